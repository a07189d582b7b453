import { describe, expect, it } from 'vitest'
import { firstClimb, recordedTest } from '../../tests/factories/recorded-test'
import { evaluateTest } from '../proof-test/evaluate'
import { historyOf } from '../proof-test/climb-history'
import { earlierLine, withEarlier } from './earlier-line'
import { lineFrame } from './line-frame'
import { lineDrawing } from './line-geometry'
import { recordLine } from './record-line'

const old = recordedTest({ climbs: [firstClimb] })
const history = historyOf(old.state)
const repeats = { id: old.id, number: 'PT-0041' }
const { state } = recordedTest({ climbs: [firstClimb], opened: { repeats } })
const { opened } = state
if (!opened) throw new Error('The test is opened.')
const name = ({ number }: { number: string }) => `${number}, 8 Sep 2026`
const spec = recordLine(opened, evaluateTest(state).climbs, { width: 640, height: 536 }, state)
if (!spec) throw new Error('Stages were read.')

describe('the line of the test that is repeated', () => {
  it('has the old readings in the units of the new test, the datum first', () => {
    const earlier = earlierLine(opened, 0, history, name)
    expect(earlier?.label).toBe(`${history[0]?.number}, 8 Sep 2026`)
    expect(earlier?.points).toHaveLength(firstClimb.stages.length + 1)
    // The same readings were taken twice here: the old points lie on the new ones.
    for (const [index, point] of (earlier?.points ?? []).entries()) {
      expect(point.x).toBeCloseTo(spec.points[index]?.x ?? Number.NaN, 9)
      expect(point.y).toBeCloseTo(spec.points[index]?.y ?? Number.NaN, 9)
    }
  })

  it('is left out where nothing is repeated, in another position, and where something else was measured', () => {
    expect(earlierLine({ ...opened, repeats: null }, 0, history, name)).toBeUndefined()
    expect(
      earlierLine(
        opened,
        0,
        history.map((climb) => ({ ...climb, leg: 'Ram far left' })),
        name,
      ),
    ).toBeUndefined()
    expect(earlierLine({ ...opened, net: null }, 0, history, name)).toBeUndefined()
    expect(earlierLine(opened, 0, [], name)).toBeUndefined()
  })

  it('is named on the chart, and widens the axis when it went further', () => {
    const further = {
      label: 'PT-0041, 8 Sep 2026',
      points: [
        { x: 0, y: 0 },
        { x: spec.xMax * 3, y: 75 },
      ],
    }
    const both = withEarlier(spec, further)
    expect(lineFrame(both).axis.max).toBeGreaterThanOrEqual(spec.xMax * 3)
    const items = lineDrawing(both).items
    expect(items.some((item) => item.kind === 'text' && item.text === 'PT-0041, 8 Sep 2026')).toBe(true)
    // One reading beside the datum, and one in the name's own line: hollow, where the new ones are filled.
    const hollow = items.filter((item) => item.kind === 'path' && item.fill === 'dye' && item.stroke === 'faint-scribe')
    expect(hollow).toHaveLength(2)
    expect(withEarlier(spec, undefined)).toBe(spec)
  })
})
