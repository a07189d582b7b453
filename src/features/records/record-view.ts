import type { EntriesResponse } from '#shared/api/ledger'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { checkChain, entryText, type ChainCheck } from '#shared/ledger/chain'
import { checkLedger, type LedgerCheck, type PublicSealKey } from '#shared/ledger/check-ledger'
import { foldProofTest } from '#shared/proof-test/apply'
import type { Opened } from '#shared/proof-test/entries'
import { evaluateTest, type TestEvaluation } from '#shared/proof-test/evaluate'
import { frozenDifferences, standingOf, type FrozenDifference, type RecordStanding } from '#shared/proof-test/record'
import type { ProofTestState } from '#shared/proof-test/state'
import { placedIn, type Placed } from '../../lib/attachment-places'

/** A record as the page shows it: everything follows from the ledger. */
export interface RecordView {
  id: string
  state: ProofTestState
  opened: Opened
  evaluation: TestEvaluation
  standing: RecordStanding
  /** As they stand in the ledger. */
  entries: readonly LedgerEntry[]
  chain: ChainCheck
  /** Chain and seals as this browser checked them; null while the keys are not here. */
  check: LedgerCheck | null
  /** What is wrong with it, by this browser's own check or the server's; at which entry, where that can be told. */
  broken: { at: number | null; why: string } | null
  sealed: EntriesResponse['sealed']
  differences: FrozenDifference[]
  /** Photos and documents with the entries that name them. */
  photos: Placed[]
  nameOf: (personId: string) => string
}

function brokenOf(answer: EntriesResponse, chain: ChainCheck, check: LedgerCheck | null): RecordView['broken'] {
  if (!chain.whole) return { at: chain.brokenAt, why: chain.why }
  if (check !== null && check.verdict !== 'whole') return { at: check.verdict === 'altered' ? check.at : null, why: check.why }
  return answer.broken ?? null
}

/**
 * Folds and checks a ledger as the server answered it; its seals too, once the keys are here. Throws when it doesn't
 * begin with an opening.
 */
export function readRecord(answer: EntriesResponse, keys?: readonly PublicSealKey[]): RecordView {
  const state = foldProofTest(answer.ledgerId, answer.entries)
  const { opened } = state
  if (opened === null) throw new Error('This ledger has no opened test.')
  const stored = answer.entries.map(({ hash, seq, receivedAt, irregular, prevHash, ...draft }) => ({
    seq,
    hash,
    canonical: entryText(draft, { seq, receivedAt, irregular, prevHash }),
  }))
  const chain = checkChain(stored)
  const seals = answer.sealed.map((seal) => ({ ...seal, ledgerId: answer.ledgerId }))
  const check = keys === undefined ? null : checkLedger(answer.ledgerId, stored, seals, keys)
  const named: Record<string, string> = { ...answer.people }
  for (const person of Object.values(opened.people)) if (person.id !== null) named[person.id] ??= person.name
  return {
    id: answer.ledgerId,
    state,
    opened,
    evaluation: evaluateTest(state),
    standing: standingOf(state),
    entries: answer.entries,
    chain,
    check,
    broken: brokenOf(answer, chain, check),
    sealed: answer.sealed,
    differences: frozenDifferences(answer.ledgerId, answer.entries),
    photos: placedIn(answer.entries),
    nameOf: (personId) => named[personId] ?? 'somebody unknown here',
  }
}
