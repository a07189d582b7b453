import { setTimeout as delay } from 'node:timers/promises'
import { Op } from 'sequelize'
import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import { RESET_MINUTES } from '#shared/api/invitations'
import type { AppContext } from '../context'
import { inTransaction } from '../context'
import { passwordResetWanted } from '../mail/account-letters'
import { queueMail } from '../mail/queue'
import { onlyShopOf } from '../mail/recipients'
import { PasswordReset, Session, User } from '../models'
import { Problem } from '../problem'
import { tellOfPassword } from './password-notice'
import { hashPassword } from './passwords'
import { withinLimits } from './sign-in-limits'
import { hashOfToken, isTokenOf, newToken } from './tokens'

/** Letters to one account in an hour: more would only bury the one that counts. */
const MOST_AN_HOUR = 3
/** Every answer takes at least so long, so that it doesn't say whether a letter was written. */
const LEAST_MILLISECONDS = 300

async function queueReset(context: AppContext, transaction: Transaction, email: string): Promise<void> {
  const now = context.now()
  const user = await User.findOne({ where: { email }, transaction, lock: transaction.LOCK.UPDATE })
  if (user === null) return
  const since = new Date(now.getTime() - 3_600_000)
  const recent = await PasswordReset.count({ where: { userId: user.id, createdAt: { [Op.gt]: since } }, transaction })
  if (recent >= MOST_AN_HOUR) return
  const token = newToken()
  const expiresAt = new Date(now.getTime() + RESET_MINUTES * 60_000)
  const reset = await PasswordReset.create(
    { id: newId(), userId: user.id, tokenHash: hashOfToken(token), createdAt: now, expiresAt },
    { transaction },
  )
  await queueMail(
    { database: context.database, transaction, now },
    {
      kind: 'password-reset',
      shopId: await onlyShopOf(user.id, transaction),
      key: reset.id,
      to: { userId: user.id, email },
      letter: passwordResetWanted(user.name, expiresAt),
      secret: token,
    },
  )
}

/** Sends a link to the address if it has an account. Says nothing of whether it has. Limited as signing in is. */
export async function askForReset(context: AppContext, email: string, address: string): Promise<void> {
  await withinLimits(context, { email: `forgotten ${email}`, address }, () => Promise.resolve(undefined))
  await Promise.all([inTransaction(context, (transaction) => queueReset(context, transaction, email)), delay(LEAST_MILLISECONDS)])
}

const spent = (code: string, detail: string) => new Problem(410, code, `${detail} Ask for another one.`)

async function holding(transaction: Transaction, token: string, now: Date, lock = false): Promise<PasswordReset> {
  const reset = await PasswordReset.findOne({
    where: { tokenHash: hashOfToken(token) },
    transaction,
    ...(lock ? { lock: transaction.LOCK.UPDATE } : {}),
  })
  if (reset === null || !isTokenOf(token, reset.tokenHash)) throw spent('unknown-link', 'This link is not one of ours, or not whole.')
  if (reset.usedAt !== null) throw spent('used', 'This link was used already.')
  if (reset.expiresAt <= now) throw spent('expired', 'This link has run out: it holds for an hour.')
  return reset
}

export async function lookAtReset(context: AppContext, token: string): Promise<void> {
  await inTransaction(context, (transaction) => holding(transaction, token, context.now()), { idempotent: true })
}

/** Sets the new password; every session ends, every other link too, and the address is told. */
export async function useReset(context: AppContext, token: string, newPassword: string): Promise<void> {
  await lookAtReset(context, token)
  const passwordHash = await hashPassword(newPassword, context.config.bcryptCost)
  await inTransaction(context, async (transaction) => {
    const now = context.now()
    const reset = await holding(transaction, token, now, true)
    const { userId } = reset
    await User.update({ passwordHash }, { where: { id: userId }, transaction })
    await PasswordReset.update({ usedAt: now }, { where: { userId, usedAt: null }, transaction })
    await Session.update({ endedAt: now }, { where: { userId, endedAt: null }, transaction })
    const user = await User.findByPk(userId, { attributes: ['id', 'name', 'email'], raw: true, transaction })
    if (user) await tellOfPassword({ database: context.database, transaction, now }, user, reset.id, 'reset')
  })
}
