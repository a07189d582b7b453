import { studentTQuantile } from './student-t'

export type Point = { x: number; y: number }

/** A straight line through readings. With deflection (m) on force (N), 1/slope is the stiffness. */
export type LineFit = {
  slope: number
  /** Deflection at no force: the slack. 0 for a line through the origin. */
  intercept: number
  /** Standard errors; null without a degree of freedom. */
  seSlope: number | null
  seIntercept: number | null
  /** Coefficient of determination (about zero for a line through the origin); null when y never changes. */
  r2: number | null
  /** Residual standard deviation; null without a degree of freedom. */
  residualSd: number | null
  /** Degrees of freedom. */
  dof: number
  n: number
  /** Mean of x, and the sum of squares about it; about zero for a line through the origin. */
  meanX: number
  sxx: number
  throughOrigin: boolean
}

/** Sum with the rounding error carried along (Neumaier's variant of Kahan's sum). */
function sum(values: readonly number[]): number {
  let total = 0
  let lost = 0
  for (const value of values) {
    const next = total + value
    lost += Math.abs(total) >= Math.abs(value) ? total - next + value : value - next + total
    total = next
  }
  return total + lost
}

/**
 * Least squares of y on x, centred on the means so that nothing cancels; through the origin when
 * `intercept` is false. Units: whatever x and y have (N and m for deflection on force).
 * Source: NIST/SEMATECH e-Handbook of Statistical Methods, 4.1.4.1; checked against NIST StRD Norris
 * and NoInt1.
 * @throws RangeError when there are too few points, a value isn't a number, or x never changes.
 */
export function fitLine(points: readonly Point[], options: { intercept?: boolean } = {}): LineFit {
  const throughOrigin = options.intercept === false
  const parameters = throughOrigin ? 1 : 2
  const n = points.length
  if (n < parameters) throw new RangeError(`A line needs ${parameters} points; there are ${n}.`)
  if (points.some(({ x, y }) => !Number.isFinite(x) || !Number.isFinite(y))) {
    throw new RangeError('A point of the line isn’t a number.')
  }
  const meanX = throughOrigin ? 0 : sum(points.map(({ x }) => x)) / n
  const meanY = throughOrigin ? 0 : sum(points.map(({ y }) => y)) / n
  const sxx = sum(points.map(({ x }) => (x - meanX) ** 2))
  if (!(sxx > 0)) throw new RangeError('All points are at the same load: no line can be drawn.')
  const slope = sum(points.map(({ x, y }) => (x - meanX) * (y - meanY))) / sxx
  const intercept = throughOrigin ? 0 : meanY - slope * meanX
  const squaresLeft = sum(points.map(({ x, y }) => (y - meanY - slope * (x - meanX)) ** 2))
  const squaresTotal = sum(points.map(({ y }) => (y - meanY) ** 2))
  const dof = n - parameters
  const residualSd = dof > 0 ? Math.sqrt(squaresLeft / dof) : null
  return {
    slope,
    intercept,
    seSlope: residualSd === null ? null : residualSd / Math.sqrt(sxx),
    seIntercept: residualSd === null || throughOrigin ? null : residualSd * Math.sqrt(1 / n + meanX ** 2 / sxx),
    r2: squaresTotal > 0 ? 1 - squaresLeft / squaresTotal : null,
    residualSd,
    dof,
    n,
    meanX,
    sxx,
    throughOrigin,
  }
}

/** The line's own variance at x, as a multiple of the variance of one reading. */
function leverage(fit: LineFit, x: number): number {
  return (fit.throughOrigin ? 0 : 1 / fit.n) + (x - fit.meanX) ** 2 / fit.sxx
}

export type Prediction = {
  y: number
  /** Half-width of the interval for the line itself. */
  halfWidthMean: number
  /** Half-width of the interval for one further reading. */
  halfWidthPrediction: number
}

/**
 * What the line says at x, with two-sided intervals from the scatter of its points. Without a degree
 * of freedom both half-widths are infinite: the points say nothing about their scatter.
 * Source: NIST/SEMATECH e-Handbook, 4.1.4.1 and 5.5.9.1; Student t, 1.3.6.7.2.
 * @throws RangeError when the confidence is not between 0 and 1.
 */
export function predictAt(fit: LineFit, x: number, confidence = 0.95): Prediction {
  if (!(confidence > 0 && confidence < 1)) throw new RangeError('A confidence lies between 0 and 1.')
  const y = fit.intercept + fit.slope * x
  if (fit.residualSd === null) return { y, halfWidthMean: Infinity, halfWidthPrediction: Infinity }
  const reach = studentTQuantile((1 + confidence) / 2, fit.dof) * fit.residualSd
  const own = leverage(fit, x)
  return {
    y,
    halfWidthMean: reach * Math.sqrt(own),
    halfWidthPrediction: reach * Math.sqrt(1 + own),
  }
}

/** Fewest degrees of freedom at which the scatter of the points is believed. */
export const LEAST_DEGREES_OF_FREEDOM = 3

export type ReadingPrediction = {
  y: number
  halfWidth: number
  /** What the half-width rests on: the points' own scatter, or the uncertainty of the readings. */
  basis: 'scatter' | 'readings'
}

/**
 * The band in which a further reading is expected at x. `uReading` is the standard uncertainty of one
 * reading in y, its force's uncertainty included. Below three degrees of freedom the readings' own
 * uncertainty (2·u) is used and not the scatter, and above that wherever it is the wider of the two:
 * points that lie closer to a line than they can be read prove nothing.
 * Source: as `predictAt`; the choice is common practice, no source.
 * @throws RangeError when the confidence is not between 0 and 1.
 */
export function predictReading(fit: LineFit, x: number, uReading: number, confidence = 0.95): ReadingPrediction {
  const { y, halfWidthPrediction } = predictAt(fit, x, confidence)
  const fromReadings = 2 * uReading * Math.sqrt(1 + leverage(fit, x))
  return fit.dof < LEAST_DEGREES_OF_FREEDOM || halfWidthPrediction < fromReadings
    ? { y, halfWidth: fromReadings, basis: 'readings' }
    : { y, halfWidth: halfWidthPrediction, basis: 'scatter' }
}
