import { useMutation } from '@tanstack/react-query'
import { protocolResponseSchema } from '#shared/api/protocols'
import { api } from '../../../lib/api-client'
import { protocolPath, useKeepProtocol } from './get-protocol'

const archiveProtocol = (id: string, archived: boolean) =>
  api.send(archived ? 'POST' : 'DELETE', protocolResponseSchema, `${protocolPath(id)}/archive`, undefined)

/** Takes a protocol out of the choice for new tests, or brings it back. */
export function useArchiveProtocol(id: string) {
  const keep = useKeepProtocol()
  return useMutation({ mutationFn: (archived: boolean) => archiveProtocol(id, archived), onSuccess: keep })
}
