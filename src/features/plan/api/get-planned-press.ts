import { queryOptions, useQuery } from '@tanstack/react-query'
import { entriesResponseSchema } from '#shared/api/ledger'
import { testListSchema } from '#shared/api/proof-tests'
import { foldPress } from '#shared/press/apply'
import { api } from '../../../lib/api-client'

const LATEST = 10

/** The press a test is planned on, folded from its ledger, and its latest tests that a new one may repeat. */
async function fetchPlannedPress(shopId: string, pressId: string, signal?: AbortSignal) {
  const [ledger, { proofTests }] = await Promise.all([
    api.get(entriesResponseSchema, `/api/presses/${encodeURIComponent(pressId)}/entries`, { signal }),
    api.get(testListSchema, '/api/proof-tests', { query: { shop: shopId, press: pressId, limit: LATEST }, signal }),
  ])
  return { state: foldPress(pressId, ledger.entries), tests: proofTests }
}

export const plannedPressQuery = (shopId: string, pressId: string) =>
  queryOptions({
    queryKey: ['planned-press', shopId, pressId] as const,
    queryFn: ({ signal }) => fetchPlannedPress(shopId, pressId, signal),
    enabled: pressId !== '',
  })

export const usePlannedPress = (shopId: string, pressId: string) => useQuery(plannedPressQuery(shopId, pressId))
export type PlannedPress = Awaited<ReturnType<typeof fetchPlannedPress>>
