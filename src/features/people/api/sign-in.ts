import { useMutation, useQueryClient } from '@tanstack/react-query'
import { sessionResponseSchema, type SignInRequest } from '#shared/api/session'
import { api } from '../../../lib/api-client'
import { rememberSession, sessionQuery } from './get-session'

const signIn = (request: SignInRequest) => api.send('POST', sessionResponseSchema, '/api/session', request)

/** Signs in; what another person saw on this device is forgotten first. */
export function useSignIn() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: signIn,
    onSuccess: (session) => {
      client.clear()
      client.setQueryData(sessionQuery().queryKey, session)
      void rememberSession(session)
    },
  })
}
