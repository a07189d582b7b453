import { describe, expect, it } from 'vitest'
import {
  convert,
  decimalsOf,
  decimalsOfStep,
  decimalTextSchema,
  forceUnitSchema,
  formatForce,
  formatNumber,
  formatQuantity,
  groupDigits,
  parseDecimal,
  roundDownTo,
  toSI,
  toUnit,
  typedForceSchema,
  typedPositiveLengthSchema,
  typedSignedLengthSchema,
  unitLabel,
  weightOf,
} from './units'

const NB = '\u00a0'
const NNB = '\u202f'

describe('parseDecimal', () => {
  it.each([
    ['3', 3, 0, '3'],
    [' 3.10 ', 3.1, 2, '3.10'],
    ['1,234', 1.234, 3, '1.234'],
    ['0.5', 0.5, 1, '0.5'],
    ['007', 7, 0, '7'],
    ['0', 0, 0, '0'],
  ])('reads %j as %d', (text, value, decimals, canonical) => {
    expect(parseDecimal(text)).toEqual({ ok: true, value, decimals, canonical })
  })

  it.each([
    ['', /Enter a number/],
    ['   ', /Enter a number/],
    ['1,234.5', /more than one decimal sign/],
    ['1.234.5', /more than one decimal sign/],
    ['3.1.', /more than one decimal sign/],
    ['1 234', /grouping/],
    ['1\u202f234', /grouping/],
    ["1'234", /grouping/],
    ['3.', /missing after/],
    ['.5', /before the decimal sign/],
    [',5', /before the decimal sign/],
    ['1e3', /exponent/],
    ['12t', /digits and one decimal sign/],
    ['0x10', /digits and one decimal sign/],
    ['+3', /digits and one decimal sign/],
    ['-', /digits and one decimal sign/],
    ['--3', /digits and one decimal sign/],
    ['Infinity', /digits and one decimal sign/],
    ['٣', /digits and one decimal sign/],
    ['-3', /below zero/],
    ['1234567890123456', /15 digits/],
  ])('refuses %j with a sentence', (text, sentence) => {
    const parsed = parseDecimal(text)
    expect(parsed.ok).toBe(false)
    if (!parsed.ok) expect(parsed.message).toMatch(sentence)
  })

  it('takes a minus, typed as a hyphen or a minus sign, only when asked', () => {
    expect(parseDecimal('-0.25', { signed: true })).toMatchObject({ value: -0.25 })
    expect(parseDecimal('\u22120,25', { signed: true })).toMatchObject({ canonical: '-0.25' })
    expect(parseDecimal('-0.0', { signed: true })).toMatchObject({ value: 0, canonical: '0.0' })
  })
})

describe('conversion', () => {
  it('keeps the three tons apart', () => {
    expect(toSI({ text: '12', unit: 'short-ton' })).toBeCloseTo(106757.318766252, 6)
    expect(toSI({ text: '12', unit: 'long-ton' })).toBeCloseTo(119568.19701820224, 6)
    expect(toSI({ text: '12', unit: 'metric-ton-force' })).toBe(117679.8)
  })

  it('keeps short decimals exact in SI', () => {
    expect(toSI({ text: '10,5', unit: 'mm' })).toBe(0.0105)
    expect(toSI({ text: '2', unit: 'in' })).toBe(0.0508)
    expect(toUnit(0.0508, 'in')).toBeCloseTo(2, 14)
    expect(convert(68, 'F', 'C')).toBe(20)
    expect(convert(-40, 'C', 'F')).toBe(-40)
  })

  it('throws on text that is not a number', () => {
    expect(() => toSI({ text: '3.1.', unit: 'bar' })).toThrow(/“3.1.” is not a number/)
  })

  it('weighs a mass at standard gravity', () => {
    expect(weightOf(10)).toBeCloseTo(98.0665, 12)
  })
})

describe('words and digits', () => {
  it('names units in the plural where they have one', () => {
    expect(unitLabel('short-ton')).toBe('short ton')
    expect(unitLabel('metric-ton-force', { plural: true })).toBe('metric tons-force')
    expect(unitLabel('kN', { plural: true })).toBe('kN')
    expect(unitLabel('mm2')).toBe('mm²')
  })

  it('groups thousands from four digits on and leaves decimals alone', () => {
    expect(groupDigits('5900')).toBe(`5${NNB}900`)
    expect(groupDigits('-1234567.12345')).toBe(`\u22121${NNB}234${NNB}567.12345`)
    expect(groupDigits('900')).toBe('900')
    expect(groupDigits('–')).toBe('–')
  })

  it('formats with unit, true minus, and no minus before zero', () => {
    expect(formatQuantity(54123846.6, 'psi', 0)).toBe(`7${NNB}850${NB}psi`)
    expect(formatQuantity(-0.0000001, 'mm', 2)).toBe(`0.00${NB}mm`)
    expect(formatQuantity(8896.443230521, 'short-ton', 0)).toBe(`1${NB}short ton`)
    expect(formatForce(101600, 'short-ton')).toBe(`11.42${NB}short tons`)
    expect(formatForce(-101649, 'kN')).toBe(`\u2212101.6${NB}kN`)
    expect(formatNumber(Number.NaN, 1)).toBe('–')
    expect(formatNumber(Number.NEGATIVE_INFINITY, 1)).toBe('\u2212∞')
  })

  it('takes decimals from an increment as typed', () => {
    expect(decimalsOf({ text: '0.05' })).toBe(2)
    expect(decimalsOf({ text: '50' })).toBe(0)
    expect(() => decimalsOf({ text: 'x' })).toThrow(RangeError)
  })
})

describe('steps that an instrument can show', () => {
  it('finds the decimals a step needs in another unit', () => {
    expect(decimalsOfStep(toSI({ text: '50', unit: 'psi' }), 'psi')).toBe(0)
    expect(decimalsOfStep(toSI({ text: '0.5', unit: 'bar' }), 'bar')).toBe(1)
    expect(decimalsOfStep(toSI({ text: '0.02', unit: 'mm' }), 'mm')).toBe(2)
    expect(decimalsOfStep(toSI({ text: '1', unit: 'psi' }), 'bar')).toBe(6)
  })

  it('rounds down to a step, and leaves a multiple where it is', () => {
    expect(roundDownTo(5949.9, 50)).toBe(5900)
    expect(roundDownTo(0.3, 0.1)).toBeCloseTo(0.3, 15)
    expect(roundDownTo(0.04, 0.1)).toBe(0)
    expect(roundDownTo(-0.04, 0.1)).toBe(-0.1)
    expect(() => roundDownTo(1, 0)).toThrow(RangeError)
  })
})

describe('schemas', () => {
  const firstMessage = (result: { error?: { issues: { message: string }[] } }) => result.error?.issues[0]?.message

  it('refuses a bare ton and names the three', () => {
    for (const unit of ['ton', 'tons', 'Ton']) {
      const message = firstMessage(forceUnitSchema.safeParse(unit))
      expect(message).toMatch(/short ton .* long ton .* metric ton-force/)
    }
    expect(firstMessage(forceUnitSchema.safeParse(undefined))).toMatch(/unit of force/)
  })

  it('keeps what was typed and puts the sentence on the text', () => {
    expect(typedForceSchema.parse({ text: ' 12,50', unit: 'short-ton' })).toEqual({
      text: '12,50',
      unit: 'short-ton',
    })
    const result = typedForceSchema.safeParse({ text: '12.', unit: 'kN' })
    expect(result.error?.issues[0]?.path).toEqual(['text'])
    expect(firstMessage(result)).toMatch(/missing after/)
  })

  it('refuses zero where a positive number is needed, and minus where none is', () => {
    expect(firstMessage(typedPositiveLengthSchema.safeParse({ text: '0.0', unit: 'mm' }))).toMatch(/above zero/)
    expect(typedSignedLengthSchema.safeParse({ text: '-0.3', unit: 'mm' }).success).toBe(true)
    expect(typedForceSchema.safeParse({ text: '-1', unit: 'kN' }).success).toBe(false)
    expect(firstMessage(decimalTextSchema().safeParse(5))).toMatch(/Enter a number/)
  })
})
