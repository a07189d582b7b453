import type { Sequelize, Transaction } from 'sequelize'
import { QueryTypes } from 'sequelize'
import { draftText, entryText, sha256Hex } from '#shared/ledger/chain'
import type { EntryDraft, LedgerEntry, LedgerSubject } from '#shared/ledger/envelope'
import { FIRST_PREV_HASH } from '#shared/ledger/chain'
import { conflict } from '../problem'
import { readEntry, type LedgerHead } from './read'

export interface Writing {
  database: Sequelize
  transaction: Transaction
  now: Date
}

/** A new, empty ledger; false when it exists already. */
export async function createLedger(
  { database, transaction, now }: Writing,
  ledger: { id: string; shopId: string; subject: LedgerSubject },
): Promise<void> {
  await database.query('INSERT IGNORE INTO ledgers (id, shop_id, subject, head_seq, head_hash, created_at) VALUES (?, ?, ?, 0, ?, ?)', {
    replacements: [ledger.id, ledger.shopId, ledger.subject, FIRST_PREV_HASH, now],
    type: QueryTypes.INSERT,
    transaction,
  })
}

/**
 * The entry that a resent draft became, or null when it is new. The same id with another ledger, author or
 * body is not a resend and is refused.
 */
export async function alreadyWritten({ database, transaction }: Writing, draft: EntryDraft): Promise<LedgerEntry | null> {
  const kept = await readEntry(database, transaction, draft.id)
  if (!kept) return null
  if (draftText(kept) === draftText(draft)) return kept
  throw conflict('id-reused', 'This entry’s id was used for another entry already. Enter it again, as a new one.')
}

/** Chains and stores one entry under the lock of its ledger. The only INSERT into ledger_entries. */
export async function writeEntry(
  { database, transaction, now }: Writing,
  head: LedgerHead,
  draft: EntryDraft,
  irregular: readonly string[],
): Promise<LedgerEntry> {
  const fields = { seq: head.headSeq + 1, receivedAt: now.toISOString(), irregular: [...irregular], prevHash: head.headHash }
  const canonical = entryText(draft, fields)
  const hash = sha256Hex(canonical)
  await database.query(
    `INSERT INTO ledger_entries (ledger_id, seq, shop_id, id, kind, canonical, prev_hash, hash, author_id, observed_at, received_at, irregular)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    {
      replacements: [
        head.id,
        fields.seq,
        head.shopId,
        draft.id,
        draft.kind,
        canonical,
        fields.prevHash,
        hash,
        draft.authorId,
        new Date(draft.observedAt),
        now,
        irregular.length > 0,
      ],
      type: QueryTypes.INSERT,
      transaction,
    },
  )
  await database.query('UPDATE ledgers SET head_seq = ?, head_hash = ? WHERE id = ?', {
    replacements: [fields.seq, hash, head.id],
    type: QueryTypes.UPDATE,
    transaction,
  })
  head.headSeq = fields.seq
  head.headHash = hash
  return { ...draft, ...fields, hash }
}
