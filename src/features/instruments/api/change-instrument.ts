import { useMutation } from '@tanstack/react-query'
import { instrumentResponseSchema } from '#shared/api/instruments'
import type { InstrumentDetails } from '#shared/instruments/model'
import { api } from '../../../lib/api-client'
import { instrumentPath, useKeepInstrument } from './get-instrument'

const changeInstrument = (id: string, details: InstrumentDetails) => api.send('PUT', instrumentResponseSchema, instrumentPath(id), details)

export function useChangeInstrument(id: string) {
  const keep = useKeepInstrument()
  return useMutation({ mutationFn: (details: InstrumentDetails) => changeInstrument(id, details), onSuccess: keep })
}
