import type { Sequelize } from 'sequelize'
import { QueryTypes } from 'sequelize'
import { pressState, proofTestState } from './folds'
import { projectPress, projectProofTest } from './projections'
import { lockHead } from './read'
import { inRetriedTransaction } from './retry'

/** Writes the projections of every ledger anew from its entries; returns how many ledgers were folded. */
export async function rebuildProjections(database: Sequelize): Promise<number> {
  const ledgers = await database.query<{ id: string }>('SELECT id FROM ledgers WHERE head_seq > 0 ORDER BY created_at, id', {
    type: QueryTypes.SELECT,
  })
  for (const { id } of ledgers) {
    await inRetriedTransaction(database, async (transaction) => {
      const head = await lockHead(database, transaction, id)
      if (!head) return
      if (head.subject === 'press') await projectPress(database, transaction, head.shopId, await pressState(database, transaction, head))
      else await projectProofTest(database, transaction, head.shopId, await proofTestState(database, transaction, head))
    })
  }
  return ledgers.length
}
