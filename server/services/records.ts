import type { Transaction } from 'sequelize'
import type { AppContext, Work } from '../context'
import { alteredProblem, findBroken } from '../ledger/check-stored'
import { LedgerEntry, ProofTest, Seal } from '../models'
import { notFound } from '../problem'
import { readTogether } from '../ledger/read'
import type { RecordSource } from '../records/record'
import { authorize } from './membership'
import { namesOf } from './names'

/**
 * What the record of a test is made of, exactly as stored; 404 for another shop's, 403 where the role may not export,
 * 409 when it is not whole: nothing is printed from an altered record.
 */
export async function readRecord(context: AppContext, { transaction, actor, now }: Work, id: string): Promise<RecordSource> {
  const test = await ProofTest.findOne({ where: { id, shopId: actor.shopId }, attributes: ['id'], raw: true, transaction })
  if (test === null) throw notFound('This proof test')
  authorize(actor, 'record:export', { shopId: actor.shopId, testId: id })
  const source = await recordSource(transaction, id, now)
  const broken = findBroken(context, id, source.stored, source.seals)
  if (broken !== null) throw alteredProblem(broken)
  return source
}

/** The same with nobody asking: for commands run on the machine that holds the database. */
export async function recordSource(transaction: Transaction, id: string, now: Date): Promise<RecordSource> {
  const { seals, entries } = await readTogether(
    () => Seal.findAll({ where: { ledgerId: id }, order: [['seq', 'ASC']], raw: true, transaction }),
    () =>
      LedgerEntry.findAll({
        where: { ledgerId: id },
        attributes: ['seq', 'canonical', 'hash', 'authorId'],
        order: [['seq', 'ASC']],
        raw: true,
        transaction,
      }),
  )
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
