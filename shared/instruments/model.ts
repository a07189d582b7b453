import { z } from 'zod'
import { gaugeAccuracySchema } from '../hydraulics/gauge'
import { idSchema } from '../ledger/envelope'
import {
  parseDecimal,
  toSI,
  typedForceSchema,
  typedLengthSchema,
  typedPositiveForceSchema,
  typedPositiveLengthSchema,
  typedPositivePressureSchema,
  typedPressureSchema,
  type Typed,
  type Unit,
} from '../units'

const code = z.string().trim().min(1, 'Give it the code that is written on it.').max(16, 'Keep the code to 16 characters.')
const description = z.string().trim().max(120, 'Keep it to 120 characters.')

export const GAUGE_STYLES = ['dial', 'digital', 'transducer'] as const
export const INDICATOR_STYLES = ['dial', 'digital', 'feeler', 'straight-edge and rule'] as const

const stepSentence = 'The step is smaller than the whole scale. One of the two is mistyped, or its unit.'

/** Whether one step of the scale is smaller than the whole of it; a number that can't be read is told at its own field. */
function isSmaller<U extends Unit>(step: Typed<U>, whole: Typed<U>): boolean {
  const readable = parseDecimal(step.text).ok && parseDecimal(whole.text).ok
  return !readable || toSI(step) < toSI(whole)
}

/** A pressure gauge: full scale, accuracy class or grade, and the smallest step that can be read. */
export const gaugeDetailsSchema = z
  .object({
    kind: z.literal('gauge'),
    code,
    description,
    style: z.enum(GAUGE_STYLES, 'Choose what sort of gauge it is.'),
    fullScale: typedPositivePressureSchema,
    increment: typedPositivePressureSchema,
    accuracy: gaugeAccuracySchema,
  })
  .refine((gauge) => isSmaller(gauge.increment, gauge.fullScale), { path: ['increment'], message: stepSentence })

/** A load cell reads force itself: no area and no springs come into it. */
export const loadCellDetailsSchema = z
  .object({
    kind: z.literal('load-cell'),
    code,
    description,
    fullScale: typedPositiveForceSchema,
    increment: typedPositiveForceSchema,
    errorPercentOfSpan: z
      .number('Enter the limit of error in percent of span.')
      .positive('The limit of error is above zero.')
      .max(20, 'A load cell with a limit of error over 20 % of span can’t carry a proof test.'),
  })
  .refine((cell) => isSmaller(cell.increment, cell.fullScale), { path: ['increment'], message: stepSentence })

/** What reads displacement at a measuring point. `errorLimit` is the maker's; null takes one increment. */
export const indicatorDetailsSchema = z
  .object({
    kind: z.literal('indicator'),
    code,
    description,
    style: z.enum(INDICATOR_STYLES, 'Choose what sort of indicator it is.'),
    range: typedPositiveLengthSchema,
    increment: typedPositiveLengthSchema,
    errorLimit: typedPositiveLengthSchema.nullable(),
    revolution: typedPositiveLengthSchema.nullable(),
  })
  .refine((indicator) => isSmaller(indicator.increment, indicator.range), { path: ['increment'], message: stepSentence })

export const instrumentDetailsSchema = z.discriminatedUnion('kind', [gaugeDetailsSchema, loadCellDetailsSchema, indicatorDetailsSchema])

function calibrationOf<Value extends z.ZodType>(value: Value) {
  return z
    .object({
      calibratedOn: z.iso.date('Give the day of the comparison, like 2026-03-09.'),
      dueOn: z.iso.date('Give the day the next one falls due, like 2027-03-09.'),
      certificate: z.string().trim().min(1, 'Give the number of the certificate.').max(60, 'Keep it to 60 characters.'),
      comparedWith: z.string().trim().max(120, 'Keep it to 120 characters.'),
      result: z.enum(['in tolerance', 'out of tolerance'], 'Say whether it was found in tolerance.'),
      uncertainty: z
        .object({
          value,
          k: z.number('Enter the coverage factor k.').min(1, 'A coverage factor is 1 at least.').max(4, 'A coverage factor is 4 at most.'),
        })
        .nullable(),
    })
    .refine((calibration) => calibration.dueOn > calibration.calibratedOn, {
      path: ['dueOn'],
      message: 'The next calibration falls due after this one.',
    })
}

/** A dated comparison with a better instrument. `uncertainty` and `k` are the certificate's, in `unit`. */
export const calibrationSchema = calibrationOf(z.union([typedPressureSchema, typedForceSchema, typedLengthSchema]))

/** The same for one kind of instrument, whose uncertainty is of the quantity that it reads. */
export const calibrationSchemaFor = {
  gauge: calibrationOf(typedPositivePressureSchema),
  'load-cell': calibrationOf(typedPositiveForceSchema),
  indicator: calibrationOf(typedPositiveLengthSchema),
} as const

/** An instrument as a test freezes it, with the calibration that was in force when the test opened. */
export const frozenInstrumentSchema = z.object({
  id: idSchema,
  details: instrumentDetailsSchema,
  calibration: calibrationSchema.nullable(),
})

export type GaugeDetails = z.infer<typeof gaugeDetailsSchema>
export type LoadCellDetails = z.infer<typeof loadCellDetailsSchema>
export type IndicatorDetails = z.infer<typeof indicatorDetailsSchema>
export type InstrumentDetails = z.infer<typeof instrumentDetailsSchema>
export type Calibration = z.infer<typeof calibrationSchema>
export type FrozenInstrument = z.infer<typeof frozenInstrumentSchema>
export type CalibrationState = 'in-date' | 'out-of-date' | 'out-of-tolerance' | 'never'

/** Whether an instrument may be relied on on `day` (an ISO date): its last calibration decides. */
export function calibrationState(calibration: Calibration | null, day: string): CalibrationState {
  if (!calibration) return 'never'
  if (calibration.result === 'out of tolerance') return 'out-of-tolerance'
  return calibration.dueOn < day ? 'out-of-date' : 'in-date'
}
