import { toSI } from '../units'
import { findings, type Finding, type StrengthFactors } from './factors'
import { strengthOf } from './materials'
import type { BeamStrength, Hole } from './member-data'
import { sectionProperties, type SectionProperties } from './sections'

/** A beam on two supports under one force, N, `at` m from the left support of a `span` in m. */
export interface PointLoad {
  force: number
  span: number
  at: number
}

/** Bending stiffness E·I, N·m², and shear stiffness G·A, N; null leaves shear out. */
export interface BeamStiffness {
  bending: number
  shear: number | null
}

function requireOnBeam({ span, at }: PointLoad): void {
  if (!(span > 0)) throw new RangeError('The span must be above zero.')
  if (!(at > 0 && at < span)) throw new RangeError('The force stands outside the supports of the beam.')
}

/**
 * Reactions (N), greatest shear (N) and greatest moment (N·m), which is under the force: M = P·a·b/L, P·L/4 in
 * the middle.
 * Source: elementary beam theory; as in Roark's Formulas, table 8.1, from memory.
 * @throws RangeError when the force isn't between the supports.
 */
export function simplySupported(load: PointLoad): { left: number; right: number; shear: number; moment: number } {
  requireOnBeam(load)
  const { force, span, at } = load
  const left = (force * (span - at)) / span
  const right = (force * at) / span
  return { left, right, shear: Math.max(left, right), moment: (force * at * (span - at)) / span }
}

/**
 * Deflection (m) at `x` m from the left support, bending and shear apart: P·b·x·(L² − b² − x²)/(6·E·I·L) left of
 * the force, mirrored right of it, which is P·L³/(48·E·I) in the middle; the shear strain's share is M/(G·A).
 * Source: elementary beam theory; Timoshenko's shear deflection.
 * @throws RangeError when the force isn't between the supports, or x is off the beam.
 */
export function deflectionOf(load: PointLoad, stiffness: BeamStiffness, x: number): { bending: number; shear: number } {
  requireOnBeam(load)
  const { force, span } = load
  if (!(x >= 0 && x <= span)) throw new RangeError('That point is not on the beam.')
  const [from, other] = x <= load.at ? [x, span - load.at] : [span - x, load.at]
  return {
    bending: (force * other * from * (span ** 2 - other ** 2 - from ** 2)) / (6 * stiffness.bending * span),
    shear: stiffness.shear === null ? 0 : (force * other * from) / (span * stiffness.shear),
  }
}

/** Deflection (m) under a force at the free end of a beam held at its root: P·L³/(3·E·I) and P·L/(G·A). */
export function tipDeflection(force: number, length: number, stiffness: BeamStiffness): { bending: number; shear: number } {
  return {
    bending: (force * length ** 3) / (3 * stiffness.bending),
    shear: stiffness.shear === null ? 0 : (force * length) / stiffness.shear,
  }
}

/** The stiffness of a beam as described. @throws RangeError when its dimensions don't fit together. */
export function beamStiffness(beam: BeamStrength): BeamStiffness {
  const section = sectionProperties(beam.section)
  const steel = strengthOf(beam.material, section.thickness, section.round)
  return {
    bending: steel.elasticModulus * section.secondMoment,
    shear: section.shearStiffnessArea === null ? null : steel.shearModulus * section.shearStiffnessArea,
  }
}

/**
 * How far off the middle the ram can stand, as a share of the span: 0 to below one half.
 * @throws RangeError when that is beyond a support.
 */
export function offsetShare(beam: BeamStrength): number {
  if (beam.support === 'one end' || !beam.ramOffset) return 0
  const share = toSI(beam.ramOffset) / toSI(beam.span)
  if (!(share < 0.5)) throw new RangeError('The ram’s offset is beyond the support of the beam. Measure the offset or the span again.')
  return share
}

/**
 * Section modulus (m³) that a hole at mid-height leaves.
 * @throws RangeError when it is larger than the section.
 */
export function netModulus(section: SectionProperties, hole: Hole | null): number {
  if (!hole) return section.sectionModulus
  const diameter = toSI(hole.diameter)
  const left = section.secondMoment - (toSI(hole.metal) * diameter ** 3) / 12
  if (!(diameter < 2 * section.c && left > 0)) throw new RangeError('The hole is larger than the section. Measure it again.')
  return left / section.c
}

/** Shear area (m²) that a hole leaves. @throws RangeError when it leaves none. */
function netShearArea({ shearArea }: SectionProperties, hole: Hole | null): number | null {
  if (!hole || shearArea === null) return shearArea
  const left = shearArea - toSI(hole.diameter) * toSI(hole.metal)
  if (!(left > 0))
    throw new RangeError('The hole takes away all that carries shear. Measure the hole, and the metal it goes through, again.')
  return left
}

/**
 * Bending and shear of a beam under `force` (N), its own share already taken, at the worst place the ram can
 * stand: the middle for bending, farthest off it for shear.
 */
export function checkBeam(beam: BeamStrength, force: number, factors: StrengthFactors): Finding[] {
  return findings('bending and shear', () => {
    const section = sectionProperties(beam.section)
    const steel = strengthOf(beam.material, section.thickness, section.round)
    const sectionModulus = netModulus(section, beam.hole)
    const shearArea = netShearArea(section, beam.hole)
    const span = toSI(beam.span)
    const held = beam.support === 'both ends'
    const moment = held ? simplySupported({ force, span, at: span / 2 }).moment : force * span
    const shear = held ? force * (0.5 + offsetShare(beam)) : force
    const of = `of yield ${(steel.yield / 1e6).toFixed(0)} MPa (${steel.name}, ${steel.source})`
    return [
      {
        check: 'bending',
        demand: moment,
        capacity: factors.ofYield * steel.yield * sectionModulus,
        unit: 'N·m',
        source: `${held ? 'M = P·L/4' : 'M = P·L, held at one end'}, elementary beam theory; ${factors.ofYield} ${of}; common practice, no source`,
      },
      shearArea === null
        ? { check: 'shear', notChecked: 'The area that carries shear is not known for this section.' }
        : {
            check: 'shear',
            demand: shear,
            capacity: factors.shearOfYield * steel.yield * shearArea,
            unit: 'N',
            source: `τ = V·Q/(I·b), elementary beam theory; ${factors.shearOfYield} ${of}; common practice, no source`,
          },
      {
        check: 'crushing of the web and buckling',
        notChecked: 'There is no check of a web crushed under the ram or over a pin, nor of a beam that buckles sideways.',
      },
      ...section.cautions.map((caution) => ({ check: 'section', notChecked: caution })),
    ]
  })
}
