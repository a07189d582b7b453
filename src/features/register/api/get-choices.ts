import { queryOptions, useQuery } from '@tanstack/react-query'
import { peopleResponseSchema } from '#shared/api/people'
import { pressListSchema } from '#shared/api/presses'
import { api } from '../../../lib/api-client'

const MOST = 100

async function fetchChoices(shopId: string, signal?: AbortSignal) {
  const [{ presses }, { people }] = await Promise.all([
    api.get(pressListSchema, '/api/presses', { query: { shop: shopId, limit: MOST }, signal }),
    api.get(peopleResponseSchema, '/api/people', { query: { shop: shopId }, signal }),
  ])
  const leads = people.filter((person) => person.role === 'lead' || person.role === 'owner')
  return {
    presses: presses.map(({ id, name, whatFor }) => ({ value: id, label: [name, whatFor].filter(Boolean).join(', ') })),
    leads: leads.map(({ userId, name }) => ({ value: userId, label: name })),
  }
}

/** The presses and the leads that the register can be narrowed to. */
export const choicesQuery = (shopId: string) =>
  queryOptions({
    queryKey: ['register-choices', shopId] as const,
    queryFn: ({ signal }) => fetchChoices(shopId, signal),
    staleTime: 60_000,
  })

export const useChoices = (shopId: string) => useQuery(choicesQuery(shopId))
