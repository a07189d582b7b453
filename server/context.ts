import { Transaction } from 'sequelize'
import type { Sequelize } from 'sequelize'
import type { Logger } from 'pino'
import type { Actor } from '#shared/policy'
import type { Config } from './config'

/** What one running server is made of; handed down, never global. */
export interface AppContext {
  config: Config
  database: Sequelize
  /** Signs the session cookie. */
  sessionSecret: string
  logger: Logger
  now(): Date
  /** Aborted when the server is asked to stop: streams that would stay open end themselves on it. */
  closing: AbortSignal
}

/** What a service works with: everything it reads and writes is in the one transaction. */
export interface Work {
  transaction: Transaction
  actor: Actor
  now: Date
}

/** READ COMMITTED: what a row lock waited for is seen as it is now. */
export function inTransaction<T>(context: Pick<AppContext, 'database'>, work: (transaction: Transaction) => Promise<T>): Promise<T> {
  return context.database.transaction({ isolationLevel: Transaction.ISOLATION_LEVELS.READ_COMMITTED }, work)
}
