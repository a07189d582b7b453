import { queryOptions, useQuery } from '@tanstack/react-query'
import { todayResponseSchema } from '#shared/api/today'
import { api } from '../../../lib/api-client'
import { useLive } from '../../../lib/use-live'

const fetchToday = (shopId: string, day: string, signal?: AbortSignal) =>
  api.get(todayResponseSchema, '/api/today', { query: { shop: shopId, day }, signal })

/** A large shop’s other presses are found by asking again. */
const MOST_LIVE = 40

const todayKey = (shopId: string, day: string) => ['today', shopId, day] as const

/** What is under way, what waits for this person and what falls due, on the reader's own day. */
export const todayQuery = (shopId: string, day: string) =>
  queryOptions({
    queryKey: todayKey(shopId, day),
    queryFn: ({ signal }) => fetchToday(shopId, day, signal),
    // A test under way moves on while somebody looks.
    refetchInterval: 20_000,
  })

export function useToday(shopId: string, day: string) {
  const query = useQuery(todayQuery(shopId, day))
  const tests = query.data?.underWay.map(({ test }) => test.id) ?? []
  // A test that opens takes its press, and so moves the press's ledger.
  const presses = query.data?.presses.map(({ press }) => press.id) ?? []
  useLive([...tests, ...presses].slice(0, MOST_LIVE), todayKey(shopId, day))
  return query
}
