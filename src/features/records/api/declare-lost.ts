import { useMutation, useQueryClient } from '@tanstack/react-query'
import { useEffect } from 'react'
import { deviceId } from '../../../lib/entry'
import { useUser } from '../../../lib/here'
import { outbox } from '../../../lib/outbox'
import type { RecordView } from '../record-view'
import { ledgerQuery } from './get-ledger'

/** Gives up the bytes of a photo or document, with the reason: an entry like any other, kept here until the server has it. */
export function useDeclareLost({ id, state }: RecordView) {
  const user = useUser()
  const client = useQueryClient()
  useEffect(
    () =>
      outbox.onKept((testId) => {
        if (testId === id) void client.invalidateQueries({ queryKey: ledgerQuery(id).queryKey })
      }),
    [client, id],
  )
  return useMutation({
    mutationFn: (lost: { sha256: string; why: string }) =>
      outbox.enqueue(
        id,
        { ledgerId: id, kind: 'attachment-lost', payload: lost, authorId: user.id, basedOnSeq: state.headSeq },
        state.devices[deviceId()]?.highest ?? 0,
      ),
  })
}
