import { describe, expect, it } from 'vitest'
import { toSI } from '#shared/units'
import reference from '../../fixtures/reference/units.json'
import { comparedWith } from '../support/outside-values'

/** Rows that the program has a unit for; the kip and ksi are thousand-fold and get theirs below. */
const UNIT_OF = new Map([
  ['psi', { text: '1', unit: 'psi' }],
  ['lbf', { text: '1', unit: 'lbf' }],
  ['short tonf', { text: '1', unit: 'short-ton' }],
  ['long tonf', { text: '1', unit: 'long-ton' }],
  ['tf', { text: '1', unit: 'metric-ton-force' }],
  ['kgf', { text: '0.001', unit: 'metric-ton-force' }],
  ['bar', { text: '1', unit: 'bar' }],
  ['in', { text: '1', unit: 'in' }],
  ['kip', { text: '1000', unit: 'lbf' }],
  ['ksi', { text: '1000', unit: 'psi' }],
] as const)

describe('units against NIST SP 811 (2008), appendix B.8', () => {
  it.each(reference.rows)('$unit', (row) => {
    const typed = UNIT_OF.get(row.symbol as Parameters<typeof UNIT_OF.get>[0])
    if (!typed) throw new Error(`No unit stands for ${row.symbol}`)
    const value = toSI(typed)
    expect(comparedWith('NIST SP 811 B.8, exact definitions', value, row.exactFromDefinition)).toBeLessThan(4e-16)
    if (row.nistPrinted === null) return
    const printed = row.nistPrinted.replace(/ E([+-]\d+)/, 'e$1')
    const decimals = /\.(\d+)/.exec(printed)?.[1]?.length ?? 0
    expect(comparedWith('NIST SP 811 B.8, printed digits', Number(value.toExponential(decimals)), Number(printed))).toBe(0)
  })
})
