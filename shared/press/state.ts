import type { Attachment, Override } from '../ledger/envelope'
import type { Clearance } from './entries'
import type { ExaminationMethod, Joint, PressDescription } from './model'

export interface PressExamination {
  result: 'accepted' | 'rejected'
  method: ExaminationMethod
  by: string
  at: string
  remark: string
  proofTestNumber: string | null
}

export interface PressJoint extends Joint {
  /** The last examination, null when work or a stopped test put the joint back to unexamined. */
  examination: PressExamination | null
  fellBackBecause: string | null
  /** Moment of the last weld or work on it; null when only the day in `madeOn` is known. */
  workedAt: string | null
  retired: boolean
}

export interface PressEvent {
  seq: number
  at: string
  authorId: string
  kind: string
  text: string
  mark: 'within' | 'stop' | 'plain' | 'under-way'
  proofTestId: string | null
  /** Photos and documents that its entry names. */
  attachments: readonly Attachment[]
}

export type ClearanceState =
  | { is: 'none' }
  | { is: 'cleared'; clearance: Clearance }
  | { is: 'suspended'; clearance: Clearance | null; why: string; proofTestId: string }
  | { is: 'withdrawn'; why: string; at: string; last: Clearance | null }

/** A press's ledger, folded. */
export interface PressState {
  id: string
  description: PressDescription | null
  joints: PressJoint[]
  clearance: ClearanceState
  underTest: { proofTestId: string; number: string; stopped: boolean } | null
  lastWorkedOn: string | null
  history: PressEvent[]
  headSeq: number
  headHash: string
  unknownKinds: number
}

export type MayItBeUsed =
  | { answer: 'cleared'; clearance: Clearance }
  | { answer: 'under test'; why: string }
  | { answer: 'do not use'; why: string; missing: string[] }

export interface PressContext {
  overrides: Override[]
}
