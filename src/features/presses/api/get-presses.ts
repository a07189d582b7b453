import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query'
import { pressListSchema, type PressListQuery } from '#shared/api/presses'
import { api } from '../../../lib/api-client'

/** What of the register is asked for; all presses by name unless said otherwise. */
export type PressesAsked = Pick<PressListQuery, 'shop'> & Partial<PressListQuery>

const fetchPresses = (asked: PressesAsked, signal?: AbortSignal) => api.get(pressListSchema, '/api/presses', { query: asked, signal })

export const pressesQuery = (asked: PressesAsked) =>
  queryOptions({
    queryKey: ['presses', asked.shop, asked] as const,
    queryFn: ({ signal }) => fetchPresses(asked, signal),
  })

/** A page of the register. The page before stays in place until the next one is here. */
export const usePresses = (asked: PressesAsked) => useQuery({ ...pressesQuery(asked), placeholderData: keepPreviousData })
