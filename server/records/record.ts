import { checkChain, type ChainCheck, type StoredEntry } from '#shared/ledger/chain'
import type { LedgerEntry } from '#shared/ledger/envelope'
import type { Seal } from '#shared/ledger/seal'
import { foldProofTest } from '#shared/proof-test/apply'
import type { Opened } from '#shared/proof-test/entries'
import { evaluateTest, type TestEvaluation } from '#shared/proof-test/evaluate'
import { frozenDifferences, type FrozenDifference } from '#shared/proof-test/record'
import type { ProofTestState } from '#shared/proof-test/state'
import { fileName } from './file-name'

/** What a record is made of: the ledger as stored, and the names of those who wrote it. */
export interface RecordSource {
  id: string
  stored: readonly StoredEntry[]
  people: Readonly<Record<string, string>>
  seals: readonly Seal[]
  /** ISO moment at which the record is written out. */
  writtenAt: string
}

/** The same, folded and evaluated. */
export interface RecordOfTest extends RecordSource {
  entries: readonly LedgerEntry[]
  state: ProofTestState
  opened: Opened
  evaluation: TestEvaluation
  chain: ChainCheck
  differences: FrozenDifference[]
  /** "PT-0043, Press 2": what every sheet bears. */
  title: string
  nameOf(personId: string): string
}

/**
 * Folds a stored ledger for its record.
 * @throws RangeError when the ledger doesn't begin with the opening of a test.
 */
export function recordOf(source: RecordSource): RecordOfTest {
  const entries = source.stored.map(({ canonical, hash }) => ({ ...(JSON.parse(canonical) as Omit<LedgerEntry, 'hash'>), hash }))
  const state = foldProofTest(source.id, entries)
  const { opened } = state
  if (opened === null) throw new RangeError('A ledger without an opened test has no record.')
  const named: Record<string, string> = { ...source.people }
  for (const person of Object.values(opened.people)) if (person.id !== null) named[person.id] ??= person.name
  return {
    ...source,
    entries,
    state,
    opened,
    evaluation: evaluateTest(state),
    chain: checkChain(source.stored),
    differences: frozenDifferences(source.id, entries),
    title: `${opened.number}, ${opened.press.name}`,
    nameOf: (personId) => named[personId] ?? 'a person unknown to this record',
  }
}

/** A moment in print, with its zone: "15 September 2026, 12:05:00 UTC". */
export function momentText(iso: string): string {
  const date = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' }).format(new Date(iso))
  return `${date}, ${new Date(iso).toISOString().slice(11, 19)} UTC`
}

/** Name of the file that a record is saved as: number and press, without what a file name can't hold. */
export function recordFileName(opened: Pick<Opened, 'number' | 'press'>, extension: 'xlsx' | 'pdf' = 'xlsx'): string {
  return fileName([opened.number, opened.press.name], extension)
}
