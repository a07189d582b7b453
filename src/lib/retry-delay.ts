const FIRST = 1000
const LONGEST = 30_000
/** A server that asks for longer than an hour is misconfigured: entries must not strand on it. */
const LONGEST_ASKED = 3_600_000

/**
 * Milliseconds to wait before trying again: anywhere between nothing and a bound that doubles with each failure
 * ("full jitter", AWS Architecture Blog, Exponential Backoff And Jitter, 2015), so that many tablets that lost the same
 * server do not all come back to it at once. `random` gives a number from 0 up to 1.
 */
export function fullJitter(failures: number, random: () => number): number {
  return random() * Math.min(LONGEST, FIRST * 2 ** Math.min(failures, 10))
}

/**
 * Milliseconds that a `Retry-After` header asks for (RFC 9110, section 10.2.3: seconds, or a date), or null when it asks
 * for nothing that can be read.
 */
export function retryAfter(header: string | null, now: number): number | null {
  if (header === null || header.trim() === '') return null
  const asked = /^\d+$/.test(header.trim()) ? Number(header) * 1000 : Date.parse(header) - now
  return Number.isNaN(asked) ? null : Math.min(Math.max(asked, 0), LONGEST_ASKED)
}
