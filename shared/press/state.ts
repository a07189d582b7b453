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
  /** What became of a clearance with it. */
  clearance: 'ended' | 'held' | 'holds again' | null
  /** Photos and documents that its entry names. */
  attachments: readonly Attachment[]
}

/** What ends a suspension: the test that is under way, every joint accepted again, or a person who looks into it. */
export type SuspendedUntil = 'the test is over' | 'the joints are accepted' | 'somebody looked into it'

export type ClearanceState =
  | { is: 'none' }
  | { is: 'cleared'; clearance: Clearance }
  | { is: 'suspended'; clearance: Clearance | null; why: string; until: SuspendedUntil }
  | { is: 'withdrawn'; why: string; at: string; last: Clearance | null }

export interface RepairNote {
  at: string
  by: string
  note: string
  doneBy: string
  seq: number
}

/** What has to be put right before the press is loaded again. Its id is that of the entry that opened it. */
export interface Repair {
  id: string
  /** A test that went wrong, a joint that was rejected, or somebody who saw something. */
  from: 'test' | 'joint' | 'person'
  openedAt: string
  openedBy: string
  why: string
  jointIds: string[]
  memberIds: string[]
  /** The test that was stopped or rejected; null when no test opened it. */
  test: { proofTestId: string; number: string } | null
  notes: RepairNote[]
  closed: { at: string; by: string; done: string; doneBy: string } | null
}

/** A press's ledger, folded. */
export interface PressState {
  id: string
  description: PressDescription | null
  joints: PressJoint[]
  clearance: ClearanceState
  underTest: { proofTestId: string; number: string; stopped: boolean } | null
  lastWorkedOn: string | null
  repairs: Repair[]
  /** Whether a paper tag of a clearance hangs on the press, as far as anybody has said. */
  tagHangs: boolean
  /** The test that went wrong last: the next one names it. */
  toRepeat: { proofTestId: string; number: string } | null
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
