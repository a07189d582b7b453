import { FORCE_DECIMALS, formatNumber, formatValue, toUnit, unitLabel, type ForceUnit } from '../units'
import { DEFAULT_FACTORS, type StrengthFactors } from './factors'
import { percentUsed, type CheckResult, type LoadPathCheck } from './load-path-check'

/** How a load path check reads on screens, records and exports. */

/** A demand or capacity in print, number and unit: 53.4 in the reader's force unit, 12.3 kN·m, 214 MPa. */
function loadWords(value: number, unit: NonNullable<CheckResult['unit']>, forceUnit: ForceUnit): { number: string; unit: string } {
  switch (unit) {
    case 'N':
      return { number: formatValue(value, forceUnit, FORCE_DECIMALS[forceUnit]), unit: unitLabel(forceUnit, { plural: true }) }
    case 'N·m':
      return { number: formatNumber(toUnit(value, 'kN'), 2), unit: 'kN·m' }
    case 'Pa':
      return { number: formatValue(value, 'MPa', 0), unit: 'MPa' }
  }
}

/** What a checked result comes to: "132 %", or that it may carry nothing. */
export function usedWords(result: CheckResult): string {
  return result.utilisation === null ? 'may carry nothing' : percentUsed(result.utilisation)
}

/** What is asked of it against what the stated factor allows: "53.4 of 106.8 kN". */
export function demandWords(result: CheckResult, forceUnit: ForceUnit): string {
  const { demand, capacity, unit } = result
  if (demand === null || capacity === null || unit === null) return ''
  const allowed = loadWords(capacity, unit, forceUnit)
  return `${loadWords(demand, unit, forceUnit).number} of ${allowed.number}\u00a0${allowed.unit}`
}

const rank = ({ verdict, utilisation }: CheckResult): number => (verdict === 'not checked' ? -1 : (utilisation ?? Infinity))

/** The checked results, the weakest first. */
export function checkedByUse(results: readonly CheckResult[]): CheckResult[] {
  return results.filter(({ verdict }) => verdict !== 'not checked').sort((a, b) => rank(b) - rank(a))
}

/** Of each member and joint the check that comes nearest to what it may carry, the weakest first. */
export function weakestOfEach(results: readonly CheckResult[]): CheckResult[] {
  const seen = new Set<string>()
  return checkedByUse(results).filter(({ about: { kind, id } }) => {
    const key = `${kind} ${id}`
    const first = !seen.has(key)
    seen.add(key)
    return first
  })
}

/** Whether somebody has entered anything that could be checked; a joint that isn't finished counts for nothing by itself. */
export function anyFigures(check: LoadPathCheck): boolean {
  return check.results.some(({ capacity }) => capacity !== null && capacity > 0)
}

/** The stated factors, each with its share and where it comes from. */
export function factorWords(factors: StrengthFactors = DEFAULT_FACTORS): (readonly [name: string, value: string])[] {
  const practice = 'common practice, no source'
  return [
    ['Bending and tension', `${factors.ofYield} of yield, ${practice}`],
    ['Shear of members', `${factors.shearOfYield} of yield, ${practice}`],
    ['Shear of pins', `${factors.pinShearOfYield} of yield, ${practice}`],
    ['Bearing', `${factors.bearingOfYield} of yield, AISC 360, J7`],
    ['Bolts and threads', `proof load ÷ ${factors.boltProof}, ${practice}`],
    ['Welds', `${factors.weldOfElectrode} of the filler’s tensile strength on the throat, Blodgett, Lincoln D412 (1991)`],
  ]
}

/** What a load path check never tells. */
export const CHECK_CAUTIONS: readonly string[] = [
  'An estimate from what was entered, no design and no approval. What was measured wrong is worked out wrong.',
  'Fatigue, cold, shock, buckling, twist, lack of fusion and cracks are in none of it.',
  'A joint is counted as whole once it is finished: the examination finds what is not.',
]
