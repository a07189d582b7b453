import { targetPressure } from '#shared/hydraulics/target'
import { lowestLimit, ramInput } from '#shared/press/ratings'
import type { Opened, Reading } from '#shared/proof-test/entries'
import { leadInstrument, stageTarget } from '#shared/proof-test/force'
import { groupDigits, parseDecimal, toSI, toUnit, unitLabel } from '#shared/units'
import type { ProofTestState } from '#shared/proof-test/state'

/** The train's lowest limit as a reading of the lead's instrument, and whose it is: "ram’s limit". */
function limitOn(opened: Opened, toReading: (si: number) => number, byForce: boolean): { value: number; label: string } | null {
  const lowest = lowestLimit(opened.press)
  if (!lowest) return null
  const owner = (lowest.name.split(',')[0] ?? '').trim().split(' ').at(-1) ?? ''
  const reading = byForce ? lowest.force : targetPressure({ force: lowest.force, rams: opened.press.rams.map(ramInput) })
  return { value: toReading(reading), label: `${owner.toLowerCase()}’s limit` }
}

/** Readings of the stages before, for the dots on the rim. */
function pastReadings(state: ProofTestState, id: string, toReading: (si: number) => number): number[] {
  const { position } = state
  const climb = position ? state.legs[position.leg]?.climbs[position.climb] : undefined
  const stages = climb?.stages.slice(0, position?.stage ?? 0) ?? []
  return stages.flatMap((stage) => {
    const reading = stage.attempts.at(-1)?.rows[0]?.readings.find((one) => one.sourceId === id)
    return reading ? [toReading(toSI(reading))] : []
  })
}

/** What the gauge's face shows; null where nothing with a face reads the load. */
export function dialOf(state: ProofTestState, opened: Opened, percent: number | null, readings: readonly Reading[]) {
  const instrument = leadInstrument(opened)
  if (!instrument || instrument.details.kind === 'indicator') return null
  const { code, fullScale, increment, kind } = instrument.details
  const { unit } = increment
  const toReading = (si: number): number => toUnit(si, unit)
  const typed = readings.find((reading) => reading.sourceId === instrument.id)
  const value = typed && parseDecimal(typed.text).ok ? toReading(toSI(typed)) : null
  const target = percent === null ? null : stageTarget(opened, percent)
  return {
    code,
    fullScale: toReading(toSI(fullScale)),
    unit: unitLabel(unit),
    value,
    target: target && { text: groupDigits(target.text), value: toReading(target.readable) },
    window: target && { from: toReading(target.window.from), to: toReading(target.window.to) },
    limitFrom: limitOn(opened, toReading, kind === 'load-cell'),
    past: pastReadings(state, instrument.id, toReading),
  }
}
