import { useMutation } from '@tanstack/react-query'
import { instrumentResponseSchema } from '#shared/api/instruments'
import type { InstrumentDetails } from '#shared/instruments/model'
import { api } from '../../../lib/api-client'
import { useKeepInstrument } from './get-instrument'

const addInstrument = (shopId: string, details: InstrumentDetails) =>
  api.send('POST', instrumentResponseSchema, '/api/instruments', details, { query: { shop: shopId } })

export function useAddInstrument(shopId: string) {
  const keep = useKeepInstrument()
  return useMutation({ mutationFn: (details: InstrumentDetails) => addInstrument(shopId, details), onSuccess: keep })
}
