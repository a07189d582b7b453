import cdf from '@stdlib/stats-base-dists-t-cdf'
import quantile from '@stdlib/stats-base-dists-t-quantile'
import fc from 'fast-check'
import { jStat } from 'jstat'
import { unit } from 'mathjs'
import { linearRegression, linearRegressionLine, rSquared } from 'simple-statistics'
import { describe, expect, it } from 'vitest'
import { fitLine } from '#shared/statistics/line'
import { studentTCdf, studentTQuantile } from '#shared/statistics/student-t'
import { convert, toSI, toUnit, type Unit } from '#shared/units'
import { comparedWith } from '../support/outside-values'

const SEED = 20260915

/** The units as mathjs writes them; it has no ton of force, so those are built of what the words mean. */
const IN_MATHJS: Record<Exclude<Unit, 'C' | 'F'>, readonly [times: number, name: string]> = {
  N: [1, 'N'],
  kN: [1, 'kN'],
  lbf: [1, 'lbf'],
  'short-ton': [2000, 'lbf'],
  'long-ton': [2240, 'lbf'],
  'metric-ton-force': [1000, 'kgf'],
  Pa: [1, 'Pa'],
  kPa: [1, 'kPa'],
  bar: [1, 'bar'],
  MPa: [1, 'MPa'],
  // Its own psi is off in the eleventh digit (6894.75729276459 for 6894.75729316836): a pound-force on a square inch is not.
  psi: [1, 'lbf/in^2'],
  mm: [1, 'mm'],
  in: [1, 'in'],
  m: [1, 'm'],
  mm2: [1, 'mm^2'],
  in2: [1, 'in^2'],
  kg: [1, 'kg'],
  lb: [1, 'lb'],
  J: [1, 'J'],
  'ft-lbf': [1, 'ft lbf'],
}
const units = Object.entries(IN_MATHJS).map(([name, mathjs]) => ({ name: name as keyof typeof IN_MATHJS, mathjs }))

describe('units against mathjs', () => {
  it.each(units)('$name', ({ name, mathjs: [times, theirs] }) => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 99_999_999 }), fc.integer({ min: 0, max: 4 }), (digits, decimals) => {
        const text = (digits / 10 ** decimals).toFixed(decimals)
        const expected = unit(Number(text) * times, theirs)
          .toSI()
          .toNumber()
        const si = toSI({ text, unit: name })
        expect(comparedWith('mathjs, units', si, expected)).toBeLessThan(1e-14)
        expect(comparedWith('mathjs, units', toUnit(expected, name), Number(text))).toBeLessThan(1e-14)
      }),
      { seed: SEED, numRuns: 25 },
    )
  })

  it.each([-40, 0, 20, 37.5, 212])('%d °F in °C', (fahrenheit) => {
    const expected = unit(fahrenheit, 'degF').toNumber('degC')
    // 32 °F comes out of the library as a rounding error about zero.
    expect(Math.abs(convert(fahrenheit, 'F', 'C') - expected)).toBeLessThan(1e-12)
    comparedWith('mathjs, units', convert(fahrenheit, 'F', 'C') + 273.15, expected + 273.15)
  })
})

describe(`Student t against @stdlib, to 8 digits (fast-check, seed ${SEED})`, () => {
  const SOURCE = '@stdlib, Student t'
  const dofs = fc.oneof(fc.integer({ min: 1, max: 200 }), fc.double({ min: 1, max: 200, noNaN: true }))

  it('quantiles', () => {
    fc.assert(
      fc.property(dofs, fc.double({ min: 0.501, max: 0.9995, noNaN: true }), (dof, p) => {
        expect(comparedWith(SOURCE, studentTQuantile(p, dof), quantile(p, dof))).toBeLessThan(1e-8)
      }),
      { seed: SEED, numRuns: 500 },
    )
  })

  it('probabilities, far into the tails', () => {
    fc.assert(
      fc.property(dofs, fc.double({ min: -20, max: 20, noNaN: true }), (dof, t) => {
        expect(comparedWith(SOURCE, studentTCdf(t, dof), cdf(t, dof))).toBeLessThan(1e-8)
      }),
      { seed: SEED, numRuns: 500 },
    )
  })

  // jstat stops its own search at about 8 digits, so it is asked for 7.
  it('quantiles as jstat, to 7 digits', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 60 }), fc.double({ min: 0.6, max: 0.9995, noNaN: true }), (dof, p) => {
        expect(comparedWith('jstat, Student t', studentTQuantile(p, dof), jStat.studentt.inv(p, dof))).toBeLessThan(1e-7)
      }),
      { seed: SEED, numRuns: 200 },
    )
  })
})

/** Readings as a climb gives them: loads that rise, deflections near a line with slack and scatter. */
const climbs = fc
  .record({
    slope: fc.double({ min: 0.1, max: 10, noNaN: true }),
    slack: fc.double({ min: -2, max: 2, noNaN: true }),
    steps: fc.array(fc.tuple(fc.double({ min: 0.5, max: 20, noNaN: true }), fc.integer({ min: -50, max: 50 })), {
      minLength: 4,
      maxLength: 40,
    }),
  })
  .map(({ slope, slack, steps }) => {
    let x = 0
    return steps.map(([step, scatter]) => {
      x += step
      return { x, y: slack + slope * x + scatter / 100 }
    })
  })
  // Points on one line leave only the libraries' rounding to compare.
  .filter((points) => (fitLine(points).residualSd ?? 0) > 1e-3)

describe(`least squares against registry libraries, on random climbs (fast-check, seed ${SEED})`, () => {
  it('slope, intercept and R² as simple-statistics', () => {
    fc.assert(
      fc.property(climbs, (points) => {
        const pairs = points.map(({ x, y }) => [x, y])
        const { m, b } = linearRegression(pairs)
        const fit = fitLine(points)
        const middle = points.reduce((sum, { x }) => sum + x, 0) / points.length
        expect(comparedWith('simple-statistics, regression', fit.slope, m)).toBeLessThan(1e-9)
        // An intercept can lie next to zero: it is measured against the size of y.
        expect(Math.abs(fit.intercept - b) / Math.abs(m * middle)).toBeLessThan(1e-9)
        comparedWith('simple-statistics, regression', fit.intercept + fit.slope * middle, b + m * middle)
        expect(comparedWith('simple-statistics, regression', fit.r2, rSquared(pairs, linearRegressionLine({ m, b })))).toBeLessThan(1e-9)
      }),
      { seed: SEED, numRuns: 300 },
    )
  })

  it('standard errors and residual standard deviation as jstat', () => {
    fc.assert(
      fc.property(climbs, (points) => {
        const theirs = jStat.models.ols(
          points.map(({ y }) => y),
          points.map(({ x }) => [1, x]),
        )
        const fit = fitLine(points)
        const [, slope = NaN] = theirs.coef
        const [seIntercept = NaN, seSlope = NaN] = theirs.t.se
        expect(comparedWith('jstat, regression', fit.slope, slope)).toBeLessThan(1e-8)
        // The library inverts a matrix, and takes the scatter as a difference of sums: that costs it digits.
        expect(comparedWith('jstat, regression', fit.residualSd, theirs.t.sigmaHat)).toBeLessThan(1e-6)
        expect(comparedWith('jstat, regression', fit.seSlope, seSlope)).toBeLessThan(1e-6)
        expect(comparedWith('jstat, regression', fit.seIntercept, seIntercept)).toBeLessThan(1e-6)
      }),
      { seed: SEED, numRuns: 300 },
    )
  })
})
