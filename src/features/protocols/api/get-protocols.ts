import { queryOptions, useQuery } from '@tanstack/react-query'
import { protocolListSchema } from '#shared/api/protocols'
import { api } from '../../../lib/api-client'

const fetchProtocols = (shopId: string, signal?: AbortSignal) =>
  api.get(protocolListSchema, '/api/protocols', { query: { shop: shopId }, signal })

/** Every protocol of a shop in its current version, those for new tests first. */
export const protocolsQuery = (shopId: string) =>
  queryOptions({
    queryKey: ['protocols', shopId] as const,
    queryFn: ({ signal }) => fetchProtocols(shopId, signal),
  })

export const useProtocols = (shopId: string) => useQuery(protocolsQuery(shopId))
