import { queryOptions, useQuery, type QueryClient } from '@tanstack/react-query'
import { sessionResponseSchema } from '#shared/api/session'
import { api } from '../../../lib/api-client'

const fetchSession = (signal?: AbortSignal) => api.get(sessionResponseSchema, '/api/session', { signal })

/** Who is signed in, and to which shops that person belongs. */
export const sessionQuery = () =>
  queryOptions({
    queryKey: ['session'] as const,
    queryFn: ({ signal }) => fetchSession(signal),
    staleTime: 60_000,
  })

export const useSession = () => useQuery(sessionQuery())

/** Another request was refused for want of a session: ask whether it has ended, so that the frame can say so. */
export function sessionEnded(client: QueryClient, found: readonly unknown[]): void {
  const { queryKey } = sessionQuery()
  if (found[0] !== queryKey[0]) void client.invalidateQueries({ queryKey })
}
