import { describe, expect, it } from 'vitest'
import { ASME_B40_GRADE_NAMES, EN_837_CLASSES, gaugeAccuracySchema, gaugeErrorLimit, gaugeSuitability } from '#shared/hydraulics/gauge'
import reference from '../../fixtures/reference/gauge-classes.json'
import { comparedWith } from '../support/outside-values'

describe('gauge accuracy against EN 837-1:1996, table 11', () => {
  it('has every class of the table and no other', () => {
    expect([...EN_837_CLASSES]).toEqual(reference.en837.classes.map((row) => row.class))
  })

  it.each(reference.en837.classes)('class $class', (row) => {
    const accuracy = gaugeAccuracySchema.parse({ standard: 'en-837-1', class: row.class })
    for (const reading of [0, 5e6, 1e7]) {
      const limit = gaugeErrorLimit({ accuracy, spanMin: 0, spanMax: 1e7, reading })
      expect(comparedWith('EN 837-1:1996, table 11', limit, row.mpePercentOfSpan * 1e5)).toBeLessThan(1e-12)
    }
  })

  it.each(reference.en837.examples)('worked example: class $class, $range bar', (row) => {
    const accuracy = gaugeAccuracySchema.parse({ standard: 'en-837-1', class: row.class })
    const [spanMin = 0, spanMax = 0] = row.range
    const limit = gaugeErrorLimit({ accuracy, spanMin, spanMax, reading: spanMax / 2 })
    expect(comparedWith('EN 837-1, worked examples', limit, row.mpe)).toBeLessThan(1e-12)
  })
})

describe('gauge accuracy against ASME B40.100 grades (B, C, D from memory)', () => {
  it('has every grade of the table and no other', () => {
    expect([...ASME_B40_GRADE_NAMES]).toEqual(reference.asmeB40100.grades.map((row) => row.grade))
  })

  it.each(reference.asmeB40100.grades)('grade $grade: $lower, $middle, $upper', (row) => {
    const accuracy = gaugeAccuracySchema.parse({ standard: 'asme-b40.100', grade: row.grade })
    const at = (reading: number) => gaugeErrorLimit({ accuracy, spanMin: 0, spanMax: 100, reading })
    for (const [reading, published] of [
      [10, row.lower],
      [50, row.middle],
      [90, row.upper],
    ] as const) {
      expect(comparedWith('ASME B40.100, grades', at(reading), published)).toBe(0)
    }
  })
})

describe('use of the scale against UFC 4-390-01 (2003), pressure gages', () => {
  it('fits between one quarter and three quarters of full scale', () => {
    const rule = reference.rangeUse.find((each) => each.minPercent !== undefined)
    if (rule?.minPercent === undefined || rule.maxPercent === undefined) throw new Error('The rule is missing')
    const at = (percent: number) => gaugeSuitability({ fullScale: 100, target: percent }).verdict
    expect([at(rule.minPercent - 1), at(rule.minPercent), at(rule.maxPercent), at(rule.maxPercent + 1)]).toEqual([
      'low-on-scale',
      'fits',
      'fits',
      'high-on-scale',
    ])
  })
})
