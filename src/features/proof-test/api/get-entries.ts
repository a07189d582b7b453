import { queryOptions, type QueryClient } from '@tanstack/react-query'
import { entriesResponseSchema } from '#shared/api/ledger'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { api } from '../../../lib/api-client'
import { askAgainAfter } from '../../../lib/use-live'
import { mergeEntries, wholeUpTo } from '../ledger-view'

/** Everything that the server has sent of one test's ledger so far. */
export interface KnownLedger {
  ledgerId: string
  /** By `seq`, each once. */
  entries: readonly LedgerEntry[]
  people: Readonly<Record<string, string>>
  /** The highest entry that a seal stands on; 0 while there is none. */
  sealedSeq: number
}

/** Where no stream of the server tells of it. */
const POLL = 1000
const LONGEST_WAIT = 8000

export const entriesKey = (testId: string) => ['proof-test', testId, 'entries'] as const

/** Asks for what came after what is known, every second where no stream tells, and keeps what it has while nothing answers. */
export const entriesQuery = (testId: string, client: QueryClient) =>
  queryOptions({
    queryKey: entriesKey(testId),
    queryFn: async ({ signal }): Promise<KnownLedger> => {
      const known = client.getQueryData<KnownLedger>(entriesKey(testId))
      const answer = await api.get(entriesResponseSchema, `/api/proof-tests/${encodeURIComponent(testId)}/entries`, {
        query: { after: known ? wholeUpTo(known.entries) : 0 },
        signal: AbortSignal.any([signal, AbortSignal.timeout(LONGEST_WAIT)]),
      })
      // What the outbox handed on while this was under way is in the cache by now: both are kept.
      const latest = client.getQueryData<KnownLedger>(entriesKey(testId))
      const sealedSeq = Math.max(latest?.sealedSeq ?? 0, ...answer.sealed.map((seal) => seal.seq))
      const entries = mergeEntries(latest?.entries ?? [], answer.entries)
      if (latest && latest.entries === entries && latest.sealedSeq === sealedSeq) return latest
      return { ledgerId: answer.ledgerId, entries, people: { ...latest?.people, ...answer.people }, sealedSeq }
    },
    structuralSharing: false,
    refetchInterval: () => askAgainAfter([testId], POLL),
    refetchIntervalInBackground: true,
    staleTime: 0,
    retry: false,
    gcTime: 60 * 60_000,
  })

/** Puts entries that the server has answered into what is known, before the next poll would. */
export function addKept(client: QueryClient, testId: string, kept: readonly LedgerEntry[]): void {
  client.setQueryData<KnownLedger>(entriesKey(testId), (known) => known && { ...known, entries: mergeEntries(known.entries, kept) })
}
