import { toSI } from '../units'
import { elapsedBetween } from './clock'
import type { Opened, Position } from './entries'
import { evaluateClimb, type StageEvaluation } from './evaluate-climb'
import { evaluateLeg, repeatClimbWanted } from './evaluate'
import { instrumentOf } from './force'
import { currentAttempt } from './current-attempt'
import { witnessReads } from './protocol'
import type { ClimbState, JointState, ProofTestState, Row } from './state'

/** What a test asks for next. Every screen of a run is one of these; the order is DOMAIN 4's. */
export type Step =
  | { name: 'walk-down'; joint: JointState | null; remaining: number }
  | { name: 'set-up' }
  | { name: 'begin-leg'; leg: number }
  | { name: 'seating'; leg: number }
  | { name: 'seating-release'; leg: number }
  | { name: 'datum'; leg: number; climb: number }
  | { name: 'datum-watch'; leg: number; climb: number; first: Row; drifted: boolean }
  | { name: 'begin-stage'; at: Position; percent: number }
  | { name: 'read-row'; at: Position; percent: number }
  | { name: 'hold'; at: Position; percent: number; stage: StageEvaluation }
  | { name: 'wait'; at: Position; percent: number; stage: StageEvaluation }
  | { name: 'stop-now'; at: Position; percent: number; stage: StageEvaluation }
  | { name: 'independent'; at: Position; percent: number; stage: StageEvaluation }
  | { name: 'decide'; at: Position; percent: number; stage: StageEvaluation }
  | { name: 'release'; leg: number; climb: number }
  | { name: 'recovery'; leg: number; climb: number; repeat: boolean }
  | { name: 'stopped-release' }
  | { name: 'after-walk-down'; joint: JointState | null; remaining: number }
  | { name: 'conclude' }
  | { name: 'sign' }
  | { name: 'countersign' }
  | { name: 'sealed' }

/** A joint that may carry load: finished, and accepted in this test's walk-down. */
export function jointReady(joint: JointState): boolean {
  return joint.makeUp === 'finished' && joint.before?.result === 'accepted'
}

function incrementOf(opened: Opened, sourceId: string): number {
  const point = opened.points.find((candidate) => candidate.id === sourceId)
  const details = instrumentOf(opened, point ? point.instrumentId : sourceId)?.details
  return details ? toSI(details.increment) : 0
}

/** How a climb's datum stands: not read, watched for drift, drifted, or steady for long enough. */
export function datumStanding(opened: Opened, climb: ClimbState): 'none' | 'watching' | 'drifted' | 'steady' {
  const last = climb.datum.at(-1)
  if (!last) return 'none'
  const before = climb.datum.at(-2)
  if (!before) return 'watching'
  const steady = last.readings.every((reading) => {
    const first = before.readings.find((candidate) => candidate.sourceId === reading.sourceId)
    return first !== undefined && Math.abs(toSI(reading) - toSI(first)) <= incrementOf(opened, reading.sourceId) * 1.0001
  })
  if (!steady) return 'drifted'
  return elapsedBetween(before.mark, last.mark).seconds >= opened.protocol.content.datumWatchSeconds - 0.5 ? 'steady' : 'watching'
}

/** Whether nothing but load stands between this test and its first stage: walk-down, load path and set-up. */
export function readyForLoad(state: ProofTestState): boolean {
  return state.joints.length > 0 && state.joints.every(jointReady) && state.loadPathConfirmed !== null && state.setUp !== null
}

function beforeLoad(state: ProofTestState): Step | null {
  const waiting = state.joints.filter((joint) => !jointReady(joint))
  if (waiting.length > 0 || state.joints.length === 0 || !state.loadPathConfirmed) {
    return { name: 'walk-down', joint: waiting[0] ?? null, remaining: waiting.length }
  }
  return state.setUp ? null : { name: 'set-up' }
}

function afterClimb(state: ProofTestState, opened: Opened, leg: number, climb: number): Step {
  const climbs = evaluateLeg(state, leg)
  if (climb === 0 && repeatClimbWanted(opened, climbs)) return { name: 'datum', leg, climb: 1 }
  if (leg + 1 < state.legs.length) return { name: 'begin-leg', leg: leg + 1 }
  const waiting = state.joints.filter((joint) => !joint.after)
  if (waiting.length > 0) return { name: 'after-walk-down', joint: waiting[0] ?? null, remaining: waiting.length }
  return { name: 'conclude' }
}

/** A climb went up to its last stage and was sent on from there; released before that, it starts again from the first stage. */
export function climbComplete(climb: ClimbState): boolean {
  return climb.stages.at(-1)?.attempts.at(-1)?.decided?.decision === 'go-on'
}

function nextAttempt(state: ProofTestState, at: Omit<Position, 'attempt'>): Position {
  return { ...at, attempt: state.legs[at.leg]?.climbs[at.climb]?.stages[at.stage]?.attempts.length ?? 0 }
}

function inStage(state: ProofTestState): Step | null {
  const current = currentAttempt(state)
  if (!current) return null
  const { place, stage, attempt } = current
  const at = { at: place, percent: stage.percent }
  if (attempt.rows.length === 0) return { name: 'read-row', ...at }
  const evaluated = evaluateClimb(state, place.leg, place.climb)?.stages.find((candidate) => candidate.at.stage === place.stage)
  if (!evaluated) return { name: 'read-row', ...at }
  if (attempt.decided?.decision === 'go-on') {
    const next = place.stage + 1
    const nextStage = state.legs[place.leg]?.climbs[place.climb]?.stages[next]
    if (!nextStage) return { name: 'release', leg: place.leg, climb: place.climb }
    return { name: 'begin-stage', at: nextAttempt(state, { ...place, stage: next }), percent: nextStage.percent }
  }
  switch (evaluated.suggestion) {
    case 'stop':
      return { name: 'stop-now', ...at, stage: evaluated }
    case 'wait':
      return { name: 'wait', ...at, stage: evaluated }
    case 'go-on':
      return witnessReads(stage.percent, place.climb) && !attempt.independent
        ? { name: 'independent', ...at, stage: evaluated }
        : { name: 'decide', ...at, stage: evaluated }
    default:
      return { name: 'hold', ...at, stage: evaluated }
  }
}

/** The one thing to do next. Total: every state has one. */
export function nextStep(state: ProofTestState): Step {
  const { opened, position } = state
  if (state.countersigned) return { name: 'sealed' }
  if (state.signed) return { name: 'countersign' }
  if (state.conclusion) return { name: (state.declined.at(-1)?.seq ?? 0) > state.conclusion.seq ? 'conclude' : 'sign' }
  if (state.stopped) return state.loaded ? { name: 'stopped-release' } : { name: 'conclude' }
  if (!opened) return { name: 'walk-down', joint: null, remaining: 0 }
  if (!position) return beforeLoad(state) ?? { name: 'begin-leg', leg: 0 }
  const leg = state.legs[position.leg]
  const climb = leg?.climbs[position.climb]
  if (!leg || !climb) return { name: 'begin-leg', leg: position.leg }
  const at = { leg: position.leg, climb: position.climb }
  if (climb.set.length > 0) return afterClimb(state, opened, position.leg, position.climb)
  if (climb.released && !state.loaded) {
    if (climbComplete(climb)) return { name: 'recovery', ...at, repeat: position.climb > 0 }
    return { name: 'begin-stage', at: nextAttempt(state, { ...at, stage: 0 }), percent: opened.protocol.content.stages[0]?.percent ?? 0 }
  }
  if (position.stage !== null) return inStage(state) ?? { name: 'release', ...at }
  if (position.climb === 0) {
    if (!leg.seated && state.joints.some((joint) => !jointReady(joint))) return beforeLoad(state) ?? { name: 'seating', leg: position.leg }
    if (!leg.seated) return { name: 'seating', leg: position.leg }
    if (!leg.seatingReleasedAt) return { name: 'seating-release', leg: position.leg }
  }
  const standing = datumStanding(opened, climb)
  const first = climb.datum.at(-1)
  if (standing === 'none' || !first) return { name: 'datum', ...at }
  if (standing !== 'steady') return { name: 'datum-watch', ...at, first, drifted: standing === 'drifted' }
  const stage = opened.protocol.content.stages[0]
  return { name: 'begin-stage', at: nextAttempt(state, { ...at, stage: 0 }), percent: stage?.percent ?? 0 }
}
