import { z } from 'zod'
import { typedPositiveForceSchema, typedPositiveLengthSchema } from './units'

export const TOOLING_KINDS = ['adaptor', 'nose', 'die', 'vee-block', 'plate', 'stack'] as const

/** A loose piece that the force passes through: an adaptor, a die, a plate; with the load marked on it or in its papers. */
export const toolingDetailsSchema = z.object({
  code: z.string().trim().min(1, 'Give it a number, as painted on it.').max(20, 'Keep it to 20 characters.'),
  name: z.string().trim().min(1, 'Say what it is.').max(80, 'Keep it to 80 characters.'),
  kind: z.enum(TOOLING_KINDS, 'Choose what it is.'),
  ratedLoad: typedPositiveForceSchema,
  /** Where the rating comes from: a mark, a paper, a calculation. */
  ratingFrom: z.string().trim().min(3, 'Say where the rating comes from.').max(120, 'Keep it to 120 characters.'),
  /** How it sits: bore, thread or bed hole. */
  fit: z.string().trim().min(1, 'Say what it fits: a bore, a thread, a bed.').max(80, 'Keep it to 80 characters.'),
  height: typedPositiveLengthSchema.nullable(),
  remark: z.string().trim().max(200, 'Keep it to 200 characters.'),
})

export type ToolingDetails = z.infer<typeof toolingDetailsSchema>
export type ToolingKind = (typeof TOOLING_KINDS)[number]
