import { useMutation, useQueryClient } from '@tanstack/react-query'
import { registerPressResponseSchema } from '#shared/api/presses'
import { PRESS_VERSION, type PressPayload } from '#shared/press/entries'
import { api } from '../../../lib/api-client'
import { useUser } from '../../../lib/here'
import { sendOnce } from '../../../lib/send-once'

/** The press's id is made with the draft, so that a second tap, or a try after a lost answer, registers the same press. */
export interface Registration {
  pressId: string
  payload: PressPayload<'registered'>
}

export function useRegisterPress(shopId: string) {
  const client = useQueryClient()
  const user = useUser()
  return useMutation({
    mutationFn: ({ pressId, payload }: Registration) =>
      sendOnce(
        `${pressId}.register`,
        [{ ledgerId: pressId, kind: 'registered', payload, v: PRESS_VERSION, authorId: user.id, basedOnSeq: 0 }],
        (request) => api.send('POST', registerPressResponseSchema, '/api/presses', request, { query: { shop: shopId } }),
      ),
    onSuccess: () => Promise.all([client.invalidateQueries({ queryKey: ['presses'] }), client.invalidateQueries({ queryKey: ['today'] })]),
  })
}
