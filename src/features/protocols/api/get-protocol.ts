import { queryOptions, useQuery, useQueryClient } from '@tanstack/react-query'
import { protocolResponseSchema, type ProtocolResponse } from '#shared/api/protocols'
import { api } from '../../../lib/api-client'
import { protocolsQuery } from './get-protocols'

export const protocolPath = (id: string) => `/api/protocols/${encodeURIComponent(id)}` as const

const fetchProtocol = (id: string, signal?: AbortSignal) => api.get(protocolResponseSchema, protocolPath(id), { signal })

/** A protocol with every version it ever had. */
export const protocolQuery = (id: string) =>
  queryOptions({
    queryKey: ['protocol', id] as const,
    queryFn: ({ signal }) => fetchProtocol(id, signal),
  })

export const useProtocol = (id: string) => useQuery(protocolQuery(id))

/** Every change answers the protocol as it is now: it is kept, and the list is fetched anew. */
export function useKeepProtocol() {
  const client = useQueryClient()
  return (answer: ProtocolResponse) => {
    client.setQueryData(protocolQuery(answer.protocol.id).queryKey, answer)
    return client.invalidateQueries({ queryKey: protocolsQuery(answer.shopId).queryKey })
  }
}
