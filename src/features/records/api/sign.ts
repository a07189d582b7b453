import { useMutation, useQueryClient } from '@tanstack/react-query'
import { v7 as newId } from 'uuid'
import { signatureResponseSchema, type SignatureRequest } from '#shared/api/proof-tests'
import { api } from '../../../lib/api-client'
import { ProblemError } from '../../../lib/problem'
import { ledgerQuery } from './get-ledger'

/** What a form of this page sends, without the id that each attempt is given. */
export type Signing = SignatureRequest extends infer Request ? (Request extends unknown ? Omit<Request, 'entryId'> : never) : never

/** True when the record has grown since it was read. */
export const hasMovedOn = (error: unknown): boolean => error instanceof ProblemError && error.code === 'stale-head'

/** Signs, countersigns or declines. The record is fetched anew after a signature, and when it turned out to have grown. */
export function useSign(testId: string) {
  const client = useQueryClient()
  const refresh = () => client.invalidateQueries({ queryKey: ledgerQuery(testId).queryKey })
  return useMutation({
    mutationFn: (signing: Signing) =>
      api.send('POST', signatureResponseSchema, `/api/proof-tests/${encodeURIComponent(testId)}/signatures`, {
        ...signing,
        entryId: newId(),
      }),
    onSuccess: refresh,
    onError: (error) => (hasMovedOn(error) ? refresh() : undefined),
  })
}
