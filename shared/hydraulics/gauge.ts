import { z } from 'zod'

/** Accuracy classes of EN 837-1:1996, table 11, in percent of span. */
export const EN_837_CLASSES = [0.1, 0.25, 0.6, 1, 1.6, 2.5, 4] as const

/**
 * Accuracy grades of ASME B40.100, in percent of span: in the lower and upper quarter of the scale,
 * and in its middle half. B, C and D from memory.
 */
export const ASME_B40_GRADES = {
  '4A': { outer: 0.1, middle: 0.1 },
  '3A': { outer: 0.25, middle: 0.25 },
  '2A': { outer: 0.5, middle: 0.5 },
  '1A': { outer: 1, middle: 1 },
  A: { outer: 2, middle: 1 },
  B: { outer: 3, middle: 2 },
  C: { outer: 4, middle: 3 },
  D: { outer: 5, middle: 5 },
} as const

export type AsmeGrade = keyof typeof ASME_B40_GRADES
export const ASME_B40_GRADE_NAMES = ['4A', '3A', '2A', '1A', 'A', 'B', 'C', 'D'] as const satisfies readonly AsmeGrade[]

/** How true a gauge is said to be: by its class, its grade, or a stated percentage of span. */
export const gaugeAccuracySchema = z.discriminatedUnion(
  'standard',
  [
    z.strictObject({
      standard: z.literal('en-837-1'),
      class: z.literal(EN_837_CLASSES, {
        error: 'Choose the class printed on the dial: 0.1, 0.25, 0.6, 1, 1.6, 2.5 or 4.',
      }),
    }),
    z.strictObject({
      standard: z.literal('asme-b40.100'),
      grade: z.enum(ASME_B40_GRADE_NAMES, {
        error: 'Choose the grade of the gauge: 4A, 3A, 2A, 1A, A, B, C or D.',
      }),
    }),
    z.strictObject({
      standard: z.literal('stated'),
      percentOfSpan: z
        .number({ error: 'Enter the accuracy in percent of span.' })
        .positive('The accuracy in percent of span is above zero.')
        .max(20, 'An accuracy of more than 20 % of span can’t carry a proof test.'),
    }),
  ],
  { error: 'Say by which standard the gauge’s accuracy is given.' },
)

export type GaugeAccuracy = z.infer<typeof gaugeAccuracySchema>

/** Keeps a reading that is a quarter of the scale but for rounding in the zone with the wider limit. */
const ZONE_SLACK = 1e-9

/**
 * The largest error a gauge of this accuracy may have at a reading, Pa, either way.
 * `spanMin`, `spanMax` (ends of its scale) and `reading` in Pa. Two-zone grades go by where the
 * reading stands on the scale; on the border between zones the wider limit counts.
 * Source: EN 837-1:1996, table 11; ASME B40.100, accuracy grade table.
 * @throws RangeError when the scale has no length.
 */
export function gaugeErrorLimit(input: { accuracy: GaugeAccuracy; spanMin: number; spanMax: number; reading: number }): number {
  const span = input.spanMax - input.spanMin
  if (!(span > 0)) throw new RangeError('The gauge’s scale must end above where it begins.')
  const { accuracy } = input
  if (accuracy.standard === 'en-837-1') return (accuracy.class / 100) * span
  if (accuracy.standard === 'stated') return (accuracy.percentOfSpan / 100) * span
  const grade = ASME_B40_GRADES[accuracy.grade]
  const place = (input.reading - input.spanMin) / span
  const inMiddle = place > 0.25 + ZONE_SLACK && place < 0.75 - ZONE_SLACK
  return ((inMiddle ? grade.middle : grade.outer) / 100) * span
}

export type GaugeFit = 'fits' | 'low-on-scale' | 'high-on-scale' | 'past-full-scale'

const RANGE_USE_SOURCE = 'US DoD UFC 4-390-01 (2003), pressure gages: operate between one quarter and three quarters of full scale'

/**
 * Whether a gauge's scale suits a target pressure, both in Pa. Past full scale must block; low and
 * high on the scale warn.
 * Source: UFC 4-390-01 (23 July 2003), gages.
 * @throws RangeError when full scale is not above zero.
 */
export function gaugeSuitability(input: { fullScale: number; target: number }): {
  verdict: GaugeFit
  sentence: string
  source: string
} {
  const { fullScale, target } = input
  if (!(fullScale > 0)) throw new RangeError('The gauge’s full scale must be above zero.')
  const place = target / fullScale
  const percent = `${Math.round(place * 100)} %`
  if (place > 1 + ZONE_SLACK) {
    return {
      verdict: 'past-full-scale',
      sentence: `The target is ${percent} of full scale. Fit a gauge with a longer scale.`,
      source: 'A gauge reads no further than its scale',
    }
  }
  if (place > 0.75 + ZONE_SLACK) {
    return {
      verdict: 'high-on-scale',
      sentence: `The target is at ${percent} of the scale, above three quarters. A longer scale spares the gauge.`,
      source: RANGE_USE_SOURCE,
    }
  }
  if (place < 0.25 - ZONE_SLACK) {
    return {
      verdict: 'low-on-scale',
      sentence: `The target is at ${percent} of the scale, below one quarter. A shorter scale reads it better.`,
      source: RANGE_USE_SOURCE,
    }
  }
  return {
    verdict: 'fits',
    sentence: `The target is at ${percent} of the scale.`,
    source: RANGE_USE_SOURCE,
  }
}

/**
 * Whether a gauge can tell what a limit asks: not when the expanded uncertainty of the force is more
 * than half the distance that the limit must resolve. Both in N (or any one unit).
 * Common practice, no source.
 */
export function gaugeCanTell(input: { U: number; distance: number }): boolean {
  return input.U <= input.distance / 2
}
