import type { PressState } from '#shared/press/state'
import { clearanceEnded, clearanceGiven } from './press-letters'
import { queueMail, type Queueing } from './queue'
import { peopleWith } from './recipients'

/** What a change of the clearance has somebody told. A test that opens suspends it in the ordinary way: nobody need be told. */
function letterOf(before: PressState, after: PressState) {
  const pressName = after.description?.name ?? ''
  const [was, is] = [before.clearance, after.clearance]
  if (is.is === 'cleared' && was.is !== 'cleared') {
    return { kind: 'clearance-given' as const, letter: clearanceGiven(after.id, pressName, is.clearance) }
  }
  const ended =
    (is.is === 'withdrawn' && was.is !== 'withdrawn') || (is.is === 'suspended' && was.is === 'cleared' && is.until !== 'the test is over')
  const letter = ended ? clearanceEnded(after.id, pressName, after) : null
  return letter && { kind: 'clearance-ended' as const, letter }
}

/** Tells owners and leads that a press may be used, or no longer, in the transaction of the entry that made it so. */
export async function tellOfClearance(
  queueing: Queueing,
  shopId: string,
  before: PressState,
  after: PressState,
  entryId: string,
): Promise<void> {
  const found = letterOf(before, after)
  if (!found) return
  for (const to of await peopleWith(['owner', 'lead'], shopId, queueing.transaction)) {
    await queueMail(queueing, { ...found, shopId, key: entryId, to })
  }
}
