import { z } from 'zod'
import { timeSchema } from './common'

/** The public half of a key that seals, or sealed once. */
export const servedKeySchema = z.object({
  kid: z.string().regex(/^[0-9a-f]{16}$/),
  /** Ed25519, 32 bytes in hexadecimal. */
  publicKey: z.string().regex(/^[0-9a-f]{64}$/),
  since: timeSchema,
  retiredOn: timeSchema.nullable(),
})

/** GET /api/verification/keys, for whoever asks: today's key first, then retired ones. */
export const verificationKeysSchema = z.object({ keys: z.array(servedKeySchema) })

export type ServedKey = z.infer<typeof servedKeySchema>
export type VerificationKeys = z.infer<typeof verificationKeysSchema>
