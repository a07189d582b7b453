import { useMutation, useQueryClient } from '@tanstack/react-query'
import { appendResponseSchema } from '#shared/api/ledger'
import type { Attachment, Override } from '#shared/ledger/envelope'
import { PRESS_VERSION, type PressDraft } from '#shared/press/entries'
import { api } from '../../../lib/api-client'
import { files } from '../../../lib/attachments'
import { useUser } from '../../../lib/here'
import { sendOnce } from '../../../lib/send-once'
import { dropKeptChange } from '../kept-change'
import { pressQuery } from './get-press'

/** What somebody did to a press, the photos of it, and reasons where a rule asks for one. */
export type PressWriting = PressDraft & { attachments?: Attachment[]; overrides?: Override[] }

/** Adds to a press's ledger what somebody did to it, in the order given. `form` names what is being filled in. */
export function useAppendToPress(pressId: string, headSeq: number, form: string) {
  const client = useQueryClient()
  const user = useUser()
  return useMutation({
    mutationFn: (drafts: readonly PressWriting[]) =>
      sendOnce(
        `${pressId}.${form}`,
        drafts.map((draft) => ({ ledgerId: pressId, ...draft, v: PRESS_VERSION, authorId: user.id, basedOnSeq: headSeq })),
        (request) => api.send('POST', appendResponseSchema, `/api/presses/${encodeURIComponent(pressId)}/entries`, request),
      ),
    onSuccess: (_answer, drafts) => {
      // Here, not in the form: somebody may have left the page before the answer came.
      if (drafts.some(({ kind }) => kind === 'changed')) dropKeptChange(pressId, user.id)
      const hashes = drafts.flatMap(({ attachments = [] }) => attachments.map(({ sha256 }) => sha256))
      // What goes wrong here is tried again at the next start.
      files.named(`ledger:${pressId}`, hashes).catch(() => undefined)
    },
    onSettled: () =>
      Promise.all([
        client.invalidateQueries({ queryKey: pressQuery(pressId).queryKey }),
        client.invalidateQueries({ queryKey: ['presses'] }),
        client.invalidateQueries({ queryKey: ['today'] }),
      ]),
  })
}
