import { queryOptions, type QueryClient } from '@tanstack/react-query'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { fetchLedger } from '../../../lib/fetch-ledger'
import { mergeEntries, type KnownLedger } from '../../../lib/known-ledger'
import { ledgerCache } from '../../../lib/ledger-cache'
import { askAgainAfter } from '../../../lib/use-live'

/** Where no stream of the server tells of it. */
const POLL = 1000

export const entriesKey = (testId: string) => ['proof-test', testId, 'entries'] as const

/** Asks for what came after what is known, every second where no stream tells, and keeps what it has while nothing answers. */
export const entriesQuery = (testId: string, client: QueryClient) =>
  queryOptions({
    queryKey: entriesKey(testId),
    queryFn: ({ signal }): Promise<KnownLedger> => fetchLedger(testId, () => client.getQueryData<KnownLedger>(entriesKey(testId)), signal),
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

/** Puts what this device kept of a test where the run looks, unless something newer is there. Never fails. */
export async function showKept(client: QueryClient, testId: string): Promise<void> {
  const kept = await ledgerCache.read(testId)
  if (!kept || client.getQueryData(entriesKey(testId)) !== undefined) return
  const { ledgerId, entries, people, sealedSeq, heardAt } = kept
  client.setQueryData<KnownLedger>(
    entriesKey(testId),
    { ledgerId, entries, people, sealedSeq, fromDevice: true },
    { updatedAt: Date.parse(heardAt) },
  )
}
