import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { invitationsResponseSchema } from '#shared/api/invitations'
import { api } from '../../../lib/api-client'

const outsideQuery = (shopId: string) =>
  queryOptions({
    queryKey: ['plan-outside', shopId] as const,
    queryFn: ({ signal }) => api.get(invitationsResponseSchema, '/api/invitations', { query: { shop: shopId }, signal }),
    // Somebody may accept while the plan is on the screen.
    refetchInterval: 15_000,
  })

/** Who was invited to witness this press’s next test, and who of them accepted. */
export function useOutside(shopId: string, pressId: string) {
  const { data } = useQuery(outsideQuery(shopId))
  const ofPress = (one: { pressId: string | null }) => pressId !== '' && one.pressId === pressId
  return {
    waiting: data?.invitations.filter((one) => one.kind === 'witness' && ofPress(one) && !one.expired) ?? [],
    accepted: data?.guests.filter((one) => ofPress(one) && one.test === null) ?? [],
  }
}

const invited = z.object({ id: z.string() })

export function useInviteWitness(shopId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (request: { email: string; pressId: string }) =>
      api.send('POST', invited, '/api/invitations', { kind: 'witness', ...request }, { query: { shop: shopId } }),
    onSuccess: () => client.invalidateQueries({ queryKey: outsideQuery(shopId).queryKey }),
  })
}
