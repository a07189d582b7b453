import { describe, expect, it } from 'vitest'
import { toSI } from '../units'
import { clearanceLoad, clearancePressure } from './clearance'

const tons = (text: string) => toSI({ text, unit: 'short-ton' })
const base = { margin: 1, ratedLoad: tons('12'), unit: 'short-ton', decimals: 1 } as const

describe('clearance load', () => {
  it('is the lowest force less its uncertainty, rounded down', () => {
    const result = clearanceLoad({ ...base, lowestForce: tons('11.99'), U: tons('0.2') })
    expect(result).toEqual({ load: tons('11.7'), text: '11.7', unit: 'short-ton' })
  })

  it('is never above the rated load, also by a rounding', () => {
    const result = clearanceLoad({ ...base, lowestForce: tons('13'), U: tons('0.2') })
    expect(result.text).toBe('12.0')
    expect(result.load).toBeLessThanOrEqual(base.ratedLoad)
    const odd = clearanceLoad({ ...base, lowestForce: tons('13'), U: 0, ratedLoad: tons('11.96') })
    expect(odd.text).toBe('11.9')
  })

  it('is divided by the margin', () => {
    expect(clearanceLoad({ ...base, lowestForce: tons('12'), U: 0, margin: 1.25 }).text).toBe('9.6')
  })

  it('is nothing when the uncertainty takes all of it', () => {
    expect(clearanceLoad({ ...base, lowestForce: 100, U: 200 })).toMatchObject({ load: 0, text: '0.0' })
  })

  it('refuses a margin that would clear more than was carried', () => {
    expect(() => clearanceLoad({ ...base, lowestForce: 1, U: 0, margin: 0.9 })).toThrow(/more than was carried/)
    expect(() => clearanceLoad({ ...base, lowestForce: 1, U: -1 })).toThrow(/below zero/)
    expect(() => clearanceLoad({ ...base, lowestForce: Number.NaN, U: 0 })).toThrow(RangeError)
  })
})

describe('clearance pressure', () => {
  const ram = {
    area: 0.002,
    relativeAreaTolerance: 0.004,
    rodArea: 0,
    springReturn: 400,
    springReturnTolerance: 0,
    carriedWeight: 150,
    carriedWeightTolerance: 0,
  }

  it('rounds down to what can be read and makes no more than the load', () => {
    const result = clearancePressure({ load: 100000, rams: [ram], increment: 1e6 })
    expect(result.pressure).toBe(50e6)
    expect(result.force).toBe(99750)
  })

  it('is never below zero', () => {
    expect(clearancePressure({ load: 0, rams: [{ ...ram, springReturn: 0 }], increment: 1e6 }).pressure).toBe(0)
  })
})
