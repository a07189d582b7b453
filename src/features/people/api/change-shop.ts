import { useMutation, useQueryClient } from '@tanstack/react-query'
import { shopSchema, type ChangeShopRequest } from '#shared/api/shops'
import { api } from '../../../lib/api-client'
import { sessionQuery } from './get-session'

const changeShop = (shopId: string, request: ChangeShopRequest) =>
  api.send('PATCH', shopSchema, `/api/shops/${encodeURIComponent(shopId)}`, request)

/** Changes a shop's settings. The session carries them, so it is fetched anew. */
export function useChangeShop(shopId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (request: ChangeShopRequest) => changeShop(shopId, request),
    onSuccess: () => client.invalidateQueries({ queryKey: sessionQuery().queryKey }),
  })
}
