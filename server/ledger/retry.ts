import type { Sequelize, Transaction } from 'sequelize'
import { runTransaction } from '../transaction'

/** For work that may be done twice, as appending may: by its id, an entry that was written already is only answered again. */
export function inRetriedTransaction<T>(database: Sequelize, work: (transaction: Transaction) => Promise<T>): Promise<T> {
  return runTransaction(database, { idempotent: true }, work)
}
