import type { LedgerEntry } from '#shared/ledger/envelope'

/** Everything that the server has sent of one test's ledger so far. */
export interface KnownLedger {
  ledgerId: string
  /** By `seq`, each once. */
  entries: readonly LedgerEntry[]
  people: Readonly<Record<string, string>>
  /** The highest entry that a seal stands on; 0 while there is none. */
  sealedSeq: number
  /** All of it was kept on this device: the server has not been heard since it was opened. */
  fromDevice?: true
}

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
