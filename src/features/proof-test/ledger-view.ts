import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { applyProofTest, emptyProofTest } from '#shared/proof-test/apply'
import { PROOF_TEST_RULES } from '#shared/proof-test/decide'
import type { ProofTestState } from '#shared/proof-test/state'
import { foldWaiting } from '../../lib/provisional'

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
    return { server, ...foldWaiting(server, known, waiting) }
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
