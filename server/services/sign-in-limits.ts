import { createHash } from 'node:crypto'
import { QueryTypes } from 'sequelize'
import type { AppContext } from '../context'
import { Problem } from '../problem'

export const failuresPerAccount = 10
export const failuresPerAddress = 60
const windowMilliseconds = 15 * 60_000
const keptMilliseconds = 24 * 3_600_000

export interface Attempt {
  email: string
  /** The network address that the attempt comes from. */
  address: string
}

/** Addresses are kept only as a hash: the table would otherwise collect what people mistype. */
function accountKey(email: string): string {
  return createHash('sha256').update(email.toLowerCase()).digest('hex')
}

/**
 * Counts the attempt before it is made, so that many at once can't slip past; a success takes its account's count back.
 * In the database, so that all servers count together and a restart forgets nothing. Must not run inside a transaction.
 */
export async function withinLimits<T>(context: AppContext, attempt: Attempt, check: () => Promise<T | undefined>): Promise<T | undefined> {
  const { database } = context
  const now = context.now()
  const key = accountKey(attempt.email)
  const address = attempt.address.slice(0, 64)
  const [attemptId] = await database.query('INSERT INTO sign_in_attempts (account_key, address, attempted_at) VALUES (?, ?, ?)', {
    replacements: [key, address, now],
    type: QueryTypes.INSERT,
  })
  const since = new Date(now.getTime() - windowMilliseconds)
  const [counts] = await database.query<{ ofAccount: number; ofAddress: number }>(
    `SELECT (SELECT COUNT(*) FROM sign_in_attempts WHERE account_key = ? AND attempted_at > ?) AS ofAccount,
            (SELECT COUNT(*) FROM sign_in_attempts WHERE address = ? AND attempted_at > ?) AS ofAddress`,
    { replacements: [key, since, address, since], type: QueryTypes.SELECT },
  )
  if (counts === undefined || counts.ofAccount > failuresPerAccount || counts.ofAddress > failuresPerAddress) {
    // A refused attempt doesn't count, else hammering would keep the account's own person out for ever.
    await database.query('DELETE FROM sign_in_attempts WHERE id = ?', { replacements: [attemptId], type: QueryTypes.DELETE })
    throw new Problem(429, 'too-many-attempts', 'Too many wrong passwords. Wait 15 minutes, then try again.', {
      retryAfterSeconds: windowMilliseconds / 1000,
    })
  }
  const result = await check()
  if (result !== undefined) {
    await database.query('DELETE FROM sign_in_attempts WHERE account_key = ? OR attempted_at < ?', {
      replacements: [key, new Date(now.getTime() - keptMilliseconds)],
      type: QueryTypes.DELETE,
    })
  }
  return result
}
