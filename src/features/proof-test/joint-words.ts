import { nameJoints, neighboursOf } from '#shared/press/joints'
import type { ExaminationMethod, FrameKind } from '#shared/press/model'
import { walkingOrder } from '#shared/press/places'
import type { JointState } from '#shared/proof-test/state'
import { examinationOf, jointMark, orderWalked, type Occasion, type Walked } from '#shared/proof-test/walked'
import { clockTime } from '../../lib/dates'
import { capital, ordinal } from '../../lib/words'

export { examinationOf, jointMark, orderWalked, type Occasion }

const BY: Record<ExaminationMethod, string> = {
  visual: 'by eye',
  'dye penetrant': 'by dye penetrant',
  'magnetic particle': 'by magnetic particle',
  measured: 'measured',
}

/** "Accepted, by dye penetrant", "Tacked", "Finished, not examined". */
export function jointSays(joint: JointState, occasion: Occasion): string {
  if (joint.makeUp !== 'finished') return capital(joint.makeUp)
  const examined = examinationOf(joint, occasion)
  if (examined) return `${capital(examined.result)}, ${BY[examined.method]}`
  return joint.fellBackBecause && occasion === 'before load' ? `Examine again: ${joint.fellBackBecause}` : 'Finished, not examined'
}

/** What makes a joint whole, as the person says it is done. */
export const madeUpWord = (joint: JointState): string =>
  joint.makeUp === 'finished' ? 'repaired' : joint.joint.kind === 'weld' ? 'welded out' : 'made up'

/** The joints to examine after work on one: itself and what hangs on the same members. */
export function toExamineAfter(joints: readonly JointState[], worked: JointState): string {
  const around = neighboursOf(
    joints.map(({ joint }) => joint),
    worked.joint.id,
  )
  return nameJoints([worked.joint.number, ...around.map(({ number }) => number)])
}

/** A joint that can't carry load as it stands: open, tacked or rejected. */
export const needsWork = (joint: JointState, occasion: Occasion): boolean =>
  joint.makeUp !== 'finished' || examinationOf(joint, occasion)?.result === 'rejected'

/** What is so and what to do about a joint that needs work. */
export function workSentence(joint: JointState, joints: readonly JointState[]): { title: string; body: string } {
  const { number, name, kind } = joint.joint
  const after = `It touches its neighbours, so examine ${toExamineAfter(joints, joint)} after.`
  const here = name.charAt(0).toLowerCase() + name.slice(1)
  if (joint.makeUp === 'tacked')
    return {
      title: `Not ready to load: joint ${number} is only tacked.`,
      body: `A tack counts as no weld, and the ${here} is in the load path. Weld it out and clean it. ${after}`,
    }
  if (joint.makeUp === 'open')
    return {
      title: `Not ready to load: joint ${number} is open.`,
      body: `Nothing holds the ${here} together yet, and it is in the load path. ${kind === 'weld' ? 'Weld it out and clean it' : 'Make it up'}. ${after}`,
    }
  return { title: `Not ready to load: joint ${number} was rejected.`, body: `Repair the ${here}. ${after}` }
}

const needsExamining = (joint: JointState, occasion: Occasion): boolean => !examinationOf(joint, occasion)

/** The joint at hand: the one that was tapped, else the first that needs work, else the first to examine, round the frame. */
export function jointAtHand(kind: FrameKind, joints: readonly JointState[], occasion: Occasion, tapped: string | null): JointState | null {
  const chosen = joints.find(({ joint }) => joint.id === tapped)
  if (chosen) return chosen
  const ways = new Map(joints.map((joint) => [joint.joint.id, joint]))
  const round = walkingOrder(
    kind,
    joints.map(({ joint }) => joint),
  ).flatMap(({ id }) => ways.get(id) ?? [])
  return round.find((joint) => needsWork(joint, occasion)) ?? round.find((joint) => needsExamining(joint, occasion)) ?? null
}

/** "3rd of 11, 14:02". */
export const walkedWords = ({ rank, at }: Walked, of: number): string => `${ordinal(rank)} of ${of}, ${clockTime(at)}`
