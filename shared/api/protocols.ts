import { z } from 'zod'
import { protocolContentSchema } from '../proof-test/protocol'
import { idSchema, lineSchema, timeSchema } from './common'

/** GET /api/protocols?shop=: few enough to come whole. */
export const protocolRowSchema = z.object({
  id: idSchema,
  name: z.string(),
  version: z.int(),
  content: protocolContentSchema,
  archived: z.boolean(),
})
export const protocolListSchema = z.object({ protocols: z.array(protocolRowSchema) })

export const protocolVersionSchema = z.object({
  version: z.int(),
  content: protocolContentSchema,
  createdAt: timeSchema,
  createdBy: z.string(),
})
export const protocolResponseSchema = z.object({ shopId: idSchema, protocol: protocolRowSchema, versions: z.array(protocolVersionSchema) })

/**
 * POST /api/protocols?shop= makes version 1; POST /api/protocols/:id/versions the next one. Versions are never edited.
 * POST /api/protocols/:id/archive takes it out of the choice for new tests, DELETE brings it back. All answer a `protocolResponseSchema`.
 */
export const protocolRequestSchema = z.object({ name: lineSchema('a name', 80), content: protocolContentSchema })

export type ProtocolList = z.infer<typeof protocolListSchema>
export type ProtocolRequest = z.infer<typeof protocolRequestSchema>
export type ProtocolResponse = z.infer<typeof protocolResponseSchema>
export type ProtocolVersion = z.infer<typeof protocolVersionSchema>
export type ProtocolRow = z.infer<typeof protocolRowSchema>
