import type { Transaction } from 'sequelize'
import { can, isGuestOf } from '#shared/policy'
import type { Action, Actor, Subject } from '#shared/policy'
import { Membership, TestGuest } from '../models'
import { forbidden, notFound } from '../problem'

interface Asked {
  transaction: Transaction
  userId: string
  shopId: string
}

/**
 * The person's place in this shop, with role null for somebody who has none or whose membership has ended; with the tests
 * that they witness from outside, where their role alone would not let them.
 */
export async function actorIn({ transaction, userId, shopId }: Asked): Promise<Actor> {
  const membership = await Membership.findOne({ where: { shopId, userId, endedAt: null }, attributes: ['role'], raw: true, transaction })
  const role = membership?.role ?? null
  if (role !== null && role !== 'crew') return { userId, shopId, role }
  const guests = await TestGuest.findAll({ where: { shopId, userId, endedAt: null }, attributes: ['proofTestId'], raw: true, transaction })
  return { userId, shopId, role, guestOf: guests.flatMap(({ proofTestId }) => proofTestId ?? []) }
}

/** The same for members; to anybody else the shop doesn't exist. */
export async function membershipOf(asked: Asked): Promise<Actor> {
  const actor = await actorIn(asked)
  if (actor.role === null) throw notFound('This shop')
  return actor
}

/** For one test: its shop's members, and the outside witness who was invited to it. To anybody else it doesn't exist. */
export async function readerOfTest(asked: Asked, testId: string): Promise<Actor> {
  const actor = await actorIn(asked)
  if (actor.role === null && !isGuestOf(actor, testId)) throw notFound('This proof test')
  return actor
}

/** Throws 403 where `can` says no. Load the subject first and answer 404 if it is another shop's. */
export function authorize(actor: Actor, action: Action, subject: Subject): void {
  if (!can(actor, action, subject)) throw forbidden()
}
