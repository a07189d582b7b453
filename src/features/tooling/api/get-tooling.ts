import { keepPreviousData, queryOptions, useQuery, useQueryClient } from '@tanstack/react-query'
import { toolingListSchema, toolingResponseSchema, type ToolingListQuery, type ToolingResponse } from '#shared/api/tooling'
import { api } from '../../../lib/api-client'

/** What of the register is asked for; the shop's pieces in use by their number unless said otherwise. */
export type ToolingAsked = Pick<ToolingListQuery, 'shop'> & Partial<ToolingListQuery>

const fetchTooling = (asked: ToolingAsked, signal?: AbortSignal) => api.get(toolingListSchema, '/api/tooling', { query: asked, signal })

export const toolingQuery = (asked: ToolingAsked) =>
  queryOptions({
    queryKey: ['tooling', asked.shop, asked] as const,
    queryFn: ({ signal }) => fetchTooling(asked, signal),
  })

/** A page of the register. The page before stays in place until the next one is here. */
export const useTooling = (asked: ToolingAsked) => useQuery({ ...toolingQuery(asked), placeholderData: keepPreviousData })

export const piecePath = (id: string) => `/api/tooling/${encodeURIComponent(id)}` as const

export const pieceQuery = (id: string) =>
  queryOptions({
    queryKey: ['tooling-piece', id] as const,
    queryFn: ({ signal }) => api.get(toolingResponseSchema, piecePath(id), { signal }),
  })

/** One piece of the register. */
export const usePiece = (id: string) => useQuery(pieceQuery(id))

/** Every change answers the piece as it is now: it is kept, and lists are fetched anew. */
export function useKeepPiece() {
  const client = useQueryClient()
  return (answer: ToolingResponse) => {
    client.setQueryData(pieceQuery(answer.tooling.id).queryKey, answer)
    return Promise.all(
      [
        ['tooling', answer.shopId],
        ['plan-registers', answer.shopId],
      ].map((queryKey) => client.invalidateQueries({ queryKey })),
    )
  }
}
