import type { Action } from '#shared/policy'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import type { Work } from '../context'
import { appendToPress, lockPress } from '../ledger/press'
import type { Writing } from '../ledger/write'
import { conflict, forbidden, notFound } from '../problem'
import { authorize } from './membership'

const ACTIONS: Record<string, Action> = {
  registered: 'press:register',
  described: 'press:describe',
  'joint-added': 'press:describe',
  'joint-described': 'press:describe',
  'joint-retired': 'press:describe',
  'joint-split': 'press:describe',
  'joint-placed': 'press:describe',
  'strength-described': 'press:describe',
  'joint-worked': 'press:record',
  'joint-examined': 'press:record',
  changed: 'press:change-report',
  // Whoever sees a crack says so; what was done about it is closed by a lead.
  'repair-opened': 'press:change-report',
  'repair-noted': 'press:repair-note',
  'repair-closed': 'press:record',
  withdrawn: 'press:withdraw',
  'tag-taken-off': 'press:tag-off',
}

/** What it takes to enter a kind by hand; undefined for what only follows from a proof test. */
export const pressAction = (kind: string): Action | undefined => ACTIONS[kind]

/** Appends one entry that a person made to a press's ledger, if the person may, in the transaction given. */
export async function appendPress(writing: Writing, { actor }: Pick<Work, 'actor'>, draft: EntryDraft): Promise<LedgerEntry> {
  const locked = await lockPress(writing, draft.ledgerId)
  if (!locked || locked.head.shopId !== actor.shopId) throw notFound('This press')
  const action = pressAction(draft.kind)
  if (!action) throw conflict('not-by-hand', 'This follows from a proof test and is not entered by hand.', ['P10'])
  authorize(actor, action, { shopId: locked.head.shopId })
  if (draft.authorId !== actor.userId) throw forbidden()
  return appendToPress(writing, locked, draft)
}
