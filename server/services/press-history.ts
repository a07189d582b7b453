import type { PressHistory } from '#shared/api/press-history'
import { historyOf } from '#shared/proof-test/climb-history'
import type { Work } from '../context'
import { proofTestState } from '../ledger/folds'
import { readHead } from '../ledger/read'
import { ProofTest } from '../models'
import { authorize } from './membership'

/** A press that is tested twice a year fills this in a working life. */
const MOST_TESTS = 80

/** Every climb of every test of a press, the oldest first, worked out from the ledgers. */
export async function readPressHistory({ transaction, actor }: Work, pressId: string): Promise<PressHistory> {
  const { shopId } = actor
  authorize(actor, 'proof-test:read', { shopId })
  const tests = await ProofTest.findAll({
    where: { shopId, pressId },
    attributes: ['id'],
    order: [
      ['openedAt', 'DESC'],
      ['id', 'DESC'],
    ],
    limit: MOST_TESTS,
    raw: true,
    transaction,
  })
  const database = ProofTest.sequelize
  if (database === undefined) throw new Error('The models are not bound to a connection.')
  const climbs: PressHistory['climbs'] = []
  for (const { id } of tests.reverse()) {
    const head = await readHead(database, transaction, id)
    if (head) climbs.push(...historyOf(await proofTestState(database, transaction, head)))
  }
  return { climbs }
}
