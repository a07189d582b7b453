import type { Transaction } from 'sequelize'
import type { Role } from '#shared/policy'
import { Membership, TestGuest, User } from '../models'
import type { Recipient } from './queue'

async function addressesOf(userIds: readonly string[], transaction: Transaction): Promise<Recipient[]> {
  if (userIds.length === 0) return []
  const users = await User.findAll({ where: { id: [...new Set(userIds)] }, attributes: ['id', 'email'], raw: true, transaction })
  return users.map(({ id, email }) => ({ userId: id, email }))
}

/** People of a shop who have one of these roles now. */
export async function peopleWith(roles: readonly Role[], shopId: string, transaction: Transaction): Promise<Recipient[]> {
  const members = await Membership.findAll({
    where: { shopId, role: [...roles], endedAt: null },
    attributes: ['userId'],
    raw: true,
    transaction,
  })
  return addressesOf(
    members.map(({ userId }) => userId),
    transaction,
  )
}

/** Who leads and who witnesses a test, and the shop's owners: each once. */
export async function peopleOfRecord(
  people: { leadId: string | null; witnessId: string | null },
  shopId: string,
  transaction: Transaction,
): Promise<Recipient[]> {
  const owners = await Membership.findAll({
    where: { shopId, role: 'owner', endedAt: null },
    attributes: ['userId'],
    raw: true,
    transaction,
  })
  const ids = [people.leadId, people.witnessId, ...owners.map(({ userId }) => userId)]
  return addressesOf(
    ids.filter((id) => id !== null),
    transaction,
  )
}

/**
 * The one shop that a person has anything to do with, whose owner may see letters about the account; null where there
 * are several, since a link that opens the account of one shop's person would open another's doors too.
 */
export async function onlyShopOf(userId: string, transaction: Transaction): Promise<string | null> {
  const [members, guests] = [
    await Membership.findAll({ where: { userId }, attributes: ['shopId'], raw: true, transaction }),
    await TestGuest.findAll({ where: { userId }, attributes: ['shopId'], raw: true, transaction }),
  ]
  const shops = new Set([...members, ...guests].map(({ shopId }) => shopId))
  const [first] = shops
  return shops.size === 1 && first !== undefined ? first : null
}
