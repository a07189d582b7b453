import { z } from 'zod'
import { calibrationSchema, calibrationSchemaFor, instrumentDetailsSchema } from '../instruments/model'
import { attachmentSchema } from '../ledger/envelope'
import { idSchema, timeSchema } from './common'

export const INSTRUMENT_SORTS = ['code', '-code', 'due', '-due'] as const

/** GET /api/instruments?shop=&search=&kind=&retired=&sort=&cursor=&limit= */
export const instrumentListQuerySchema = z.object({
  shop: idSchema,
  search: z.string().trim().max(80).optional(),
  kind: z.enum(['gauge', 'load-cell', 'indicator']).optional(),
  /** Retired ones stay on record, and out of the way. */
  retired: z.enum(['no', 'yes']).default('no'),
  sort: z.enum(INSTRUMENT_SORTS).default('code'),
  cursor: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(25),
})

/** The certificate itself, as PDF or picture; its bytes are at /api/attachments/:sha256?calibration= once they are `present`. */
export const certificateFileSchema = attachmentSchema.extend({ present: z.boolean() })

export const calibrationRowSchema = z.object({
  id: idSchema,
  calibration: calibrationSchema,
  certificateFile: certificateFileSchema.nullable(),
  createdAt: timeSchema,
  createdBy: z.string(),
})

/** An instrument with the calibration in force (the latest by its day), null when it never had one. */
export const instrumentRowSchema = z.object({
  id: idSchema,
  details: instrumentDetailsSchema,
  calibration: calibrationSchema.nullable(),
  retired: z.boolean(),
})

export const instrumentListSchema = z.object({
  instruments: z.array(instrumentRowSchema),
  older: z.string().nullable(),
  newer: z.string().nullable(),
})
export const instrumentResponseSchema = z.object({
  shopId: idSchema,
  instrument: instrumentRowSchema,
  calibrations: z.array(calibrationRowSchema),
})

/**
 * POST /api/instruments?shop= and PUT /api/instruments/:id; POST /api/instruments/:id/calibrations takes a Calibration
 * with the certificate's file, if there is one: what it names is put to /api/attachments afterwards.
 * POST /api/instruments/:id/retirement takes it out of use, DELETE brings it back. Each answers an `instrumentResponseSchema`.
 */
export const instrumentRequestSchema = instrumentDetailsSchema
const withCertificateFile = { certificateFile: attachmentSchema.nullish() }
export const calibrationRequestSchemaFor = {
  gauge: calibrationSchemaFor.gauge.safeExtend(withCertificateFile),
  'load-cell': calibrationSchemaFor['load-cell'].safeExtend(withCertificateFile),
  indicator: calibrationSchemaFor.indicator.safeExtend(withCertificateFile),
} as const

export type InstrumentListQuery = z.infer<typeof instrumentListQuerySchema>
export type CalibrationRow = z.infer<typeof calibrationRowSchema>
export type CertificateFile = z.infer<typeof certificateFileSchema>
export type InstrumentList = z.infer<typeof instrumentListSchema>
export type InstrumentResponse = z.infer<typeof instrumentResponseSchema>
export type InstrumentRow = z.infer<typeof instrumentRowSchema>
