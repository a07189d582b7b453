import { useEffect } from 'react'
import { useQueryClient, type QueryKey } from '@tanstack/react-query'
import { ledgerStream } from './stream'

/** How often it is asked all the same while the stream stands (ms): nothing rests on the stream alone. */
const SAFETY = 15_000

/** How long to wait before asking again: `alone` is the wait where no stream tells of these ledgers (ms). */
export function askAgainAfter(ledgerIds: readonly string[], alone: number): number {
  return ledgerIds.every((id) => ledgerStream.hears(id)) ? Math.max(SAFETY, alone) : alone
}

/** Asks again as soon as one of these ledgers has grown, here or on any other device. */
export function useLive(ledgerIds: readonly string[], queryKey: QueryKey): void {
  const client = useQueryClient()
  const watched = ledgerIds.join(',')
  const key = JSON.stringify(queryKey)
  useEffect(() => {
    if (watched === '') return undefined
    const ask = () => void client.invalidateQueries({ queryKey: JSON.parse(key) as QueryKey, exact: true })
    const stops = watched.split(',').map((id) => ledgerStream.watch(id, ask))
    return () => stops.forEach((stop) => stop())
  }, [client, watched, key])
}
