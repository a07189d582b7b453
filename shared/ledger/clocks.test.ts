import { describe, expect, it } from 'vitest'
import { clocksApart, minutesApart } from './clocks'

const at = (observed: string, received: string) => ({
  observedAt: `2026-09-21T${observed}.000Z`,
  receivedAt: `2026-09-21T${received}.000Z`,
})

describe('both clocks of an entry', () => {
  it('are left to speak for themselves up to five minutes', () => {
    expect(minutesApart(at('10:00:00', '10:05:00'))).toBeNull()
    expect(minutesApart(at('10:05:00', '10:00:00'))).toBeNull()
    expect(clocksApart(at('10:00:00', '10:00:01'))).toBe('')
  })

  it('are compared in words beyond that, whichever is ahead', () => {
    expect(minutesApart(at('10:00:00', '10:05:01'))).toBe(5)
    expect(clocksApart(at('10:00:00', '10:12:00'))).toBe('12 min later')
    expect(clocksApart(at('10:00:00', '13:05:00'))).toBe('3 h 5 min later')
    expect(clocksApart(at('10:07:00', '10:00:00'))).toBe('7 min before it was made by the device’s clock')
  })
})
