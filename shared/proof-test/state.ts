import type { DeviceCount } from './device-count'
import type { Conclusion, CriterionSnapshot, Mark, Opened, Position, ProofTestPayload, Reading, SetUpItem, Signature } from './entries'
import type { NamedAttachment } from '../ledger/attachments'
import type { ExaminationMethod, Joint, MakeUp } from '../press/model'

export interface JointExamination {
  entryId: string
  at: string
  by: string
  method: ExaminationMethod
  result: 'accepted' | 'rejected'
  remark: string
}

export interface JointState {
  joint: Joint
  makeUp: MakeUp
  workedAt: string | null
  before: JointExamination | null
  after: JointExamination | null
  fellBackBecause: string | null
}

/** One correction; the reading it names stays as it was typed. */
export interface Correction {
  entryId: string
  correctsEntryId: string
  correctsSeq: number
  seq: number
  sourceId: string
  from: Reading
  to: Reading
  why: string
  by: string
  at: string
  readAgainByBoth: boolean
  underLoad: boolean
  /** Made while the press stood as it did when the row was read: at that load, or released for a datum or a set. */
  atItsLoad: boolean
}

/** One row of readings as it stands: `typed` as first entered, `readings` with corrections in. */
export interface Row {
  entryId: string
  seq: number
  mark: Mark
  enteredAt: string
  by: string
  typed: Reading[]
  readings: Reading[]
  irregular: string[]
}

export type RowOccasion = ProofTestPayload<'row-read'>['occasion']
export interface StageRow extends Row {
  occasion: RowOccasion
  toppedUp: boolean
}

export interface Decided {
  entryId: string
  decision: 'go-on' | 'wait' | 'stop'
  criteria: CriterionSnapshot[]
  at: string
  by: string
  reasons: { rule: string; reason: string }[]
}

export interface AttemptState {
  begunAt: string
  rows: StageRow[]
  topUps: number
  independent: { readings: Reading[]; notTaken: string | null; by: string; at: string } | null
  decided: Decided | null
}

export interface StageState {
  percent: number
  holdSeconds: number
  attempts: AttemptState[]
}

export interface ClimbState {
  datum: Row[]
  stages: StageState[]
  released: { at: string; mark: Mark } | null
  set: Row[]
}

export interface LegState {
  begunAt: string | null
  seated: Row | null
  seatingReleasedAt: string | null
  climbs: ClimbState[]
}

export interface Observation {
  seq: number
  at: string
  by: string
  what: string
  note: string
  position: Position | null
}
export interface Stopped {
  seq: number
  at: string
  by: string
  cause: string
  why: string
  atPercent: number | null
}
export interface Reason {
  seq: number
  kind: string
  rule: string
  reason: string
  by: string
  at: string
}
export interface Irregular {
  seq: number
  kind: string
  rules: string[]
}

export type Loaded = { since: string; by: 'seating' | 'stage' } | null

/** Where a test is: `stage` and `attempt` are null until the climb's first stage begins. */
export interface Place {
  leg: number
  climb: number
  stage: number | null
  attempt: number | null
}

/** A proof test's ledger, folded. Everything a screen or a record shows is a function of this. */
export interface ProofTestState {
  id: string
  opened: Opened | null
  openedAt: string | null
  joints: JointState[]
  loadPathConfirmed: { by: string; as: string; at: string } | null
  setUp: {
    items: SetUpItem[]
    reliefSet: Reading | { text: string; unit: string } | null
    strokePercent: string
    note: string
    at: string
  } | null
  legs: LegState[]
  /** Where the test is; null before the first leg begins. */
  position: Place | null
  loaded: Loaded
  paused: { at: string; by: string; mark: Mark; why: string } | null
  stopped: Stopped | null
  observations: Observation[]
  corrections: Correction[]
  reasons: Reason[]
  irregular: Irregular[]
  /** Photos and documents that entries name, oldest first. */
  attachments: readonly NamedAttachment[]
  conclusion: {
    seq: number
    conclusion: Conclusion
    why: string
    at: string
    by: string
    evaluation: Record<string, unknown>
    coreVersion: string
  } | null
  signed: (Signature & { seq: number }) | null
  countersigned: (Signature & { seq: number }) | null
  declined: { seq: number; why: string; by: string; at: string; printedName: string }[]
  /** Facts that arrived after the countersignature. */
  lateFacts: number
  /** Moments of the last entry of every device, for clocks and holds. */
  lastMark: Mark | null
  /** Every device's own count, by device. */
  devices: Readonly<Record<string, DeviceCount>>
  entryCount: number
  headSeq: number
  headHash: string
  unknownKinds: number
}
