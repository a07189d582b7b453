import { describe, expect, it } from 'vitest'
import { creep, creepLimit, creepUncertainty, pressureLoss, pressureLossUncertainty } from './hold'

const reading = (pressure: number, toppedUp = false) => ({ pressure, toppedUp })

describe('pressure loss', () => {
  it('is the fall as a fraction of the pressure the hold started with', () => {
    expect(pressureLoss([reading(200), reading(197), reading(194)])).toBeCloseTo(0.03, 14)
  })

  it('is summed between top-ups, so that pumping up hides nothing', () => {
    const readings = [reading(200), reading(194), reading(200, true), reading(195), reading(201, true), reading(200)]
    expect(pressureLoss(readings)).toBeCloseTo((6 + 5 + 1) / 200, 14)
  })

  it('lets no rise in one stretch pay for a fall in another', () => {
    expect(pressureLoss([reading(200), reading(203), reading(203, true), reading(199)])).toBeCloseTo(4 / 200, 14)
    expect(pressureLoss([reading(200)])).toBe(0)
  })

  it('is uncertain by two readings for every stretch', () => {
    const one = pressureLossUncertainty([reading(200), reading(194)], 2)
    expect(one).toBeCloseTo((2 * Math.SQRT2 * 2) / Math.sqrt(12) / 200, 14)
    const two = pressureLossUncertainty([reading(200), reading(194), reading(200, true), reading(195)], 2)
    expect(two).toBeCloseTo(Math.SQRT2 * one, 14)
    expect(pressureLossUncertainty([reading(200), reading(200, true)], 2)).toBe(0)
  })

  it('refuses a hold without a start', () => {
    expect(() => pressureLoss([])).toThrow(/above zero/)
    expect(() => pressureLossUncertainty([reading(0)], 1)).toThrow(/above zero/)
  })
})

describe('creep', () => {
  const hold = { deflectionStart: 0.002, deflectionEnd: 0.00202, forceStart: 100000, forceEnd: 98000, stiffness: 5e7 }

  it('adds back what the fall of force gave back', () => {
    expect(creep(hold)).toBeCloseTo(0.00006, 12)
    expect(creep({ ...hold, stiffness: Infinity })).toBeCloseTo(0.00002, 12)
    expect(() => creep({ ...hold, stiffness: 0 })).toThrow(RangeError)
  })

  it('is uncertain by two readings of each instrument', () => {
    const U = creepUncertainty({ uDeflection: 3e-6, uForce: 200, stiffness: 5e7 })
    expect(U).toBeCloseTo(2 * Math.SQRT2 * 5e-6, 14)
    expect(() => creepUncertainty({ uDeflection: 1, uForce: 1, stiffness: -1 })).toThrow(RangeError)
  })

  it('may be a share of the deflection, but no less than two increments', () => {
    expect(creepLimit({ fraction: 0.02, stageDeflection: 0.002, increment: 0.00001 })).toBeCloseTo(0.00004, 14)
    expect(creepLimit({ fraction: 0.02, stageDeflection: 0.0005, increment: 0.00001 })).toBe(0.00002)
  })
})
