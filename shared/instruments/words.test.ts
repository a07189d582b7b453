import { describe, expect, it } from 'vitest'
import { accuracyWords, errorLimitWords, instrumentWords, typedWords } from './words'
import { calibrationState, instrumentDetailsSchema } from './model'
import type { GaugeDetails, IndicatorDetails, LoadCellDetails } from './model'

const plain = (text: string) => text.replace(/[\u00a0\u202f]/g, ' ')

const gauge: GaugeDetails = {
  kind: 'gauge',
  code: 'G-01',
  description: '',
  style: 'dial',
  fullScale: { text: '10000', unit: 'psi' },
  increment: { text: '50', unit: 'psi' },
  accuracy: { standard: 'en-837-1', class: 1.6 },
}
const loadCell: LoadCellDetails = {
  kind: 'load-cell',
  code: 'L-01',
  description: '',
  fullScale: { text: '25', unit: 'short-ton' },
  increment: { text: '0.01', unit: 'short-ton' },
  errorPercentOfSpan: 0.5,
}
const indicator: IndicatorDetails = {
  kind: 'indicator',
  code: 'I-01',
  description: '',
  style: 'dial',
  range: { text: '10', unit: 'mm' },
  increment: { text: '0,01', unit: 'mm' },
  errorLimit: null,
  revolution: null,
}

describe('the words for an instrument', () => {
  it('say its limit of error in its own unit', () => {
    // EN 837-1: class 1.6 is 1.6 % of span, so 160 psi of 10 000.
    expect(plain(errorLimitWords(gauge))).toBe('± 160 psi anywhere on its scale')
    const bar: GaugeDetails = { ...gauge, fullScale: { text: '250', unit: 'bar' }, accuracy: { standard: 'stated', percentOfSpan: 0.25 } }
    expect(plain(errorLimitWords(bar))).toBe('± 0.625 bar anywhere on its scale')
    expect(plain(errorLimitWords(loadCell))).toBe('± 0.125 short tons anywhere on its scale')
    expect(plain(errorLimitWords(indicator))).toBe('± 0.01 mm, one step, because no limit is stated')
    expect(plain(errorLimitWords({ ...indicator, errorLimit: { text: '0.02', unit: 'mm' } }))).toBe('± 0.02 mm, as its maker states')
  })

  it('tell both zones of a grade that has two', () => {
    // ASME B40.100 grade A: 2-1-2 % of span.
    const graded: GaugeDetails = { ...gauge, accuracy: { standard: 'asme-b40.100', grade: 'A' } }
    expect(plain(errorLimitWords(graded))).toBe('± 200 psi in the lower and the upper quarter of its scale, ± 100 psi between them')
    const even: GaugeDetails = { ...gauge, accuracy: { standard: 'asme-b40.100', grade: '1A' } }
    expect(plain(errorLimitWords(even))).toBe('± 100 psi anywhere on its scale')
  })

  it('never let a ton stand alone', () => {
    expect(plain(typedWords({ text: '1', unit: 'short-ton' }))).toBe('1 short ton')
    expect(plain(typedWords({ text: '12,5', unit: 'metric-ton-force' }))).toBe('12.5 metric tons-force')
    expect(plain(typedWords(gauge.fullScale))).toBe('10 000 psi')
  })

  it('name kind, class, grade or limit', () => {
    expect(instrumentWords(gauge)).toBe('dial gauge')
    expect(plain(accuracyWords(gauge))).toBe('EN 837-1 class 1.6')
    expect(plain(accuracyWords(loadCell))).toBe('± 0.5 % of span')
    expect(accuracyWords(indicator)).toBe('one step')
  })
})

describe('the details of an instrument', () => {
  it('are refused when a step is no smaller than the whole scale, whatever the units', () => {
    const wrong = instrumentDetailsSchema.safeParse({
      ...gauge,
      fullScale: { text: '700', unit: 'bar' },
      increment: { text: '10500', unit: 'psi' },
    })
    expect(wrong.error?.issues.map((issue) => issue.path.join('.'))).toEqual(['increment'])
    expect(instrumentDetailsSchema.safeParse({ ...gauge, fullScale: { text: '700', unit: 'bar' } }).success).toBe(true)
  })

  it('are told at their own field when a number can’t be read', () => {
    const wrong = instrumentDetailsSchema.safeParse({ ...gauge, increment: { text: '3.1.', unit: 'psi' } })
    expect(wrong.error?.issues.map((issue) => issue.path.join('.'))).toEqual(['increment.text'])
    expect(instrumentDetailsSchema.safeParse({ ...gauge, fullScale: { text: '0', unit: 'psi' } }).success).toBe(false)
  })
})

describe('a calibration', () => {
  const calibration = {
    calibratedOn: '2026-01-10',
    dueOn: '2026-09-30',
    certificate: 'C-1',
    comparedWith: '',
    result: 'in tolerance',
    uncertainty: null,
  } as const

  it('holds through the day it falls due', () => {
    expect(calibrationState(calibration, '2026-09-30')).toBe('in-date')
    expect(calibrationState(calibration, '2026-10-01')).toBe('out-of-date')
    expect(calibrationState({ ...calibration, result: 'out of tolerance' }, '2026-02-01')).toBe('out-of-tolerance')
    expect(calibrationState(null, '2026-02-01')).toBe('never')
  })
})
