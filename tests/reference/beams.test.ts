import { describe, expect, it } from 'vitest'
import { deflectionOf, simplySupported } from '#shared/structure/beams'
import { sectionProperties } from '#shared/structure/sections'
import { elongation } from '#shared/structure/ties'
import { convert, toSI, toUnit } from '#shared/units'
import reference from '../../fixtures/reference/beams.json'
import { comparedWith } from '../support/outside-values'

const INCH = 0.0254

describe('beams against The Engineering ToolBox, Stresses and Deflections in Beams: single load at centre, example', () => {
  it.each(reference.rows)('$case', (row) => {
    const force = toSI({ text: String(row.P), unit: 'lbf' })
    const span = toSI({ text: String(row.L), unit: 'in' })
    const elasticModulus = toSI({ text: String(row.E), unit: 'psi' })
    const secondMoment = row.I * INCH ** 4
    const load = { force, span, at: span / 2 }
    const stress = (simplySupported(load).moment * row.c * INCH) / secondMoment
    // The page prints the stress without decimals.
    expect(comparedWith('Engineering ToolBox, beam with centre load', Math.round(toUnit(stress, 'psi')), row.published.sigma_psi)).toBe(0)
    expect(comparedWith('beam formulas, worked out beside the source', toUnit(stress, 'psi'), row.computed.sigma_psi)).toBeLessThan(1e-6)
    const { bending } = deflectionOf(load, { bending: elasticModulus * secondMoment, shear: null }, span / 2)
    expect(comparedWith('beam formulas, worked out beside the source', toUnit(bending, 'in'), row.computed.delta_in)).toBeLessThan(2e-5)
  })
})

describe('ties against a published worked example: total extension of a stepped bar', () => {
  it.each(reference.axial)('$case', (row) => {
    const segments = row.segments.map(([diameter = 0, length = 0]) => ({
      area: sectionProperties({ shape: 'round bar', diameter: { text: String(diameter), unit: 'mm' }, sideBySide: 1, plates: [] }).area,
      length: length / 1000,
    }))
    const found = convert(elongation(row.P_N, row.E_GPa * 1e9, segments), 'm', 'mm')
    expect(comparedWith('worked example, total extension', Number(found.toFixed(4)), row.published.elongation_mm)).toBe(0)
    expect(comparedWith('worked example, total extension', found, row.computed.elongation_mm)).toBeLessThan(2e-5)
  })
})
