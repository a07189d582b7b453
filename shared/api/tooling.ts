import { z } from 'zod'
import { toolingDetailsSchema } from '../tooling'
import { idSchema } from './common'

/** GET /api/tooling?shop=&search=&retired=&cursor=&limit= */
export const toolingListQuerySchema = z.object({
  shop: idSchema,
  search: z.string().trim().max(80).optional(),
  /** Retired pieces stay on record, and out of the way. */
  retired: z.enum(['no', 'yes']).default('no'),
  sort: z.enum(['code', '-code']).default('code'),
  cursor: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(25),
})

export const toolingRowSchema = z.object({ id: idSchema, details: toolingDetailsSchema, retired: z.boolean() })

export const toolingListSchema = z.object({
  tooling: z.array(toolingRowSchema),
  older: z.string().nullable(),
  newer: z.string().nullable(),
})

/**
 * POST /api/tooling?shop= and PUT /api/tooling/:id take a `toolingDetailsSchema`; POST /api/tooling/:id/retirement takes a
 * piece out of use, DELETE brings it back. Each answers a `toolingResponseSchema`.
 */
export const toolingResponseSchema = z.object({ shopId: idSchema, tooling: toolingRowSchema })

export type ToolingListQuery = z.infer<typeof toolingListQuerySchema>
export type ToolingRow = z.infer<typeof toolingRowSchema>
export type ToolingList = z.infer<typeof toolingListSchema>
export type ToolingResponse = z.infer<typeof toolingResponseSchema>
