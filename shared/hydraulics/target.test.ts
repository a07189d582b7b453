import { describe, expect, it } from 'vitest'
import { toSI } from '../units'
import type { RamInput } from './ram'
import { ramForce } from './ram'
import { lowestRatingPressure, pressureWindow, readableTarget, targetPressure } from './target'

const ram: RamInput = {
  area: 0.002,
  relativeAreaTolerance: 0.004,
  rodArea: 0,
  springReturn: 400,
  springReturnTolerance: 100,
  carriedWeight: 150,
  carriedWeightTolerance: 20,
}
const psi = (text: string) => toSI({ text, unit: 'psi' })
const stage = { rams: [ram], lowerTolerance: 0.02, upperTolerance: 0.05, capPressure: Infinity }

describe('target pressure', () => {
  it('makes the force it is asked for, on one ram and on two', () => {
    for (const rams of [[ram], [ram, { ...ram, area: 0.003 }]]) {
      const pressure = targetPressure({ force: 50000, rams })
      expect(ramForce(rams.map((each) => ({ ram: each, pressure, rodPressure: 0 })))).toBeCloseTo(50000, 8)
    }
  })

  it('refuses a press without a ram', () => {
    expect(() => targetPressure({ force: 1, rams: [] })).toThrow(/bore or effective area/)
  })
})

describe('readable target', () => {
  it('rounds down to what the gauge can show and gives the force of that', () => {
    const result = readableTarget({ ...stage, force: 50000, increment: psi('50') })
    expect(result.readable).toBeLessThanOrEqual(result.exact)
    expect(result.exact - result.readable).toBeLessThan(psi('50'))
    expect(result.readable / psi('50')).toBeCloseTo(Math.round(result.readable / psi('50')), 9)
    expect(result.force).toBeCloseTo(result.readable * 0.002 - 250, 9)
    expect(result).toMatchObject({ belowTolerance: false, next: null, sentence: null })
  })

  it('keeps a target that is readable but for rounding', () => {
    const force = psi('5900') * 0.002 - 250
    const result = readableTarget({ ...stage, force, increment: psi('100') })
    expect(result.readable).toBeCloseTo(psi('5900'), 3)
  })

  it('offers the next readable value when rounding down falls under the tolerance', () => {
    // Exact target 7.9 MPa; the gauge shows whole steps of 0.8 MPa: 7.2 or 8.0.
    const force = 7.9e6 * 0.002 - 250
    const result = readableTarget({ ...stage, force, increment: 8e5, units: { pressure: 'bar', force: 'kN' } })
    expect(result.readable).toBe(7.2e6)
    expect(result.belowTolerance).toBe(true)
    expect(result.next?.pressure).toBe(8e6)
    expect(result.next?.force).toBeCloseTo(15750, 9)
    expect(result.sentence).toMatch(/72\u00a0bar makes 14.2\u00a0kN, less than the 15.2\u00a0kN .* 80\u00a0bar makes 15.8\u00a0kN/)
  })

  it('offers no value past a component’s rating and says so', () => {
    const force = 7.9e6 * 0.002 - 250
    const result = readableTarget({ ...stage, force, increment: 8e5, capPressure: 7.95e6 })
    expect(result.next).toBeNull()
    expect(result.sentence).toMatch(/lowest rating in the train/)
  })

  it('offers no value past the upper tolerance and asks for a finer gauge', () => {
    const force = 7.9e6 * 0.002 - 250
    const result = readableTarget({ ...stage, force, increment: 3e6 })
    expect(result.readable).toBe(6e6)
    expect(result.next).toBeNull()
    expect(result.sentence).toMatch(/read finer/)
  })

  it('never goes above the cap, even when the exact target does', () => {
    const result = readableTarget({ ...stage, force: 50000, increment: 1e6, capPressure: 20.5e6 })
    expect(result.exact).toBeGreaterThan(20.5e6)
    expect(result.readable).toBe(20e6)
    expect(result.belowTolerance).toBe(true)
  })

  it('says when the weight alone makes more than the stage', () => {
    const heavy = { ...ram, carriedWeight: 3000 }
    const result = readableTarget({ ...stage, rams: [heavy], force: 2000, increment: 1e5 })
    expect(result.readable).toBe(0)
    expect(result.sentence).toMatch(/already makes 2.6\u00a0kN/)
  })
})

describe('pressure window', () => {
  it('runs from the lower to the upper tolerance of the force', () => {
    const window = pressureWindow({ ...stage, force: 50000 })
    expect(window.low).toBeCloseTo((49000 + 250) / 0.002, 6)
    expect(window.high).toBeCloseTo((52500 + 250) / 0.002, 6)
    expect(window.endsAtRating).toBe(false)
  })

  it('ends at the lowest component rating', () => {
    const window = pressureWindow({ ...stage, force: 50000, capPressure: 25.5e6 })
    expect(window.high).toBe(25.5e6)
    expect(window.endsAtRating).toBe(true)
  })

  it('takes the lowest of pressure and force ratings', () => {
    expect(lowestRatingPressure({ rams: [ram], pressureRatings: [7e7, 3e7], forceRatings: [50000] })).toBe(25.125e6)
    expect(lowestRatingPressure({ rams: [ram], pressureRatings: [2e7], forceRatings: [50000] })).toBe(2e7)
    expect(lowestRatingPressure({ rams: [], pressureRatings: [], forceRatings: [] })).toBe(Infinity)
  })
})
