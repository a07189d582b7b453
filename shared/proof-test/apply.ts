import type { LedgerEntry } from '../ledger/envelope'
import { withAttachmentsOf, withLost } from '../ledger/attachments'
import { FIRST_PREV_HASH } from '../ledger/chain'
import { neighboursOf } from '../press/joints'
import { currentAttempt } from './current-attempt'
import { countDevice } from './device-count'
import type { Opened, Position, ProofTestDraft, ProofTestKind, ProofTestPayload, Reading } from './entries'
import { replaceAt, withLeg, withClimb, withAttempt, rowOf, withJoint } from './fold-parts'
import type { AttemptState, ProofTestState, Row, StageRow } from './state'
import { upcast } from './upcast'

/** The state before the first entry. */
export function emptyProofTest(id: string): ProofTestState {
  return {
    id,
    opened: null,
    openedAt: null,
    joints: [],
    loadPathConfirmed: null,
    setUp: null,
    legs: [],
    position: null,
    loaded: null,
    paused: null,
    stopped: null,
    observations: [],
    corrections: [],
    reasons: [],
    irregular: [],
    attachments: [],
    conclusion: null,
    signed: null,
    countersigned: null,
    declined: [],
    lateFacts: 0,
    lastMark: null,
    devices: {},
    entryCount: 0,
    headSeq: 0,
    headHash: FIRST_PREV_HASH,
    unknownKinds: 0,
  }
}

function stageBegun(state: ProofTestState, at: Position, entry: LedgerEntry): ProofTestState {
  const begun = withClimb(state, at.leg, at.climb, (climb) => {
    const stage = climb.stages[at.stage]
    if (!stage || at.attempt !== stage.attempts.length) return climb
    const attempt: AttemptState = { begunAt: entry.observedAt, rows: [], topUps: 0, independent: null, decided: null }
    return { ...climb, stages: replaceAt(climb.stages, at.stage, { ...stage, attempts: [...stage.attempts, attempt] }) }
  })
  return {
    ...withClimb(begun, at.leg, at.climb, (climb) => ({ ...climb, released: null })),
    position: at,
    loaded: state.loaded ?? { since: entry.observedAt, by: 'stage' },
  }
}

function addStageRow(state: ProofTestState, at: Position, row: StageRow): ProofTestState {
  return withAttempt({ ...state, loaded: state.loaded ?? { since: row.enteredAt, by: 'stage' } }, at, (attempt) => ({
    ...attempt,
    rows: [...attempt.rows, row],
    topUps: attempt.topUps + (row.toppedUp ? 1 : 0),
  }))
}

function released(state: ProofTestState, entry: LedgerEntry): ProofTestState {
  const mark = { at: entry.observedAt, bootId: entry.bootId, monotonicMs: entry.monotonicMs }
  const unloaded: ProofTestState = { ...state, loaded: null, paused: null }
  const place = state.position
  if (!place) return unloaded
  if (state.loaded?.by === 'seating') {
    return withLeg(unloaded, place.leg, (leg) => ({ ...leg, seatingReleasedAt: entry.observedAt }))
  }
  return withClimb(unloaded, place.leg, place.climb, (climb) => ({ ...climb, released: { at: entry.observedAt, mark } }))
}

function correctRow<R extends Row>(row: R, entryId: string, reading: Reading): R {
  if (row.entryId !== entryId) return row
  const readings = row.readings.map((old) => (old.sourceId === reading.sourceId ? reading : old))
  return { ...row, readings }
}

/** Every row of a test, wherever it stands. */
export function allRows(state: ProofTestState): Row[] {
  return state.legs.flatMap((leg) => [
    ...(leg.seated ? [leg.seated] : []),
    ...leg.climbs.flatMap((climb) => [
      ...climb.datum,
      ...climb.stages.flatMap((stage) => stage.attempts.flatMap((attempt) => attempt.rows)),
      ...climb.set,
    ]),
  ])
}

/** Whether the press stands as it did when this row was read, so that it can be read again. */
function standsAsRead(state: ProofTestState, entryId: string): boolean {
  const isRow = (row: Row): boolean => row.entryId === entryId
  if (state.loaded) return currentAttempt(state)?.attempt.rows.some(isRow) ?? false
  const place = state.position
  const climb = place && state.legs[place.leg]?.climbs[place.climb]
  if (!climb) return false
  return climb.set.some(isRow) || (climb.datum.some(isRow) && climb.stages.every((stage) => stage.attempts.length === 0))
}

function corrected(state: ProofTestState, payload: ProofTestPayload<'corrected'>, entry: LedgerEntry): ProofTestState {
  const row = allRows(state).find((candidate) => candidate.entryId === payload.entryId)
  const from = row?.readings.find((reading) => reading.sourceId === payload.sourceId)
  if (!row || !from) return state
  const to: Reading = { sourceId: payload.sourceId, text: payload.text, unit: payload.unit }
  const fix = <R extends Row>(candidate: R): R => correctRow(candidate, payload.entryId, to)
  return {
    ...state,
    legs: state.legs.map((leg) => ({
      ...leg,
      seated: leg.seated && fix(leg.seated),
      climbs: leg.climbs.map((climb) => ({
        ...climb,
        datum: climb.datum.map(fix),
        set: climb.set.map(fix),
        stages: climb.stages.map((stage) => ({
          ...stage,
          attempts: stage.attempts.map((attempt) => ({ ...attempt, rows: attempt.rows.map(fix) })),
        })),
      })),
    })),
    corrections: [
      ...state.corrections,
      {
        entryId: entry.id,
        seq: entry.seq,
        correctsEntryId: row.entryId,
        correctsSeq: row.seq,
        sourceId: payload.sourceId,
        from,
        to,
        why: payload.why,
        by: entry.authorId,
        at: entry.observedAt,
        readAgainByBoth: payload.readAgainByBoth,
        underLoad: state.loaded !== null,
        atItsLoad: standsAsRead(state, row.entryId),
      },
    ],
  }
}

function percentReached(state: ProofTestState): number | null {
  const place = state.position
  if (!place || place.stage === null) return null
  return state.opened?.protocol.content.stages[place.stage]?.percent ?? null
}

function opened(state: ProofTestState, payload: Opened, entry: LedgerEntry): ProofTestState {
  return {
    ...state,
    opened: payload,
    openedAt: entry.observedAt,
    joints: payload.joints.map((joint) => ({
      joint,
      makeUp: joint.makeUp,
      workedAt: null,
      before: null,
      after: null,
      fellBackBecause: null,
    })),
    legs: payload.legs.map(() => ({ begunAt: null, seated: null, seatingReleasedAt: null, climbs: [] })),
  }
}

function jointWorked(state: ProofTestState, payload: ProofTestPayload<'joint-worked'>): ProofTestState {
  const worked = state.joints.find((joint) => joint.joint.id === payload.jointId)
  if (!worked) return state
  const touched = new Set(
    neighboursOf(
      state.joints.map((joint) => joint.joint),
      payload.jointId,
    ).map((joint) => joint.id),
  )
  return {
    ...state,
    joints: state.joints.map((joint) => {
      if (joint === worked)
        return { ...joint, makeUp: payload.makeUp, workedAt: payload.workedAt, before: null, after: null, fellBackBecause: null }
      if (!touched.has(joint.joint.id)) return joint
      return {
        ...joint,
        before: null,
        after: null,
        fellBackBecause: joint.before ? `joint ${worked.joint.number} was worked on` : joint.fellBackBecause,
      }
    }),
  }
}

/** Lead and witness answer for the record, so only their word counts; anybody else's stands in the ledger and changes nothing. */
function attachmentLost(state: ProofTestState, payload: ProofTestPayload<'attachment-lost'>, entry: LedgerEntry): ProofTestState {
  const people = state.opened?.people
  if (entry.authorId !== people?.lead.id && entry.authorId !== people?.witness.id) return state
  const lost = { why: payload.why, by: entry.authorId, at: entry.observedAt }
  return { ...state, attachments: withLost(state.attachments, payload.sha256, lost) }
}

type Handlers = { [K in ProofTestKind]: (state: ProofTestState, payload: ProofTestPayload<K>, entry: LedgerEntry) => ProofTestState }

const handlers: Handlers = {
  opened,
  'joint-worked': jointWorked,
  'joint-examined': (state, payload, entry) =>
    withJoint(state, payload.jointId, (joint) => {
      const { method, result, remark } = payload
      const examination = { entryId: entry.id, at: entry.observedAt, by: entry.authorId, method, result, remark }
      return payload.occasion === 'before load'
        ? { ...joint, before: examination, fellBackBecause: null }
        : { ...joint, after: examination }
    }),
  'load-path-confirmed': (state, payload, entry) => ({
    ...state,
    loadPathConfirmed: { by: entry.authorId, as: payload.by, at: entry.observedAt },
  }),
  'set-up-confirmed': (state, payload, entry) => ({
    ...state,
    setUp: {
      items: payload.items,
      reliefSet: payload.reliefSet,
      strokePercent: payload.strokePercent,
      note: payload.note,
      at: entry.observedAt,
    },
  }),
  'leg-begun': (state, payload, entry) => {
    if (!state.legs[payload.leg]) return state
    const begun = withClimb(state, payload.leg, 0, (climb) => climb)
    return {
      ...withLeg(begun, payload.leg, (leg) => ({ ...leg, begunAt: leg.begunAt ?? entry.observedAt })),
      position: { leg: payload.leg, climb: 0, stage: null, attempt: null },
    }
  },
  seated: (state, payload, entry) => ({
    ...withLeg(state, payload.leg, (leg) => ({ ...leg, seated: rowOf(entry, payload), seatingReleasedAt: null })),
    loaded: state.loaded ?? { since: entry.observedAt, by: 'seating' },
  }),
  'datum-read': (state, payload, entry) => {
    const next = withClimb(state, payload.leg, payload.climb, (climb) => ({ ...climb, datum: [...climb.datum, rowOf(entry, payload)] }))
    return { ...next, position: { leg: payload.leg, climb: payload.climb, stage: null, attempt: null } }
  },
  'stage-begun': (state, payload, entry) => stageBegun(state, payload.at, entry),
  'row-read': (state, payload, entry) =>
    addStageRow(state, payload.at, { ...rowOf(entry, payload), occasion: payload.occasion, toppedUp: false }),
  'topped-up': (state, payload, entry) =>
    addStageRow(state, payload.at, { ...rowOf(entry, payload), occasion: 'hold start', toppedUp: true }),
  'independent-read': (state, payload, entry) =>
    withAttempt(state, payload.at, (attempt) => ({
      ...attempt,
      independent: { readings: payload.readings, notTaken: payload.notTaken, by: entry.authorId, at: entry.observedAt },
    })),
  observed: (state, payload, entry) => ({
    ...state,
    observations: [
      ...state.observations,
      {
        seq: entry.seq,
        at: entry.observedAt,
        by: entry.authorId,
        what: payload.what,
        note: payload.note,
        position: payload.at,
      },
    ],
  }),
  paused: (state, payload, entry) => ({
    ...state,
    paused: {
      at: entry.observedAt,
      by: entry.authorId,
      why: payload.why,
      mark: { at: entry.observedAt, bootId: entry.bootId, monotonicMs: entry.monotonicMs },
    },
  }),
  resumed: (state) => ({ ...state, paused: null }),
  stopped: (state, payload, entry) =>
    state.stopped
      ? state
      : {
          ...state,
          stopped: {
            seq: entry.seq,
            at: entry.observedAt,
            by: entry.authorId,
            cause: payload.cause,
            why: payload.why,
            atPercent: percentReached(state),
          },
        },
  released: (state, _payload, entry) => released(state, entry),
  'set-read': (state, payload, entry) =>
    withClimb(state, payload.leg, payload.climb, (climb) => ({ ...climb, set: [...climb.set, rowOf(entry, payload)] })),
  decided: (state, payload, entry) => {
    const next = withAttempt(state, payload.at, (attempt) => ({
      ...attempt,
      decided: {
        entryId: entry.id,
        decision: payload.decision,
        criteria: payload.criteria,
        at: entry.observedAt,
        by: entry.authorId,
        reasons: entry.overrides,
      },
    }))
    if (payload.decision !== 'stop' || next.stopped) return next
    const criterion = payload.criteria.find((candidate) => candidate.stops && candidate.verdict === 'beyond')
    return {
      ...next,
      stopped: {
        seq: entry.seq,
        at: entry.observedAt,
        by: entry.authorId,
        cause: 'criterion',
        why: criterion ? `${criterion.label}: ${criterion.reading}, limit ${criterion.limit}` : 'A limit could not be shown to be kept.',
        atPercent: percentReached(state),
      },
    }
  },
  corrected,
  concluded: (state, payload, entry) => ({
    ...state,
    conclusion: { ...payload, seq: entry.seq, at: entry.observedAt, by: entry.authorId },
    signed: null,
    countersigned: null,
  }),
  signed: (state, payload, entry) => ({ ...state, signed: { ...payload, seq: entry.seq } }),
  countersigned: (state, payload, entry) => ({ ...state, countersigned: { ...payload, seq: entry.seq } }),
  declined: (state, payload, entry) => ({
    ...state,
    signed: null,
    declined: [
      ...state.declined,
      { seq: entry.seq, why: payload.why, by: payload.personId, printedName: payload.printedName, at: entry.observedAt },
    ],
  }),
  reviewed: (state) => state,
  'attachment-lost': attachmentLost,
}

function dispatch<K extends ProofTestKind>(
  state: ProofTestState,
  kind: K,
  payload: ProofTestPayload<K>,
  entry: LedgerEntry,
): ProofTestState {
  return handlers[kind](state, payload, entry)
}

/**
 * Folds one entry into the state. Total: it never throws and never judges; an entry that fits nowhere
 * leaves the state as it was but for the count and the head. A kind from the future is counted in
 * `unknownKinds`, so that the screen can say that an update is needed.
 */
export function applyProofTest(before: ProofTestState, stored: LedgerEntry): ProofTestState {
  const entry = upcast(stored)
  const state: ProofTestState = {
    ...before,
    devices: { ...before.devices, [entry.deviceId]: countDevice(before.devices[entry.deviceId], entry.deviceSeq) },
    entryCount: before.entryCount + 1,
    headSeq: entry.seq,
    headHash: entry.hash,
    lastMark: { at: entry.observedAt, bootId: entry.bootId, monotonicMs: entry.monotonicMs },
    irregular:
      entry.irregular.length > 0 ? [...before.irregular, { seq: entry.seq, kind: entry.kind, rules: entry.irregular }] : before.irregular,
    attachments: withAttachmentsOf(before.attachments, entry),
    lateFacts: before.countersigned ? before.lateFacts + 1 : before.lateFacts,
    reasons:
      entry.overrides.length > 0
        ? [
            ...before.reasons,
            ...entry.overrides.map((override) => ({
              seq: entry.seq,
              kind: entry.kind,
              rule: override.rule,
              reason: override.reason,
              by: entry.authorId,
              at: entry.observedAt,
            })),
          ]
        : before.reasons,
  }
  if (!Object.hasOwn(handlers, entry.kind)) return { ...state, unknownKinds: state.unknownKinds + 1 }
  const draft = { kind: entry.kind, payload: entry.payload } as ProofTestDraft
  return dispatch(state, draft.kind, draft.payload, entry)
}

/** Folds a list of entries, oldest first. */
export function foldProofTest(id: string, entries: readonly LedgerEntry[]): ProofTestState {
  return entries.reduce(applyProofTest, emptyProofTest(id))
}
