import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { findingsOf } from '#shared/ledger/rules'
import { applyProofTest } from '#shared/proof-test/apply'
import { decideProofTest } from '#shared/proof-test/decide'
import { PROOF_TEST_ACTS } from '#shared/proof-test/entries'
import type { ProofTestQuestion } from '#shared/proof-test/rule'
import type { ProofTestState } from '#shared/proof-test/state'
import { conflict } from '../problem'
import { carryOut } from './consequences'
import { proofTestState, rememberFold } from './folds'
import { projectProofTest } from './projections'
import { lockHead, type LedgerHead } from './read'
import { alreadyWritten, writeEntry, type Writing } from './write'

/** What only the server knows of an entry: how far the device's clock stands off, and which files are not here. */
export type Circumstances = Pick<ProofTestQuestion, 'clockOff' | 'absentFiles'>

/** A test's ledger, locked, with its state: where every append begins. */
export interface LockedProofTest {
  head: LedgerHead
  state: ProofTestState
}

export async function lockProofTest(writing: Writing, testId: string): Promise<LockedProofTest | null> {
  const head = await lockHead(writing.database, writing.transaction, testId)
  if (!head || head.subject !== 'proof-test') return null
  return { head, state: await proofTestState(writing.database, writing.transaction, head) }
}

/**
 * Appends one entry to a test that is locked. An act that the rules don't allow is refused; a fact always
 * lands, marked with the rules it goes against.
 */
export async function appendToProofTest(
  writing: Writing,
  locked: LockedProofTest,
  draft: EntryDraft,
  circumstances: Circumstances = {},
): Promise<LedgerEntry> {
  const { head, state } = locked
  const known = await alreadyWritten(writing, draft)
  if (known) return known
  const mark = { at: draft.observedAt, bootId: draft.bootId, monotonicMs: draft.monotonicMs }
  const { kind, payload, overrides, authorId } = draft
  const findings = findingsOf(decideProofTest(state, { kind, payload, overrides, authorId, mark, ...circumstances }))
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
