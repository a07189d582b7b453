import { z } from 'zod'
import { idSchema, roleSchema, timeSchema } from './common'
import { emailSchema, newPasswordSchema, personNameSchema } from './session'

export const personSchema = z.object({
  userId: idSchema,
  name: z.string(),
  /** Only the owner sees addresses. */
  email: z.string().optional(),
  role: roleSchema,
  addedAt: timeSchema,
  /** Set when the person no longer belongs to the shop. */
  endedAt: timeSchema.nullable(),
})
export type Person = z.infer<typeof personSchema>

/** GET /api/people?shop= — members first, by name. */
export const peopleResponseSchema = z.object({ people: z.array(personSchema) })
export type PeopleResponse = z.infer<typeof peopleResponseSchema>

/**
 * POST /api/people?shop= — 201 with the person. Whoever has an account already keeps name and password, so `name` and
 * `password` are used for new accounts only; somebody who had left comes back.
 */
export const addPersonRequestSchema = z.strictObject({
  name: personNameSchema,
  email: emailSchema,
  role: roleSchema,
  /** Handed over in person; whoever gets it changes it after signing in. */
  password: newPasswordSchema,
})
export type AddPersonRequest = z.infer<typeof addPersonRequestSchema>

/** PATCH /api/people/:userId?shop= — another role, or `ended: true`. Answers the person. */
export const changePersonRequestSchema = z
  .strictObject({ role: roleSchema.optional(), ended: z.literal(true).optional() })
  .refine(
    (change) => (change.role === undefined) !== (change.ended === undefined),
    'Change the role, or end the membership: one of the two.',
  )
export type ChangePersonRequest = z.infer<typeof changePersonRequestSchema>
