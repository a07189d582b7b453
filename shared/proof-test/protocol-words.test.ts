import { describe, expect, it } from 'vitest'
import { SHIPPED_PROTOCOLS } from './protocol'
import { COMMON_PRACTICE, examinationSource, mostSetSource, secondsWords, valueSource } from './protocol-words'

describe('the words for a protocol', () => {
  it('say seconds as they are spoken of', () => {
    expect([45, 60, 150, 300, 3600].map((one) => secondsWords(one).replaceAll('\u00a0', ' '))).toEqual([
      '45 s',
      '1 min',
      '2 min 30 s',
      '5 min',
      '60 min',
    ])
  })

  it('call every shipped limit common practice, and a changed one the shop’s own', () => {
    for (const { content } of SHIPPED_PROTOCOLS) {
      const { mostSet, ...limits } = content.limits
      const {
        seatingPercent,
        datumWatchSeconds,
        recoverySeconds,
        repeatHoldSeconds,
        predictionAllowancePercent,
        frictionPercent,
        marginDivisor,
      } = content
      const times = {
        seatingPercent,
        datumWatchSeconds,
        recoverySeconds,
        repeatHoldSeconds,
        predictionAllowancePercent,
        frictionPercent,
        marginDivisor,
      }
      for (const [key, value] of Object.entries({ ...limits, ...times }) as [keyof typeof times, number][]) {
        expect(valueSource(key, value)).toBe(COMMON_PRACTICE)
      }
      expect(mostSetSource(mostSet)).toBe(mostSet === null ? 'the percentage alone holds' : 'ASME ASP-2010 3-4.1.1, as described')
      expect(examinationSource(content.examinationMonths)).toMatch(/^29 CFR 1910\.244/)
    }
    expect(valueSource('softeningPercent', 12)).toBe('set by this shop')
    expect(mostSetSource({ text: '2', unit: 'mm' })).toBe('set by this shop')
    expect(examinationSource(12)).toBe('set by this shop')
  })
})
