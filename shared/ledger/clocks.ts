import type { LedgerEntry } from './envelope'

/** Both clocks of an entry are shown; from here on the difference between them is written out as well (ms). */
export const WORTH_SAYING = 5 * 60_000

/**
 * How far the server's clock when it received an entry lies after the device's clock when it was made, in whole minutes;
 * null up to five minutes. Positive: it waited on the device, or the device's clock was behind. Negative: the device's
 * clock was ahead, since nothing arrives before it is made. Five minutes: common practice, no source.
 */
export function minutesApart({ observedAt, receivedAt }: Pick<LedgerEntry, 'observedAt' | 'receivedAt'>): number | null {
  const apart = Date.parse(receivedAt) - Date.parse(observedAt)
  return Math.abs(apart) > WORTH_SAYING ? Math.round(apart / 60_000) : null
}

/** "12 min later", "3 h 5 min later", "7 min before it was made by the device’s clock"; empty when they agree. */
export function clocksApart(entry: Pick<LedgerEntry, 'observedAt' | 'receivedAt'>): string {
  const minutes = minutesApart(entry)
  if (minutes === null) return ''
  const size = Math.abs(minutes)
  const text = size < 60 ? `${size} min` : `${Math.floor(size / 60)} h ${size % 60} min`
  return minutes > 0 ? `${text} later` : `${text} before it was made by the device’s clock`
}
