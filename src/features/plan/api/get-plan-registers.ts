import { queryOptions, useQuery } from '@tanstack/react-query'
import { instrumentListSchema } from '#shared/api/instruments'
import { peopleResponseSchema } from '#shared/api/people'
import { pressListSchema } from '#shared/api/presses'
import { protocolListSchema } from '#shared/api/protocols'
import { toolingListSchema } from '#shared/api/tooling'
import { api } from '../../../lib/api-client'

const MOST = 100

/** Everything a plan chooses from: presses, protocols, instruments and tooling in use, and people of the shop. */
async function fetchRegisters(shopId: string, signal?: AbortSignal) {
  const query = { shop: shopId }
  const [{ presses }, { protocols }, { instruments }, { tooling }, { people }] = await Promise.all([
    api.get(pressListSchema, '/api/presses', { query: { ...query, limit: MOST }, signal }),
    api.get(protocolListSchema, '/api/protocols', { query, signal }),
    api.get(instrumentListSchema, '/api/instruments', { query: { ...query, limit: MOST }, signal }),
    api.get(toolingListSchema, '/api/tooling', { query: { ...query, limit: MOST }, signal }),
    api.get(peopleResponseSchema, '/api/people', { query, signal }),
  ])
  return {
    presses,
    protocols: protocols.filter((protocol) => !protocol.archived),
    instruments: instruments.filter((instrument) => !instrument.retired),
    tooling: tooling.filter((piece) => !piece.retired),
    people: people.filter((person) => person.endedAt === null),
  }
}

export const planRegistersQuery = (shopId: string) =>
  queryOptions({
    queryKey: ['plan-registers', shopId] as const,
    queryFn: ({ signal }) => fetchRegisters(shopId, signal),
  })

export const usePlanRegisters = (shopId: string) => useQuery(planRegistersQuery(shopId))
export type PlanRegisters = Awaited<ReturnType<typeof fetchRegisters>>
