import type { Transaction } from 'sequelize'
import type { GuestTest } from '#shared/api/session'
import { can } from '#shared/policy'
import type { Work } from '../context'
import { Press, ProofTest, Shop, TestGuest, User } from '../models'

interface Bound {
  userId: string
  pressId: string
  testId: string
}

/**
 * Gives an outside witness their one test: it was the press's next until now. Answers the printed name; null for
 * somebody who did not accept for this press.
 */
export async function bindGuest({ transaction, actor }: Work, { userId, pressId, testId }: Bound): Promise<string | null> {
  const { shopId } = actor
  const guest = await TestGuest.findOne({
    where: { shopId, userId, pressId, proofTestId: null, endedAt: null },
    order: [['createdAt', 'ASC']],
    transaction,
    lock: transaction.LOCK.UPDATE,
  })
  const user = guest && (await User.findByPk(userId, { attributes: ['name'], raw: true, transaction }))
  if (!guest || !user) return null
  // The policy has the last word here as everywhere.
  const asGuest = { userId, shopId, role: null, guestOf: [testId] }
  if (!can(asGuest, 'proof-test:be-witness', { shopId, testId })) return null
  await guest.update({ proofTestId: testId }, { transaction })
  return user.name
}

/** The tests that this person witnesses from outside, the latest first, with what stands on their first screen. */
export async function guestTestsOf(userId: string, transaction?: Transaction): Promise<GuestTest[]> {
  const guests = await TestGuest.findAll({ where: { userId, endedAt: null }, order: [['createdAt', 'DESC']], raw: true, transaction })
  const named = <M>(rows: readonly M[], key: (row: M) => string) => new Map(rows.map((row) => [key(row), row]))
  if (guests.length === 0) return []
  const shops = named(
    await Shop.findAll({ where: { id: guests.map((one) => one.shopId) }, attributes: ['id', 'name'], raw: true, transaction }),
    (shop) => shop.id,
  )
  const presses = named(
    await Press.findAll({ where: { id: guests.map((one) => one.pressId) }, attributes: ['id', 'name'], raw: true, transaction }),
    (press) => press.id,
  )
  const tests = named(
    await ProofTest.findAll({
      where: { id: guests.flatMap((one) => one.proofTestId ?? []) },
      attributes: ['id', 'number', 'status'],
      raw: true,
      transaction,
    }),
    (test) => test.id,
  )
  return guests.map(({ shopId, pressId, proofTestId }) => {
    const test = tests.get(proofTestId ?? '')
    return {
      shopId,
      shopName: shops.get(shopId)?.name ?? '',
      pressName: presses.get(pressId)?.name ?? '',
      test: test === undefined ? null : { proofTestId: test.id, number: test.number, status: test.status },
    }
  })
}
