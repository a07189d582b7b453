import { z } from 'zod'
import { attachmentSchema } from '../ledger/envelope'
import { timeSchema } from './common'

/** Photos and documents that a ledger names: which are here, and which were declared lost. */
export const heldAttachmentSchema = attachmentSchema.extend({
  /** The entry that names it. */
  seq: z.int(),
  present: z.boolean(),
  lost: z.object({ why: z.string(), by: z.string(), at: timeSchema }).nullable(),
})

export const heldAttachmentsSchema = z.object({ attachments: z.array(heldAttachmentSchema) })

export type HeldAttachment = z.infer<typeof heldAttachmentSchema>
