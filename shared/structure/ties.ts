import { toSI } from '../units'
import { netModulus } from './beams'
import { findings, type Finding, type StrengthFactors } from './factors'
import { strengthOf } from './materials'
import type { Hole, TieStrength } from './member-data'
import { sectionProperties } from './sections'

/**
 * Elongation of a bar in tension, m: P·L/(E·A), summed over segments. Force in N, lengths in m, areas in m²,
 * modulus in Pa.
 * Source: Hooke's law.
 */
export function elongation(force: number, elasticModulus: number, segments: readonly { length: number; area: number }[]): number {
  return segments.reduce((sum, { length, area }) => sum + (force * length) / (elasticModulus * area), 0)
}

/** Area (m²) that a hole leaves. @throws RangeError when it leaves none. */
export function netArea(area: number, hole: Hole | null): number {
  const net = hole ? area - toSI(hole.diameter) * toSI(hole.metal) : area
  if (!(net > 0)) throw new RangeError('The hole takes away the whole section. Measure the hole, and the metal it goes through, again.')
  return net
}

/** Elongation of a tie (m) under its share of the force, N, holes left out. @throws RangeError when it can't be worked out. */
export function tieElongation(tie: TieStrength, force: number): number {
  const section = sectionProperties(tie.section)
  const steel = strengthOf(tie.material, section.thickness, section.round)
  return elongation(force, steel.elasticModulus, [{ length: toSI(tie.length), area: section.area }])
}

/**
 * Tension of a tie under `force` (N), its own share already taken, on the section that its hole leaves; where the
 * force pulls beside the section, with the bending that comes of it: P/A + P·e/S.
 */
export function checkTie(tie: TieStrength, force: number, factors: StrengthFactors): Finding[] {
  return findings('tension', () => {
    const section = sectionProperties(tie.section)
    const steel = strengthOf(tie.material, section.thickness, section.round)
    const net = netArea(section.area, tie.hole)
    const arm = tie.eccentricity ? toSI(tie.eccentricity) : 0
    const allowed = `${factors.ofYield} of yield ${(steel.yield / 1e6).toFixed(0)} MPa (${steel.name}, ${steel.source}); common practice, no source`
    const where = tie.hole ? 'on the net section' : 'on the whole section'
    const twist = section.cautions.map((caution) => ({ check: 'section', notChecked: caution }))
    if (arm > 0) {
      return [
        {
          check: `tension and bending, ${where}`,
          demand: force / net + (force * arm) / netModulus(section, tie.hole),
          capacity: factors.ofYield * steel.yield,
          unit: 'Pa',
          source: `σ = P/A + P·e/S; ${allowed}`,
        },
        ...twist,
      ]
    }
    return [
      {
        check: `tension, ${where}`,
        demand: force,
        capacity: factors.ofYield * steel.yield * net,
        unit: 'N',
        source: `σ = P/A; ${allowed}`,
      },
      ...twist,
    ]
  })
}
