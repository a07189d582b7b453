import { ramForce } from './ram'
import type { RamInput } from './ram'

/** One line of an uncertainty budget. `value` and `u` in the unit of the result (N or m). */
export type BudgetLine = {
  name: string
  /** Half-width of a rectangular distribution, or the certificate's U, as it acts on the result. */
  value: number
  distribution: 'rectangular' | 'normal'
  /** Standard uncertainty of the result from this line. */
  u: number
  /** This line's part of the variance, 0 to 1. */
  share: number
}

/** A calibration certificate's expanded uncertainty and its coverage factor, in the instrument's SI unit. */
export type CertificateUncertainty = {
  U: number
  k: number
  /** The largest error on the certificate that readings aren't corrected for; rectangular, default 0. */
  uncorrectedError?: number | undefined
}

export type ForceUncertainty = {
  /** Force, N. */
  force: number
  /** Combined standard uncertainty, N. */
  u: number
  /** Expanded uncertainty, N: 2·u. */
  U: number
  k: 2
  budget: BudgetLine[]
  /**
   * Standard uncertainty that differs from reading to reading (resolution only), N: what is left
   * when two readings of the same instrument and ram are compared.
   */
  uIndependent: number
}

const ROOT_3 = Math.sqrt(3)

type Source = { name: string; value: number; distribution: 'rectangular' | 'normal'; u: number }

const rectangular = (name: string, halfWidth: number): Source => ({
  name,
  value: Math.abs(halfWidth),
  distribution: 'rectangular',
  u: Math.abs(halfWidth) / ROOT_3,
})

/** The root sum of squares of standard uncertainties. */
function combine(sources: readonly { u: number }[]): number {
  return Math.sqrt(sources.reduce((sum, { u }) => sum + u * u, 0))
}

function toBudget(sources: readonly Source[]): BudgetLine[] {
  const variance = combine(sources) ** 2
  return sources.filter(({ u }) => u > 0).map((source) => ({ ...source, share: source.u ** 2 / variance }))
}

/** What the instrument itself may be wrong by: its certificate if there is one, else its error limit. */
function instrumentSources(
  name: string,
  sensitivity: number,
  input: { errorLimit: number; certificate?: CertificateUncertainty | null | undefined },
): Source[] {
  const { certificate } = input
  if (!certificate) return [rectangular(name, sensitivity * input.errorLimit)]
  if (!(certificate.k > 0)) throw new RangeError('A certificate’s coverage factor is above zero.')
  const U = sensitivity * certificate.U
  return [
    { name: `${name} (certificate)`, value: U, distribution: 'normal', u: U / certificate.k },
    rectangular(`${name} (error not corrected)`, sensitivity * (certificate.uncorrectedError ?? 0)),
  ]
}

function result(force: number, sources: readonly Source[], uIndependent: number): ForceUncertainty {
  const u = combine(sources)
  return { force, u, U: 2 * u, k: 2, budget: toBudget(sources), uIndependent }
}

/**
 * Force of the rams on one manifold with its uncertainty, N.
 * `pressure` and `rodPressure` (0 when vented), `errorLimit` (the gauge's, rectangular half-width)
 * and `readableIncrement` in Pa; a `certificate` (U in Pa, and k) takes the place of the error limit.
 * u² = (ΣA·u_P)² + Σ(P·A·u_A/A)² + Σu_spring² + Σu_weight², U = 2u: the gauge's error is common to
 * all rams it reads, areas, springs and weights are each ram's own.
 * Source: JCGM 100:2008 (GUM), 4.3.7, 5.1.2 and 6.2; checked against JCGM 101.
 * @throws RangeError when the certificate's k is not above zero.
 */
export function forceUncertainty(input: {
  rams: readonly RamInput[]
  pressure: number
  rodPressure?: number | undefined
  errorLimit: number
  certificate?: CertificateUncertainty | null | undefined
  readableIncrement: number
}): ForceUncertainty {
  const { rams, pressure, rodPressure = 0 } = input
  const area = rams.reduce((sum, ram) => sum + ram.area, 0)
  const reading = rectangular('half of the gauge’s readable increment', (area * input.readableIncrement) / 2)
  const sources = [...instrumentSources('gauge', area, input), reading]
  rams.forEach((ram, index) => {
    const which = rams.length === 1 ? '' : `, ram ${index + 1}`
    sources.push(
      rectangular(`bore${which}`, pressure * ram.area * ram.relativeAreaTolerance),
      rectangular(`return springs${which}`, ram.springReturnTolerance),
      rectangular(`carried weight${which}`, ram.carriedWeightTolerance),
    )
  })
  const force = ramForce(rams.map((ram) => ({ ram, pressure, rodPressure })))
  return result(force, sources, reading.u)
}

/**
 * Force read by a load cell with its uncertainty, N: no area, no springs.
 * `reading`, `errorLimit` (rectangular half-width), `increment` and the `certificate`'s U in N.
 * Source: JCGM 100:2008, 4.3.7 and 6.2.
 * @throws RangeError when the certificate's k is not above zero.
 */
export function loadCellUncertainty(input: {
  reading: number
  errorLimit: number
  certificate?: CertificateUncertainty | null | undefined
  increment: number
}): ForceUncertainty {
  const resolution = rectangular('half of the load cell’s increment', input.increment / 2)
  const sources = [...instrumentSources('load cell', 1, input), resolution]
  return result(input.reading, sources, resolution.u)
}

/**
 * Forces of isolated manifolds, each with a gauge of its own, acting together, N. Their errors are
 * independent, so uncertainties add as the root of squares.
 * Source: JCGM 100:2008, 5.1.2.
 */
export function addForces(forces: readonly ForceUncertainty[]): ForceUncertainty {
  const total = forces.reduce((sum, { force }) => sum + force, 0)
  const sources = forces.flatMap(({ budget }, index) =>
    budget.map(({ name, value, distribution, u }) => ({
      name: `${name}, manifold ${index + 1}`,
      value,
      distribution,
      u,
    })),
  )
  return result(total, sources, combine(forces.map(({ uIndependent }) => ({ u: uIndependent }))))
}

/** A reading's part in a combined deflection: a bare sensitivity, or one with an indicator of its own. */
export type DeflectionTerm = number | { sensitivity: number; increment: number; errorLimit?: number | undefined }

export type DeflectionUncertainty = {
  /** Combined standard uncertainty, m. */
  u: number
  /** Expanded uncertainty, m: 2·u. */
  U: number
  k: 2
  budget: BudgetLine[]
}

/**
 * Uncertainty of a deflection, m, from the indicators' readable `increment` and `errorLimit`
 * (rectangular half-width; 0 unless given), both in m. `terms` are the sensitivities of every reading
 * that enters it, the datum's included: [1, −1] for one point, [1, −½, −½, −1, ½, ½] for the middle
 * less the mean of the ends. Errors are taken as independent from reading to reading.
 * Source: JCGM 100:2008, 4.3.7, 5.1.2 and 6.2.
 */
export function deflectionUncertainty(input: {
  increment: number
  errorLimit?: number | undefined
  terms: readonly DeflectionTerm[]
}): DeflectionUncertainty {
  const squares = { resolution: 0, error: 0 }
  for (const term of input.terms) {
    const { sensitivity, increment, errorLimit } =
      typeof term === 'number' ? { sensitivity: term, increment: input.increment, errorLimit: input.errorLimit } : term
    squares.resolution += (sensitivity * (increment / 2)) ** 2
    squares.error += (sensitivity * (errorLimit ?? 0)) ** 2
  }
  const sources = [
    rectangular('half of the indicator’s increment', Math.sqrt(squares.resolution)),
    rectangular('indicator', Math.sqrt(squares.error)),
  ]
  const u = combine(sources)
  return { u, U: 2 * u, k: 2, budget: toBudget(sources) }
}
