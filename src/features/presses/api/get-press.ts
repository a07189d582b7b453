import { queryOptions, useQuery } from '@tanstack/react-query'
import { entriesResponseSchema } from '#shared/api/ledger'
import { pressResponseSchema } from '#shared/api/presses'
import { foldPress } from '#shared/press/apply'
import { api } from '../../../lib/api-client'
import { placedIn } from '../../../lib/attachment-places'
import { useLive } from '../../../lib/use-live'

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

const pressKey = (id: string) => ['press', id] as const

export const pressQuery = (id: string) =>
  queryOptions({
    queryKey: pressKey(id),
    queryFn: ({ signal }) => fetchPress(id, signal),
  })

export function usePress(id: string) {
  useLive([id], pressKey(id))
  return useQuery(pressQuery(id))
}
export type PressFetched = Awaited<ReturnType<typeof fetchPress>>
