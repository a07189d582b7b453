import type { ClimbHistory } from '#shared/api/press-history'
import { formatNumber, formatQuantity, toUnit, type LengthUnit } from '#shared/units'

/** Climbs that can be compared: one position of the press, one measured figure. */
export interface Series {
  key: string
  label: string
  climbs: readonly ClimbHistory[]
}

/** Climbs by position and by what was measured, each the oldest first. */
export function seriesOf(climbs: readonly ClimbHistory[]): Series[] {
  const groups = new Map<string, ClimbHistory[]>()
  for (const climb of climbs) {
    const key = `${climb.leg}\n${climb.of}`
    groups.set(key, [...(groups.get(key) ?? []), climb])
  }
  const legs = [...groups.values()].map(([first]) => first?.leg)
  return [...groups].flatMap(([key, group]) => {
    const [first] = group
    if (!first) return []
    const several = legs.filter((leg) => leg === first.leg).length > 1
    return [{ key, label: several ? `${first.leg}, ${first.of}` : first.leg, climbs: group }]
  })
}

/** First climbs of the tests: a repeat climb is of the same hour and says nothing of the years. */
export const firstClimbs = ({ climbs }: Series): ClimbHistory[] => climbs.filter(({ climb }) => climb === 0)

/** Stiffness (N/m) in the units of the shop: kN/mm, or lbf/in where lengths are read in inches. */
export function stiffnessUnit(length: LengthUnit): { label: string; of: (newtonPerMetre: number) => number; decimals: number } {
  return length === 'in'
    ? { label: 'lbf/in', of: (value) => toUnit(value, 'lbf') * 0.0254, decimals: 0 }
    : { label: 'kN/mm', of: (value) => value / 1e6, decimals: 1 }
}

export interface StiffnessChange {
  from: ClimbHistory
  to: ClimbHistory
  /** Share of the first stiffness that is lost; negative when it is stiffer. */
  softer: number
  /** Expanded uncertainty of that share; null when one of the lines has too few readings to tell. */
  U: number | null
  says: 'softer' | 'stiffer' | 'cannot tell'
}

/**
 * How the last test's stiffness compares with the first's: r = K₂/K₁, with U(r)/r from both relative uncertainties
 * (JCGM 100, 5.1.6). It is softer only when the difference is outside that; null with fewer than two lines.
 */
export function stiffnessChange(climbs: readonly ClimbHistory[]): StiffnessChange | null {
  const read = climbs.filter(({ stiffness }) => stiffness !== null)
  const known = read.filter(({ stiffnessU }) => stiffnessU !== null)
  const lines = known.length > 1 ? known : read
  const from = lines[0]
  const to = lines.at(-1)
  if (!from?.stiffness || !to?.stiffness || from === to) return null
  const ratio = to.stiffness / from.stiffness
  const U =
    from.stiffnessU === null || to.stiffnessU === null
      ? null
      : ratio * Math.hypot(from.stiffnessU / from.stiffness, to.stiffnessU / to.stiffness)
  const softer = 1 - ratio
  const outside = U !== null && Math.abs(softer) > U
  return { from, to, softer, U, says: !outside ? 'cannot tell' : softer > 0 ? 'softer' : 'stiffer' }
}

const percent = (share: number): string => `${formatNumber(Math.abs(share) * 100, 1)}\u202f%`

/** The change in words; claims one only where the tests can tell it. */
export function changeWords({ from, to, softer, U, says }: StiffnessChange): string {
  const than = `at ${to.number} than at ${from.number}`
  if (U === null)
    return `Read as ${percent(softer)} ${softer < 0 ? 'stiffer' : 'softer'} ${than}. One of the lines has too few readings to tell whether that is so.`
  const tell = `what the two tests can tell is ±${percent(U)}`
  if (says !== 'cannot tell') return `${percent(softer)} ${says} ${than}; ${tell}.`
  return `No change that the tests can tell: ${percent(softer)} ${softer < 0 ? 'stiffer' : 'softer'} ${than}, and ${tell}.`
}

const beyond = (value: number | null, limit: number | null): boolean => value !== null && limit !== null && value > limit

/** What permanent set and pressure loss did over the tests, a sentence each where there is anything to say. */
export function limitWords(climbs: readonly ClimbHistory[]): string[] {
  const sentence = (what: string, has: (climb: ClimbHistory) => boolean, over: (climb: ClimbHistory) => boolean): string[] => {
    const read = climbs.filter(has)
    if (read.length === 0) return []
    const bad = [...new Set(read.filter(over).map(({ number }) => number))]
    if (bad.length === 0) return [`${what} stayed within its limit ${read.length === 1 ? 'in the one test that read it' : 'each time'}.`]
    return [`${what} passed its limit in ${bad.join(' and ')}.`]
  }
  return [
    ...sentence(
      'Permanent set',
      ({ set }) => set !== null,
      ({ set, setLimit }) => beyond(set, setLimit),
    ),
    ...sentence(
      'Pressure loss',
      ({ pressureLoss }) => pressureLoss !== null,
      ({ pressureLoss, pressureLossLimit }) => beyond(pressureLoss, pressureLossLimit),
    ),
  ]
}

const NONE = '—'

/** One row of the table below the chart, in the shop's units. */
export function rowOf(climb: ClimbHistory, length: LengthUnit) {
  const { label, of, decimals } = stiffnessUnit(length)
  const { stiffness, stiffnessU, set, setLimit, pressureLoss, pressureLossLimit } = climb
  const places = length === 'in' ? 4 : 3
  const against = (value: string, limit: string | null) => (limit === null ? value : `${value}, limit ${limit}`)
  return {
    stiffness:
      stiffness === null
        ? NONE
        : `${formatNumber(of(stiffness), decimals)}${stiffnessU === null ? '' : `\u00a0± ${formatNumber(of(stiffnessU), decimals)}`}\u00a0${label}`,
    set:
      set === null
        ? NONE
        : against(formatQuantity(set, length, places), setLimit === null ? null : formatQuantity(setLimit, length, places)),
    loss: pressureLoss === null ? NONE : against(percent(pressureLoss), pressureLossLimit === null ? null : percent(pressureLossLimit)),
  }
}
