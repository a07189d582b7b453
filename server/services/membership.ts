import type { Transaction } from 'sequelize'
import { can } from '#shared/policy'
import type { Action, Actor, Subject } from '#shared/policy'
import { Membership } from '../models'
import { forbidden, notFound } from '../problem'

interface Asked {
  transaction: Transaction
  userId: string
  shopId: string
}

/** The person's place in this shop, with role null for somebody who has none or whose membership has ended. */
export async function actorIn({ transaction, userId, shopId }: Asked): Promise<Actor> {
  const membership = await Membership.findOne({ where: { shopId, userId, endedAt: null }, attributes: ['role'], raw: true, transaction })
  return { userId, shopId, role: membership?.role ?? null }
}

/** The same for members; to anybody else the shop doesn't exist. */
export async function membershipOf(asked: Asked): Promise<Actor> {
  const actor = await actorIn(asked)
  if (actor.role === null) throw notFound('This shop')
  return actor
}

/** Throws 403 where `can` says no. Load the subject first and answer 404 if it is another shop's. */
export function authorize(actor: Actor, action: Action, subject: Subject): void {
  if (!can(actor, action, subject)) throw forbidden()
}
