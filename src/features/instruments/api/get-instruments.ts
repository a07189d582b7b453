import { keepPreviousData, queryOptions, useQuery } from '@tanstack/react-query'
import { instrumentListSchema, type InstrumentListQuery } from '#shared/api/instruments'
import { api } from '../../../lib/api-client'

/** What of the register is asked for; the shop's instruments in use by their code unless said otherwise. */
export type InstrumentsAsked = Pick<InstrumentListQuery, 'shop'> & Partial<InstrumentListQuery>

const fetchInstruments = (asked: InstrumentsAsked, signal?: AbortSignal) =>
  api.get(instrumentListSchema, '/api/instruments', { query: asked, signal })

export const instrumentsQuery = (asked: InstrumentsAsked) =>
  queryOptions({
    queryKey: ['instruments', asked.shop, asked] as const,
    queryFn: ({ signal }) => fetchInstruments(asked, signal),
  })

/** A page of the register. The page before stays in place until the next one is here. */
export const useInstruments = (asked: InstrumentsAsked) => useQuery({ ...instrumentsQuery(asked), placeholderData: keepPreviousData })
