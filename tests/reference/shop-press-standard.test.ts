import { describe, expect, it } from 'vitest'
import { ASP_OFF_CENTRE_HOLD, ASP_PROOF_HOLD } from '#shared/statistics/hold'
import { ASP_PERMANENT_INCREASE_LIMIT } from '#shared/statistics/permanent-set'
import { toSI, toUnit } from '#shared/units'
import reference from '../../fixtures/reference/shop-press-standard.json'
import { comparedWith } from '../support/outside-values'

const SOURCE = 'ASME ASP-2010, part 3'

const test = (section: string) => {
  const found = reference.tests.find((each) => each.section === section)
  if (!found) throw new Error(`Section ${section} is missing`)
  return found
}

describe('constants against ASME ASP-2010, part 3', () => {
  it('3-4.1.1: the off-centre load is held one minute', () => {
    expect(comparedWith(SOURCE, ASP_OFF_CENTRE_HOLD, (test('3-4.1.1').hold_min ?? 0) * 60)).toBe(0)
  })

  it('3-4.1.3: the proof load is held ten minutes', () => {
    expect(comparedWith(SOURCE, ASP_PROOF_HOLD, (test('3-4.1.3').hold_min ?? 0) * 60)).toBe(0)
  })

  it.each(['3-4.1.1', '3-4.1.3'])('%s: the permanent increase in opening is limited to 0.125 in', (section) => {
    const { permanentIncreaseMax_in, permanentIncreaseMax_mm } = test(section)
    const limit = toSI({ text: String(permanentIncreaseMax_in), unit: 'in' })
    expect(comparedWith(SOURCE, ASP_PERMANENT_INCREASE_LIMIT, limit)).toBe(0)
    const printed = Number((toUnit(ASP_PERMANENT_INCREASE_LIMIT, 'mm') + 1e-9).toFixed(2))
    expect(comparedWith(SOURCE, printed, permanentIncreaseMax_mm ?? 0)).toBe(0)
  })
})
