import { queryOptions, useQuery } from '@tanstack/react-query'
import { entriesResponseSchema } from '#shared/api/ledger'
import { pressResponseSchema } from '#shared/api/presses'
import { foldPress } from '#shared/press/apply'
import { api } from '../../../lib/api-client'
import { placedIn } from '../../../lib/attachment-places'

const addressOf = (id: string): `/api/presses/${string}` => `/api/presses/${encodeURIComponent(id)}`

/** The row says whose the press is; the ledger says everything else. */
async function fetchPress(id: string, signal?: AbortSignal) {
  const [row, ledger] = await Promise.all([
    api.get(pressResponseSchema, addressOf(id), { signal }),
    api.get(entriesResponseSchema, `${addressOf(id)}/entries`, { signal }),
  ])
  const state = foldPress(id, ledger.entries)
  return { shopId: row.shopId, row: row.press, state, people: ledger.people, photos: placedIn(ledger.entries) }
}

export const pressQuery = (id: string) =>
  queryOptions({
    queryKey: ['press', id] as const,
    queryFn: ({ signal }) => fetchPress(id, signal),
  })

export const usePress = (id: string) => useQuery(pressQuery(id))
export type PressFetched = Awaited<ReturnType<typeof fetchPress>>
