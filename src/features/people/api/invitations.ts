import { queryOptions, useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { invitationsResponseSchema, type InviteRequest } from '#shared/api/invitations'
import { api } from '../../../lib/api-client'

/** Invitations that wait, and who came from outside. */
export const invitationsQuery = (shopId: string) =>
  queryOptions({
    queryKey: ['invitations', shopId] as const,
    queryFn: ({ signal }) => api.get(invitationsResponseSchema, '/api/invitations', { query: { shop: shopId }, signal }),
  })

export const useInvitations = (shopId: string, enabled: boolean) => useQuery({ ...invitationsQuery(shopId), enabled })

const invited = z.object({ id: z.string() })

export function useInvite(shopId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (request: InviteRequest) => api.send('POST', invited, '/api/invitations', request, { query: { shop: shopId } }),
    onSuccess: () => client.invalidateQueries({ queryKey: invitationsQuery(shopId).queryKey }),
  })
}

/** Takes an invitation back, or ends what came of it. */
export function useRevoke(shopId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (id: string) => api.tell('DELETE', `/api/invitations/${encodeURIComponent(id)}`),
    onSuccess: () => client.invalidateQueries({ queryKey: invitationsQuery(shopId).queryKey }),
  })
}
