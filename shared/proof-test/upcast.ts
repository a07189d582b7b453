import type { LedgerEntry } from '../ledger/envelope'

type Upcaster = (payload: Record<string, unknown>) => Record<string, unknown>

/**
 * Changes of payload between versions, by kind: the function at index n turns version n + 1 into n + 2.
 * Chains are checked on what was stored; this runs in memory only, before folding.
 */
const UPCASTERS: Readonly<Record<string, readonly Upcaster[]>> = {}

/** The entry with its payload as today's version writes it. */
export function upcast(entry: LedgerEntry): LedgerEntry {
  const steps = UPCASTERS[entry.kind]?.slice(entry.v - 1) ?? []
  if (steps.length === 0) return entry
  return { ...entry, v: entry.v + steps.length, payload: steps.reduce((payload, step) => step(payload), entry.payload) }
}
