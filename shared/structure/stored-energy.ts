import { STANDARD_GRAVITY } from '../units'

/**
 * Bulk modulus of mineral hydraulic oil without air in it, Pa: common practice, from memory, no source.
 * Real oil with air in it is softer and stores more, which is why the energy is "at least".
 */
export const OIL_BULK_MODULUS = 1.7e9

export type StoredEnergy = {
  /** In the stretched and bent frame, J: ½·F·δ. */
  frame: number
  /** In the compressed oil, J: ½·P²·V/β. */
  oil: number
  total: number
  /** The mass, kg, that falling one metre would bring the same energy. */
  massDroppedOneMetre: number
}

/**
 * The least energy that a loaded press gives back at once when something lets go, J.
 * `force` N; `opening` (total deflection between head and bed) m; `pressure` Pa; `oilVolume` (under
 * pressure, in ram, hose and pump) m³; `bulkModulus` Pa.
 * Source: work of a linear spring, ½·F·δ; of a compressed liquid, ½·P²·V/β (elementary mechanics).
 * @throws RangeError when a value is below zero or the bulk modulus is not above zero.
 */
export function storedEnergy(input: {
  force: number
  opening: number
  pressure: number
  oilVolume: number
  bulkModulus?: number | undefined
}): StoredEnergy {
  const { force, opening, pressure, oilVolume, bulkModulus = OIL_BULK_MODULUS } = input
  if (!(force >= 0 && opening >= 0 && pressure >= 0 && oilVolume >= 0)) {
    throw new RangeError('Force, opening, pressure and oil volume can’t be below zero.')
  }
  if (!(bulkModulus > 0)) throw new RangeError('The bulk modulus must be above zero.')
  const frame = (force * opening) / 2
  const oil = (pressure ** 2 * oilVolume) / (2 * bulkModulus)
  const total = frame + oil
  return { frame, oil, total, massDroppedOneMetre: total / STANDARD_GRAVITY }
}
