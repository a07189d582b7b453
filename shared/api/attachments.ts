import { z } from 'zod'
import { attachmentSchema } from '../ledger/envelope'
import { idSchema, timeSchema } from './common'

/** Photos and documents that a ledger names: which are here, and which were declared lost. */
export const heldAttachmentSchema = attachmentSchema.extend({
  /** The entry that names it. */
  seq: z.int(),
  present: z.boolean(),
  lost: z.object({ why: z.string(), by: z.string(), at: timeSchema }).nullable(),
})

export const heldAttachmentsSchema = z.object({ attachments: z.array(heldAttachmentSchema) })

/** The two smaller pictures of a photo: the longer side at most so many px. Always JPEG. */
export const PICTURE_SIZES = { thumb: 320, page: 1600 } as const
export type PictureSize = keyof typeof PICTURE_SIZES

/**
 * PUT and GET /api/attachments/:sha256 name who names the file, which says who may: `?ledger=` a press's or a test's,
 * or `?calibration=`. GET takes `&size=` for a smaller picture; a document has none.
 */
export const attachmentQuerySchema = z
  .object({ ledger: idSchema.optional(), calibration: idSchema.optional(), size: z.enum(['thumb', 'page']).optional() })
  .refine(({ ledger, calibration }) => (ledger === undefined) !== (calibration === undefined), 'Name the ledger or the calibration.')

export type HeldAttachment = z.infer<typeof heldAttachmentSchema>
