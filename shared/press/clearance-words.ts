import { formatNumber, roundDownTo, toSI, type TypedForce } from '../units'

/** What a clearance holds under (DOMAIN 3.1, 3.12), as it stands on clearance, record and tag. */
export function conditionsOf(proven: {
  bedHoles: readonly string[]
  ramPositions: readonly string[]
  tooling: readonly string[]
  gaugeCode: string
}): string[] {
  const { bedHoles, ramPositions, tooling, gaugeCode } = proven
  return [
    `With the ram it was proven with${gaugeCode ? `, read on gauge ${gaugeCode}` : ''}.`,
    `In bed ${bedHoles.length === 1 ? 'hole' : 'holes'} ${bedHoles.join(' and ')}, ram ${ramPositions.join(' and ')}.`,
    tooling.length > 0 ? `With ${tooling.join(', ')}, or tooling rated for the load.` : 'With tooling rated for the load.',
    'Pressed slowly, with the load in line with the ram.',
    'Nobody in line with pins, ram or tooling; shield in place.',
  ]
}

/** What ends a clearance before its day, as the tag says it: the changes of rules P13 to P20 and what a test does. */
export const VOIDED_BY: readonly string[] = [
  'a repair or modification',
  'an overload or a knock',
  'another ram or gauge',
  'a joint that is worked on or rejected',
  'a gauge found out of tolerance',
  'a later test that was stopped or rejected',
]

/** What holds a clearance back until the joints were examined again. */
export const HELD_BY: readonly string[] = ['a move', 'a long stop']

/** The stated load of a clearance in kN, rounded down to a tenth: in no unit does a press carry more than it was cleared to. */
export function clearedKilonewtons(load: TypedForce): string {
  // A hair above, so that 100 kN typed as such does not come out as 99.9.
  return `${formatNumber(roundDownTo(toSI(load) / 1000 + 1e-9, 0.1), 1)}\u00a0kN`
}
