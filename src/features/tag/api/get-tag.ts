import { queryOptions, useQuery } from '@tanstack/react-query'
import { publicTagSchema, tagResponseSchema } from '#shared/api/tags'
import { api } from '../../../lib/api-client'
import { calendarDate } from '../../../lib/dates'

/** The press's tag. Its code is made the first time somebody asks, and stays the same after. */
export const tagQuery = (pressId: string) =>
  queryOptions({
    queryKey: ['press-tag', pressId] as const,
    queryFn: ({ signal }) => api.send('POST', tagResponseSchema, `/api/presses/${encodeURIComponent(pressId)}/tag`, undefined, { signal }),
  })

export const useTag = (pressId: string) => useQuery(tagQuery(pressId))

/** How often the public page asks again. */
export const ASK_EVERY_MS = 30_000

/** What the tag says at this moment. A failure is not tried again behind the reader's back: the page says that it can't tell. */
export const publicTagQuery = (code: string) =>
  queryOptions({
    queryKey: ['public-tag', code] as const,
    queryFn: ({ signal }) =>
      api.get(publicTagSchema, `/api/tags/${encodeURIComponent(code)}`, { query: { day: calendarDate(new Date()) }, signal }),
    staleTime: 0,
    retry: false,
    refetchInterval: ASK_EVERY_MS,
    refetchOnWindowFocus: 'always',
    refetchOnReconnect: 'always',
    enabled: code !== '',
  })

export const usePublicTag = (code: string) => useQuery(publicTagQuery(code))
