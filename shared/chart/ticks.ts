/** Steps of scales: what an eye divides without counting. Numbers are in the scale's own display unit. */

/** Removes what binary arithmetic leaves behind (0.1 + 0.2). */
export function tidy(value: number): number {
  return Number(value.toPrecision(12))
}

/** True when `step` goes into `span` a whole number of times. */
export function divides(step: number, span: number): boolean {
  const times = span / step
  return Math.abs(times - Math.round(times)) < 1e-6
}

/** Round steps from `smallest` up to `largest`: the given multiples of each power of ten, rising. */
export function roundSteps(smallest: number, largest: number, multiples: readonly number[]): number[] {
  const steps: number[] = []
  for (let power = Math.floor(Math.log10(smallest)) - 1; power <= Math.ceil(Math.log10(largest)) + 1; power += 1) {
    for (const multiple of multiples) {
      const step = tidy(multiple * 10 ** power)
      if (step >= smallest * (1 - 1e-9) && step <= largest * (1 + 1e-9)) steps.push(step)
    }
  }
  return steps.sort((a, b) => a - b)
}

export interface AxisTicks {
  /** End of the axis: the first labelled step at or past what has to be shown. */
  max: number
  labels: number[]
  labelStep: number
  minorStep: number
  decimals: number
}

/**
 * Ticks of an axis from zero that has to show `needed` (> 0) with at most `mostLabels` labelled intervals. Labelled
 * steps are 1, 2 or 5 times a power of ten, each divided in five. Throws a RangeError when `needed` is not positive.
 */
export function axisTicks(needed: number, mostLabels = 4): AxisTicks {
  if (!(needed > 0) || !Number.isFinite(needed)) throw new RangeError('An axis needs a positive end.')
  const steps = roundSteps(needed / mostLabels, needed * 2, [1, 2, 5])
  const labelStep = steps[0] ?? needed
  const count = Math.ceil(tidy(needed / labelStep))
  const labels = Array.from({ length: count + 1 }, (_, index) => tidy(index * labelStep))
  return {
    max: tidy(count * labelStep),
    labels,
    labelStep,
    minorStep: tidy(labelStep / 5),
    decimals: Math.max(0, -Math.floor(Math.log10(labelStep) + 1e-9)),
  }
}

/** Every multiple of `step` from `from` to `to`, both included. */
export function multiples(step: number, from: number, to: number): number[] {
  const first = Math.ceil(tidy(from / step) - 1e-9)
  const last = Math.floor(tidy(to / step) + 1e-9)
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, index) => tidy((first + index) * step))
}

export interface DialTicks {
  /** Steps in the gauge's own unit; `medium` is null where a half step would not fall on a tick. */
  minor: number
  medium: number | null
  major: number
  label: number
}

const MOST_MINOR_TICKS = 200

/**
 * Ticks for the face of a gauge of any full scale (> 0, its own unit). With `readable`, the smallest increment that
 * can be read on the real gauge, one tick is that increment, unless more than 200 would stand on the scale. Throws a
 * RangeError for a full scale or increment that is not positive. Common practice, no source.
 */
export function dialTicks(fullScale: number, readable?: number): DialTicks {
  if (!(fullScale > 0) || !Number.isFinite(fullScale)) throw new RangeError('A gauge needs a positive full scale.')
  if (readable !== undefined && !(readable > 0)) throw new RangeError('A readable increment is positive.')
  const whole = (least: number, most: number, multiplesOfTen: readonly number[]): number | undefined =>
    roundSteps(fullScale / most, fullScale / least, multiplesOfTen)
      .reverse()
      .find((step) => divides(step, fullScale))
  const major = whole(8, 16, [1, 2, 5]) ?? whole(7, 20, [1, 2, 2.5, 4, 5]) ?? tidy(fullScale / 10)
  const label =
    [3, 4, 5, 6].map((count) => tidy(fullScale / count)).find((step) => isRound(step) && divides(major, step)) ??
    whole(2, 8, [1, 2, 2.5, 4, 5]) ??
    tidy(fullScale / 2)
  const ownMinor = fullScale / (major / 10) <= 150 ? tidy(major / 10) : tidy(major / 5)
  const fits = readable !== undefined && fullScale / readable <= MOST_MINOR_TICKS && divides(readable, major)
  const minor = fits ? tidy(readable) : ownMinor
  const medium = minor < major / 2 && divides(minor, major / 2) ? tidy(major / 2) : null
  return { minor, medium, major, label }
}

function isRound(step: number): boolean {
  const leading = tidy(step / 10 ** Math.floor(Math.log10(step) + 1e-9))
  return [1, 2, 2.5, 4, 5].includes(leading)
}
