import { useMutation } from '@tanstack/react-query'
import { protocolResponseSchema, type ProtocolRequest } from '#shared/api/protocols'
import { api } from '../../../lib/api-client'
import { protocolPath, useKeepProtocol } from './get-protocol'

const addProtocolVersion = (id: string, request: ProtocolRequest) =>
  api.send('POST', protocolResponseSchema, `${protocolPath(id)}/versions`, request)

export function useAddProtocolVersion(id: string) {
  const keep = useKeepProtocol()
  return useMutation({ mutationFn: (request: ProtocolRequest) => addProtocolVersion(id, request), onSuccess: keep })
}
