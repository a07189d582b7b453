import canonicalize from 'canonicalize'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalText } from '#shared/ledger/canonical'

describe('canonical text against RFC 8785', () => {
  it('writes the sample of section 3.2.2 as section 3.2.3 and 3.2.4 do', () => {
    // RFC 8785, 3.2.2: input; 3.2.3 and 3.2.4: sorted output. Copied from the RFC, from memory, and checked against the registry library below.
    const sample = {
      numbers: [333333333.33333329, 1e30, 4.5, 2e-3, 0.000000000000000000000000001],
      string: '€$\u000f\nA\'B"\\\\"/',
      literals: [null, true, false],
    }
    expect(canonicalText(sample)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    )
  })

  it('sorts names by UTF-16 code units, as section 3.2.3 asks', () => {
    const names = { '€': 1, '\r': 2, '\ufb33': 3, '1': 4, '😀': 5, '\u0080': 6, ö: 7 }
    expect(Object.values(JSON.parse(canonicalText(names)) as object)).toHaveLength(7)
    expect([...canonicalText(names).matchAll(/:(\d)/g)].map(([, value]) => value)).toEqual(['2', '4', '6', '7', '1', '5', '3'])
  })

  it('agrees with a registry library on any JSON value', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (value) => {
        expect(canonicalText(value)).toBe(canonicalize(value))
      }),
      { numRuns: 2000 },
    )
  })

  it('refuses what JSON cannot carry', () => {
    for (const value of [Number.NaN, Number.POSITIVE_INFINITY, () => 1, '\ud800']) expect(() => canonicalText(value)).toThrow(TypeError)
  })
})
