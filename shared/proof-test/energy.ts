import { ramInput } from '../press/ratings'
import { storedEnergy, type StoredEnergy } from '../structure/stored-energy'
import { parseDecimal, toSI } from '../units'
import type { Opened } from './entries'
import type { ProofTestState } from './state'

/** Oil under pressure, m³: the rams' areas times the stroke that is out by the set-up; pump and hose come on top of it. */
export function oilVolume(opened: Opened, strokePercent: string | undefined): number {
  const parsed = strokePercent === undefined ? null : parseDecimal(strokePercent)
  if (!parsed?.ok) return 0
  return opened.press.rams.reduce((sum, ram) => sum + ramInput(ram).area * toSI(ram.stroke) * (parsed.value / 100), 0)
}

/**
 * The least energy that a loaded press gives back at once: its frame, by the figure that leads, and the oil in
 * its rams (DOMAIN 3.11). `force` N, `opening` m, `pressure` Pa (null under a load cell: the oil is left out).
 * Null below zero load.
 */
export function energyAt(state: ProofTestState, at: { force: number; opening: number; pressure: number | null }): StoredEnergy | null {
  const { opened, setUp } = state
  if (!opened || at.force < 0 || (at.pressure ?? 0) < 0) return null
  return storedEnergy({
    force: at.force,
    opening: Math.abs(at.opening),
    pressure: at.pressure ?? 0,
    oilVolume: at.pressure === null ? 0 : oilVolume(opened, setUp?.strokePercent),
  })
}
