import type { AttemptState, ProofTestState, StageState } from './state'

/** One stage of the climb that is under way, as a ladder shows it. */
export interface RungSummary {
  percent: number
  holdSeconds: number
  state: 'to-come' | 'now' | 'waiting' | 'went-on' | 'stopped'
  /** When it was sent on, or when its hold began; null while it is to come. */
  at: string | null
}

/** Where a test stands, in few words: what a list or a watching screen needs of its ledger. */
export interface ClimbSummary {
  datumAt: string | null
  rungs: RungSummary[]
  /** Percent of rated load that the last rows stand for; 0 while nothing is loaded. */
  levelPercent: number
  loaded: boolean
}

function lastAttempt(stage: StageState): AttemptState | undefined {
  return stage.attempts.at(-1)
}

function rungOf(stage: StageState, stoppedAt: number | null): RungSummary {
  const { percent, holdSeconds } = stage
  const attempt = lastAttempt(stage)
  const holdFrom = attempt?.rows[0]?.mark.at ?? null
  if (stoppedAt === percent) return { percent, holdSeconds, state: 'stopped', at: holdFrom }
  if (!attempt) return { percent, holdSeconds, state: 'to-come', at: null }
  switch (attempt.decided?.decision) {
    case 'go-on':
      return { percent, holdSeconds, state: 'went-on', at: attempt.decided.at }
    case 'wait':
      return { percent, holdSeconds, state: 'waiting', at: attempt.decided.at }
    case 'stop':
      return { percent, holdSeconds, state: 'stopped', at: attempt.decided.at }
    default:
      return { percent, holdSeconds, state: 'now', at: holdFrom }
  }
}

/** The climb that a test is in, or was in last. Total: a test that has not begun to climb has all its stages to come. */
export function summariseClimb(state: ProofTestState): ClimbSummary {
  const leg = state.legs[state.position?.leg ?? 0]
  const climb = leg?.climbs[state.position?.climb ?? 0] ?? leg?.climbs.at(-1)
  const planned = (state.opened?.protocol.content.stages ?? []).map((stage): RungSummary => ({
    percent: stage.percent,
    holdSeconds: stage.holdSeconds,
    state: 'to-come',
    at: null,
  }))
  const stoppedAt = state.stopped?.atPercent ?? null
  const rungs = climb ? climb.stages.map((stage) => rungOf(stage, stoppedAt)) : planned
  const read = climb?.stages.filter((stage) => (lastAttempt(stage)?.rows.length ?? 0) > 0) ?? []
  const loaded = state.loaded !== null
  return {
    datumAt: climb?.datum.at(-1)?.mark.at ?? null,
    rungs,
    levelPercent: loaded ? Math.max(0, ...read.map((stage) => stage.percent)) : 0,
    loaded,
  }
}
