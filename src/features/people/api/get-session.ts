import { queryOptions, useQuery, type QueryClient } from '@tanstack/react-query'
import { sessionResponseSchema, type SessionResponse } from '#shared/api/session'
import { api } from '../../../lib/api-client'
import { Disconnected } from '../../../lib/problem'

/** How long the server may be silent before whoever was signed in here last goes on without it (ms). */
const PATIENCE = 2500

// The sign-in alone needs none of it, so it is no part of what a signed-out device fetches.
const keeper = () => import('../../../lib/kept-session')

/** Keeps on this device who is signed in. A device that can't keep it asks the server the next time. */
export async function rememberSession(session: SessionResponse): Promise<void> {
  await (await keeper()).keepSession(session).catch(() => undefined)
}

async function askServer(signal?: AbortSignal): Promise<SessionResponse> {
  const session = await api.get(sessionResponseSchema, '/api/session', { signal })
  void rememberSession(session)
  return session
}

async function kept(): Promise<SessionResponse | undefined> {
  return (await keeper()).readSession()
}

/**
 * Who is signed in, by the server; where nothing answers, whoever was signed in on this device when it last did. An ended
 * session is an answer: then nobody is.
 */
async function fetchSession(signal?: AbortSignal): Promise<SessionResponse> {
  const asked = askServer(signal)
  let timer: ReturnType<typeof setTimeout> | undefined
  const impatient = new Promise<'late'>((resolve) => {
    timer = setTimeout(() => resolve('late'), PATIENCE)
  })
  try {
    const first = await Promise.race([asked, impatient])
    return first === 'late' ? ((await kept()) ?? (await asked)) : first
  } catch (error) {
    const here = error instanceof Disconnected ? await kept() : undefined
    if (here === undefined) throw error
    return here
  } finally {
    clearTimeout(timer)
    // Nobody waits any more for an answer that comes too late.
    asked.catch(() => undefined)
  }
}

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
