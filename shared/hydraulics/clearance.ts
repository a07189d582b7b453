import { roundDownTo, toSI, toUnit } from '../units'
import type { ForceUnit } from '../units'
import { ramForce } from './ram'
import type { RamInput } from './ram'
import { targetPressure } from './target'

/** The load in a clearance: `load` in N, and `text` in the unit, rounded down to its decimals. */
export type ClearanceLoad = { load: number; text: string; unit: ForceUnit }

/**
 * What a press may be cleared to: the lowest force through the last full-load hold less its expanded
 * uncertainty, divided by the protocol's margin, rounded down in the unit to `decimals`, and never
 * above the rated load. `lowestForce`, `U` and `ratedLoad` in N. Zero when nothing is left.
 * Common practice, no source.
 * @throws RangeError when the margin is below one (it would clear more than was carried), when U is
 * below zero, or when a value isn't a number.
 */
export function clearanceLoad(input: {
  lowestForce: number
  U: number
  margin: number
  ratedLoad: number
  unit: ForceUnit
  decimals: number
}): ClearanceLoad {
  const { lowestForce, U, margin, ratedLoad, unit, decimals } = input
  if (!(margin >= 1)) throw new RangeError('A margin below 1 would clear more than was carried.')
  if (!(U >= 0)) throw new RangeError('An uncertainty can’t be below zero.')
  if (!Number.isFinite(lowestForce) || !(ratedLoad >= 0)) {
    throw new RangeError('The lowest force and the rated load must be numbers.')
  }
  const proven = Math.max(0, Math.min((lowestForce - U) / margin, ratedLoad))
  const text = roundDownTo(toUnit(proven, unit), 10 ** -decimals).toFixed(decimals)
  return { load: Math.min(toSI({ text, unit }), ratedLoad), text, unit }
}

/**
 * The gauge pressure, Pa, that belongs to a clearance load (N) on the rams it was proven with, rounded
 * down to what the gauge can show (`increment`, Pa), with the force (N) it makes: never above the load.
 * @throws RangeError when there is no ram or the increment is not above zero.
 */
export function clearancePressure(input: { load: number; rams: readonly RamInput[]; increment: number }): {
  pressure: number
  force: number
} {
  const exact = targetPressure({ force: input.load, rams: input.rams })
  const pressure = Math.max(0, roundDownTo(exact, input.increment))
  const force = ramForce(input.rams.map((ram) => ({ ram, pressure, rodPressure: 0 })))
  return { pressure, force }
}
