import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { invitationLookSchema, type AcceptRequest } from '#shared/api/invitations'
import { sessionResponseSchema, type SessionResponse } from '#shared/api/session'
import { api } from '../../../lib/api-client'

/** Who invites, and to what. The secret goes in the body: addresses end up in logs. */
export const useInvitation = (token: string) =>
  useQuery({
    queryKey: ['invitation', token] as const,
    queryFn: ({ signal }) => api.send('POST', invitationLookSchema, '/api/invitations/look', { token }, { signal }),
    retry: false,
    staleTime: Infinity,
  })

/** Accepts, which signs in; what another person saw on this device is forgotten first. */
export function useAccept(remember: (session: SessionResponse) => void) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (request: AcceptRequest) => api.send('POST', sessionResponseSchema, '/api/invitations/accept', request),
    onSuccess: (session) => {
      client.clear()
      remember(session)
    },
  })
}
