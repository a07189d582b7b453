import { z } from 'zod'
import { idSchema, lineSchema, roleSchema, timeSchema } from './common'
import { shopSchema } from './shops'

/** bcrypt reads 72 bytes and no further; what it would not read must not count as secret. */
const longestPasswordBytes = 72

export const emailSchema = z
  .string('Enter an e-mail address.')
  .trim()
  .toLowerCase()
  .min(1, 'Enter an e-mail address.')
  .max(254, 'This e-mail address is too long.')
  .pipe(z.email('Enter a whole e-mail address, such as name@shop.example.'))

export const personNameSchema = lineSchema('a name', 120)

/** A password as chosen. Signing in accepts any text instead, so that no rule is given away there. */
export const newPasswordSchema = z
  .string('Enter a password.')
  .min(10, 'Use at least 10 characters.')
  .refine((text) => new TextEncoder().encode(text).length <= longestPasswordBytes, 'Use a shorter password: 72 bytes at most.')

export const passwordSchema = z.string('Enter the password.').min(1, 'Enter the password.').max(200, 'No password is this long.')

/** POST /api/session */
export const signInRequestSchema = z.strictObject({ email: emailSchema, password: passwordSchema })
export type SignInRequest = z.infer<typeof signInRequestSchema>

export const signedInUserSchema = z.object({ id: idSchema, name: z.string(), email: z.string() })

/** A test that somebody witnesses from outside its shop; `test` is null until it is opened. */
export const guestTestSchema = z.object({
  shopId: idSchema,
  shopName: z.string(),
  pressName: z.string(),
  test: z.object({ proofTestId: idSchema, number: z.string(), status: z.string() }).nullable(),
})
export type GuestTest = z.infer<typeof guestTestSchema>

/** GET and POST /api/session, POST /api/shops. Without a session GET answers 401 `not-signed-in`. */
export const sessionResponseSchema = z.object({
  user: signedInUserSchema,
  /** The shops this person belongs to now, by name. */
  shops: z.array(shopSchema.extend({ role: roleSchema })),
  /** What this person was invited to from outside; not in what older versions kept on a device. */
  guestOf: z.array(guestTestSchema).optional(),
  expiresAt: timeSchema,
})
export type SessionResponse = z.infer<typeof sessionResponseSchema>

/** POST /api/session/password; 204. The other sessions of this person end. */
export const changePasswordRequestSchema = z.strictObject({ currentPassword: passwordSchema, newPassword: newPasswordSchema })
export type ChangePasswordRequest = z.infer<typeof changePasswordRequestSchema>
