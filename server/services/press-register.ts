import type { Transaction } from 'sequelize'
import type { PressListQuery } from '#shared/api/presses'
import type { Work } from '../context'
import { Press } from '../models'
import { notFound } from '../problem'
import { equals, keysetPage, searchConditions, sortBy } from './keyset'
import type { KeysetPage } from './keyset'
import { authorize } from './membership'

/** A press as its row in the register says it. */
export type PressRecord = Omit<Press['_attributes'], 'ratedLoadNewton' | 'clearedToNewton' | 'headSeq'>

const columns: Record<keyof PressRecord, string> = {
  id: 'id',
  shopId: 'shop_id',
  name: 'name',
  whatFor: 'what_for',
  kind: 'kind',
  status: 'status',
  ratedLoadText: 'rated_load_text',
  ratedLoadUnit: 'rated_load_unit',
  clearedToText: 'cleared_to_text',
  clearedToUnit: 'cleared_to_unit',
  clearedUntil: 'cleared_until',
  jointCount: 'joint_count',
  jointsAccepted: 'joints_accepted',
  lastChangedAt: 'last_changed_at',
}
const sorts = { name: 'name', ratedLoad: 'rated_load_newton', lastChanged: 'last_changed_at' }

export async function listPresses({ transaction, actor }: Work, query: PressListQuery): Promise<KeysetPage<PressRecord>> {
  authorize(actor, 'press:read', { shopId: actor.shopId })
  return keysetPage<PressRecord>({
    model: Press,
    transaction,
    shopId: actor.shopId,
    columns,
    conditions: [...equals('status', query.status), ...searchConditions(query.search, ['name', 'what_for'])],
    sort: sortBy(query.sort, sorts),
    cursor: query.cursor,
    limit: query.limit,
  })
}

/** The shop that a press belongs to; undefined for an id that nobody gave out. */
export async function shopOfPress(id: string, transaction: Transaction): Promise<string | undefined> {
  return (await Press.findOne({ where: { id }, attributes: ['shopId'], raw: true, transaction }))?.shopId
}

export async function readPress({ transaction, actor }: Work, id: string): Promise<PressRecord> {
  const { shopId } = actor
  authorize(actor, 'press:read', { shopId })
  const press = await Press.findOne({ where: { id, shopId }, raw: true, transaction })
  if (press === null) throw notFound('This press')
  return press
}
