import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { beamStiffness, checkBeam, deflectionOf, offsetShare, simplySupported, tipDeflection } from './beams'
import { DEFAULT_FACTORS, type Finding } from './factors'
import type { BeamStrength } from './member-data'

const SEED = 20260916
const mm = (value: number) => ({ text: String(value), unit: 'mm' as const })

/**
 * Deflection by the unit-load integral ∫ M·m/EI + V·v/GA dx, added up in strips: moments and shears of both loads are
 * taken from the supports, and nothing of the closed form is in it.
 */
function byUnitLoad(load: { force: number; span: number; at: number }, bending: number, shear: number, x: number): number {
  const { force, span, at } = load
  const internal = (weight: number, place: number, s: number) => ({
    moment: s < place ? (weight * (span - place) * s) / span : (weight * place * (span - s)) / span,
    shear: s < place ? (weight * (span - place)) / span : (-weight * place) / span,
  })
  let sum = 0
  const cuts = [0, Math.min(at, x), Math.max(at, x), span]
  for (let part = 1; part < cuts.length; part += 1) {
    const [from = 0, to = 0] = [cuts[part - 1], cuts[part]]
    const step = (to - from) / 2000
    for (let strip = 0; strip < 2000; strip += 1) {
      const s = from + (strip + 0.5) * step
      const real = internal(force, at, s)
      const unit = internal(1, x, s)
      sum += ((real.moment * unit.moment) / bending + (real.shear * unit.shear) / shear) * step
    }
  }
  return sum
}

describe('a beam on two supports', () => {
  it(`deflects as the unit-load integral says, anywhere on it and wherever the force stands (fast-check, seed ${SEED})`, () => {
    const share = fc.double({ min: 0.02, max: 0.98, noNaN: true })
    fc.assert(
      fc.property(share, share, fc.double({ min: 0.2, max: 3, noNaN: true }), (atShare, xShare, span) => {
        const load = { force: 120_000, span, at: atShare * span }
        const [bending, shear] = [2.1e6, 9e7]
        const found = deflectionOf(load, { bending, shear }, xShare * span)
        expect((found.bending + found.shear) / byUnitLoad(load, bending, shear, xShare * span)).toBeCloseTo(1, 5)
      }),
      { seed: SEED, numRuns: 100 },
    )
  })

  it('under a force in the middle: P·L/4, P·L³/48EI and P·L/4GA', () => {
    const load = { force: 80_000, span: 0.8, at: 0.4 }
    expect(simplySupported(load)).toEqual({ left: 40_000, right: 40_000, shear: 40_000, moment: 16_000 })
    const { bending, shear } = deflectionOf(load, { bending: 1e6, shear: 5e7 }, 0.4)
    expect(bending).toBeCloseTo((80_000 * 0.8 ** 3) / 48e6, 15)
    expect(shear).toBeCloseTo((80_000 * 0.8) / (4 * 5e7), 15)
  })

  it('held at one end: P·L³/3EI', () => {
    expect(tipDeflection(1000, 0.5, { bending: 1e5, shear: 1e7 })).toEqual({ bending: 125 / 3e5, shear: 5e-5 })
    expect(tipDeflection(1000, 0.5, { bending: 1e5, shear: null }).shear).toBe(0)
  })

  it('a force beside the supports is refused', () => {
    expect(() => simplySupported({ force: 1, span: 1, at: 1 })).toThrow(/outside the supports/)
    expect(() => deflectionOf({ force: 1, span: 1, at: 0.5 }, { bending: 1, shear: null }, 1.1)).toThrow(/not on the beam/)
  })
})

const beam: BeamStrength = {
  role: 'beam',
  section: { shape: 'flat', height: mm(150), width: mm(40), sideBySide: 1, plates: [] },
  material: { grade: 'S355JR' },
  support: 'both ends',
  span: mm(600),
  ramOffset: null,
  hole: null,
  loadShare: null,
}
const figures = (found: Finding[], check: string) => {
  const each = found.find((finding) => finding.check === check)
  if (!each || !('capacity' in each)) throw new Error(`No ${check} in ${JSON.stringify(found)}`)
  return each
}

describe('the check of a beam', () => {
  it('takes half of the yield that belongs to its thickness, and 0.4 of it in shear', () => {
    const found = checkBeam(beam, 100_000, DEFAULT_FACTORS)
    // 40 mm thick: 345 MPa, not the 355 MPa of thin plate.
    expect(figures(found, 'bending').capacity).toBeCloseTo((0.5 * 345e6 * (0.04 * 0.15 ** 2)) / 6, 3)
    expect(figures(found, 'bending').demand).toBe(15_000)
    expect(figures(found, 'shear').capacity).toBeCloseTo(0.4 * 345e6 * (2 / 3) * 0.006, 3)
    expect(figures(found, 'bending').source).toMatch(/345 MPa \(S355JR, EN 10025-2, table 7\)/)
  })

  it('is at the worst place of the ram: bending in the middle, shear at its farthest', () => {
    const found = checkBeam({ ...beam, ramOffset: mm(150) }, 100_000, DEFAULT_FACTORS)
    expect(figures(found, 'bending').demand).toBe(15_000)
    expect(figures(found, 'shear').demand).toBe(75_000)
  })

  it('held at one end bends four times as much', () => {
    expect(figures(checkBeam({ ...beam, support: 'one end' }, 100_000, DEFAULT_FACTORS), 'bending').demand).toBe(60_000)
  })

  it('a hole takes from bending and shear', () => {
    const found = checkBeam({ ...beam, hole: { diameter: mm(50), metal: mm(40) } }, 1, DEFAULT_FACTORS)
    expect(figures(found, 'bending').capacity).toBeCloseTo((0.5 * 345e6 * ((0.04 * (0.15 ** 3 - 0.05 ** 3)) / 12)) / 0.075, 3)
    expect(figures(found, 'shear').capacity).toBeCloseTo(0.4 * 345e6 * ((2 / 3) * 0.006 - 0.05 * 0.04), 3)
  })

  it('says that crushing and buckling are not checked, and why a beam with impossible dimensions isn’t', () => {
    expect(checkBeam(beam, 1, DEFAULT_FACTORS)).toContainEqual(
      expect.objectContaining({ notChecked: expect.stringMatching(/buckles sideways/) as string }),
    )
    expect(checkBeam({ ...beam, ramOffset: mm(300) }, 1, DEFAULT_FACTORS)).toEqual([
      { check: 'bending and shear', notChecked: expect.stringMatching(/beyond the support/) as string },
    ])
    expect(checkBeam({ ...beam, hole: { diameter: mm(149), metal: mm(40) } }, 1, DEFAULT_FACTORS)).toEqual([
      { check: 'bending and shear', notChecked: expect.stringMatching(/all that carries shear/) as string },
    ])
  })

  it('a custom section without a shear area leaves shear unchecked, and its deflection without shear', () => {
    const custom: BeamStrength = {
      ...beam,
      section: {
        shape: 'custom',
        name: 'two channels back to back, from the list',
        area: { text: '48', unit: 'in2' },
        secondMoment: { text: '1200', unit: 'cm4' },
        sectionModulus: { text: '160', unit: 'cm3' },
        shearArea: null,
        thickness: mm(10),
        sideBySide: 1,
      },
    }
    expect(checkBeam(custom, 1, DEFAULT_FACTORS)).toContainEqual({
      check: 'shear',
      notChecked: expect.stringMatching(/not known/) as string,
    })
    expect(beamStiffness(custom)).toEqual({ bending: 210e9 * 1.2e-5, shear: null })
  })

  it('a ram that can’t be moved is in the middle', () => {
    expect([offsetShare(beam), offsetShare({ ...beam, ramOffset: mm(60) })]).toEqual([0, 0.1])
  })
})
