import type { JointMarkState } from '../drawing/balloon-items'
import type { JointExamination, JointState } from './state'

export type Occasion = 'before load' | 'after load'

export const examinationOf = (joint: JointState, occasion: Occasion): JointExamination | null =>
  occasion === 'before load' ? joint.before : joint.after

/** How a joint's balloon is drawn. */
export function jointMark(joint: JointState, occasion: Occasion): JointMarkState {
  if (joint.makeUp !== 'finished') return joint.makeUp
  return examinationOf(joint, occasion)?.result ?? 'finished'
}

export interface Walked {
  joint: JointState
  /** From 1, in the order the joints were examined. */
  rank: number
  at: string
}

/** The joints in the order they were walked; it follows from the ledger, so it is there again after a reload. */
export function orderWalked(joints: readonly JointState[], occasion: Occasion): Walked[] {
  return joints
    .flatMap((joint) => {
      const examined = examinationOf(joint, occasion)
      return examined ? [{ joint, at: examined.at }] : []
    })
    .sort((a, b) => (a.at === b.at ? 0 : a.at < b.at ? -1 : 1))
    .map((one, index) => ({ ...one, rank: index + 1 }))
}
