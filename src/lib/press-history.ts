import { queryOptions } from '@tanstack/react-query'
import { pressHistorySchema } from '#shared/api/press-history'
import { api } from './api-client'

/** Every climb of every test of a press, the oldest first. */
export const pressHistoryQuery = (pressId: string) =>
  queryOptions({
    queryKey: ['press-history', pressId] as const,
    queryFn: ({ signal }) => api.get(pressHistorySchema, `/api/presses/${encodeURIComponent(pressId)}/history`, { signal }),
  })
