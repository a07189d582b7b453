import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { findingsOf } from '#shared/ledger/rules'
import { applyProofTest, emptyProofTest } from '#shared/proof-test/apply'
import { decideProofTest, PROOF_TEST_RULES } from '#shared/proof-test/decide'
import type { ProofTestState } from '#shared/proof-test/state'

/** Both lists as one, by `seq`, each entry once; the first list itself when nothing is new. */
export function mergeEntries(known: readonly LedgerEntry[], more: readonly LedgerEntry[]): readonly LedgerEntry[] {
  const have = new Set(known.map((entry) => entry.seq))
  const added = more.filter((entry) => !have.has(entry.seq))
  if (added.length === 0) return known
  return [...known, ...added].sort((a, b) => a.seq - b.seq)
}

/** The last `seq` before the first gap: what comes after it is asked for. */
export function wholeUpTo(entries: readonly LedgerEntry[]): number {
  let seq = 0
  while (entries[seq]?.seq === seq + 1) seq += 1
  return seq
}

const NO_HASH = '0'.repeat(64)

/** An entry that only this device has yet, numbered as if it came next, and marked as the server would mark it. */
export function provisional(state: ProofTestState, draft: EntryDraft): LedgerEntry {
  const { kind, payload, overrides, authorId, bootId, monotonicMs, observedAt } = draft
  const mark = { bootId, monotonicMs, at: observedAt }
  const irregular = findingsOf(decideProofTest(state, { kind, payload, overrides, authorId, mark })).map((finding) => finding.rule)
  return { ...draft, seq: state.headSeq + 1, receivedAt: observedAt, irregular, prevHash: NO_HASH, hash: NO_HASH }
}

export interface Folded {
  /** What the server has, folded. */
  server: ProofTestState
  /** The same with what only this device has. */
  state: ProofTestState
  /** In the order of the fold; the last ones may be provisional. */
  entries: readonly LedgerEntry[]
  pending: number
}

interface Remembered {
  entries: readonly LedgerEntry[]
  state: ProofTestState
}

/** Folds a growing ledger: entries that were folded before are not folded again. */
export class LedgerFold {
  private readonly testId: string
  private remembered: Remembered

  constructor(testId: string) {
    this.testId = testId
    this.remembered = { entries: [], state: emptyProofTest(testId) }
  }

  fold(known: readonly LedgerEntry[], waiting: readonly EntryDraft[]): Folded {
    const server = this.foldServer(known)
    const have = new Set(known.map((entry) => entry.id))
    const entries = [...known]
    let state = server
    let pending = 0
    for (const draft of waiting) {
      if (have.has(draft.id)) continue
      const entry = provisional(state, draft)
      entries.push(entry)
      state = applyProofTest(state, entry)
      pending += 1
    }
    return { server, state, entries, pending }
  }

  private foldServer(known: readonly LedgerEntry[]): ProofTestState {
    const before = this.remembered
    const goesOn = before.entries.length <= known.length && before.entries.every((entry, index) => entry.hash === known[index]?.hash)
    const start = goesOn ? before : { entries: [], state: emptyProofTest(this.testId) }
    const state = known.slice(start.entries.length).reduce(applyProofTest, start.state)
    this.remembered = { entries: known, state }
    return state
  }
}

const INTERLOCKS: ReadonlySet<string> = new Set(PROOF_TEST_RULES.filter((rule) => rule.interlock).map((rule) => rule.id))

/** Rules of interlocks that an entry since the last release went against, while the press is loaded. */
export function irregularUnderLoad(state: ProofTestState, entries: readonly LedgerEntry[]): string[] {
  if (!state.loaded) return []
  const lastRelease = entries.findLastIndex((entry) => entry.kind === 'released')
  return [...new Set(entries.slice(lastRelease + 1).flatMap((entry) => entry.irregular.filter((rule) => INTERLOCKS.has(rule))))]
}
