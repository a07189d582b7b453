import { canonicalText } from '../ledger/canonical'
import type { PressChange } from './entries'
import { neighboursOf } from './joints'
import type { JOINT_KINDS, PressDescription } from './model'
import type { PressJoint, PressState } from './state'

/** Which joints a change puts back to unexamined. */
export type Touches = 'every joint' | 'the joints named, or every joint' | 'what can work loose' | 'what holds the ram' | 'no joint'

/** What a change does to a clearance in force: ends it, holds it until the joints are accepted again, or leaves it. */
export type ClearanceAfter = 'ends' | 'waits for the joints' | 'stands'

/** A numbered rule of the press's ledger: what one kind of change does. */
export interface ChangeRule {
  id: string
  change: PressChange['change']
  text: string
  touches: Touches
  clearance: ClearanceAfter
}

/**
 * What each kind of change does to joints and clearance. That a press is examined again after repair,
 * modification, abnormal load or shock follows 29 CFR 1910.244(a)(2)(vi), written for jacks; the rest is common
 * practice, no source.
 */
export const CHANGE_RULES: readonly ChangeRule[] = [
  {
    id: 'P13',
    change: 'repair',
    text: 'A repair puts the joints named and their neighbours back to unexamined, all of them when none is named, and ends the clearance.',
    touches: 'the joints named, or every joint',
    clearance: 'ends',
  },
  {
    id: 'P14',
    change: 'modification',
    text: 'A modification puts the joints named and their neighbours back to unexamined, all of them when none is named, and ends the clearance.',
    touches: 'the joints named, or every joint',
    clearance: 'ends',
  },
  {
    id: 'P15',
    change: 'overload',
    text: 'An overload puts every joint back to unexamined and ends the clearance.',
    touches: 'every joint',
    clearance: 'ends',
  },
  {
    id: 'P16',
    change: 'knock',
    text: 'A knock puts the joints named and their neighbours back to unexamined, all of them when none is named, and ends the clearance.',
    touches: 'the joints named, or every joint',
    clearance: 'ends',
  },
  {
    id: 'P17',
    change: 'moved',
    text: 'A move puts what can work loose (pins, bolts, threads, bearing faces) back to unexamined; the clearance waits until it is accepted again.',
    touches: 'what can work loose',
    clearance: 'waits for the joints',
  },
  {
    id: 'P18',
    change: 'long stop',
    text: 'A long stop puts every joint back to unexamined; the clearance waits until they are accepted again.',
    touches: 'every joint',
    clearance: 'waits for the joints',
  },
  {
    id: 'P19',
    change: 'painted',
    text: 'Paint leaves examinations and clearance as they are; it hides cracks from the next examination.',
    touches: 'no joint',
    clearance: 'stands',
  },
  {
    id: 'P20',
    change: 'ram or gauge changed',
    text: 'Another ram or gauge puts what holds the ram back to unexamined and ends the clearance, which rests on the ram and gauge it was proven with.',
    touches: 'what holds the ram',
    clearance: 'ends',
  },
]

export function changeRule(change: PressChange['change']): ChangeRule {
  const found = CHANGE_RULES.find((rule) => rule.change === change)
  if (!found) throw new Error(`No rule says what ${change} does.`)
  return found
}

const CAN_WORK_LOOSE: ReadonlySet<(typeof JOINT_KINDS)[number]> = new Set(['pin', 'bolt', 'thread', 'bearing'] as const)

/** Members that carry the ram or hang on it: what changes when the ram is taken out. */
function atTheRam(description: PressDescription | null): Set<string> {
  const members = description?.members ?? []
  return new Set(members.filter((member) => member.kind === 'ram-seat' || member.kind === 'tooling-adaptor').map((member) => member.id))
}

/** The joints that a change puts back to unexamined, with the neighbours of those named. */
export function touchedBy(
  state: Pick<PressState, 'joints' | 'description'>,
  { change, jointIds }: Pick<PressChange, 'change' | 'jointIds'>,
): PressJoint[] {
  const joints = state.joints.filter((joint) => !joint.retired)
  switch (changeRule(change).touches) {
    case 'every joint':
      return joints
    case 'no joint':
      return []
    case 'what can work loose':
      return joints.filter((joint) => CAN_WORK_LOOSE.has(joint.kind) || jointIds.includes(joint.id))
    case 'what holds the ram': {
      const members = atTheRam(state.description)
      const holding = joints.filter((joint) => joint.between.some((member) => members.has(member)) && CAN_WORK_LOOSE.has(joint.kind))
      return joints.filter((joint) => holding.includes(joint) || jointIds.includes(joint.id))
    }
    case 'the joints named, or every joint': {
      if (jointIds.length === 0) return joints
      const touched = new Set(jointIds)
      for (const id of jointIds) for (const neighbour of neighboursOf(joints, id)) touched.add(neighbour.id)
      return joints.filter((joint) => touched.has(joint.id))
    }
  }
}

/** What somebody reads before reporting a change. */
export interface ChangePreview {
  rule: ChangeRule
  touched: PressJoint[]
}

export function previewChange(state: PressState, change: Pick<PressChange, 'change' | 'jointIds'>): ChangePreview {
  return { rule: changeRule(change.change), touched: touchedBy(state, change) }
}

/** What the press is, without what it is called and what is known of its strength. */
function shapeOf(description: PressDescription): string {
  const { name: _name, whatFor: _whatFor, members, ...rest } = description
  return canonicalText({ ...rest, members: members.map(({ id, kind }) => ({ id, kind })) })
}

/** Whether a new description tells of another press than before, or only names it otherwise or knows more of it. */
export function describesAnotherPress(before: PressDescription | null, after: PressDescription): boolean {
  return before === null || shapeOf(before) !== shapeOf(after)
}
