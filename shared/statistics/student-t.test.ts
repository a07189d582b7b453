import { describe, expect, it } from 'vitest'
import { normalCdf, normalQuantile, studentTCdf, studentTQuantile } from './student-t'

const relative = (value: number, exact: number) => Math.abs(value - exact) / Math.abs(exact)

describe('Student t, cumulative', () => {
  it.each([1e-8, 0.01, 0.5, 1, 3, 30, 1e4, 1e100])('has the closed form of ν = 1 and 2 at %d', (t) => {
    expect(relative(studentTCdf(-t, 1), Math.atan2(1, t) / Math.PI)).toBeLessThan(1e-12)
    const root = Math.sqrt(2 + t * t)
    expect(relative(studentTCdf(-t, 2), 1 / (root * (root + t)))).toBeLessThan(1e-12)
  })

  // Tails computed with mpmath 1.3.0 to forty digits, from the definition.
  it.each([
    [0.5, 3, 0.183654077992971724],
    [1.7, 0.3, 0.398401459198725004],
    [3.3, 4, 0.0117060761437848139],
    [34, 2, 0.0267699177352252157],
    [1000, 40, 5.23942607758668047e-210],
    [1e5, 0.9, 0.184061208976433072],
    [1e6, 10, 7.63930538408912478e-24],
  ])('keeps ten digits of the tail at ν = %d, t = %d', (dof, t, tail) => {
    expect(relative(studentTCdf(-t, dof), tail)).toBeLessThan(1e-10)
    expect(studentTCdf(t, dof)).toBeCloseTo(1 - tail, 14)
  })

  it('runs into the normal distribution without a step', () => {
    for (const t of [0.3, 2, 8]) {
      expect(relative(studentTCdf(-t, 1.0000001e8), studentTCdf(-t, 0.9999999e8))).toBeLessThan(1e-10)
      expect(relative(studentTCdf(-t, 1e300), normalCdf(-t))).toBeLessThan(1e-12)
    }
    expect(studentTCdf(2, Infinity)).toBe(normalCdf(2))
  })

  it('is a half at zero and reaches its ends', () => {
    expect(studentTCdf(0, 3.3)).toBe(0.5)
    expect(studentTCdf(Infinity, 3)).toBe(1)
    expect(studentTCdf(-Infinity, 3)).toBe(0)
  })

  it('refuses degrees of freedom that are not above zero', () => {
    expect(() => studentTCdf(1, 0)).toThrow(/above zero/)
    expect(() => studentTQuantile(0.5, Number.NaN)).toThrow(RangeError)
  })
})

describe('Student t, quantile', () => {
  // mpmath 1.3.0, forty digits.
  it.each([
    [0.975, 0.5, 164.557673480488241],
    [0.975, 1.7, 5.11883898825305707],
    [0.95, 2.5, 2.55821861413593546],
    [0.975, 34, 2.03224450931771855],
    [0.995, 1000.5, 2.58075223217431134],
    [0.975, 1e6, 1.95996635681410666],
  ])('keeps ten digits at p = %d, ν = %d', (p, dof, exact) => {
    expect(relative(studentTQuantile(p, dof), exact)).toBeLessThan(1e-12)
    expect(relative(studentTQuantile(1 - p, dof), -exact)).toBeLessThan(1e-12)
  })

  it('undoes the cumulative function for any degrees of freedom and any probability', () => {
    for (const dof of [0.5, 1, 1.7, 2, 3.3, 10, 34, 1000, 1e5, 1e7, 2e8, 1e12, Infinity]) {
      for (const p of [1e-30, 1e-6, 0.01, 0.2, 0.26, 0.499999, 0.6, 0.975, 0.999]) {
        expect(relative(studentTCdf(studentTQuantile(p, dof), dof), p)).toBeLessThan(1e-10)
      }
    }
  })

  it('says infinity at the ends, and where the point passes the largest number', () => {
    expect(studentTQuantile(0.5, 4)).toBe(0)
    expect(studentTQuantile(1, 4)).toBe(Infinity)
    expect(studentTQuantile(0, 4)).toBe(-Infinity)
    expect(studentTQuantile(1e-100, 0.1)).toBe(-Infinity)
    expect(() => studentTQuantile(1.1, 4)).toThrow(/between 0 and 1/)
  })
})

describe('normal', () => {
  // mpmath 1.3.0, forty digits.
  it.each([
    [-0.5, 0.308537538725986896],
    [-2, 0.0227501319481792072],
    [-3, 0.00134989803163009453],
    [-6, 9.86587645037698141e-10],
    [-20, 2.7536241186062337e-89],
    [1.3, 0.903199515414389674],
  ])('has Φ(%d)', (z, exact) => {
    expect(relative(normalCdf(z), exact)).toBeLessThan(1e-12)
  })

  it.each([
    [0.975, 1.95996398454005386],
    [0.95, 1.64485362695147228],
    [1e-10, -6.3613409024040562],
  ])('has the deviate of %d', (p, exact) => {
    expect(relative(normalQuantile(p), exact)).toBeLessThan(1e-12)
  })
})
