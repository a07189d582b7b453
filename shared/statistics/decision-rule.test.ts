import { describe, expect, it } from 'vitest'
import { conformanceProbability, judge } from './decision-rule'

describe('decision rule', () => {
  it.each([
    [8, 'within', 'within'],
    [9.5, 'within', 'undecided'],
    [10, 'within', 'undecided'],
    [10.5, 'undecided', 'undecided'],
    [11, 'undecided', 'undecided'],
    [11.5, 'beyond', 'beyond'],
  ] as const)('%d ± 1 against 10 at most: simple %s, guard band %s', (value, simple, guarded) => {
    expect(judge({ value, U: 1, limit: { max: 10 }, rule: 'simple' })).toBe(simple)
    expect(judge({ value, U: 1, limit: { max: 10 }, rule: 'guard-band' })).toBe(guarded)
  })

  it('turns round for a least value, and takes the worse of two limits', () => {
    expect(judge({ value: 9.5, U: 1, limit: { min: 10 }, rule: 'simple' })).toBe('undecided')
    expect(judge({ value: 8.5, U: 1, limit: { min: 10 }, rule: 'simple' })).toBe('beyond')
    expect(judge({ value: 10.5, U: 1, limit: { min: 10, max: 20 }, rule: 'guard-band' })).toBe('undecided')
    expect(judge({ value: 22, U: 1, limit: { min: 10, max: 20 }, rule: 'guard-band' })).toBe('beyond')
    expect(judge({ value: 15, U: 1, limit: { min: 10, max: 20 }, rule: 'guard-band' })).toBe('within')
  })

  it('counts a value on the limit as on it, whatever the last binary digit', () => {
    expect(judge({ value: 0.1 + 0.2, U: 0, limit: { max: 0.3 }, rule: 'guard-band' })).toBe('within')
  })

  it('has no slack at a limit of zero, and judges infinity', () => {
    expect(judge({ value: 1e-12, U: 0, limit: { max: 0 }, rule: 'simple' })).toBe('beyond')
    expect(judge({ value: Infinity, U: 1, limit: { max: 1 }, rule: 'simple' })).toBe('beyond')
  })

  it('refuses what it cannot judge', () => {
    expect(() => judge({ value: Number.NaN, U: 0, limit: { max: 1 }, rule: 'simple' })).toThrow(/isn’t a number/)
    expect(() => judge({ value: 1, U: -1, limit: { max: 1 }, rule: 'simple' })).toThrow(/below zero/)
    expect(() => judge({ value: 1, U: 0, limit: {}, rule: 'simple' })).toThrow(/no limit/)
  })
})

describe('conformance probability', () => {
  it('is a half on the limit and certain without one', () => {
    expect(conformanceProbability({ value: 1, u: 0.1, limit: { max: 1 } })).toBe(0.5)
    expect(conformanceProbability({ value: 1, u: 0.1, limit: {} })).toBe(1)
    expect(() => conformanceProbability({ value: 1, u: 0, limit: {} })).toThrow(/above zero/)
  })
})
