import { useMutation } from '@tanstack/react-query'
import { toolingResponseSchema } from '#shared/api/tooling'
import type { ToolingDetails } from '#shared/tooling'
import { api } from '../../../lib/api-client'
import { piecePath, useKeepPiece } from './get-tooling'

const addPiece = (shopId: string, details: ToolingDetails) =>
  api.send('POST', toolingResponseSchema, '/api/tooling', details, { query: { shop: shopId } })

export function useAddPiece(shopId: string) {
  const keep = useKeepPiece()
  return useMutation({ mutationFn: (details: ToolingDetails) => addPiece(shopId, details), onSuccess: keep })
}

const changePiece = (id: string, details: ToolingDetails) => api.send('PUT', toolingResponseSchema, piecePath(id), details)

export function useChangePiece(id: string) {
  const keep = useKeepPiece()
  return useMutation({ mutationFn: (details: ToolingDetails) => changePiece(id, details), onSuccess: keep })
}

const retirePiece = (id: string, retired: boolean) =>
  api.send(retired ? 'POST' : 'DELETE', toolingResponseSchema, `${piecePath(id)}/retirement`, undefined)

/** Takes a piece out of use, or brings it back. */
export function useRetirePiece(id: string) {
  const keep = useKeepPiece()
  return useMutation({ mutationFn: (retired: boolean) => retirePiece(id, retired), onSuccess: keep })
}
