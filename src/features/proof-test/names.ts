import { formatForce, toUnit, unitLabel, type ForceUnit } from '#shared/units'

/** "9 short tons" of a round load, "7.5 short tons" of another: no digit that says nothing. */
export function roundLoad(force: number, unit: ForceUnit): string {
  const value = toUnit(force, unit)
  const short = String(Number(value.toFixed(2)))
  return short.length <= 6 ? `${short} ${unitLabel(unit, { plural: short !== '1' })}` : formatForce(force, unit)
}

/** "5 min" or "45 s". */
export function duration(seconds: number): string {
  return seconds % 60 === 0 ? `${seconds / 60} min` : `${seconds} s`
}
