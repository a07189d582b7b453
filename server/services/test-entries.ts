import type { Action, Actor, Assignment } from '#shared/policy'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import type { ProofTestState } from '#shared/proof-test/state'
import { appendToProofTest, lockProofTest, type Circumstances, type LockedProofTest } from '../ledger/proof-test'
import type { Writing } from '../ledger/write'
import { forbidden, notFound } from '../problem'
import { actorIn, authorize } from './membership'

const ACTIONS: Record<string, Action> = {
  opened: 'proof-test:open',
  stopped: 'proof-test:stop',
  concluded: 'proof-test:conclude',
  reviewed: 'proof-test:conclude',
  signed: 'proof-test:sign-as-lead',
  countersigned: 'proof-test:countersign',
  declined: 'proof-test:decline',
}

/** Lead, pump hand and witness of a test, for the policy. */
export function assignmentOf(state: ProofTestState): Assignment | undefined {
  const people = state.opened?.people
  if (!people?.lead.id || !people.witness.id) return undefined
  return { leadId: people.lead.id, pumpHandId: people.pumpHand.id, witnessId: people.witness.id }
}

/** A locked test with who asks. */
export interface LockedTest extends LockedProofTest {
  actor: Actor
}

/** Locks a test's ledger; another shop's is as unknown as none. People named in it may go on after their role ended. */
export async function lockTest(writing: Writing, userId: string, testId: string): Promise<LockedTest> {
  const locked = await lockProofTest(writing, testId)
  if (!locked) throw notFound('This proof test')
  const actor = await actorIn({ transaction: writing.transaction, userId, shopId: locked.head.shopId })
  const assignment = assignmentOf(locked.state)
  const named = assignment ? Object.values(assignment).includes(userId) : false
  if (actor.role === null && !named) throw notFound('This proof test')
  return { ...locked, actor }
}

/** Appends one entry of a person to a test that is locked, if the person may. */
export async function appendToTest(
  writing: Writing,
  locked: LockedTest,
  draft: EntryDraft,
  circumstances: Circumstances = {},
): Promise<LedgerEntry> {
  const { head, state, actor } = locked
  const assignment = draft.kind === 'opened' ? undefined : assignmentOf(state)
  authorize(actor, ACTIONS[draft.kind] ?? 'proof-test:append-fact', { shopId: head.shopId, assignment, testId: head.id })
  if (draft.authorId !== actor.userId) throw forbidden()
  return appendToProofTest(writing, locked, draft, circumstances)
}
