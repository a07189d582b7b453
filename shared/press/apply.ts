import { FIRST_PREV_HASH } from '../ledger/chain'
import type { LedgerEntry } from '../ledger/envelope'
import type { Clearance, PressDraft, PressKind, PressPayload } from './entries'
import { nameJoints, neighboursOf } from './joints'
import type { Joint } from './model'
import type { PressEvent, PressJoint, PressState } from './state'
import { unitLabel } from '../units'

export function emptyPress(id: string): PressState {
  return {
    id,
    description: null,
    joints: [],
    clearance: { is: 'none' },
    underTest: null,
    lastWorkedOn: null,
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

type Handlers = { [K in PressKind]: (state: PressState, payload: PressPayload<K>, entry: LedgerEntry) => PressState }

const handlers: Handlers = {
  registered: (state, payload) => ({
    ...state,
    description: payload.description,
    joints: payload.joints.map(fresh),
    lastWorkedOn: payload.lastWorkedOn,
  }),
  described: (state, payload, entry) =>
    endClearance({ ...state, description: payload.description }, 'The description of the press was changed.', entry.observedAt),
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
    if (payload.result === 'accepted') return examined
    const number = state.joints.find((joint) => joint.id === payload.jointId)?.number ?? 0
    return endClearance(examined, `Joint ${number} was rejected.`, entry.observedAt)
  },
  changed: (state, payload, entry) => {
    const all = state.joints.filter((joint) => !joint.retired).map((joint) => joint.id)
    const touched = payload.change === 'painted' ? [] : payload.jointIds.length > 0 ? payload.jointIds : all
    const fallen = fallBack(state, touched, `${payload.change}: ${payload.why}`)
    return endClearance(fallen, `${payload.change[0]?.toUpperCase()}${payload.change.slice(1)}: ${payload.why}`, entry.observedAt)
  },
  'test-opened': (state, payload) => ({
    ...state,
    underTest: { ...payload, stopped: false },
    clearance:
      state.clearance.is === 'withdrawn'
        ? state.clearance
        : { is: 'suspended', clearance: lastClearance(state), why: `${payload.number} is under way.`, proofTestId: payload.proofTestId },
  }),
  'test-stopped': (state, payload, entry) => ({
    ...withdraw(
      fallBack(state, payload.jointIds, `${payload.number} was stopped`),
      `${payload.number} was stopped. ${payload.why}`,
      entry.observedAt,
    ),
    underTest: state.underTest && { ...state.underTest, stopped: true },
  }),
  'test-concluded': (state, payload, entry) => {
    const ended: PressState = { ...state, underTest: payload.conclusion === 'accepted' ? state.underTest : null }
    if (payload.conclusion === 'accepted') return ended
    return withdraw(
      fallBack(ended, payload.jointIds, `${payload.number} was ${payload.conclusion}`),
      `${payload.number} was ${payload.conclusion}.`,
      entry.observedAt,
    )
  },
  'test-late-fact': (state, payload) => ({
    ...state,
    clearance: {
      is: 'suspended',
      clearance: lastClearance(state),
      why: `${payload.number}: ${payload.why}`,
      proofTestId: payload.proofTestId,
    },
  }),
  'test-ended': (state, payload, entry) => withdraw({ ...state, underTest: null }, `${payload.number}: ${payload.why}`, entry.observedAt),
  'instrument-recalled': (state, payload) => {
    const { clearance } = state
    if (clearance.is !== 'cleared' || !clearance.clearance.instrumentIds.includes(payload.instrumentId)) return state
    const why = `${payload.code} was found out of tolerance on ${payload.calibratedOn}, and the clearance rests on it.`
    return { ...state, clearance: { is: 'suspended', clearance: clearance.clearance, why, proofTestId: clearance.clearance.proofTestId } }
  },
  'clearance-given': (state, payload) => ({ ...state, underTest: null, clearance: { is: 'cleared', clearance: payload } }),
  withdrawn: (state, payload, entry) => withdraw(state, payload.why, entry.observedAt),
}

const PLAIN = { mark: 'plain', proofTestId: null } as const
type Told = Pick<PressEvent, 'text' | 'mark' | 'proofTestId'>
type Tellers = { [K in PressKind]: (payload: PressPayload<K>, state: PressState) => Told }

const numbersOf = (state: PressState, ids: readonly string[]): string =>
  nameJoints(state.joints.filter((joint) => ids.includes(joint.id)).map((joint) => joint.number))

const tell: Tellers = {
  registered: (payload) => ({ ...PLAIN, text: `Entered with ${payload.joints.length} joints` }),
  described: () => ({ ...PLAIN, text: 'Description changed' }),
  'joint-added': (payload) => ({ ...PLAIN, text: `Joint ${payload.joint.number} added` }),
  'joint-described': (payload) => ({ ...PLAIN, text: `Joint ${payload.joint.number} described anew` }),
  'joint-retired': (payload, state) => ({ ...PLAIN, text: `Retired ${numbersOf(state, [payload.jointId])}` }),
  'joint-worked': (payload, state) => ({ ...PLAIN, text: `Now ${payload.makeUp}: ${numbersOf(state, [payload.jointId])}` }),
  'joint-examined': (payload, state) => ({
    text: `${payload.result === 'accepted' ? 'Accepted' : 'Rejected'} ${numbersOf(state, [payload.jointId])}, ${payload.method}`,
    mark: payload.result === 'accepted' ? 'plain' : 'stop',
    proofTestId: payload.test?.proofTestId ?? null,
  }),
  changed: (payload) => ({ ...PLAIN, text: `${payload.change[0]?.toUpperCase()}${payload.change.slice(1)}: ${payload.why}` }),
  'test-opened': (payload) => ({ text: `${payload.number} opened`, mark: 'under-way', proofTestId: payload.proofTestId }),
  'test-stopped': (payload) => ({ text: `${payload.number} stopped. ${payload.why}`, mark: 'stop', proofTestId: payload.proofTestId }),
  'test-concluded': (payload) => ({
    text: `${payload.number} concluded: ${payload.conclusion}`,
    mark: payload.conclusion === 'accepted' ? 'within' : 'stop',
    proofTestId: payload.proofTestId,
  }),
  'test-late-fact': (payload) => ({ text: `${payload.number}: ${payload.why}`, mark: 'stop', proofTestId: payload.proofTestId }),
  'test-ended': (payload) => ({ text: `${payload.number}: ${payload.why}`, mark: 'stop', proofTestId: payload.proofTestId }),
  'instrument-recalled': (payload) => ({ text: `${payload.code} was found out of tolerance`, mark: 'stop', proofTestId: null }),
  'clearance-given': (payload) => ({
    text: `Cleared up to ${payload.load.text} ${unitLabel(payload.load.unit, { plural: true })}`,
    mark: 'within',
    proofTestId: payload.proofTestId,
  }),
  withdrawn: (payload) => ({ text: `Withdrawn. ${payload.why}`, mark: 'stop', proofTestId: null }),
}

function run<K extends PressKind>(state: PressState, kind: K, payload: PressPayload<K>, entry: LedgerEntry): PressState {
  const next = handlers[kind](state, payload, entry)
  const { seq, observedAt, authorId, attachments } = entry
  const event: PressEvent = { seq, at: observedAt, authorId, kind, attachments, ...tell[kind](payload, next) }
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
