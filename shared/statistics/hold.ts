/** A gauge reading of a hold, Pa; `toppedUp` when the pump was worked between it and the one before. */
export type HoldReading = { pressure: number; toppedUp: boolean }

/**
 * Hold at full load with the ram at its extreme offset, s: ASME ASP-2010, 3-4.1.1 (1 min).
 */
export const ASP_OFF_CENTRE_HOLD = 60
/** Hold of a proof load above the rating, s: ASME ASP-2010, 3-4.1.3 (10 min). */
export const ASP_PROOF_HOLD = 600

/** First and last reading of every stretch between top-ups. */
function stretches(readings: readonly HoldReading[]): { first: number; last: number }[] {
  const found: { first: number; last: number }[] = []
  for (const { pressure, toppedUp } of readings) {
    const current = found.at(-1)
    if (!current || toppedUp) found.push({ first: pressure, last: pressure })
    else current.last = pressure
  }
  return found
}

function startPressure(readings: readonly HoldReading[]): number {
  const start = readings[0]?.pressure ?? Number.NaN
  if (!(start > 0)) throw new RangeError('A hold starts with a gauge reading above zero.')
  return start
}

/**
 * Pressure lost in a hold, as a fraction of the pressure it started with: the falls of all stretches
 * between top-ups added up. A stretch in which the pressure rose (oil warming) doesn't pay for a fall
 * in another. Common practice, no source.
 * @throws RangeError when the hold has no first reading above zero.
 */
export function pressureLoss(readings: readonly HoldReading[]): number {
  const start = startPressure(readings)
  const lost = stretches(readings).reduce((sum, { first, last }) => sum + Math.max(0, first - last), 0)
  return lost / start
}

/**
 * Expanded uncertainty (k = 2) of that fraction, from the gauge's readable `increment`, Pa: two
 * readings for every stretch of more than one reading. The gauge's gain cancels.
 * Source: JCGM 100:2008, 4.3.7 and 5.1.2.
 * @throws RangeError when the hold has no first reading above zero.
 */
export function pressureLossUncertainty(readings: readonly HoldReading[], increment: number): number {
  const start = startPressure(readings)
  const lengths: number[] = []
  for (const { toppedUp } of readings) {
    if (lengths.length === 0 || toppedUp) lengths.push(1)
    else lengths.push((lengths.pop() ?? 0) + 1)
  }
  const differences = lengths.filter((length) => length > 1).length
  return (2 * Math.sqrt(2 * differences) * (increment / Math.sqrt(12))) / start
}

/**
 * Movement during a hold at equal pressure, m: what the deflection (m) grew by, less what the fall of
 * force (N) over the frame's `stiffness` (N/m) gave back. An infinite stiffness gives nothing back.
 * Common practice, no source.
 * @throws RangeError when the stiffness is not above zero.
 */
export function creep(input: {
  deflectionStart: number
  deflectionEnd: number
  forceStart: number
  forceEnd: number
  stiffness: number
}): number {
  if (!(input.stiffness > 0)) throw new RangeError('The stiffness must be above zero.')
  const moved = input.deflectionEnd - input.deflectionStart
  return moved + (input.forceStart - input.forceEnd) / input.stiffness
}

/**
 * Expanded uncertainty (k = 2) of creep, m, from the standard uncertainties of one reading that differ
 * from reading to reading: `uDeflection` m, `uForce` N; `stiffness` N/m. The datum cancels.
 * Source: JCGM 100:2008, 5.1.2.
 * @throws RangeError when the stiffness is not above zero.
 */
export function creepUncertainty(input: { uDeflection: number; uForce: number; stiffness: number }): number {
  if (!(input.stiffness > 0)) throw new RangeError('The stiffness must be above zero.')
  return 2 * Math.SQRT2 * Math.hypot(input.uDeflection, input.uForce / input.stiffness)
}

/**
 * How much creep a hold may show, m: a fraction of the stage's deflection (m), but no less than two
 * readable increments (m). Common practice, from memory, no source.
 */
export function creepLimit(input: { fraction: number; stageDeflection: number; increment: number }): number {
  return Math.max(input.fraction * input.stageDeflection, 2 * input.increment)
}
