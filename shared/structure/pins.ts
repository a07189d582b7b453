import { toSI, type TypedLength } from '../units'
import { simplySupported, tipDeflection, deflectionOf } from './beams'
import { findings, type Finding, type StrengthFactors } from './factors'
import { strengthOf } from './materials'
import type { Part, PinStrength } from './member-data'

/** Smallest pin diameter (m) that carries a force (N) at a shear stress (Pa) across its planes: √(4·F/(π·n·τ)). */
export function pinDiameterFor(force: number, shearStress: number, shearPlanes: number): number {
  return Math.sqrt((4 * force) / (Math.PI * shearPlanes * shearStress))
}

/** Area (m²) that shears when a pin of this diameter (m) is cut across n planes: n·π·d²/4. */
export function pinShearArea(diameter: number, shearPlanes: number): number {
  return (shearPlanes * Math.PI * diameter ** 2) / 4
}

/**
 * The lever arm (m) by which a pin bends across its gaps: half of each outer part, the gap, and a quarter of the
 * middle part; in single shear half of both parts.
 * Source: t₁/2 + g + t₂/4, the usual lug analysis (Melconian and Hoblit, 1953, from memory).
 */
export function pinArm(pin: PinStrength): number {
  const inner = toSI(pin.inner.thickness)
  return toSI(pin.outer.thickness) / 2 + toSI(pin.gap) + (pin.shearPlanes === 2 ? inner / 4 : inner / 2)
}

/**
 * Greatest bending moment in a pin (N·m) under a force (N): P/2 times the arm in double shear, P times it in
 * single shear, where nothing else is counted on to hold the pin straight.
 */
export function pinMoment(pin: PinStrength, force: number): number {
  const arm = pinArm(pin)
  return pin.shearPlanes === 1 ? force * arm : simplySupported({ force, span: 2 * arm, at: arm }).moment
}

/** How far a pin gives (m) under a force (N): bending across the same arm, and shear over 0.9 of its area. */
export function pinGive(pin: PinStrength, force: number): number {
  const diameter = toSI(pin.diameter)
  const steel = strengthOf(pin.material, diameter)
  const stiffness = {
    bending: (steel.elasticModulus * Math.PI * diameter ** 4) / 64,
    shear: 0.9 * steel.shearModulus * pinShearArea(diameter, 1),
  }
  const arm = pinArm(pin)
  const { bending, shear } =
    pin.shearPlanes === 1 ? tipDeflection(force, arm, stiffness) : deflectionOf({ force, span: 2 * arm, at: arm }, stiffness, arm)
  return bending + shear
}

function bearing(which: string, part: Part, diameter: number, force: number, factors: StrengthFactors): Finding {
  const thickness = toSI(part.thickness)
  const steel = strengthOf(part.material, thickness)
  return {
    check: `bearing on the ${which}`,
    demand: force,
    capacity: factors.bearingOfYield * steel.yield * diameter * thickness,
    unit: 'N',
    source: `σ = P/(d·t); ${factors.bearingOfYield} of yield ${(steel.yield / 1e6).toFixed(0)} MPa (${steel.name}, ${steel.source}); AISC 360, J7`,
  }
}

/** Two planes from the hole's wall to the edge; what lies beside the pin itself is not counted. */
function tearOut(which: string, part: Part, edge: TypedLength | null, diameter: number, force: number, factors: StrengthFactors): Finding {
  const check = `tear-out of the ${which}`
  if (!edge) return { check, notChecked: 'No distance from the hole to the edge was entered.' }
  const clear = toSI(edge) - diameter / 2
  if (!(clear > 0)) throw new RangeError('The edge is nearer than the hole’s own wall. Measure from the middle of the hole to the edge.')
  const thickness = toSI(part.thickness)
  const steel = strengthOf(part.material, thickness)
  return {
    check,
    demand: force,
    capacity: factors.shearOfYield * steel.yield * 2 * clear * thickness,
    unit: 'N',
    source: `two planes, 2·(e − d/2)·t; ${factors.shearOfYield} of yield ${(steel.yield / 1e6).toFixed(0)} MPa (${steel.name}, ${steel.source}); common practice, no source`,
  }
}

/** Shear, bending across the gaps, bearing and tear-out of a pin under its share of the force, N. */
export function checkPin(pin: PinStrength, force: number, factors: StrengthFactors): Finding[] {
  return findings('pin', () => {
    const diameter = toSI(pin.diameter)
    const steel = strengthOf(pin.material, diameter)
    const onOuter = force / pin.shearPlanes
    const yields = `of yield ${(steel.yield / 1e6).toFixed(0)} MPa (${steel.name}, ${steel.source}); common practice, no source`
    return [
      {
        check: pin.shearPlanes === 2 ? 'double shear' : 'single shear',
        demand: force,
        capacity: factors.pinShearOfYield * steel.yield * pinShearArea(diameter, pin.shearPlanes),
        unit: 'N',
        source: `τ = F/(n·π·d²/4); ${factors.pinShearOfYield} ${yields}`,
      },
      {
        check: 'bending across the gaps',
        demand: pinMoment(pin, force),
        capacity: (factors.ofYield * steel.yield * Math.PI * diameter ** 3) / 32,
        unit: 'N·m',
        source: `M = P/n·(t₁/2 + g + t₂/${pin.shearPlanes === 2 ? 4 : 2}), usual lug analysis, from memory; ${factors.ofYield} ${yields}`,
      },
      bearing('outer part', pin.outer, diameter, onOuter, factors),
      bearing('middle part', pin.inner, diameter, force, factors),
      tearOut('outer part', pin.outer, pin.outerEdge, diameter, onOuter, factors),
      tearOut('middle part', pin.inner, pin.innerEdge, diameter, force, factors),
    ]
  })
}
