import { describe, expect, it } from 'vitest'
import { axisTicks, dialTicks, divides, multiples } from './ticks'

describe('ticks of a gauge', () => {
  it('draws a 15,000 psi gauge with a tick every 100, as it is read', () => {
    expect(dialTicks(15_000, 100)).toEqual({ minor: 100, medium: 500, major: 1000, label: 5000 })
  })

  it('draws a 400 bar gauge with a tick every 5', () => {
    expect(dialTicks(400)).toEqual({ minor: 5, medium: 25, major: 50, label: 100 })
  })

  it.each([1.6, 2.5, 4, 6, 10, 16, 25, 40, 60, 100, 160, 250, 400, 600, 700, 1000, 1600, 3000, 5000, 6000, 10_000, 15_000, 20_000, 30_000])(
    'divides a full scale of %d without a remainder, labels a few of its ticks and stays readable',
    (fullScale) => {
      const { minor, medium, major, label } = dialTicks(fullScale)
      expect(divides(major, fullScale)).toBe(true)
      expect(divides(minor, major)).toBe(true)
      expect(divides(major, label)).toBe(true)
      if (medium !== null) expect(divides(minor, medium)).toBe(true)
      expect(fullScale / minor).toBeLessThanOrEqual(200)
      expect(fullScale / label).toBeGreaterThanOrEqual(2)
      expect(fullScale / label).toBeLessThanOrEqual(8)
    },
  )

  it('draws its own ticks where those that can be read would stand too close', () => {
    expect(dialTicks(15_000, 10).minor).toBe(100)
  })

  it('refuses a gauge without a full scale', () => {
    expect(() => dialTicks(0)).toThrow(RangeError)
    expect(() => dialTicks(100, 0)).toThrow(RangeError)
  })
})

describe('ticks of an axis', () => {
  it('reaches past what has to be shown, in round steps', () => {
    const ticks = axisTicks(1.77)
    expect(ticks.labels).toEqual([0, 0.5, 1, 1.5, 2])
    expect(ticks).toMatchObject({ max: 2, minorStep: 0.1, decimals: 1 })
  })

  it('shows a deflection of hundredths with the decimals it needs', () => {
    expect(axisTicks(0.07)).toMatchObject({ max: 0.08, decimals: 2 })
  })

  it('counts multiples from and to, ends included, without binary dust', () => {
    expect(multiples(0.1, 0, 0.3)).toEqual([0, 0.1, 0.2, 0.3])
  })

  it('refuses an axis of no length', () => {
    expect(() => axisTicks(0)).toThrow(RangeError)
  })
})
