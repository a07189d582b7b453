import { describe, expect, it } from 'vitest'
import { fullJitter, retryAfter } from './retry-delay'

describe('waiting before trying again', () => {
  it('draws from a bound that doubles, up to half a minute', () => {
    const almostOne = () => 0.999_999
    expect([0, 1, 2, 3, 4, 5, 6, 400].map((failures) => Math.round(fullJitter(failures, almostOne) / 1000))).toEqual([
      1, 2, 4, 8, 16, 30, 30, 30,
    ])
    expect(fullJitter(3, () => 0)).toBe(0)
    expect(fullJitter(3, () => 0.25)).toBe(2000)
  })

  it('reads what a server asks for, in seconds or as a date', () => {
    const now = Date.parse('2026-12-01T12:00:00Z')
    expect(retryAfter('120', now)).toBe(120_000)
    expect(retryAfter('Tue, 01 Dec 2026 12:00:30 GMT', now)).toBe(30_000)
    expect(retryAfter('Tue, 01 Dec 2026 11:00:00 GMT', now)).toBe(0)
    expect([retryAfter(null, now), retryAfter('', now), retryAfter('soon', now)]).toEqual([null, null, null])
    expect(retryAfter('99999999', now)).toBe(3_600_000)
  })
})
