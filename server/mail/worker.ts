import { setTimeout as delay } from 'node:timers/promises'
import { QueryTypes } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { AppContext } from '../context'
import { retried } from '../transaction'
import { Undeliverable, type Delivery } from './delivery'
import { fillIn } from './letter'

/** After so many tries a letter is dead until somebody has it tried again. */
export const MOST_ATTEMPTS = 8
const FIRST_WAIT = 15_000
const LONGEST_WAIT = 2 * 3_600_000
const IDLE_MILLISECONDS = 1_000

type Sending = Pick<AppContext, 'database' | 'logger' | 'config' | 'now'>

interface Claimed {
  id: string
  recipient: string
  subject: string
  text: string
  html: string
  secret: string | null
  messageId: string
  attempts: number
}

/** Doubling, and never the same twice: letters that failed together don't come back together. */
export function waitAfter(attempts: number, random = Math.random()): number {
  return Math.min(LONGEST_WAIT, FIRST_WAIT * 2 ** (attempts - 1)) * (0.75 + random / 2)
}

/** Takes the next letter for a while: one that is due, or one whose sender was not heard of again. */
async function claim({ database, config, now }: Sending, delivery: Delivery, holder: string): Promise<Claimed | 'none' | 'lost'> {
  const at = now()
  const due = `(state = 'queued' AND next_at <= ?) OR (state = 'sending' AND lease_until < ?)`
  const [next] = await database.query<{ id: string }>(
    `(SELECT id, next_at FROM mail_messages WHERE state = 'queued' AND next_at <= ? ORDER BY next_at LIMIT 1)
     UNION ALL
     (SELECT id, next_at FROM mail_messages WHERE state = 'sending' AND lease_until < ? ORDER BY next_at LIMIT 1)
     ORDER BY next_at LIMIT 1`,
    { replacements: [at, at], type: QueryTypes.SELECT },
  )
  if (!next) return 'none'
  await database.query(
    `UPDATE mail_messages SET state = 'sending', lease_holder = ?, lease_until = ?, attempts = attempts + 1,
            message_id = COALESCE(message_id, ?)
      WHERE id = ? AND (${due})`,
    {
      replacements: [holder, new Date(at.getTime() + config.mailLeaseMilliseconds), `<${next.id}@${delivery.domain}>`, next.id, at, at],
      type: QueryTypes.UPDATE,
    },
  )
  const [claimed] = await database.query<Claimed>(
    `SELECT id, recipient, subject, text, html, secret, message_id AS messageId, attempts FROM mail_messages
      WHERE id = ? AND lease_holder = ? AND state = 'sending'`,
    { replacements: [next.id, holder], type: QueryTypes.SELECT },
  )
  return claimed ?? 'lost'
}

/** Only who still holds the letter says what became of it. */
async function settle({ database }: Sending, id: string, holder: string, set: string, values: unknown[]): Promise<void> {
  await retried(() =>
    database.query(`UPDATE mail_messages SET ${set}, lease_holder = NULL, lease_until = NULL WHERE id = ? AND lease_holder = ?`, {
      replacements: [...values, id, holder],
      type: QueryTypes.UPDATE,
    }),
  )
}

const sayError = (error: unknown): string => (error instanceof Error ? error.message : String(error)).slice(0, 500)

async function send(sending: Sending, delivery: Delivery, origin: string, holder: string, letter: Claimed): Promise<void> {
  const { id, messageId, recipient: to, subject, attempts, secret } = letter
  const { now, logger } = sending
  if (attempts > MOST_ATTEMPTS) {
    await settle(sending, id, holder, "state = 'dead', last_error = ?", ['Each server that tried to send it ended on the way.'])
    return
  }
  try {
    const [text, html] = [letter.text, letter.html].map((part) => fillIn(part, { origin, secret })) as [string, string]
    await delivery.deliver({ messageId, to, subject, text, html })
  } catch (error) {
    const dead = error instanceof Undeliverable || attempts >= MOST_ATTEMPTS
    const next = new Date(now().getTime() + waitAfter(attempts))
    await settle(sending, id, holder, 'state = ?, next_at = ?, last_error = ?', [dead ? 'dead' : 'queued', next, sayError(error)])
    // Neither address nor words: a log is read by others than the letter is for.
    logger.warn({ mail: id, attempts, dead }, 'A letter was not taken')
    return
  }
  const forget = delivery.isTray ? '' : ', secret = NULL'
  await settle(sending, id, holder, `state = 'sent', sent_at = ?, last_error = NULL${forget}`, [now()])
}

/** Sends what is due, one letter after the other; returns how many were taken in hand. Several servers may do so at once. */
export async function sendDueMail(sending: Sending, delivery: Delivery, origin: string, closing?: AbortSignal): Promise<number> {
  let count = 0
  while (!closing?.aborted) {
    const holder = newId()
    const claimed = await claim(sending, delivery, holder)
    if (claimed === 'none') break
    // Another server was quicker: there may be more.
    if (claimed === 'lost') continue
    await send(sending, delivery, origin, holder, claimed)
    count += 1
  }
  return count
}

/** Sends until the server is asked to stop; resolves when the letter in hand is settled. */
export async function runMailWorker(context: AppContext, delivery: Delivery, origin: string): Promise<void> {
  const { closing, logger } = context
  while (!closing.aborted) {
    try {
      await sendDueMail(context, delivery, origin, closing)
    } catch (error) {
      // What was in hand comes back when its lease is over.
      logger.warn({ err: error }, 'The letters that are due could not be read')
    }
    await delay(IDLE_MILLISECONDS * (0.75 + Math.random() / 2), undefined, { signal: closing }).catch(() => undefined)
  }
  delivery.close()
}
