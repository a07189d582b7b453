import type { Transaction } from 'sequelize'
import type { Work } from '../context'
import { LedgerEntry, ProofTest, Seal } from '../models'
import { notFound } from '../problem'
import type { RecordSource } from '../records/record'
import { authorize } from './membership'
import { namesOf } from './names'

/** What the record of a test is made of, exactly as stored; 404 for another shop's, 403 where the role may not export. */
export async function readRecord({ transaction, actor, now }: Work, id: string): Promise<RecordSource> {
  const test = await ProofTest.findOne({ where: { id, shopId: actor.shopId }, attributes: ['id'], raw: true, transaction })
  if (test === null) throw notFound('This proof test')
  authorize(actor, 'record:export', { shopId: actor.shopId })
  return recordSource(transaction, id, now)
}

/** The same with nobody asking: for commands run on the machine that holds the database. */
export async function recordSource(transaction: Transaction, id: string, now: Date): Promise<RecordSource> {
  const entries = await LedgerEntry.findAll({
    where: { ledgerId: id },
    attributes: ['seq', 'canonical', 'hash', 'authorId'],
    order: [['seq', 'ASC']],
    raw: true,
    transaction,
  })
  const seals = await Seal.findAll({ where: { ledgerId: id }, order: [['seq', 'ASC']], raw: true, transaction })
  return {
    id,
    stored: entries.map(({ seq, canonical, hash }) => ({ seq, canonical, hash })),
    people: await namesOf(
      transaction,
      entries.map((entry) => entry.authorId),
    ),
    seals: seals.map(({ kid, ledgerId, seq, headHash, sealedAt, signature }) => ({
      kid,
      ledgerId,
      seq,
      headHash,
      sealedAt: new Date(sealedAt).toISOString(),
      signature,
    })),
    writtenAt: now.toISOString(),
  }
}
