import type { Sequelize, Transaction } from 'sequelize'
import { QueryTypes } from 'sequelize'
import type { StoredEntry } from '#shared/ledger/chain'
import type { LedgerEntry } from '#shared/ledger/envelope'
import type { Seal } from '#shared/ledger/seal'

interface StoredRow {
  canonical: string
  hash: string
}

/** An entry as it was stored, with its hash: nothing is read from the columns beside the hashed text. */
export function entryOf(row: StoredRow): LedgerEntry {
  return { ...(JSON.parse(row.canonical) as Omit<LedgerEntry, 'hash'>), hash: row.hash }
}

export interface LedgerHead {
  id: string
  shopId: string
  subject: 'proof-test' | 'press'
  headSeq: number
  headHash: string
}

const HEAD = 'SELECT id, shop_id AS shopId, subject, head_seq AS headSeq, head_hash AS headHash FROM ledgers WHERE id = ?'

export async function readHead(database: Sequelize, transaction: Transaction, ledgerId: string): Promise<LedgerHead | null> {
  const [head] = await database.query<LedgerHead>(HEAD, { replacements: [ledgerId], type: QueryTypes.SELECT, transaction })
  return head ?? null
}

/** The head, locked until the transaction ends: the first statement of every append. */
export async function lockHead(database: Sequelize, transaction: Transaction, ledgerId: string): Promise<LedgerHead | null> {
  const [head] = await database.query<LedgerHead>(`${HEAD} FOR UPDATE`, { replacements: [ledgerId], type: QueryTypes.SELECT, transaction })
  return head ?? null
}

/** Entries of a ledger after a number, in order, as they were stored: what a check is made on. */
export function readStored(database: Sequelize, transaction: Transaction, ledgerId: string, after = 0): Promise<StoredEntry[]> {
  return database.query<StoredEntry>('SELECT seq, canonical, hash FROM ledger_entries WHERE ledger_id = ? AND seq > ? ORDER BY seq', {
    replacements: [ledgerId, after],
    type: QueryTypes.SELECT,
    transaction,
  })
}

/** Entries of a ledger after a number, in order. */
export async function readEntries(database: Sequelize, transaction: Transaction, ledgerId: string, after = 0): Promise<LedgerEntry[]> {
  return (await readStored(database, transaction, ledgerId, after)).map(entryOf)
}

/** The entry with an id, whichever ledger it stands in. */
export async function readEntry(database: Sequelize, transaction: Transaction, id: string): Promise<LedgerEntry | null> {
  const [row] = await database.query<StoredRow>('SELECT canonical, hash FROM ledger_entries WHERE id = ?', {
    replacements: [id],
    type: QueryTypes.SELECT,
    transaction,
  })
  return row ? entryOf(row) : null
}

export async function readSeals(database: Sequelize, transaction: Transaction, ledgerId: string): Promise<Seal[]> {
  const rows = await database.query<Omit<Seal, 'sealedAt'> & { sealedAt: Date }>(
    'SELECT kid, ledger_id AS ledgerId, seq, head_hash AS headHash, sealed_at AS sealedAt, signature FROM seals WHERE ledger_id = ? ORDER BY seq',
    { replacements: [ledgerId], type: QueryTypes.SELECT, transaction },
  )
  return rows.map((row) => ({ ...row, sealedAt: new Date(row.sealedAt).toISOString() }))
}

/**
 * Reads entries and seals that belong together, although each is read by a statement of its own while somebody may be
 * signing: the seals are the same before the entries were read and after.
 */
export async function readTogether<Many extends readonly unknown[], Entries>(
  seals: () => Promise<Many>,
  entries: () => Promise<Entries>,
): Promise<{ seals: Many; entries: Entries }> {
  let before = await seals()
  for (;;) {
    const read = await entries()
    const after = await seals()
    if (after.length === before.length) return { seals: after, entries: read }
    before = after
  }
}
