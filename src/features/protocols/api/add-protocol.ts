import { useMutation } from '@tanstack/react-query'
import { protocolResponseSchema, type ProtocolRequest } from '#shared/api/protocols'
import { api } from '../../../lib/api-client'
import { useKeepProtocol } from './get-protocol'

const addProtocol = (shopId: string, request: ProtocolRequest) =>
  api.send('POST', protocolResponseSchema, '/api/protocols', request, { query: { shop: shopId } })

export function useAddProtocol(shopId: string) {
  const keep = useKeepProtocol()
  return useMutation({ mutationFn: (request: ProtocolRequest) => addProtocol(shopId, request), onSuccess: keep })
}
