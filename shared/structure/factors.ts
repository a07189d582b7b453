/**
 * The shares of a material's strength that the load path check allows, and what it says about each. All of them are
 * fields, so that a shop can set its own: common practice, no source, except where a source is named.
 */
export interface StrengthFactors {
  /** Bending and tension of members, as a share of yield. */
  ofYield: number
  /** Shear of members and of the metal beside welds, holes and threads, as a share of yield. */
  shearOfYield: number
  /** Shear of pins, as a share of yield. */
  pinShearOfYield: number
  /** Bearing on a face or a hole's wall, as a share of yield: 1.8/2.00 in AISC 360, J7. */
  bearingOfYield: number
  /** A bolt's proof load is divided by this. */
  boltProof: number
  /** Shear on a weld's throat, as a share of the filler's tensile strength: Blodgett, Lincoln D412 (1991). */
  weldOfElectrode: number
}

export const DEFAULT_FACTORS: StrengthFactors = {
  ofYield: 0.5,
  shearOfYield: 0.4,
  pinShearOfYield: 0.4,
  bearingOfYield: 0.9,
  boltProof: 2,
  weldOfElectrode: 0.3,
}

/** One thing checked of a member or joint: what it must carry against what it may. */
export interface CheckedFinding {
  check: string
  demand: number
  capacity: number
  /** Of both. */
  unit: 'N' | 'N·m' | 'Pa'
  /** Formula, factor, material and where each comes from. */
  source: string
}

/** One thing that nothing was worked out for, with the reason. */
export interface UncheckedFinding {
  check: string
  notChecked: string
}

export type Finding = CheckedFinding | UncheckedFinding

/** Runs checks and turns dimensions that don't fit together, said as a RangeError, into NOT CHECKED. */
export function findings(check: string, work: () => Finding[]): Finding[] {
  try {
    return work()
  } catch (error) {
    if (!(error instanceof RangeError)) throw error
    return [{ check, notChecked: error.message }]
  }
}
