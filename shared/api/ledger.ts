import { z } from 'zod'
import { entryDraftSchema, ledgerEntrySchema } from '../ledger/envelope'
import { idSchema, timeSchema } from './common'
import { problemSchema } from './problem'

/** POST …/entries: what a device made, in order. `sentAt` is the device's clock now, so that a wrong one shows. */
export const appendRequestSchema = z.object({ sentAt: timeSchema, entries: z.array(entryDraftSchema).min(1).max(200) })

/** One result per entry, in order: kept (with the entry as it stands in the ledger), or refused with the reason. */
export const appendResultSchema = z.discriminatedUnion('outcome', [
  z.object({ outcome: z.literal('kept'), id: idSchema, entry: ledgerEntrySchema }),
  z.object({ outcome: z.literal('refused'), id: idSchema, problem: problemSchema }),
])

/**
 * `resendFrom` names the first number of this device's entries that the server lacks, when there is a gap; `missing` all
 * of them, as runs of first and last. The device sends again what it still has of them.
 */
export const appendResponseSchema = z.object({
  results: z.array(appendResultSchema),
  headSeq: z.int(),
  headHash: z.string(),
  resendFrom: z.int().nullable(),
  missing: z.array(z.tuple([z.int(), z.int()])).optional(),
})

/** GET …/entries?after=seq: what came after, and the names of everybody who wrote any of it. */
export const entriesResponseSchema = z.object({
  ledgerId: idSchema,
  entries: z.array(ledgerEntrySchema),
  headSeq: z.int(),
  headHash: z.string(),
  people: z.record(z.string(), z.string()),
  sealed: z.array(z.object({ seq: z.int(), headHash: z.string(), kid: z.string(), signature: z.string(), sealedAt: timeSchema })),
  /** Said when the server found the ledger altered as it read it: at which entry, where that can be told. */
  broken: z.object({ at: z.int().nullable(), why: z.string() }).nullish(),
})

export type AppendRequest = z.infer<typeof appendRequestSchema>
export type AppendResult = z.infer<typeof appendResultSchema>
export type AppendResponse = z.infer<typeof appendResponseSchema>
export type EntriesResponse = z.infer<typeof entriesResponseSchema>
