import type { Attachment } from '#shared/ledger/envelope'
import type { PressDescription, RamPosition } from '#shared/press/model'
import type { ProtocolContent } from '#shared/proof-test/protocol'
import { typedNumber } from '../../lib/draft-resolver'

export interface PointDraft {
  id: string
  letter: string
  label: string
  place: string
  instrumentId: string
  reads: 'rises' | 'falls'
  memberId: string
}

export interface LegDraft {
  label: string
  ramPosition: RamPosition
  bedHole: string
}

/** The plan as it is typed; ids are made once, with the draft. */
export interface PlanDraft {
  id: string
  entryId: string
  pressId: string
  protocolId: string
  forceInstrumentIds: string[]
  points: PointDraft[]
  combine: 'yes' | 'no'
  legs: LegDraft[]
  pumpHand: { id: string; name: string }
  witness: { id: string; relation: string }
  /** Asked where the protocol goes above the rated load. */
  aboveRating: { percent: string; rule: string }
  /** Asked where the load path check is over 100 %. */
  engineer: { name: string; document: string; on: string }
  /** The document itself, kept on this device until the test is open. */
  engineerFiles: Attachment[]
  repeatsId: string
  /** Loose tooling of the register that the force passes through. */
  toolingIds: string[]
  instrumentOverride: string
}

/** Stands in the list of pump hands for somebody without an account. */
export const SOMEBODY_ELSE = 'somebody else'

export function newPlan(nextId: () => string, pressId: string, repeatsId = ''): PlanDraft {
  return {
    id: nextId(),
    entryId: nextId(),
    pressId,
    protocolId: '',
    forceInstrumentIds: [''],
    points: [],
    combine: 'yes',
    legs: [],
    pumpHand: { id: '', name: '' },
    witness: { id: '', relation: '' },
    aboveRating: { percent: '', rule: '' },
    engineer: { name: '', document: '', on: '' },
    engineerFiles: [],
    repeatsId,
    toolingIds: [],
    instrumentOverride: '',
  }
}

type Spot = readonly [letter: string, label: string, place: string]

const PORTAL: readonly Spot[] = [
  ['M', 'Bed middle', 'bed-middle'],
  ['L', 'Left pin', 'bed-pin-left'],
  ['R', 'Right pin', 'bed-pin-right'],
]
const SPOTS: Record<PressDescription['kind'], readonly Spot[]> = {
  'h-frame': PORTAL,
  'four-post': [
    PORTAL[0] ?? ['M', 'Bed middle', 'bed-middle'],
    ['L', 'Bed at left post', 'bed-pin-left'],
    ['R', 'Bed at right post', 'bed-pin-right'],
  ],
  bench: [
    PORTAL[0] ?? ['M', 'Bed middle', 'bed-middle'],
    ['L', 'Bed at left rod', 'bed-pin-left'],
    ['R', 'Bed at right rod', 'bed-pin-right'],
  ],
  'c-frame': [
    ['H', 'Upper arm at the ram', 'head-middle'],
    ['M', 'Bed middle', 'bed-middle'],
  ],
}

/** The member a usual point tells of: the bed under M, the head under H. What a pin's point tells of is said by hand. */
function memberOf(letter: string, press: PressDescription): string {
  const kind = letter === 'M' ? 'bed-beam' : letter === 'H' ? 'head-beam' : null
  return press.members.find((member) => member.kind === kind)?.id ?? ''
}

/** The points that this kind of frame is usually measured at: the bed's bending apart from the pins it lies on. */
export function usualPoints(press: PressDescription, nextId: () => string): PointDraft[] {
  return SPOTS[press.kind].map(([letter, label, place]) => ({
    id: nextId(),
    letter,
    label,
    place,
    instrumentId: '',
    reads: 'rises',
    memberId: memberOf(letter, press),
  }))
}

/** A leg for each of the protocol, with the bed holes that were typed already. */
export function legsOf(content: ProtocolContent, typed: readonly LegDraft[]): LegDraft[] {
  return content.legs.map(({ label, ramPosition }, index) => ({ label, ramPosition, bedHole: typed[index]?.bedHole ?? '' }))
}

/** Middle less the mean of what it lies on, where there are such points. */
export function netOf({ points, combine }: Pick<PlanDraft, 'points' | 'combine'>) {
  const [first, ...rest] = points
  if (combine === 'no' || first === undefined || rest.length === 0) return null
  const names = rest.map((point) => point.label.toLowerCase())
  const mean = rest.length === 1 ? (names[0] ?? '') : `mean of ${names.join(' and ')}`
  return { label: `${first.label.toLowerCase()} less ${mean}`.slice(0, 80), plus: first.id, minus: rest.map((point) => point.id) }
}

export type Stamp = { deviceId: string; bootId: string; monotonicMs: number; observedAt: string }

/** What a plan asks of the registers to say what it stands for. */
export interface PlanLookup {
  nameOf: (userId: string) => string
  contentOf: (protocolId: string) => ProtocolContent | undefined
}

/** Whether anything is typed of an engineer's document: then it is shown, checked and sent. */
export const engineerTyped = (engineer: PlanDraft['engineer']): boolean => Object.values(engineer).some((text) => text.trim() !== '')

/** The request that the plan stands for, unchecked. */
export function toRequest(draft: PlanDraft, stamp: Stamp, { nameOf, contentOf }: PlanLookup) {
  const { combine: _combine, points, pumpHand, aboveRating, engineer, engineerFiles, ...rest } = draft
  const stranger = pumpHand.id === SOMEBODY_ELSE
  return {
    ...rest,
    ...stamp,
    points: points.map(({ reads, memberId, ...point }) => ({ ...point, risesWithLoad: reads === 'rises', memberId: memberId || null })),
    net: netOf(draft),
    // Whoever has an account is named by it; a name is only typed for somebody who has none.
    pumpHand: stranger ? { id: null, name: pumpHand.name } : { id: pumpHand.id, name: nameOf(pumpHand.id) },
    // Kept in the draft while another protocol is tried, and sent only where it is asked for.
    aboveRating: contentOf(draft.protocolId)?.aboveRating ? { ...aboveRating, percent: typedNumber(aboveRating.percent) } : null,
    engineer: engineerTyped(engineer) ? engineer : null,
    attachments: engineerTyped(engineer) ? engineerFiles : [],
    repeatsId: draft.repeatsId || null,
    instrumentOverride: draft.instrumentOverride.trim() || null,
  }
}
