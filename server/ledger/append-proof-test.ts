import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { findingsOf } from '#shared/ledger/rules'
import { applyProofTest } from '#shared/proof-test/apply'
import { decideProofTest } from '#shared/proof-test/decide'
import { PROOF_TEST_ACTS } from '#shared/proof-test/entries'
import type { ProofTestState } from '#shared/proof-test/state'
import type { Action, Actor, Assignment } from '#shared/policy'
import { conflict, forbidden, notFound } from '../problem'
import { actorIn, authorize } from '../services/membership'
import { carryOut } from './consequences'
import { proofTestState, rememberFold } from './folds'
import { projectProofTest } from './projections'
import { lockHead, type LedgerHead } from './read'
import { alreadyWritten, writeEntry, type Writing } from './write'

/** Lead, pump hand and witness of a test, for the policy. */
export function assignmentOf(state: ProofTestState): Assignment | undefined {
  const people = state.opened?.people
  if (!people?.lead.id || !people.witness.id) return undefined
  return { leadId: people.lead.id, pumpHandId: people.pumpHand.id, witnessId: people.witness.id }
}

const ACTIONS: Record<string, Action> = {
  opened: 'proof-test:open',
  stopped: 'proof-test:stop',
  concluded: 'proof-test:conclude',
  reviewed: 'proof-test:conclude',
  signed: 'proof-test:sign-as-lead',
  countersigned: 'proof-test:countersign',
  declined: 'proof-test:decline',
}

/** A test's ledger locked, with its state and who asks: where every append begins. */
export interface LockedTest {
  head: LedgerHead
  state: ProofTestState
  actor: Actor
}

/** Locks a test's ledger; another shop's is as unknown as none. People named in it may go on after their role ended. */
export async function lockTest(writing: Writing, userId: string, ledgerId: string): Promise<LockedTest> {
  const { database, transaction } = writing
  const head = await lockHead(database, transaction, ledgerId)
  if (!head || head.subject !== 'proof-test') throw notFound('This proof test')
  const state = await proofTestState(database, transaction, head)
  const actor = await actorIn({ transaction, userId, shopId: head.shopId })
  const assignment = assignmentOf(state)
  const named = assignment ? Object.values(assignment).includes(userId) : false
  if (actor.role === null && !named) throw notFound('This proof test')
  return { head, state, actor }
}

/**
 * Appends one entry to a test that is locked. An act that the rules don't allow is refused; a fact always
 * lands, marked with the rules it goes against. `clockOff` in ms marks a device whose clock is wrong.
 */
export async function appendToTest(writing: Writing, locked: LockedTest, draft: EntryDraft, clockOff?: number): Promise<LedgerEntry> {
  const { head, state, actor } = locked
  authorize(actor, ACTIONS[draft.kind] ?? 'proof-test:append-fact', {
    shopId: head.shopId,
    assignment: draft.kind === 'opened' ? undefined : assignmentOf(state),
  })
  if (draft.authorId !== actor.userId) throw forbidden()
  const known = await alreadyWritten(writing, draft)
  if (known) return known
  const mark = { at: draft.observedAt, bootId: draft.bootId, monotonicMs: draft.monotonicMs }
  const { kind, payload, overrides, authorId } = draft
  const findings = findingsOf(decideProofTest(state, { kind, payload, overrides, authorId, mark, clockOff }))
  const rules = findings.map((finding) => finding.rule)
  const [first] = findings
  if (first && PROOF_TEST_ACTS.has(kind)) throw conflict(first.severity === 'reason' ? 'needs-reason' : 'refused', first.says, rules)
  const entry = await writeEntry(writing, head, draft, rules)
  const after = applyProofTest(state, entry)
  await projectProofTest(writing.database, writing.transaction, head.shopId, after)
  await carryOut(writing, state, after, draft)
  rememberFold(writing.database, after)
  locked.state = after
  return entry
}
