import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useNavigate } from 'react-router-dom'
import { api } from '../../../lib/api-client'
import { paths } from '../../../paths'

/** Ends the session; what this device kept to go on without a network goes with it, what waits to be sent never does. */
async function signOut(): Promise<void> {
  await api.tell('DELETE', '/api/session')
  const { forgetSession } = await import('../../../lib/kept-session')
  await forgetSession().catch(() => undefined)
}

interface Leave {
  /** Ends the session; what waits on this device stays there. */
  leave: () => void
  /** The server was not reached: still signed in. */
  failed: boolean
}

export function useLeave(): Leave {
  const ending = useMutation({ mutationFn: signOut })
  const client = useQueryClient()
  const navigate = useNavigate()
  const leave = (): void =>
    ending.mutate(undefined, {
      onSuccess: () => {
        client.clear()
        void navigate(paths.signIn.href())
      },
    })
  return { leave, failed: ending.isError }
}

/** Whether entries of this person wait on this device. Storage that fails is asked nothing: its screen says so. */
export async function entriesWait(personId: string): Promise<boolean> {
  if (!('indexedDB' in window)) return false
  const { outbox } = await import('../../../lib/outbox')
  return outbox.contents().then(
    ({ waiting }) => waiting.some(({ entry }) => entry.authorId === personId),
    () => true,
  )
}
