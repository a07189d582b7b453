import type { PublicTag } from '../api/tags'
import { mayItBeUsed } from './may-it-be-used'
import type { PressState } from './state'

/** The day a clearance was given, if nothing has been reported since that touches it. */
function noChangeSince(state: PressState): string | null {
  const { clearance } = state
  if (clearance.is !== 'cleared') return null
  const given = state.history.findLast((event) => event.kind === 'clearance-given')
  const reported = state.history.some((event) => event.seq > (given?.seq ?? 0) && event.kind === 'changed')
  return reported ? null : clearance.clearance.clearedOn
}

/**
 * What whoever scans a press's tag is told, at `asOf` (ISO moment) and on `today` (ISO date): the answer, and of the
 * clearance no more than what stands on the paper.
 */
export function publicTagOf(state: PressState, shopName: string, today: string, asOf: string): PublicTag | null {
  const { description } = state
  if (!description) return null
  const answer = mayItBeUsed(state, today)
  const common = {
    shopName,
    press: { name: description.name, whatFor: description.whatFor },
    asOf,
    noChangeSince: noChangeSince(state),
  }
  if (answer.answer === 'cleared') {
    const { instrumentIds: _instrumentIds, proofTestId: _proofTestId, ...clearance } = answer.clearance
    return { ...common, answer: { is: 'cleared', clearance } }
  }
  if (answer.answer === 'under test') return { ...common, answer: { is: 'under test', why: answer.why } }
  const since = state.clearance.is === 'withdrawn' ? state.clearance.at : null
  return { ...common, answer: { is: 'do not use', why: answer.why, since } }
}
