import type { Sequelize } from 'sequelize'
import { Transaction } from 'sequelize'

/** Deadlock, lock wait timeout, certification failure (Galera reports it as a deadlock), record changed. */
const PASSING_ERRORS = new Set([1213, 1205, 1020, 1047])
const PASSING_CODES = new Set(['ECONNRESET', 'EPIPE', 'ER_SOCKET_UNEXPECTED_CLOSE', 'ER_CMD_CONNECTION_CLOSED', 'PROTOCOL_CONNECTION_LOST'])
const TRIES = 6

function isPassing(error: unknown): boolean {
  for (let cause: unknown = error; cause instanceof Error; cause = 'parent' in cause ? cause.parent : cause.cause) {
    const { errno, code } = cause as { errno?: unknown; code?: unknown }
    if (typeof errno === 'number' && PASSING_ERRORS.has(errno)) return true
    if (typeof code === 'string' && PASSING_CODES.has(code)) return true
  }
  return false
}

/**
 * Runs work in a READ COMMITTED transaction and runs it again, whole, when the database gave up on it for a
 * passing reason, COMMIT included: appending is idempotent by the entry's id, so a second run is harmless.
 */
export async function inRetriedTransaction<T>(database: Sequelize, work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await database.transaction({ isolationLevel: Transaction.ISOLATION_LEVELS.READ_COMMITTED }, work)
    } catch (error) {
      if (attempt >= TRIES || !isPassing(error)) throw error
      await new Promise((resolve) => setTimeout(resolve, 5 * 2 ** attempt * (0.5 + Math.random())))
    }
  }
}
