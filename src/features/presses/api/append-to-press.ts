import { useMutation, useQueryClient } from '@tanstack/react-query'
import { appendResponseSchema } from '#shared/api/ledger'
import { PRESS_VERSION, type PressDraft } from '#shared/press/entries'
import { api } from '../../../lib/api-client'
import { useUser } from '../../../lib/here'
import { sendOnce } from '../../../lib/send-once'
import { pressQuery } from './get-press'

/** Adds to a press's ledger what somebody did to it, in the order given. `form` names what is being filled in. */
export function useAppendToPress(pressId: string, headSeq: number, form: string) {
  const client = useQueryClient()
  const user = useUser()
  return useMutation({
    mutationFn: (drafts: readonly PressDraft[]) =>
      sendOnce(
        `${pressId}.${form}`,
        drafts.map((draft) => ({ ledgerId: pressId, ...draft, v: PRESS_VERSION, authorId: user.id, basedOnSeq: headSeq })),
        (request) => api.send('POST', appendResponseSchema, `/api/presses/${encodeURIComponent(pressId)}/entries`, request),
      ),
    onSettled: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: pressQuery(pressId).queryKey }),
        client.invalidateQueries({ queryKey: ['presses'] }),
        client.invalidateQueries({ queryKey: ['today'] }),
      ]),
  })
}
