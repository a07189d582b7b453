import { describe, expect, it } from 'vitest'
import { ids, openedPayload } from '../../tests/factories/test-press'
import { testId } from '../../tests/factories/ledger-builder'
import type { Opened } from './entries'
import { forceOf, stageTarget } from './force'
import { turnMiscount } from './turns'

const PSI = 6894.757293168
const area = (boreMm: number): number => (Math.PI * (boreMm / 1000) ** 2) / 4

/** The example press with a second ram of 40 mm bore, isolated, on a gauge of its own. */
function twoRams(): Opened {
  const opened = openedPayload()
  const [ram] = opened.press.rams
  const [gauge] = opened.instruments
  if (!ram || !gauge) throw new Error('The example has a ram and a gauge.')
  const second = { ...ram, id: testId(4, 2), name: 'Ram 2', bore: { text: '40', unit: 'mm' as const } }
  return {
    ...opened,
    press: { ...opened.press, rams: [ram, second] },
    instruments: [...opened.instruments, { ...gauge, id: testId(5, 9) }],
    forceInstrumentIds: [ids.gauge, testId(5, 9)],
  }
}

describe('isolated rams', () => {
  const opened = twoRams()
  const reading = (sourceId: string, text: string) => ({ sourceId, text, unit: 'psi' as const })

  it('make the sum of their own pressures times their own areas', () => {
    const force = forceOf(opened, [reading(ids.gauge, '4000'), reading(testId(5, 9), '3000')])
    expect(force?.force).toBeCloseTo(4000 * PSI * area(50) + 3000 * PSI * area(40), 3)
  })

  it('have no force until every gauge is read', () => {
    expect(forceOf(opened, [reading(ids.gauge, '4000')])).toBeNull()
  })

  it('are pumped to one pressure that makes the stage together, and their errors add as squares', () => {
    const target = stageTarget(opened, 50)
    expect(target?.readableForce).toBeCloseTo(Number(target?.text) * PSI * (area(50) + area(40)), 0)
    const both = forceOf(opened, [reading(ids.gauge, '4000'), reading(testId(5, 9), '4000')])
    const first = forceOf({ ...opened, press: { ...opened.press, rams: opened.press.rams.slice(0, 1) }, forceInstrumentIds: [ids.gauge] }, [
      reading(ids.gauge, '4000'),
    ])
    expect(both?.u).toBeLessThan(2 * (first?.u ?? 0))
    expect(both?.u).toBeGreaterThan(first?.u ?? 0)
  })

  it('deliver at least the friction allowance less', () => {
    const force = forceOf(opened, [reading(ids.gauge, '4000'), reading(testId(5, 9), '4000')])
    expect(force?.deliveredAtLeast).toBeCloseTo((force?.force ?? 0) * 0.95, 3)
  })
})

describe('a turn that was not counted', () => {
  const opened = openedPayload()
  const prediction = { deflection: 0.00132, halfWidth: 0.00008 }

  it('is named, with the size of the turn', () => {
    expect(turnMiscount(opened, ids.middle, 0.00033, prediction)).toMatch(/one whole turn of the dial \(1\smm\)/)
    expect(turnMiscount(opened, ids.middle, 0.00234, prediction)).toContain('Count the turns')
  })

  it('is not suspected where the reading is as predicted or elsewhere', () => {
    expect(turnMiscount(opened, ids.middle, 0.0013, prediction)).toBeNull()
    expect(turnMiscount(opened, ids.middle, 0.0018, prediction)).toBeNull()
  })
})
