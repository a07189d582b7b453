import { queryOptions, useQuery } from '@tanstack/react-query'
import { todayResponseSchema } from '#shared/api/today'
import { api } from '../../../lib/api-client'

const fetchToday = (shopId: string, day: string, signal?: AbortSignal) =>
  api.get(todayResponseSchema, '/api/today', { query: { shop: shopId, day }, signal })

/** What is under way, what waits for this person and what falls due, on the reader's own day. */
export const todayQuery = (shopId: string, day: string) =>
  queryOptions({
    queryKey: ['today', shopId, day] as const,
    queryFn: ({ signal }) => fetchToday(shopId, day, signal),
    // A test under way moves on while somebody looks.
    refetchInterval: 20_000,
  })

export const useToday = (shopId: string, day: string) => useQuery(todayQuery(shopId, day))
