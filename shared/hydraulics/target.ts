import { decimalsOfStep, formatForce, formatQuantity, roundDownTo } from '../units'
import type { ForceUnit, PressureUnit } from '../units'
import { ramForce } from './ram'
import type { RamInput } from './ram'

/** The force of rams on one manifold at one pressure (Pa), rod sides vented, N. */
function manifoldForce(rams: readonly RamInput[], pressure: number): number {
  return ramForce(rams.map((ram) => ({ ram, pressure, rodPressure: 0 })))
}

/**
 * Gauge pressure, Pa, at which rams on one manifold make a force, N, rod sides vented:
 * P = (F + ΣF_ret − ΣW)/ΣA. Below zero when the weight alone makes more than the force.
 * Source: F = p·π·d²/4 solved for p, with springs and weight.
 * @throws RangeError when there is no ram or its area is not above zero.
 */
export function targetPressure(input: { force: number; rams: readonly RamInput[] }): number {
  const area = input.rams.reduce((sum, ram) => sum + ram.area, 0)
  if (!(area > 0)) throw new RangeError('Give the ram’s bore or effective area first.')
  return (input.force - manifoldForce(input.rams, 0)) / area
}

/** Units that sentences are written in. */
export type SentenceUnits = { pressure: PressureUnit; force: ForceUnit }

export type ReadableTarget = {
  /** Exact target, Pa. */
  exact: number
  /** Rounded down to what the gauge can show, and not above the cap, Pa. */
  readable: number
  /** The force that the readable pressure makes, N. */
  force: number
  /** Whether that force falls under the stage's lower tolerance. */
  belowTolerance: boolean
  /** The next readable value up, when the readable one is below tolerance and this one is allowed. */
  next: { pressure: number; force: number } | null
  /** What to know about the readable value, or null when it is within tolerance. */
  sentence: string | null
}

const TOLERANCE_SLACK = 1e-9

/**
 * The gauge pressure to pump to for a stage's force, rounded down to what can be read.
 * `force` N; `increment` (readable) and `capPressure` (lowest component rating) Pa; tolerances as
 * fractions of the force (0.02 is −2 %). When rounding down falls under the tolerance the sentence
 * says so, and the next readable value is offered if it passes neither the upper tolerance nor a
 * component's rating.
 * Source: the formula of `targetPressure`; tolerances are common practice.
 * @throws RangeError when there is no ram, or the increment is not above zero.
 */
export function readableTarget(input: {
  force: number
  rams: readonly RamInput[]
  increment: number
  lowerTolerance: number
  upperTolerance: number
  capPressure: number
  units?: SentenceUnits
}): ReadableTarget {
  const { force, rams, increment, capPressure } = input
  const exact = targetPressure({ force, rams })
  const readable = Math.max(0, roundDownTo(Math.min(exact, capPressure), increment))
  const made = manifoldForce(rams, readable)
  const least = force * (1 - input.lowerTolerance)
  const most = force * (1 + input.upperTolerance)
  const belowTolerance = made < least - TOLERANCE_SLACK * Math.abs(force)
  const nextPressure = readable + increment
  const nextForce = manifoldForce(rams, nextPressure)
  const nextAllowed = nextPressure <= capPressure * (1 + TOLERANCE_SLACK) && nextForce <= most + TOLERANCE_SLACK * Math.abs(force)
  const next = belowTolerance && nextAllowed ? { pressure: nextPressure, force: nextForce } : null
  const units = input.units ?? { pressure: 'bar', force: 'kN' }
  const decimals = decimalsOfStep(increment, units.pressure)
  const say = (pressure: number, value: number) =>
    `${formatQuantity(pressure, units.pressure, decimals)} makes ${formatForce(value, units.force)}`
  return { exact, readable, force: made, belowTolerance, next, sentence: sentence() }

  function sentence(): string | null {
    if (exact < 0) {
      return `The weight that comes down with the ram already makes ${formatForce(manifoldForce(rams, 0), units.force)}, more than this stage asks for.`
    }
    if (!belowTolerance) return null
    const short = `${say(readable, made)}, less than the ${formatForce(least, units.force)} that this stage must reach.`
    if (next) return `${short} The next value that can be read, ${say(next.pressure, next.force)}, is within the tolerance.`
    if (nextPressure > capPressure) return `${short} Anything higher passes the lowest rating in the train.`
    return `${short} The next value that can be read, ${say(nextPressure, nextForce)}, passes the upper tolerance. Fit a gauge that can be read finer.`
  }
}

export type PressureWindow = {
  /** Lowest and highest gauge pressure of the stage's tolerance, Pa. */
  low: number
  high: number
  /** The exact target, Pa. */
  target: number
  /** Whether a component's rating ends the window before the upper tolerance does. */
  endsAtRating: boolean
}

/**
 * The window of gauge pressure in which a stage's force (N) counts as reached, Pa: from the lower
 * tolerance to the upper one, its top ending at the lowest component rating (`capPressure`, Pa).
 * @throws RangeError when there is no ram.
 */
export function pressureWindow(input: {
  force: number
  rams: readonly RamInput[]
  lowerTolerance: number
  upperTolerance: number
  capPressure: number
}): PressureWindow {
  const { force, rams, capPressure } = input
  const at = (share: number) => targetPressure({ force: force * share, rams })
  const top = at(1 + input.upperTolerance)
  return {
    low: Math.max(0, at(1 - input.lowerTolerance)),
    high: Math.max(0, Math.min(top, capPressure)),
    target: at(1),
    endsAtRating: capPressure < top,
  }
}

/**
 * The gauge pressure, Pa, that no stage may pass on one manifold: the lowest of the pressure ratings
 * (Pa) and of the pressures at which the rams make one of the force ratings (N). Infinity when
 * nothing is rated.
 * @throws RangeError when a force rating is given and there is no ram.
 */
export function lowestRatingPressure(input: {
  rams: readonly RamInput[]
  pressureRatings: readonly number[]
  forceRatings: readonly number[]
}): number {
  const fromForces = input.forceRatings.map((force) => targetPressure({ force, rams: input.rams }))
  return Math.max(0, Math.min(Infinity, ...input.pressureRatings, ...fromForces))
}
