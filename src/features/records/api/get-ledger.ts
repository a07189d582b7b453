import { queryOptions, useQuery } from '@tanstack/react-query'
import { useMemo } from 'react'
import { entriesResponseSchema } from '#shared/api/ledger'
import { api } from '../../../lib/api-client'
import { askAgainAfter, useLive } from '../../../lib/use-live'
import { useVerificationKeys } from '../../../lib/verification-keys'
import { readRecord, type RecordView } from '../record-view'

const fetchLedger = (id: string, signal?: AbortSignal) =>
  api.get(entriesResponseSchema, `/api/proof-tests/${encodeURIComponent(id)}/entries`, { query: { after: 0 }, signal })

/** A record that may still grow is asked for again while it is read, where no stream tells of it. */
const AGAIN_AFTER = 5_000

const ledgerKey = (id: string) => ['record', id] as const

/** The whole ledger of a test, for its record. Kept apart from the run's: a record is read whole or not at all. */
export const ledgerQuery = (id: string) =>
  queryOptions({
    queryKey: ledgerKey(id),
    queryFn: ({ signal }) => fetchLedger(id, signal),
    staleTime: 0,
    refetchInterval: ({ state }) => (state.data?.entries.at(-1)?.kind === 'countersigned' ? false : askAgainAfter([id], AGAIN_AFTER)),
  })

/** The ledger folded, evaluated and checked with the server's keys; the same object until the ledger grows. */
export function useRecord(id: string): { record: RecordView | undefined; error: unknown } {
  const { data, error } = useQuery(ledgerQuery(id))
  useLive([id], ledgerKey(id))
  const { keys } = useVerificationKeys(data?.sealed.map(({ kid }) => kid))
  const record = useMemo(() => (data === undefined ? undefined : readRecord(data, keys)), [data, keys])
  return { record, error }
}
