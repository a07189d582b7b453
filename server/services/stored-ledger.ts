import type { Transaction } from 'sequelize'
import type { LedgerEntry as Entry } from '#shared/ledger/envelope'
import { LedgerEntry } from '../models'

type Stored = Pick<LedgerEntry, 'ledgerId' | 'canonical' | 'hash'>

/** The entry as it was written; its text was checked when it came in and never changes. */
function entryOf({ canonical, hash }: Stored): Entry {
  const written: Omit<Entry, 'hash'> = JSON.parse(canonical)
  return { ...written, hash }
}

/** Whole ledgers of one shop, each in order, by id. */
export async function readLedgers(shopId: string, ledgerIds: readonly string[], transaction: Transaction): Promise<Map<string, Entry[]>> {
  const ledgers = new Map<string, Entry[]>(ledgerIds.map((id) => [id, []]))
  if (ledgerIds.length === 0) return ledgers
  const stored: Stored[] = await LedgerEntry.findAll({
    where: { shopId, ledgerId: [...ledgerIds] },
    attributes: ['ledgerId', 'canonical', 'hash'],
    order: [
      ['ledgerId', 'ASC'],
      ['seq', 'ASC'],
    ],
    raw: true,
    transaction,
  })
  for (const row of stored) ledgers.get(row.ledgerId)?.push(entryOf(row))
  return ledgers
}
