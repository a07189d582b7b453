import type { LedgerEntry } from '../ledger/envelope'
import type { Opened, Position, Reading } from './entries'
import type { AttemptState, ClimbState, JointState, LegState, ProofTestState, Row, StageState } from './state'

/*
 * Parts of a state changed without touching the rest: what has not changed is shared with the state before.
 * A part that is not there leaves the state as it was.
 */

export function climbFor(opened: Opened, climb: number): ClimbState {
  const { stages, repeatHoldSeconds } = opened.protocol.content
  return {
    datum: [],
    released: null,
    set: [],
    // A stage above rating belongs to the second climb alone, from the datum after full load, with its whole hold.
    stages: stages
      .filter((stage) => climb > 0 || stage.percent <= 100)
      .map((stage): StageState => ({
        percent: stage.percent,
        holdSeconds: climb === 0 || stage.percent > 100 ? stage.holdSeconds : repeatHoldSeconds,
        attempts: [],
      })),
  }
}

export function replaceAt<T>(list: readonly T[], index: number, item: T): T[] {
  const copy = list.slice()
  copy[index] = item
  return copy
}

export function withLeg(state: ProofTestState, index: number, change: (leg: LegState) => LegState): ProofTestState {
  const leg = state.legs[index]
  return leg ? { ...state, legs: replaceAt(state.legs, index, change(leg)) } : state
}

export function withClimb(state: ProofTestState, leg: number, climb: number, change: (climb: ClimbState) => ClimbState): ProofTestState {
  return withLeg(state, leg, (before) => {
    const opened = state.opened
    const current = before.climbs[climb] ?? (opened && climb === before.climbs.length ? climbFor(opened, climb) : undefined)
    return current ? { ...before, climbs: replaceAt(before.climbs, climb, change(current)) } : before
  })
}

export function withAttempt(state: ProofTestState, at: Position, change: (attempt: AttemptState) => AttemptState): ProofTestState {
  return withClimb(state, at.leg, at.climb, (climb) => {
    const stage = climb.stages[at.stage]
    const attempt = stage?.attempts[at.attempt]
    if (!stage || !attempt) return climb
    const attempts = replaceAt(stage.attempts, at.attempt, change(attempt))
    return { ...climb, stages: replaceAt(climb.stages, at.stage, { ...stage, attempts }) }
  })
}

export function rowOf(entry: LedgerEntry, payload: { mark: Row['mark']; readings: Reading[] }): Row {
  return {
    entryId: entry.id,
    seq: entry.seq,
    mark: payload.mark,
    enteredAt: entry.observedAt,
    by: entry.authorId,
    typed: payload.readings,
    readings: payload.readings,
    irregular: entry.irregular,
  }
}

export function withJoint(state: ProofTestState, jointId: string, change: (joint: JointState) => JointState): ProofTestState {
  const index = state.joints.findIndex((joint) => joint.joint.id === jointId)
  const joint = state.joints[index]
  return joint ? { ...state, joints: replaceAt(state.joints, index, change(joint)) } : state
}
