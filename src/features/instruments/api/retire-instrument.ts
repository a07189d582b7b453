import { useMutation } from '@tanstack/react-query'
import { instrumentResponseSchema } from '#shared/api/instruments'
import { api } from '../../../lib/api-client'
import { instrumentPath, useKeepInstrument } from './get-instrument'

const retireInstrument = (id: string, retired: boolean) =>
  api.send(retired ? 'POST' : 'DELETE', instrumentResponseSchema, `${instrumentPath(id)}/retirement`, undefined)

/** Takes an instrument out of use, or brings it back. */
export function useRetireInstrument(id: string) {
  const keep = useKeepInstrument()
  return useMutation({ mutationFn: (retired: boolean) => retireInstrument(id, retired), onSuccess: keep })
}
