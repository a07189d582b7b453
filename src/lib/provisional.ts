import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { findingsOf } from '#shared/ledger/rules'
import { applyProofTest } from '#shared/proof-test/apply'
import { decideProofTest } from '#shared/proof-test/decide'
import type { ProofTestState } from '#shared/proof-test/state'

const NO_HASH = '0'.repeat(64)

/** An entry that only this device has yet, numbered as if it came next, and marked as the server would mark it. */
function provisional(state: ProofTestState, draft: EntryDraft): LedgerEntry {
  const { kind, payload, overrides, authorId, bootId, monotonicMs, observedAt } = draft
  const mark = { bootId, monotonicMs, at: observedAt }
  const irregular = findingsOf(decideProofTest(state, { kind, payload, overrides, authorId, mark })).map((finding) => finding.rule)
  return { ...draft, seq: state.headSeq + 1, receivedAt: observedAt, irregular, prevHash: NO_HASH, hash: NO_HASH }
}

/** What only this device has, behind what the server has; an entry that has arrived meanwhile counts once. */
export function foldWaiting(
  server: ProofTestState,
  known: readonly LedgerEntry[],
  waiting: readonly EntryDraft[],
): { state: ProofTestState; entries: readonly LedgerEntry[]; pending: number } {
  const have = new Set(known.map((entry) => entry.id))
  const entries = [...known]
  let state = server
  for (const draft of waiting) {
    if (have.has(draft.id)) continue
    const entry = provisional(state, draft)
    entries.push(entry)
    state = applyProofTest(state, entry)
  }
  return { state, entries, pending: entries.length - known.length }
}
