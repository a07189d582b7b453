import { toSI } from '../units'
import { findings, type Finding, type StrengthFactors } from './factors'
import { strengthOf } from './materials'
import type { Electrode, WeldStrength } from './member-data'

const MPa = 1e6
const KSI = toSI({ text: '1000', unit: 'psi' })

const TENSILE: Record<Exclude<Electrode['grade'], 'custom'>, { tensile: number; source: string }> = {
  E60: { tensile: 60 * KSI, source: 'AWS A5.1, 60 ksi' },
  E70: { tensile: 70 * KSI, source: 'AWS A5.1, 70 ksi' },
  E80: { tensile: 80 * KSI, source: 'AWS A5.5, 80 ksi, from memory' },
  E38: { tensile: 470 * MPa, source: 'EN ISO 2560-A, from memory' },
  E42: { tensile: 500 * MPa, source: 'EN ISO 2560-A, from memory' },
  E46: { tensile: 530 * MPa, source: 'EN ISO 2560-A, from memory' },
}

/** Least tensile strength of a filler, Pa, with where it comes from. */
export function fillerStrength(electrode: Electrode): { tensile: number; name: string; source: string } {
  if (electrode.grade === 'custom') return { tensile: toSI(electrode.tensile), name: electrode.name, source: 'as entered' }
  return { name: electrode.grade, ...TENSILE[electrode.grade] }
}

/** Throat of an equal-legged fillet, m, from its leg: leg/√2. */
export const throatOfLeg = (leg: number): number => leg / Math.SQRT2

/**
 * What a weld's throat may carry, N: share · F_EXX · throat · length. `throat` and `length` in m, `tensile` in Pa.
 * Source: Blodgett, Stress Allowables Affect Weldment Design (Lincoln D412, 1991): 0.30·F_EXX on the throat.
 */
export function weldCapacity(throat: number, length: number, tensile: number, share: number): number {
  return share * tensile * throat * length
}

/** Throat of a weld, and the metal beside it, under their share of the force, N. */
export function checkWeld(weld: WeldStrength, force: number, factors: StrengthFactors): Finding[] {
  return findings('weld', () => {
    const size = toSI(weld.size.value)
    const length = toSI(weld.length)
    const throat = weld.size.by === 'leg' ? throatOfLeg(size) : size
    const filler = fillerStrength(weld.electrode)
    const own: Finding = {
      check: 'weld throat',
      demand: force,
      capacity: weldCapacity(throat, length, filler.tensile, factors.weldOfElectrode),
      unit: 'N',
      source: `${factors.weldOfElectrode}·F_EXX on the throat, Blodgett, Lincoln D412 (1991); ${filler.name}, ${(filler.tensile / MPa).toFixed(0)} MPa (${filler.source})`,
    }
    const eccentric: Finding = { check: 'bending of the weld', notChecked: 'The force is taken to pass through the middle of the weld.' }
    if (!weld.base) return [own, { check: 'metal beside the weld', notChecked: 'The parts that it holds were not entered.' }, eccentric]
    const steel = strengthOf(weld.base.material, toSI(weld.base.thickness))
    const width = weld.size.by === 'leg' ? size : throat
    return [
      own,
      {
        check: 'metal beside the weld',
        demand: force,
        capacity: factors.shearOfYield * steel.yield * width * length,
        unit: 'N',
        source: `shear over the leg; ${factors.shearOfYield} of yield ${(steel.yield / MPa).toFixed(0)} MPa (${steel.name}, ${steel.source}); common practice, no source`,
      },
      eccentric,
    ]
  })
}
