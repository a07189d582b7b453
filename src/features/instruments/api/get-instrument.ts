import { queryOptions, useQuery, useQueryClient } from '@tanstack/react-query'
import { instrumentResponseSchema, type InstrumentResponse } from '#shared/api/instruments'
import { api } from '../../../lib/api-client'

export const instrumentPath = (id: string) => `/api/instruments/${encodeURIComponent(id)}` as const

const fetchInstrument = (id: string, signal?: AbortSignal) => api.get(instrumentResponseSchema, instrumentPath(id), { signal })

/** An instrument with every calibration it ever had. */
export const instrumentQuery = (id: string) =>
  queryOptions({
    queryKey: ['instrument', id] as const,
    queryFn: ({ signal }) => fetchInstrument(id, signal),
  })

export const useInstrument = (id: string) => useQuery(instrumentQuery(id))

/** Every change answers the instrument as it is now: it is kept, and lists are fetched anew. */
export function useKeepInstrument() {
  const client = useQueryClient()
  return (answer: InstrumentResponse) => {
    client.setQueryData(instrumentQuery(answer.instrument.id).queryKey, answer)
    return client.invalidateQueries({ queryKey: ['instruments', answer.shopId] })
  }
}
