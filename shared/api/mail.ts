import { z } from 'zod'
import { idSchema, timeSchema } from './common'

export const MAIL_KINDS = [
  'invitation',
  'countersignature-wanted',
  'record-sealed',
  'declined',
  'clearance-given',
  'clearance-ended',
  'due-soon',
  'overdue',
  'password-changed',
  'password-reset',
] as const
export const mailKindSchema = z.enum(MAIL_KINDS)
export type MailKind = z.infer<typeof mailKindSchema>

export const MAIL_STATES = ['queued', 'sending', 'sent', 'dead'] as const
export const mailStateSchema = z.enum(MAIL_STATES)
export type MailState = z.infer<typeof mailStateSchema>

/** GET /api/mail?shop=&cursor=&state= — the newest first; for the owner. */
export const mailListQuerySchema = z.object({
  shop: idSchema,
  state: mailStateSchema.optional(),
  cursor: z.string().max(200).optional(),
})
export type MailListQuery = z.infer<typeof mailListQuerySchema>

export const mailRowSchema = z.object({
  id: idSchema,
  kind: mailKindSchema,
  to: z.string(),
  subject: z.string(),
  state: mailStateSchema,
  attempts: z.number().int(),
  lastError: z.string().nullable(),
  createdAt: timeSchema,
  sentAt: timeSchema.nullable(),
  /** When it is tried next; null unless it waits. */
  nextAt: timeSchema.nullable(),
})
export type MailRow = z.infer<typeof mailRowSchema>

export const mailListSchema = z.object({
  /** Whether letters stay here to be read, because no mail server is set up. */
  isTray: z.boolean(),
  mail: z.array(mailRowSchema),
  older: z.string().nullable(),
})
export type MailList = z.infer<typeof mailListSchema>

/** GET /api/mail/:id and POST /api/mail/:id/retry (a dead one is queued again). */
export const mailResponseSchema = z.object({
  shopId: idSchema,
  isTray: z.boolean(),
  mail: mailRowSchema.extend({ messageId: z.string().nullable(), text: z.string(), html: z.string() }),
})
export type MailResponse = z.infer<typeof mailResponseSchema>
