import { z } from 'zod'
import { gaugeAccuracySchema } from '../hydraulics/gauge'
import { idSchema } from '../ledger/envelope'
import { typedForceSchema, typedLengthSchema, typedPressureSchema } from '../units'

const code = z.string().trim().min(1, 'Give it the code that is written on it.').max(16, 'Keep the code under 16 characters.')
const description = z.string().trim().max(120)

export const GAUGE_STYLES = ['dial', 'digital', 'transducer'] as const
export const INDICATOR_STYLES = ['dial', 'digital', 'feeler', 'straight-edge and rule'] as const

/** A pressure gauge: full scale, accuracy class or grade, and the smallest step that can be read. */
export const gaugeDetailsSchema = z.object({
  kind: z.literal('gauge'),
  code,
  description,
  style: z.enum(GAUGE_STYLES),
  fullScale: typedPressureSchema,
  increment: typedPressureSchema,
  accuracy: gaugeAccuracySchema,
})

/** A load cell reads force itself: no area and no springs come into it. */
export const loadCellDetailsSchema = z.object({
  kind: z.literal('load-cell'),
  code,
  description,
  fullScale: typedForceSchema,
  increment: typedForceSchema,
  errorPercentOfSpan: z.number().positive().max(20),
})

/** What reads displacement at a measuring point. `errorLimit` is the maker's; null takes one increment. */
export const indicatorDetailsSchema = z.object({
  kind: z.literal('indicator'),
  code,
  description,
  style: z.enum(INDICATOR_STYLES),
  range: typedLengthSchema,
  increment: typedLengthSchema,
  errorLimit: typedLengthSchema.nullable(),
  revolution: typedLengthSchema.nullable(),
})

export const instrumentDetailsSchema = z.discriminatedUnion('kind', [gaugeDetailsSchema, loadCellDetailsSchema, indicatorDetailsSchema])

/** A dated comparison with a better instrument. `uncertainty` and `k` are the certificate's, in `unit`. */
export const calibrationSchema = z
  .object({
    calibratedOn: z.iso.date('Write the day like 2026-03-09.'),
    dueOn: z.iso.date('Write the day like 2027-03-09.'),
    certificate: z.string().trim().min(1, 'Give the number of the certificate.').max(60),
    comparedWith: z.string().trim().max(120),
    result: z.enum(['in tolerance', 'out of tolerance']),
    uncertainty: z
      .object({
        value: z.union([typedPressureSchema, typedForceSchema, typedLengthSchema]),
        k: z.number().min(1).max(4),
      })
      .nullable(),
  })
  .refine((calibration) => calibration.dueOn > calibration.calibratedOn, {
    path: ['dueOn'],
    message: 'The next calibration falls due after this one.',
  })

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
