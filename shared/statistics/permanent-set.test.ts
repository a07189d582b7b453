import { describe, expect, it } from 'vitest'
import { indicatorTooCoarse, secondSetVanishes, setIsResolved, setLimit } from './permanent-set'

describe('permanent set', () => {
  it('is limited to a share of the full deflection, but no less than two increments', () => {
    expect(setLimit({ fraction: 0.05, fullDeflection: 0.002, increment: 0.00001 })).toBeCloseTo(0.0001, 14)
    expect(setLimit({ fraction: 0.05, fullDeflection: 0.002, increment: 0.0001 })).toBe(0.0002)
  })

  it('needs a finer indicator when two increments are more than the share', () => {
    expect(indicatorTooCoarse({ fraction: 0.05, fullDeflection: 0.002, increment: 0.00005 })).toBe(false)
    expect(indicatorTooCoarse({ fraction: 0.05, fullDeflection: 0.002, increment: 0.00006 })).toBe(true)
  })

  it('vanishes the second time when it is within its uncertainty, either way', () => {
    expect(secondSetVanishes({ set: 0.00001, U: 0.00001 })).toBe(true)
    expect(secondSetVanishes({ set: -0.00002, U: 0.00001 })).toBe(false)
    expect(setIsResolved({ set: 0.00002, U: 0.00001 })).toBe(true)
  })
})
