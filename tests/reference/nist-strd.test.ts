import { describe, expect, it } from 'vitest'
import { fitLine, predictAt } from '#shared/statistics/line'
import noint from '../../fixtures/reference/nist-strd-noint1.json'
import norris from '../../fixtures/reference/nist-strd-norris.json'
import { comparedWith } from '../support/outside-values'

const points = (data: number[][]) => data.map(([x = 0, y = 0]) => ({ x, y }))

const SOURCE = 'NIST StRD, certified values'

/** Digits that agree: −log10 of the relative error (NIST's "log relative error"). */
const digits = (source: string, value: number | null, certified: number) =>
  Math.min(15, -Math.log10(comparedWith(source, value, certified)))

describe('line fit against NIST StRD, linear least squares', () => {
  it('Norris (lower difficulty): ten digits of every certified value', () => {
    const fit = fitLine(points(norris.data))
    const { certified } = norris
    expect(fit).toMatchObject({ n: certified.n, dof: certified.df })
    expect(digits(SOURCE, fit.intercept, certified.b0)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.slope, certified.b1)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.seIntercept, certified.seB0)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.seSlope, certified.seB1)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.residualSd, certified.s)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.r2, certified.r2)).toBeGreaterThan(10)
    expect(digits(SOURCE, (fit.residualSd ?? 0) ** 2 * fit.dof, certified.sse)).toBeGreaterThan(10)
    expect(digits(SOURCE, (fit.slope / (fit.seSlope ?? 1)) ** 2, certified.F)).toBeGreaterThan(10)
  })

  it('NoInt1 (average difficulty, through the origin): ten digits of every certified value', () => {
    const fit = fitLine(points(noint.data), { intercept: false })
    const { certified } = noint
    expect(fit).toMatchObject({ n: certified.n, dof: certified.df, intercept: 0, seIntercept: null })
    expect(digits(SOURCE, fit.slope, certified.b1)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.seSlope, certified.seB1)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.residualSd, certified.s)).toBeGreaterThan(10)
    expect(digits(SOURCE, fit.r2, certified.r2)).toBeGreaterThan(10)
    expect(digits(SOURCE, (fit.slope / (fit.seSlope ?? 1)) ** 2, certified.F)).toBeGreaterThan(10)
    const atSixty = predictAt(fit, 60)
    expect(atSixty.halfWidthMean / 60).toBeCloseTo(2.228138852 * certified.seB1, 9)
  })

  // Derived from the Norris data in double precision, not certified by NIST.
  it.each(norris.derivedNotCertified.predictionIntervals)('Norris: prediction interval at x = $x0', (row) => {
    const prediction = predictAt(fitLine(points(norris.data)), row.x0, 2 * row.p - 1)
    expect(digits('NIST StRD data, intervals computed beside it', prediction.y, row.yHat)).toBeGreaterThan(10)
    expect(digits('NIST StRD data, intervals computed beside it', prediction.halfWidthMean, row.halfMean)).toBeGreaterThan(10)
    expect(digits('NIST StRD data, intervals computed beside it', prediction.halfWidthPrediction, row.halfPred)).toBeGreaterThan(10)
  })
})
