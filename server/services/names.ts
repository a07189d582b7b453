import type { Transaction } from 'sequelize'
import { User } from '../models'

/** Names of people by id, for entries that carry ids only. */
export async function namesOf(transaction: Transaction, ids: readonly string[]): Promise<Record<string, string>> {
  const users = await User.findAll({ where: { id: [...new Set(ids)] }, attributes: ['id', 'name'], raw: true, transaction })
  return Object.fromEntries(users.map((user) => [user.id, user.name]))
}
