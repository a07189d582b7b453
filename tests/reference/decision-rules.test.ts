import { describe, expect, it } from 'vitest'
import { conformanceProbability, judge } from '#shared/statistics/decision-rule'
import { normalCdf, normalQuantile } from '#shared/statistics/student-t'
import reference from '../../fixtures/reference/decision-rules.json'
import { comparedWith } from '../support/outside-values'

const JCGM106 = 'JCGM 106:2012, clause 7, from memory'

const named = (name: string) => {
  const found = reference.jcgm106.find((each) => each.name.startsWith(name))
  if (!found) throw new Error(`${name} is missing`)
  return found
}

describe('decision rules against ILAC-G8:09/2019', () => {
  it('4.2.1, simple acceptance: on the limit the risk of accepting falsely is one half', () => {
    const rule = reference.ilacG8.find((each) => each.section === '4.2.1')
    expect(judge({ value: 1, U: 0.2, limit: { max: 1 }, rule: 'simple' })).toBe('within')
    const risk = 1 - conformanceProbability({ value: 1, u: 0.1, limit: { max: 1 } })
    expect(comparedWith('ILAC-G8:09/2019, 4.2.1', risk, rule?.falseAcceptUpTo ?? 0)).toBe(0)
  })

  it('4.2.2, guard band of U: at the edge of acceptance the risk is under 2.5 %', () => {
    const rule = reference.ilacG8.find((each) => each.section === '4.2.2')
    expect(judge({ value: 0.8, U: 0.2, limit: { max: 1 }, rule: 'guard-band' })).toBe('within')
    const risk = 1 - conformanceProbability({ value: 0.8, u: 0.1, limit: { max: 1 } })
    expect(risk).toBeLessThan(rule?.falseAcceptUpTo ?? 0)
    expect(risk).toBeCloseTo(1 - normalCdf(2), 12)
  })

  it('table 1 (from memory): the risk of every guard band', () => {
    const rows = reference.ilacG8.find((each) => each.rows)?.rows ?? []
    expect(rows).toHaveLength(5)
    for (const { w, computed } of rows) {
      const multiple = w === '0' ? 0 : Number.parseFloat(w)
      const risk = 1 - conformanceProbability({ value: -multiple * 2, u: 1, limit: { max: 0 } })
      comparedWith('ILAC-G8:09/2019, table 1, from memory', risk, computed)
      expect(Math.abs(risk - computed)).toBeLessThan(1e-12)
    }
  })

  it('micrometer example: 0.0017 mm is inside a guard band of U below 0.003 mm, 0.0025 mm is not', () => {
    const { MPE, U, cases } = reference.example
    const verdicts = cases.map(({ dev }) => judge({ value: dev, U, limit: { max: MPE }, rule: 'guard-band' }))
    expect(verdicts).toEqual(['within', 'undecided'])
  })
})

describe('conformance probability against JCGM 106:2012, clause 7 (numbers from memory)', () => {
  it('one upper limit: Zener diode', () => {
    const { y, u, TU, pcPublished, computed } = named('one upper limit')
    const probability = conformanceProbability({ value: y ?? 0, u: u ?? 0, limit: { max: TU } })
    expect(comparedWith(JCGM106, Number(probability.toFixed(2)), pcPublished ?? 0)).toBe(0)
    expect(comparedWith(JCGM106, Number(probability.toFixed(4)), computed ?? 0)).toBe(0)
  })

  it('two limits: oil viscosity', () => {
    const { y, u, TL, TU, pcPublished, computed } = named('two limits')
    const probability = conformanceProbability({ value: y ?? 0, u: u ?? 0, limit: { min: TL, max: TU } })
    expect(comparedWith(JCGM106, Number(probability.toFixed(2)), pcPublished ?? 0)).toBe(0)
    expect(comparedWith(JCGM106, Number(probability.toFixed(4)), computed ?? 0)).toBe(0)
  })

  it('table 1: the deviate of each conformance probability', () => {
    const rows = named('table 1').rows ?? []
    expect(rows).toHaveLength(5)
    for (const [probability = 0, z = 0] of rows) expect(comparedWith(JCGM106, Number(normalQuantile(probability).toFixed(2)), z)).toBe(0)
  })
})
