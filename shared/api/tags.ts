import { z } from 'zod'
import { clearanceSchema } from '../press/entries'
import { timeSchema } from './common'

/** The code of a press's tag: 16 letters and figures that are not mistaken for each other, hard to guess. */
export const tagCodeSchema = z.string().regex(/^[a-hjkmnp-z2-9]{16}$/)

/** POST /api/presses/:id/tag: the press's tag, made the first time it is asked for. `address` is what its QR code holds. */
export const tagResponseSchema = z.object({
  code: tagCodeSchema,
  address: z.url(),
  /** False while the address leads nowhere but to the machine the server runs on. */
  reachable: z.boolean(),
})

/** GET /api/tags/:code, for whoever reads it: what the press may be used for at this moment, and nothing about the rest of the shop. */
export const publicTagSchema = z.object({
  shopName: z.string(),
  press: z.object({ name: z.string(), whatFor: z.string() }),
  asOf: timeSchema,
  answer: z.discriminatedUnion('is', [
    z.object({ is: z.literal('cleared'), clearance: clearanceSchema.omit({ instrumentIds: true, proofTestId: true }) }),
    z.object({ is: z.literal('under test'), why: z.string() }),
    z.object({ is: z.literal('do not use'), why: z.string(), since: timeSchema.nullable() }),
  ]),
  /** The day the clearance was given, when no change has been reported since. */
  noChangeSince: z.iso.date().nullable(),
})

export type TagResponse = z.infer<typeof tagResponseSchema>
export type PublicTag = z.infer<typeof publicTagSchema>
