import { z } from 'zod'
import { FRAME_KINDS } from '../press/model'
import { FORCE_UNITS } from '../units'
import { appendResponseSchema } from './ledger'
import { idSchema, timeSchema } from './common'

export const PRESS_SORTS = ['name', '-name', 'ratedLoad', '-ratedLoad', 'lastChanged', '-lastChanged'] as const
export const PRESS_STATUSES = ['building', 'ready', 'under test', 'cleared', 'suspended', 'withdrawn'] as const

/** GET /api/presses?shop=&search=&status=&sort=&cursor=&limit= */
export const pressListQuerySchema = z.object({
  shop: idSchema,
  search: z.string().trim().max(80).optional(),
  status: z.enum(PRESS_STATUSES).optional(),
  sort: z.enum(PRESS_SORTS).default('name'),
  cursor: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(25),
})

/** One row of the register of presses; `status` "cleared" with a date gone by is shown as overdue by whoever reads it. */
export const pressRowSchema = z.object({
  id: idSchema,
  name: z.string(),
  whatFor: z.string(),
  kind: z.enum(FRAME_KINDS),
  status: z.enum(PRESS_STATUSES),
  ratedLoad: z.object({ text: z.string(), unit: z.enum(FORCE_UNITS) }),
  clearedTo: z.object({ text: z.string(), unit: z.enum(FORCE_UNITS) }).nullable(),
  clearedUntil: z.iso.date().nullable(),
  jointCount: z.int(),
  jointsAccepted: z.int(),
  lastChangedAt: timeSchema,
})

export const pressListSchema = z.object({
  presses: z.array(pressRowSchema),
  older: z.string().nullable(),
  newer: z.string().nullable(),
})

/** POST /api/presses?shop= takes an AppendRequest of one `registered` entry whose ledgerId is the new press's id. */
export const registerPressResponseSchema = appendResponseSchema

/** GET /api/presses/:id: whose it is and what the register says; the rest is its ledger. */
export const pressResponseSchema = z.object({ shopId: idSchema, press: pressRowSchema })

export type PressListQuery = z.infer<typeof pressListQuerySchema>
export type PressRow = z.infer<typeof pressRowSchema>
export type PressList = z.infer<typeof pressListSchema>
