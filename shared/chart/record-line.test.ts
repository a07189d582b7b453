import { describe, expect, it } from 'vitest'
import { firstClimb, recordedTest, repeatClimb, type ClimbScript } from '../../tests/factories/recorded-test'
import { evaluateTest } from '../proof-test/evaluate'
import { lineDrawing } from './line-geometry'
import type { LineChartSpec } from './line-spec'
import { recordLine } from './record-line'

function specOf(climbs: readonly ClimbScript[], width = 640): LineChartSpec {
  const { state } = recordedTest({ climbs })
  const spec = state.opened && recordLine(state.opened, evaluateTest(state).climbs, { width, height: 536 }, state)
  if (!spec) throw new Error('Stages were read in this test.')
  return spec
}

const wordsOf = (spec: LineChartSpec): string[] => lineDrawing(spec).items.flatMap((item) => (item.kind === 'text' ? [item.text] : []))
const why = 'Digits swapped when typed.'

describe('a reading that was corrected', () => {
  it('bears the letter of its correction on the line, and the foot says what letters mean', () => {
    const spec = specOf([firstClimb, repeatClimb])
    expect(spec.points.map(({ corrected }) => corrected)).toEqual([undefined, undefined, 'a', undefined, undefined])
    expect(wordsOf(spec)).toEqual(expect.arrayContaining(['a', 'Letter: corrected, see Corrections']))
    // The second correction is of the end of a hold, which is not a point of the line.
    expect(wordsOf(spec)).not.toContain('b')
  })

  it('bears every letter when it was corrected twice, and on the repeat climb too', () => {
    const [quarter, ...rest] = repeatClimb.stages
    if (!quarter) throw new Error('A climb has stages.')
    const [gauge, middle, left, right] = quarter.start
    const twice: typeof quarter = {
      ...quarter,
      start: [gauge, '5.01', left, right],
      corrections: [
        { row: 'start', column: 1, to: '5.02', why },
        { row: 'start', column: 1, to: middle, why },
      ],
    }
    const spec = specOf([firstClimb, { ...repeatClimb, stages: [twice, ...rest] }])
    expect(spec.comparison?.map(({ corrected }) => corrected)).toEqual([undefined, 'c d', ...rest.map(() => undefined)])
    expect(wordsOf(spec)).toContain('c d')
  })

  it('leaves no letter and no foot where nothing was corrected', () => {
    const stages = firstClimb.stages.map(({ corrections: _none, ...stage }, index) =>
      index === 1 ? { ...stage, start: ['3900', '1.08', '0.23', '0.19'] as const } : stage,
    )
    const spec = specOf([{ ...firstClimb, stages }])
    expect(spec.points.every(({ corrected }) => corrected === undefined)).toBe(true)
    expect(wordsOf(spec).some((text) => text.startsWith('Letter'))).toBe(false)
  })
})

describe('the load at the top stage', () => {
  it('has its unit below it where the two would run over the axis', () => {
    const wide = specOf([firstClimb, repeatClimb])
    expect(wordsOf(wide)).toContain('12.00 short tons')
    const narrow = wordsOf(specOf([firstClimb, repeatClimb], 370))
    expect(narrow).toEqual(expect.arrayContaining(['12.00', 'short tons']))
    expect(narrow).not.toContain('12.00 short tons')
  })
})
