import { ConnectionError, Transaction } from 'sequelize'
import type { Sequelize } from 'sequelize'
import { Problem } from './problem'

/**
 * The database gave up on a transaction and took it back: lock wait timeout, deadlock (Galera reports a failed
 * certification as one), record changed since it was read.
 */
const TAKEN_BACK = new Set([1205, 1213, 1020])
/**
 * The database, or the way to it, went away: too many connections, the server is ending, the statement or connection
 * was killed, the network broke, a Galera node that is not (or no longer) part of the cluster, a COMMIT that failed.
 * The driver's own numbers begin at 45000.
 */
const WENT_AWAY = new Set([
  1040, 1047, 1053, 1152, 1158, 1159, 1160, 1161, 1180, 1317, 1927, 2002, 2003, 2006, 2013, 45001, 45004, 45009, 45012, 45013, 45019, 45026,
])
const WENT_AWAY_CODES = new Set([
  'ECONNREFUSED',
  'ECONNRESET',
  'EPIPE',
  'ETIMEDOUT',
  'EHOSTUNREACH',
  'ENETUNREACH',
  'ER_SOCKET_UNEXPECTED_CLOSE',
  'ER_CMD_CONNECTION_CLOSED',
  'PROTOCOL_CONNECTION_LOST',
])

/** What is tried again is tried at least this often, and after that until the time is over. */
const LEAST_TRIES = 4
const LONGEST_MILLISECONDS = 8_000

export type Passing = 'taken-back' | 'went-away'

/** Why the same thing may well go through a moment later; undefined when trying again would not help. */
export function passingReason(error: unknown): Passing | undefined {
  for (
    let cause: unknown = error;
    cause instanceof Error;
    cause = 'parent' in cause && cause.parent !== cause ? cause.parent : cause.cause
  ) {
    const { errno, code } = cause as { errno?: unknown; code?: unknown }
    if (typeof errno === 'number' && TAKEN_BACK.has(errno)) return 'taken-back'
    if (typeof errno === 'number' && WENT_AWAY.has(errno)) return 'went-away'
    if (typeof code === 'string' && WENT_AWAY_CODES.has(code)) return 'went-away'
    // A connection that could not be made has done nothing yet; a wrong password is a ConnectionError too, and stays one.
    if (cause instanceof ConnectionError && cause.name === 'SequelizeConnectionRefusedError') return 'went-away'
  }
  return undefined
}

function pause(attempt: number): Promise<void> {
  const milliseconds = Math.min(400, 5 * 2 ** attempt) * (0.5 + Math.random())
  return new Promise((resolve) => {
    setTimeout(resolve, milliseconds)
  })
}

/** Runs reading, or anything else that may be done twice, again while the database is away for a passing reason. */
export async function retried<T>(work: () => Promise<T>): Promise<T> {
  const until = performance.now() + LONGEST_MILLISECONDS
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await work()
    } catch (error) {
      const over = attempt >= LEAST_TRIES && performance.now() >= until
      if (over || passingReason(error) === undefined) throw error
      await pause(attempt)
    }
  }
}

interface TransactionOptions {
  /** Running the work a second time after it was committed changes nothing. */
  idempotent: boolean
}

const unknownOutcome = () =>
  new Problem(
    503,
    'outcome-unknown',
    'The connection to the database broke just as this was being written. It may have been written, or not: look before entering it again.',
    { retryAfterSeconds: 5 },
  )

/**
 * Runs work in a READ COMMITTED transaction and runs it again, whole, when the database gave up on it for a passing
 * reason. When the connection broke during COMMIT nobody knows whether it was written: then only work that may be done
 * twice runs again, anything else throws 503 `outcome-unknown`.
 */
export function runTransaction<T>(
  database: Sequelize,
  { idempotent }: TransactionOptions,
  work: (transaction: Transaction) => Promise<T>,
): Promise<T> {
  let committing = false
  return retried(async () => {
    committing = false
    try {
      return await database.transaction({ isolationLevel: Transaction.ISOLATION_LEVELS.READ_COMMITTED }, async (transaction) => {
        const result = await work(transaction)
        committing = true
        return result
      })
    } catch (error) {
      if (committing && !idempotent && passingReason(error) === 'went-away') throw unknownOutcome()
      throw error
    }
  })
}
