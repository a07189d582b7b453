import { describe, expect, it } from 'vitest'
import { gaugeAccuracySchema, gaugeCanTell, gaugeErrorLimit, gaugeSuitability } from './gauge'

const gradeA = { accuracy: { standard: 'asme-b40.100', grade: 'A' }, spanMin: 0, spanMax: 1000 } as const

describe('gauge error limit', () => {
  it('is wider in the outer quarters of a two-zone grade, and on the border', () => {
    expect(gaugeErrorLimit({ ...gradeA, reading: 100 })).toBe(20)
    expect(gaugeErrorLimit({ ...gradeA, reading: 250 })).toBe(20)
    expect(gaugeErrorLimit({ ...gradeA, reading: 251 })).toBe(10)
    expect(gaugeErrorLimit({ ...gradeA, reading: 749 })).toBe(10)
    expect(gaugeErrorLimit({ ...gradeA, reading: 750 })).toBe(20)
  })

  it('is a share of the span, not of the reading', () => {
    const accuracy = { standard: 'stated', percentOfSpan: 0.5 } as const
    expect(gaugeErrorLimit({ accuracy, spanMin: 0, spanMax: 600, reading: 10 })).toBe(3)
    expect(gaugeErrorLimit({ accuracy, spanMin: 0, spanMax: 600, reading: 590 })).toBe(3)
  })

  it('refuses a scale without length', () => {
    expect(() => gaugeErrorLimit({ ...gradeA, spanMax: 0, reading: 0 })).toThrow(/begins/)
  })
})

describe('gauge suitability', () => {
  it.each([
    [200, 'low-on-scale'],
    [250, 'fits'],
    [750, 'fits'],
    [751, 'high-on-scale'],
    [1000, 'high-on-scale'],
    [1001, 'past-full-scale'],
  ])('a target of %d on a scale of 1000: %s', (target, verdict) => {
    const result = gaugeSuitability({ fullScale: 1000, target })
    expect(result.verdict).toBe(verdict)
    expect(result.sentence).toMatch(/^The target is .*\.$/)
    expect(result.source).not.toBe('')
  })

  it('says when the gauge cannot tell', () => {
    expect(gaugeCanTell({ U: 2, distance: 4 })).toBe(true)
    expect(gaugeCanTell({ U: 2.1, distance: 4 })).toBe(false)
  })
})

describe('gauge accuracy schema', () => {
  it('takes each standard and says what to choose otherwise', () => {
    expect(gaugeAccuracySchema.parse({ standard: 'en-837-1', class: 1.6 })).toEqual({ standard: 'en-837-1', class: 1.6 })
    const wrongClass = gaugeAccuracySchema.safeParse({ standard: 'en-837-1', class: 1.5 })
    expect(wrongClass.error?.issues[0]?.message).toMatch(/class printed on the dial/)
    const wrongGrade = gaugeAccuracySchema.safeParse({ standard: 'asme-b40.100', grade: 'E' })
    expect(wrongGrade.error?.issues[0]?.message).toMatch(/grade of the gauge/)
    const none = gaugeAccuracySchema.safeParse({ standard: 'guess' })
    expect(none.error?.issues[0]?.message).toMatch(/by which standard/)
  })
})
