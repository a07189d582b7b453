import { useMutation, useQueryClient } from '@tanstack/react-query'
import type { OpenShopRequest } from '#shared/api/open-shop'
import { sessionResponseSchema } from '#shared/api/session'
import { api } from '../../../lib/api-client'
import { rememberSession, sessionQuery } from './get-session'

const openShop = (request: OpenShopRequest) => api.send('POST', sessionResponseSchema, '/api/shops', request)

/** Opens a shop; its owner is signed in by the same answer. */
export function useOpenShop() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: openShop,
    onSuccess: (session) => {
      client.clear()
      client.setQueryData(sessionQuery().queryKey, session)
      void rememberSession(session)
    },
  })
}
