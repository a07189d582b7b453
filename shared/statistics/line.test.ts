import { describe, expect, it } from 'vitest'
import { fitLine, predictAt, predictReading } from './line'

const points = [
  { x: 0, y: 0.1 },
  { x: 1, y: 0.9 },
  { x: 2, y: 2.2 },
  { x: 3, y: 2.9 },
  { x: 4, y: 4.1 },
]

describe('line through readings', () => {
  it('solves a small case by hand', () => {
    const fit = fitLine(points)
    expect(fit.slope).toBeCloseTo(1, 14)
    expect(fit.intercept).toBeCloseTo(0.04, 14)
    // Residuals 0.06, −0.14, 0.16, −0.14, 0.06.
    expect(fit.residualSd).toBeCloseTo(Math.sqrt(0.072 / 3), 14)
    expect(fit.seSlope).toBeCloseTo(Math.sqrt(0.024 / 10), 14)
    expect(fit.seIntercept).toBeCloseTo(Math.sqrt(0.024 * (1 / 5 + 4 / 10)), 14)
    expect(fit).toMatchObject({ dof: 3, n: 5, meanX: 2, sxx: 10, throughOrigin: false })
  })

  it('keeps its digits when the load is far from zero', () => {
    const fit = fitLine(points.map(({ x, y }) => ({ x: x + 1e8, y })))
    expect(fit.slope).toBeCloseTo(1, 12)
  })

  it('says what it cannot know from two points', () => {
    const fit = fitLine(points.slice(0, 2))
    expect(fit).toMatchObject({ dof: 0, residualSd: null, seSlope: null, seIntercept: null, r2: 1 })
    expect(predictAt(fit, 2).halfWidthPrediction).toBe(Infinity)
    expect(predictAt(fit, 2).y).toBeCloseTo(1.7, 14)
  })

  it('has no coefficient of determination where nothing moved', () => {
    expect(fitLine(points.map(({ x }) => ({ x, y: 0 }))).r2).toBeNull()
  })

  it('refuses with a sentence what cannot be fitted', () => {
    expect(() => fitLine([{ x: 1, y: 1 }])).toThrow('A line needs 2 points; there are 1.')
    expect(() => fitLine([], { intercept: false })).toThrow(/needs 1 points/)
    expect(() =>
      fitLine([
        { x: 1, y: 1 },
        { x: 1, y: 2 },
      ]),
    ).toThrow(/same load/)
    expect(() =>
      fitLine([
        { x: 1, y: Number.NaN },
        { x: 2, y: 2 },
      ]),
    ).toThrow(/isn’t a number/)
  })
})

describe('prediction', () => {
  it('is wider for a reading than for the line, and wider away from the middle', () => {
    const fit = fitLine(points)
    const inside = predictAt(fit, 2)
    const beyond = predictAt(fit, 6)
    expect(inside.halfWidthPrediction).toBeGreaterThan(inside.halfWidthMean)
    expect(beyond.halfWidthPrediction).toBeGreaterThan(inside.halfWidthPrediction)
    expect(predictAt(fit, 6, 0.99).halfWidthMean).toBeGreaterThan(beyond.halfWidthMean)
    expect(() => predictAt(fit, 6, 1)).toThrow(/between 0 and 1/)
  })

  it('rests on the readings below three degrees of freedom, and says so', () => {
    const result = predictReading(fitLine(points.slice(0, 4)), 4, 0.05)
    expect(result.basis).toBe('readings')
    expect(result.halfWidth).toBeCloseTo(0.1 * Math.sqrt(1 + 1 / 4 + 2.5 ** 2 / 5), 12)
  })

  it('rests on the scatter from three on, unless the readings are worse than it', () => {
    const fit = fitLine(points)
    expect(predictReading(fit, 5, 0.001)).toEqual({
      y: expect.closeTo(5.04, 12),
      halfWidth: predictAt(fit, 5).halfWidthPrediction,
      basis: 'scatter',
    })
    expect(predictReading(fit, 5, 1).basis).toBe('readings')
  })
})
