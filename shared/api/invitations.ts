import { z } from 'zod'
import { idSchema, roleSchema, timeSchema } from './common'
import { emailSchema, newPasswordSchema, passwordSchema, personNameSchema } from './session'

/** How long an invitation holds. */
export const INVITATION_DAYS = 7
/** How long the link of a forgotten password holds. */
export const RESET_MINUTES = 60

/** What stands behind the slash of a link in a letter. Sent in bodies only: addresses end up in logs. */
export const linkTokenSchema = z
  .string('This link is not whole.')
  .regex(/^[\w-]{43}$/, 'This link is not whole. Copy all of it from the letter.')

/**
 * POST /api/invitations?shop= — invites by mail: a member with a role (the owner may), or an outside witness to the next
 * proof test of one press (owner and leads may). 201 with the invitation; the link goes to the address only.
 */
export const inviteRequestSchema = z.discriminatedUnion('kind', [
  z.strictObject({ kind: z.literal('member'), email: emailSchema, role: roleSchema }),
  z.strictObject({ kind: z.literal('witness'), email: emailSchema, pressId: idSchema }),
])
export type InviteRequest = z.infer<typeof inviteRequestSchema>

const of = { kind: z.enum(['member', 'witness']), role: roleSchema.nullable() }

/** One that waits, or one that ran out and was not revoked. */
export const invitationSchema = z.object({
  id: idSchema,
  ...of,
  email: z.string(),
  pressId: idSchema.nullable(),
  pressName: z.string().nullable(),
  invitedBy: z.string(),
  createdAt: timeSchema,
  expiresAt: timeSchema,
  expired: z.boolean(),
})
export type Invitation = z.infer<typeof invitationSchema>

/** Somebody from outside who accepted. `test` once it is open; ending them takes their view of it away. */
export const guestSchema = z.object({
  invitationId: idSchema,
  userId: idSchema,
  name: z.string(),
  pressId: idSchema,
  pressName: z.string(),
  test: z.object({ proofTestId: idSchema, number: z.string() }).nullable(),
})
export type Guest = z.infer<typeof guestSchema>

/**
 * GET /api/invitations?shop= — what waits and which outside witnesses there are; leads see those to tests only.
 * DELETE /api/invitations/:id revokes one, or ends what came of it; 204.
 */
export const invitationsResponseSchema = z.object({ invitations: z.array(invitationSchema), guests: z.array(guestSchema) })
export type InvitationsResponse = z.infer<typeof invitationsResponseSchema>

/** POST /api/invitations/look, for whoever has the link. 404 for no invitation, 410 `expired`, `used` or `revoked`. */
export const lookRequestSchema = z.strictObject({ token: linkTokenSchema })
export const invitationLookSchema = z.object({
  ...of,
  shopName: z.string(),
  invitedBy: z.string(),
  pressName: z.string().nullable(),
  email: z.string(),
  /** Whether the address has an account: then its password is asked for, else a name and a new password. */
  hasAccount: z.boolean(),
  expiresAt: timeSchema,
})
export type InvitationLook = z.infer<typeof invitationLookSchema>

/** POST /api/invitations/accept — signs in and answers the session. */
export const acceptRequestSchema = z.union([
  z.strictObject({ token: linkTokenSchema, name: personNameSchema, newPassword: newPasswordSchema }),
  z.strictObject({ token: linkTokenSchema, password: passwordSchema }),
])
export type AcceptRequest = z.infer<typeof acceptRequestSchema>

/** POST /api/password-resets — 202 whether there is such an account or not. */
export const forgottenPasswordRequestSchema = z.strictObject({ email: emailSchema })
/** POST /api/password-resets/look — 204 while the link holds; 410 otherwise. */
/** POST /api/password-resets/use — 204; every session of the account ends. */
export const newPasswordRequestSchema = z.strictObject({ token: linkTokenSchema, newPassword: newPasswordSchema })
