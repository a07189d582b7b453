import { queryOptions, useQuery } from '@tanstack/react-query'
import { peopleResponseSchema } from '#shared/api/people'
import { api } from '../../../lib/api-client'

const fetchPeople = (shopId: string, signal?: AbortSignal) =>
  api.get(peopleResponseSchema, '/api/people', { query: { shop: shopId }, signal })

/** Everyone of a shop, also those whose time there has ended. */
export const peopleQuery = (shopId: string) =>
  queryOptions({
    queryKey: ['people', shopId] as const,
    queryFn: ({ signal }) => fetchPeople(shopId, signal),
  })

export const usePeople = (shopId: string) => useQuery(peopleQuery(shopId))
