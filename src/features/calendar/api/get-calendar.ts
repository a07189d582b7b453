import { queryOptions, useMutation, useQuery } from '@tanstack/react-query'
import { calendarFeedSchema, calendarSchema } from '#shared/api/calendar'
import { api } from '../../../lib/api-client'

/** What falls due in a shop between two calendar dates, both counted. */
export const calendarQuery = (shop: string, from: string, to: string) =>
  queryOptions({
    queryKey: ['calendar', shop, from, to] as const,
    queryFn: ({ signal }) => api.get(calendarSchema, '/api/calendar', { query: { shop, from, to }, signal }),
  })

export const useCalendar = (shop: string, from: string, to: string) => useQuery(calendarQuery(shop, from, to))

/** Makes an address for a calendar program to follow, and ends the one before; or ends it. */
export function useFeed(shop: string) {
  return useMutation({
    mutationFn: (act: 'make' | 'end') =>
      api.send(act === 'make' ? 'POST' : 'DELETE', calendarFeedSchema, '/api/calendar/feed', undefined, { query: { shop } }),
  })
}
