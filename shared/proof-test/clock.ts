import type { Mark } from './entries'

export interface Elapsed {
  seconds: number
  /** False when the two moments come from different boots, so that only the wall clock could be used. */
  monotonic: boolean
}

/** Time from one mark to another: monotonic within one boot of one device, else by the wall clock. */
export function elapsedBetween(from: Mark, to: Mark): Elapsed {
  if (from.bootId === to.bootId) return { seconds: (to.monotonicMs - from.monotonicMs) / 1000, monotonic: true }
  return { seconds: (Date.parse(to.at) - Date.parse(from.at)) / 1000, monotonic: false }
}

/** Under load a pause lasts at most this long, then the press is released (DOMAIN 4; common practice, no source). */
export const LONGEST_PAUSE_SECONDS = 300
