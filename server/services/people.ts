import { UniqueConstraintError } from 'sequelize'
import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { AddPersonRequest, ChangePersonRequest } from '#shared/api/people'
import type { Work } from '../context'
import { Membership, User } from '../models'
import { conflict, invalid, notFound } from '../problem'
import { authorize } from './membership'

export interface PersonInShop {
  user: Pick<User, 'id' | 'name' | 'email'>
  membership: Membership
}

async function withUsers(memberships: Membership[], transaction: Transaction): Promise<PersonInShop[]> {
  const users = await User.findAll({
    where: { id: memberships.map((one) => one.userId) },
    attributes: ['id', 'name', 'email'],
    raw: true,
    transaction,
  })
  const byId = new Map(users.map((user) => [user.id, user]))
  return memberships.flatMap((membership) => {
    const user = byId.get(membership.userId)
    return user === undefined ? [] : [{ user, membership }]
  })
}

/** Members first, then those who left, each by name. */
export async function listPeople({ transaction, actor }: Work): Promise<PersonInShop[]> {
  authorize(actor, 'people:list', { shopId: actor.shopId })
  const people = await withUsers(await Membership.findAll({ where: { shopId: actor.shopId }, transaction }), transaction)
  const hasLeft = (person: PersonInShop) => Number(person.membership.endedAt !== null)
  return people.sort((a, b) => hasLeft(a) - hasLeft(b) || a.user.name.localeCompare(b.user.name) || a.user.id.localeCompare(b.user.id))
}

/** The account of an address: the one that exists, else a new one with this name and password. */
export async function accountFor(
  { transaction, now }: Pick<Work, 'transaction' | 'now'>,
  person: Pick<AddPersonRequest, 'email' | 'name'>,
  passwordHash: string,
): Promise<User> {
  const existing = await User.findOne({ where: { email: person.email }, transaction })
  if (existing !== null) return existing
  try {
    return await User.create({ id: newId(), email: person.email, name: person.name, passwordHash, createdAt: now }, { transaction })
  } catch (error) {
    // Somebody else made the account a moment ago.
    const raced = error instanceof UniqueConstraintError ? await User.findOne({ where: { email: person.email }, transaction }) : null
    if (raced === null) throw error
    return raced
  }
}

/** Takes the hash, made before the transaction begins: it takes too long to hold one open. */
export async function addPerson(work: Work, person: Omit<AddPersonRequest, 'password'>, passwordHash: string): Promise<PersonInShop> {
  const { transaction, actor, now } = work
  authorize(actor, 'people:add', { shopId: actor.shopId })
  const user = await accountFor(work, person, passwordHash)
  const where = { shopId: actor.shopId, userId: user.id }
  const former = await Membership.findOne({ where, transaction, lock: transaction.LOCK.UPDATE })
  if (former !== null && former.endedAt === null) throw invalid({ email: 'This person belongs to the shop already.' })
  try {
    const membership =
      former === null
        ? await Membership.create({ ...where, role: person.role, createdAt: now, endedAt: null }, { transaction })
        : await former.update({ role: person.role, endedAt: null }, { transaction })
    return { user, membership }
  } catch (error) {
    if (error instanceof UniqueConstraintError) throw invalid({ email: 'This person belongs to the shop already.' })
    throw error
  }
}

/** Another role, or the end of the membership. A shop keeps an owner at all times. */
export async function changePerson({ transaction, actor, now }: Work, userId: string, change: ChangePersonRequest): Promise<PersonInShop> {
  authorize(actor, change.ended === true ? 'people:end' : 'people:change-role', { shopId: actor.shopId })
  // All owners are locked first, so that two of them can't step down at once.
  const owners = await Membership.findAll({
    where: { shopId: actor.shopId, role: 'owner', endedAt: null },
    transaction,
    lock: transaction.LOCK.UPDATE,
  })
  const membership = await Membership.findOne({
    where: { shopId: actor.shopId, userId, endedAt: null },
    transaction,
    lock: transaction.LOCK.UPDATE,
  })
  if (membership === null) throw notFound('This person')
  const remainsOwner = change.ended !== true && change.role === 'owner'
  if (!remainsOwner && owners.length === 1 && owners[0]?.userId === userId) {
    throw conflict('last-owner', 'A shop needs an owner. Make somebody else owner first.')
  }
  await membership.update(change.ended === true ? { endedAt: now } : { role: change.role }, { transaction })
  const [person] = await withUsers([membership], transaction)
  if (person === undefined) throw notFound('This person')
  return person
}
