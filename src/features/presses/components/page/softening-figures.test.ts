import { describe, expect, it } from 'vitest'
import type { ClimbHistory } from '#shared/api/press-history'
import { climbHistory } from '../../../../../tests/factories/climb-history'
import { changeWords, firstClimbs, limitWords, rowOf, seriesOf, stiffnessChange } from './softening-figures'

const climb = climbHistory

/** Numbers keep to their units by spaces that do not break. */
const plain = (text: string): string => text.replaceAll(/[\u00a0\u202f]/g, ' ')

const words = (...climbs: ClimbHistory[]): string => {
  const change = stiffnessChange(climbs)
  if (!change) throw new Error('Two lines can be compared.')
  return plain(changeWords(change))
}

describe('is it getting softer', () => {
  it('is claimed only outside what the two tests can tell', () => {
    // U(r) = r·√((U₁/K₁)² + (U₂/K₂)²), by hand: 0.95·√((0.5/60)² + (0.5/57)²) = 1.15 %.
    expect(words(climb('PT-0002'), climb('PT-0009', { stiffness: 57e6 }))).toBe(
      '5.0 % softer at PT-0009 than at PT-0002; what the two tests can tell is ±1.1 %.',
    )
    expect(words(climb('PT-0002'), climb('PT-0009', { stiffness: 59.7e6 }))).toBe(
      'No change that the tests can tell: 0.5 % softer at PT-0009 than at PT-0002, and what the two tests can tell is ±1.2 %.',
    )
    expect(words(climb('PT-0002'), climb('PT-0009', { stiffness: 63e6 }))).toMatch(/^5\.0 % stiffer at PT-0009 than at PT-0002;/)
  })

  it('compares the last with the first that can be told, over whatever lies between', () => {
    const change = stiffnessChange([
      climb('PT-0001', { stiffnessU: null }),
      climb('PT-0002'),
      climb('PT-0003', { stiffness: 40e6 }),
      climb('PT-0004', { stiffness: 58e6 }),
      climb('PT-0005', { stiffness: null, stiffnessU: null }),
    ])
    expect([change?.from.number, change?.to.number]).toEqual(['PT-0002', 'PT-0004'])
  })

  it('claims nothing from a line that has too few readings, and nothing from one line', () => {
    expect(words(climb('PT-0002', { stiffnessU: null }), climb('PT-0009', { stiffness: 40e6 }))).toContain('too few readings to tell')
    expect(stiffnessChange([climb('PT-0002')])).toBeNull()
    expect(stiffnessChange([])).toBeNull()
  })

  it('keeps positions and figures apart, and repeat climbs out of the comparison', () => {
    const left = climb('PT-0002', { leg: 'Ram far left' })
    const other = climb('PT-0003', { of: 'bed middle' })
    const series = seriesOf([climb('PT-0001'), climb('PT-0001', { climb: 1 }), left, other])
    expect(series.map(({ label }) => label)).toEqual([
      'Ram central, bed middle less mean of pins',
      'Ram far left',
      'Ram central, bed middle',
    ])
    expect(series[0] && firstClimbs(series[0])).toHaveLength(1)
  })

  it('says which test passed a limit of set or pressure loss, and which figures nobody read', () => {
    expect(limitWords([climb('PT-0002'), climb('PT-0003')])).toEqual([
      'Permanent set stayed within its limit each time.',
      'Pressure loss stayed within its limit each time.',
    ])
    expect(limitWords([climb('PT-0002', { set: 0.06e-3 }), climb('PT-0003', { pressureLoss: null })])).toEqual([
      'Permanent set passed its limit in PT-0002.',
      'Pressure loss stayed within its limit in the one test that read it.',
    ])
    expect(limitWords([climb('PT-0002', { set: null, pressureLoss: null })])).toEqual([])
  })

  it('writes figures in the units of the shop', () => {
    const { stiffness, loss } = rowOf(climb('PT-0002'), 'mm')
    expect([plain(stiffness), plain(loss)]).toEqual(['60.0 ± 0.5 kN/mm', '1.2 %, limit 5.0 %'])
    // 60 kN/mm = 60e6 N/m ÷ 4.4482216 N/lbf × 0.0254 m/in = 342 609 lbf/in.
    expect(rowOf(climb('PT-0002'), 'in').stiffness.replaceAll(/[\s\u202f\u00a0]/g, '')).toBe('342609±2855lbf/in')
    expect(rowOf(climb('PT-0002', { stiffness: null, set: null, pressureLoss: null }), 'mm')).toEqual({
      stiffness: '—',
      set: '—',
      loss: '—',
    })
  })
})
