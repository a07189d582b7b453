import type { Position } from './entries'
import type { AttemptState, Place, ProofTestState, StageState } from './state'

/** The attempt that is under way, or was last. */
export function currentAttempt(state: ProofTestState): { place: Position; stage: StageState; attempt: AttemptState } | null {
  const place: Place | null = state.position
  if (!place || place.stage === null || place.attempt === null) return null
  const stage = state.legs[place.leg]?.climbs[place.climb]?.stages[place.stage]
  const attempt = stage?.attempts[place.attempt]
  return stage && attempt ? { place: place as Position, stage, attempt } : null
}
