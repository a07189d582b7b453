import { FIRST_PREV_HASH } from '../ledger/chain'
import type { LedgerEntry } from '../ledger/envelope'
import type { Clearance, PressDraft, PressKind, PressPayload } from './entries'
import { neighboursOf } from './joints'
import type { Joint } from './model'
import { changeRule, describesAnotherPress, touchedBy } from './changes'
import type { PressEvent, PressJoint, PressState, Repair } from './state'
import { tell } from './tell'

export function emptyPress(id: string): PressState {
  return {
    id,
    description: null,
    joints: [],
    clearance: { is: 'none' },
    underTest: null,
    lastWorkedOn: null,
    repairs: [],
    tagHangs: false,
    toRepeat: null,
    history: [],
    headSeq: 0,
    headHash: FIRST_PREV_HASH,
    unknownKinds: 0,
  }
}

function fresh(joint: Joint): PressJoint {
  return { ...joint, examination: null, fellBackBecause: null, workedAt: null, retired: false }
}

function changeJoints(state: PressState, ids: readonly string[], change: (joint: PressJoint) => PressJoint): PressState {
  return { ...state, joints: state.joints.map((joint) => (ids.includes(joint.id) ? change(joint) : joint)) }
}

function fallBack(state: PressState, ids: readonly string[], because: string): PressState {
  return changeJoints(state, ids, (joint) => ({
    ...joint,
    examination: null,
    fellBackBecause: joint.examination ? because : joint.fellBackBecause,
  }))
}

function lastClearance(state: PressState): Clearance | null {
  const { clearance } = state
  if (clearance.is === 'cleared') return clearance.clearance
  if (clearance.is === 'suspended') return clearance.clearance
  return clearance.is === 'withdrawn' ? clearance.last : null
}

function withdraw(state: PressState, why: string, at: string): PressState {
  return { ...state, clearance: { is: 'withdrawn', why, at, last: lastClearance(state) } }
}

/** A change ends a clearance that is in force, or suspended under a test; where there never was one, nothing ends. */
function endClearance(state: PressState, why: string, at: string): PressState {
  return state.clearance.is === 'none' || state.clearance.is === 'withdrawn' ? state : withdraw(state, why, at)
}

/** A change that the clearance can outlive: it holds again when every joint is accepted. */
function holdClearance(state: PressState, why: string): PressState {
  const { clearance } = state
  if (clearance.is !== 'cleared') return state
  return { ...state, clearance: { is: 'suspended', clearance: clearance.clearance, why, until: 'the joints are accepted' } }
}

/** Finished, and accepted when it was last examined; a retired joint asks for nothing. */
export function isAccepted(joint: PressJoint): boolean {
  return joint.retired || (joint.makeUp === 'finished' && joint.examination?.result === 'accepted')
}

/** Gives back a clearance that waited for the joints, once the last of them is accepted. */
function resumeClearance(state: PressState): PressState {
  const { clearance } = state
  if (clearance.is !== 'suspended' || clearance.until !== 'the joints are accepted' || !clearance.clearance) return state
  return state.joints.every(isAccepted) ? { ...state, clearance: { is: 'cleared', clearance: clearance.clearance } } : state
}

type Wanted = Pick<Repair, 'from' | 'why' | 'jointIds' | 'test'> & { memberIds?: string[] }

/** Opens a repair named for the entry that calls for it. */
function wantRepair(state: PressState, { id, observedAt, authorId }: LedgerEntry, wanted: Wanted): PressState {
  const repair: Repair = {
    id,
    openedAt: observedAt,
    openedBy: authorId,
    ...wanted,
    memberIds: wanted.memberIds ?? [],
    notes: [],
    closed: null,
  }
  return { ...state, repairs: [...state.repairs, repair] }
}

function changeRepair(state: PressState, id: string, change: (repair: Repair) => Repair): PressState {
  return { ...state, repairs: state.repairs.map((repair) => (repair.id === id ? change(repair) : repair)) }
}

/** A joint that is rejected wants a repair, unless one that is open names it already. */
function rejectedJoint(state: PressState, payload: PressPayload<'joint-examined'>, entry: LedgerEntry): PressState {
  const number = state.joints.find((joint) => joint.id === payload.jointId)?.number ?? 0
  const ended = endClearance(state, `Joint ${number} was rejected.`, entry.observedAt)
  if (state.repairs.some((repair) => !repair.closed && repair.jointIds.includes(payload.jointId))) return ended
  const why = `Joint ${number} was rejected${payload.remark ? `: ${payload.remark}` : '.'}`
  return wantRepair(ended, entry, { from: 'joint', why, jointIds: [payload.jointId], test: payload.test })
}

/** The repair that a rejection called for is over when the joint is accepted. */
function acceptedJoint(state: PressState, { jointId }: PressPayload<'joint-examined'>, entry: LedgerEntry): PressState {
  const closed = { at: entry.observedAt, by: entry.authorId, done: 'Examined again and accepted.', doneBy: '' }
  const over = (repair: Repair) => repair.from === 'joint' && !repair.closed && repair.jointIds.includes(jointId)
  const repairs = state.repairs.map((repair) => (over(repair) ? { ...repair, closed } : repair))
  return resumeClearance({ ...state, repairs })
}

/** Whether a clearance, its tag and its repair are to follow from a test that did not end well. */
function testWentWrong(
  state: PressState,
  payload: PressPayload<'test-stopped'> | PressPayload<'test-concluded'>,
  why: string,
  wantsRepair: boolean,
  entry: LedgerEntry,
): PressState {
  const { proofTestId, number, jointIds, memberIds } = payload
  const test = { proofTestId, number }
  const next = { ...withdraw(fallBack(state, jointIds, why), why, entry.observedAt), toRepeat: test }
  const hasOne = next.repairs.some((repair) => repair.from === 'test' && repair.test?.proofTestId === proofTestId)
  return hasOne || !wantsRepair ? next : wantRepair(next, entry, { from: 'test', why, jointIds, memberIds, test })
}

function jointWorked(state: PressState, payload: PressPayload<'joint-worked'>, at: string): PressState {
  const worked = state.joints.find((joint) => joint.id === payload.jointId)
  if (!worked) return state
  const because = `joint ${worked.number} was worked on`
  const touched = neighboursOf(state.joints, payload.jointId).map((joint) => joint.id)
  const next = changeJoints(fallBack(state, touched, because), [payload.jointId], (joint) => ({
    ...joint,
    makeUp: payload.makeUp,
    workedAt: payload.workedAt,
    examination: null,
    fellBackBecause: null,
  }))
  const moved = { ...next, lastWorkedOn: payload.workedAt.slice(0, 10) }
  return payload.test ? moved : endClearance(moved, `Joint ${worked.number} was worked on.`, at)
}

/** Whether a clearance that is in force, or could come into force again by itself, rests on an instrument. */
export function restsOn({ clearance }: Pick<PressState, 'clearance'>, instrumentId: string): boolean {
  const waits = clearance.is === 'suspended' && clearance.until === 'the joints are accepted'
  return (clearance.is === 'cleared' || waits) && (clearance.clearance?.instrumentIds.includes(instrumentId) ?? false)
}

type Handlers = { [K in PressKind]: (state: PressState, payload: PressPayload<K>, entry: LedgerEntry) => PressState }

const handlers: Handlers = {
  registered: (state, payload) => ({
    ...state,
    description: payload.description,
    joints: payload.joints.map(fresh),
    lastWorkedOn: payload.lastWorkedOn,
  }),
  described: (state, payload, entry) => {
    const next = { ...state, description: payload.description }
    return describesAnotherPress(state.description, payload.description)
      ? endClearance(next, 'The description of the press was changed.', entry.observedAt)
      : next
  },
  'joint-added': (state, payload, entry) =>
    endClearance(
      { ...state, joints: [...state.joints, fresh(payload.joint)] },
      `Joint ${payload.joint.number} was added.`,
      entry.observedAt,
    ),
  'joint-described': (state, payload, entry) =>
    endClearance(
      changeJoints(state, [payload.joint.id], (joint) => ({
        ...joint,
        ...payload.joint,
        examination: null,
        fellBackBecause: joint.examination ? 'its description was changed' : joint.fellBackBecause,
      })),
      `Joint ${payload.joint.number} was described anew.`,
      entry.observedAt,
    ),
  'joint-retired': (state, payload, entry) =>
    endClearance(
      changeJoints(state, [payload.jointId], (joint) => ({ ...joint, retired: true })),
      'A joint was retired.',
      entry.observedAt,
    ),
  'joint-split': (state, payload, entry) => {
    const split = state.joints.find((joint) => joint.id === payload.jointId)
    const retired = changeJoints(state, [payload.jointId], (joint) => ({ ...joint, retired: true }))
    const joints = [...retired.joints, ...payload.into.map(fresh)]
    return endClearance({ ...retired, joints }, `Joint ${split?.number ?? 0} was split.`, entry.observedAt)
  },
  'joint-placed': (state, payload) => changeJoints(state, [payload.jointId], (joint) => ({ ...joint, place: payload.place })),
  'strength-described': (state, payload) => {
    const { description } = state
    const members = description?.members.map((member) => {
      const known = payload.members.find((one) => one.memberId === member.id)
      return known ? { ...member, strength: known.strength } : member
    })
    const joints = state.joints.map((joint) => {
      const known = payload.joints.find((one) => one.jointId === joint.id)
      return known ? { ...joint, strength: known.strength } : joint
    })
    return { ...state, description: description && { ...description, members: members ?? [] }, joints }
  },
  'joint-worked': (state, payload, entry) => jointWorked(state, payload, entry.observedAt),
  'joint-examined': (state, payload, entry) => {
    const examined = changeJoints(state, [payload.jointId], (joint) => ({
      ...joint,
      fellBackBecause: null,
      examination: {
        result: payload.result,
        method: payload.method,
        by: entry.authorId,
        at: entry.observedAt,
        remark: payload.remark,
        proofTestNumber: payload.test?.number ?? null,
      },
    }))
    return payload.result === 'accepted' ? acceptedJoint(examined, payload, entry) : rejectedJoint(examined, payload, entry)
  },
  changed: (state, payload, entry) => {
    const rule = changeRule(payload.change)
    const said = `${payload.change[0]?.toUpperCase()}${payload.change.slice(1)}: ${payload.why}`
    const touched = touchedBy(state, payload).map((joint) => joint.id)
    const fallen = fallBack(state, touched, `${payload.change}: ${payload.why}`)
    if (rule.clearance === 'stands') return fallen
    return rule.clearance === 'ends' ? endClearance(fallen, said, entry.observedAt) : holdClearance(fallen, said)
  },
  'repair-opened': (state, payload, entry) => {
    const fallen = fallBack(state, payload.jointIds, `a repair was opened: ${payload.why}`)
    return wantRepair(endClearance(fallen, payload.why, entry.observedAt), entry, { ...payload, from: 'person', test: null })
  },
  'repair-noted': (state, payload, entry) =>
    changeRepair(state, payload.repairId, (repair) => ({
      ...repair,
      notes: [...repair.notes, { at: entry.observedAt, by: entry.authorId, note: payload.note, doneBy: payload.doneBy, seq: entry.seq }],
    })),
  'repair-closed': (state, payload, entry) => {
    const repair = state.repairs.find((one) => one.id === payload.repairId)
    if (!repair) return state
    const closed = { at: entry.observedAt, by: entry.authorId, done: payload.done, doneBy: payload.doneBy }
    const next = changeRepair(state, repair.id, (one) => ({ ...one, closed }))
    // What was examined between the repair's work and its close counts no more: the whole is looked at when it is done.
    return fallBack(next, repair.jointIds, `it was repaired: ${payload.done}`)
  },
  'test-opened': (state, payload) => ({
    ...state,
    underTest: { proofTestId: payload.proofTestId, number: payload.number, stopped: false },
    clearance:
      state.clearance.is === 'withdrawn'
        ? state.clearance
        : { is: 'suspended', clearance: lastClearance(state), why: `${payload.number} is under way.`, until: 'the test is over' },
  }),
  'test-stopped': (state, payload, entry) => ({
    ...testWentWrong(state, payload, `${payload.number} was stopped. ${payload.why}`, true, entry),
    underTest: state.underTest && { ...state.underTest, stopped: true },
  }),
  'test-concluded': (state, payload, entry) => {
    const { conclusion, number } = payload
    const ended: PressState = { ...state, underTest: conclusion === 'accepted' ? state.underTest : null }
    if (conclusion === 'accepted') return ended
    return testWentWrong(ended, payload, `${number} was ${conclusion}.`, conclusion === 'rejected', entry)
  },
  'test-late-fact': (state, payload) => ({
    ...state,
    clearance: {
      is: 'suspended',
      clearance: lastClearance(state),
      why: `${payload.number}: ${payload.why}`,
      until: 'somebody looked into it',
    },
  }),
  'test-ended': (state, payload, entry) => withdraw({ ...state, underTest: null }, `${payload.number}: ${payload.why}`, entry.observedAt),
  'instrument-recalled': (state, payload) => {
    const clearance = lastClearance(state)
    if (!restsOn(state, payload.instrumentId) || !clearance) return state
    const why = `${payload.code} was found out of tolerance on ${payload.calibratedOn}, and the clearance rests on it.`
    return { ...state, clearance: { is: 'suspended', clearance, why, until: 'somebody looked into it' } }
  },
  'clearance-given': (state, payload) => ({
    ...state,
    underTest: null,
    clearance: { is: 'cleared', clearance: payload },
    tagHangs: true,
    toRepeat: null,
  }),
  'tag-taken-off': (state) => ({ ...state, tagHangs: false }),
  withdrawn: (state, payload, entry) => withdraw(state, payload.why, entry.observedAt),
}

/** What became of a clearance between two states of a press; one that is given or opened under a test tells it by itself. */
function clearanceTurn(before: PressState, after: PressState, kind: PressKind): PressEvent['clearance'] {
  const from = before.clearance.is
  const to = after.clearance.is
  if (kind === 'clearance-given' || kind === 'withdrawn' || from === to) return null
  if (to === 'withdrawn' && (from === 'cleared' || lastClearance(before) !== null)) return 'ended'
  if (to === 'suspended' && from === 'cleared') return 'held'
  return to === 'cleared' ? 'holds again' : null
}

function run<K extends PressKind>(state: PressState, kind: K, payload: PressPayload<K>, entry: LedgerEntry): PressState {
  const next = handlers[kind](state, payload, entry)
  const { seq, observedAt, authorId, attachments } = entry
  const clearance = clearanceTurn(state, next, kind)
  const event: PressEvent = { seq, at: observedAt, authorId, kind, attachments, clearance, ...tell[kind](payload, next) }
  return { ...next, history: [...state.history, event] }
}

/** Folds one entry of a press's ledger. Total: never throws, never judges. */
export function applyPress(before: PressState, entry: LedgerEntry): PressState {
  const state: PressState = { ...before, headSeq: entry.seq, headHash: entry.hash }
  if (!Object.hasOwn(handlers, entry.kind)) return { ...state, unknownKinds: state.unknownKinds + 1 }
  const draft = { kind: entry.kind, payload: entry.payload } as PressDraft
  return run(state, draft.kind, draft.payload, entry)
}

export function foldPress(id: string, entries: readonly LedgerEntry[]): PressState {
  return entries.reduce(applyPress, emptyPress(id))
}
