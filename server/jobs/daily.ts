import { setTimeout as delay } from 'node:timers/promises'
import { QueryTypes } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { AppContext } from '../context'
import { tellWhatIsDue } from '../services/due-notices'

const LEASE_MILLISECONDS = 15 * 60_000
const LOOK_EVERY_MILLISECONDS = 10 * 60_000

type Running = Pick<AppContext, 'database' | 'now' | 'logger'>

/**
 * Does a job that is due once a day, if no other server has done it today or is doing it. A server that ended on the way
 * leaves its lease to run out; what the job does may be done twice. Returns whether it was done here.
 */
export async function onceToday({ database, now }: Running, name: string, job: (day: string) => Promise<void>): Promise<boolean> {
  const at = now()
  const day = at.toISOString().slice(0, 10)
  const holder = newId()
  await database.query('INSERT IGNORE INTO jobs (name) VALUES (?)', { replacements: [name], type: QueryTypes.INSERT })
  await database.query(
    `UPDATE jobs SET lease_holder = ?, lease_until = ?
      WHERE name = ? AND (done_for IS NULL OR done_for < ?) AND (lease_until IS NULL OR lease_until < ?)`,
    { replacements: [holder, new Date(at.getTime() + LEASE_MILLISECONDS), name, day, at], type: QueryTypes.UPDATE },
  )
  const [held] = await database.query<{ name: string }>('SELECT name FROM jobs WHERE name = ? AND lease_holder = ?', {
    replacements: [name, holder],
    type: QueryTypes.SELECT,
  })
  if (!held) return false
  let done = false
  try {
    await job(day)
    done = true
  } finally {
    await database.query(
      `UPDATE jobs SET lease_holder = NULL, lease_until = NULL${done ? ', done_for = ?' : ''} WHERE name = ? AND lease_holder = ?`,
      { replacements: done ? [day, name, holder] : [name, holder], type: QueryTypes.UPDATE },
    )
  }
  return true
}

/** Looks every ten minutes whether a day's jobs are still to be done, until the server is asked to stop. */
export async function runDailyJobs(context: AppContext): Promise<void> {
  const { closing, logger } = context
  while (!closing.aborted) {
    try {
      await onceToday(context, 'due-letters', (day) => tellWhatIsDue(context, day, closing))
    } catch (error) {
      logger.warn({ err: error }, 'The letters about what is due could not be written')
    }
    await delay(LOOK_EVERY_MILLISECONDS * (0.9 + Math.random() / 5), undefined, { signal: closing }).catch(() => undefined)
  }
}
