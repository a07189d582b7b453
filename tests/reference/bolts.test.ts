import { describe, expect, it } from 'vitest'
import { proofStrength, stressArea } from '#shared/structure/bolts'
import type { BoltStrength, Thread } from '#shared/structure/member-data'
import { BOLT_CLASSES } from '#shared/structure/member-data'
import { pinDiameterFor, pinShearArea } from '#shared/structure/pins'
import { toSI, toUnit } from '#shared/units'
import reference from '../../fixtures/reference/bolts.json'
import { comparedWith } from '../support/outside-values'

const J429 = 'SAE J429, proof strength'
const B11 = 'ASME B1.1, UNC stress area'
const ISO898 = 'EN ISO 898-1, tables 5 and 6'

const boltClass = (name: string): BoltStrength => {
  const found = BOLT_CLASSES.find((each) => each === name)
  if (!found) throw new Error(`No class ${name}`)
  return { class: found }
}
const grade = (number: number) => boltClass(`grade ${number}`)
const inches = (value: number) => toSI({ text: String(value), unit: 'in' })
const ksi = (pascals: number) => toUnit(pascals, 'psi') / 1000
const unc = (diameter: number, threadsPerInch: number): Thread => ({
  series: 'inch',
  diameter: { text: String(diameter), unit: 'in' },
  threadsPerInch: String(threadsPerInch),
})
const coarse = (size: string) => {
  const row = reference.uncStressArea.rows.find((each) => each.size === size || each.size.startsWith(`${size}-`))
  if (!row) throw new Error(`No coarse thread ${size}`)
  return row
}
/** The proof load of one bolt, lbf. */
const proofLoad = (thread: Thread, strength: BoltStrength) =>
  toUnit(proofStrength(strength, toSI(thread.diameter)).proof * stressArea(thread), 'lbf')

describe('bolts against SAE J429, mechanical properties', () => {
  it.each(reference.saeJ429.grades)('grade $grade up to $to in', (row) => {
    const from = row.from ?? row.over ?? 0
    // Just above the size where the next band begins, half-way, and at its end.
    for (const diameter of [from + 0.01, (from + row.to) / 2, row.to]) {
      expect(comparedWith(J429, ksi(proofStrength(grade(row.grade), inches(diameter)).proof), row.proof)).toBeLessThan(1e-12)
    }
  })

  it('a grade has no bolt above its largest', () => {
    for (const each of [2, 5, 8]) expect(() => proofStrength(grade(each), inches(1.75))).toThrow(/certificate/)
  })
})

describe('bolts against ASME B1.1, UNC stress areas', () => {
  it.each(reference.uncStressArea.rows)('$size', (row) => {
    const area = toUnit(stressArea(unc(row.d, row.tpi)), 'in2')
    // The table rounds to three or four digits, 0.33446 down to 0.334.
    expect(comparedWith(B11, area, row.At)).toBeLessThan(0.0015)
    expect(comparedWith(`${B11}, formula`, area, row.computed)).toBeLessThan(2.5e-4)
  })

  it.each(reference.proofLoadsComputed.rows)('proof load of $size, grade $grade', (row) => {
    const { d, tpi } = coarse(row.size)
    expect(comparedWith('SAE J429 × UNC area', proofLoad(unc(d, tpi), grade(row.grade)), row.proofLoad_lbf)).toBeLessThan(0.0015)
  })
})

describe('bolts against published loads', () => {
  it.each(reference.publishedLoadChecks.clamp75.rows)(
    '75 % of proof, $size, grade $grade (Cox Hardware torque chart, coarse thread)',
    (row) => {
      const { d, tpi } = coarse(row.size)
      expect(
        comparedWith('Cox Hardware, clamp at 75 % of proof', 0.75 * proofLoad(unc(d, tpi), grade(row.grade)), row.published_lbf),
      ).toBeLessThan(0.0015)
    },
  )

  /** UNC threads per inch of the larger sizes: ASME B1.1, from memory. */
  const LARGER: Record<string, [diameter: number, threadsPerInch: number]> = {
    '1/2': [0.5, 13],
    '1-1/4': [1.25, 7],
    '1-3/8': [1.375, 6],
    '1-1/2': [1.5, 6],
  }

  it.each(reference.publishedLoadChecks.proof.rows)('proof load of $size (public fastener page, rounded to 100 lbf)', (row) => {
    const thread = unc(...(LARGER[row.size] ?? [NaN, NaN]))
    expect(comparedWith(B11, toUnit(stressArea(thread), 'in2'), row.At)).toBeLessThan(0.0015)
    expect(comparedWith('SAE proof loads, fastener page', proofLoad(thread, grade(2)), row.grade2)).toBeLessThan(0.005)
    expect(comparedWith('SAE proof loads, fastener page', proofLoad(thread, grade(8)), row.grade8)).toBeLessThan(0.005)
  })
})

describe('bolts against EN ISO 898-1, coarse thread (0.5 %)', () => {
  it.each(reference.iso898.rows)('$size', (row) => {
    const diameter = Number(row.size.slice(1))
    const thread: Thread = {
      series: 'metric',
      diameter: { text: String(diameter), unit: 'mm' },
      pitch: { text: String(row.pitch), unit: 'mm' },
    }
    const area = stressArea(thread)
    expect(comparedWith(ISO898, area * 1e6, row.As_mm2)).toBeLessThan(0.005)
    expect(comparedWith(`${ISO898}, formula`, area * 1e6, row.computedAs)).toBeLessThan(1e-4)
    for (const [name, published] of Object.entries(row.proofLoad_N)) {
      expect(comparedWith(ISO898, proofStrength(boltClass(name), diameter / 1000).proof * area, published)).toBeLessThan(0.005)
    }
  })

  it('proof strength by class and diameter; M16 belongs to the smaller ones', () => {
    const strengths = reference.iso898.strengths_MPa
    const at = (name: string, millimetres: number) => proofStrength(boltClass(name), millimetres / 1000).proof / 1e6
    expect(comparedWith(ISO898, at('8.8', 16), strengths['8.8 d<=16'].Sp)).toBe(0)
    expect(comparedWith(ISO898, at('8.8', 18), strengths['8.8 d>16'].Sp)).toBe(0)
    expect(comparedWith(ISO898, at('10.9', 20), strengths['10.9'].Sp)).toBe(0)
    expect(comparedWith(ISO898, at('12.9', 20), strengths['12.9'].Sp)).toBe(0)
  })
})

describe('pins against MecMovies (Philpot), example M1.5: double shear', () => {
  it('shear area and diameter', () => {
    const { F_kN, tauAllow_MPa, published, computed } = reference.pinDoubleShear
    const diameter = pinDiameterFor(F_kN * 1e3, tauAllow_MPa * 1e6, 2)
    expect(comparedWith('MecMovies M1.5, pin in double shear', diameter * 1e3, computed.pinDiameter_mm)).toBeLessThan(2e-5)
    expect(comparedWith('MecMovies M1.5, pin in double shear', Number((diameter * 1e3).toFixed(1)), published.pinDiameter_mm)).toBe(0)
    expect(comparedWith('MecMovies M1.5, pin in double shear', pinShearArea(diameter, 2) * 1e6, published.shearArea_mm2)).toBeLessThan(1e-6)
  })
})
