import { UniqueConstraintError } from 'sequelize'
import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { ToolingListQuery } from '#shared/api/tooling'
import type { TrainPart } from '#shared/press/model'
import { toolingDetailsSchema, type ToolingDetails } from '#shared/tooling'
import type { Work } from '../context'
import { Tooling } from '../models'
import { conflict, invalid, notFound } from '../problem'
import { keysetPage, searchConditions, sortBy } from './keyset'
import type { KeysetPage } from './keyset'
import { authorize } from './membership'

export interface ToolingInShop {
  id: string
  details: ToolingDetails
  retired: boolean
}

type Stored = Pick<Tooling, 'id' | 'details' | 'retiredAt'>

const inShop = ({ id, details, retiredAt }: Stored): ToolingInShop => ({
  id,
  details: toolingDetailsSchema.parse(details),
  retired: retiredAt !== null,
})

/** The shop that a piece belongs to; undefined for an id that nobody gave out. */
export async function shopOfTooling(id: string, transaction: Transaction): Promise<string | undefined> {
  return (await Tooling.findOne({ where: { id }, attributes: ['shopId'], raw: true, transaction }))?.shopId
}

export async function listTooling({ transaction, actor }: Work, query: ToolingListQuery): Promise<KeysetPage<ToolingInShop>> {
  const { shopId } = actor
  authorize(actor, 'tooling:read', { shopId })
  const page = await keysetPage<Stored>({
    model: Tooling,
    transaction,
    shopId,
    columns: { details: 'details', retiredAt: 'retired_at' },
    conditions: [
      { sql: query.retired === 'yes' ? 'retired_at IS NOT NULL' : 'retired_at IS NULL', values: [] },
      ...searchConditions(query.search, ['code', 'name']),
    ],
    sort: sortBy(query.sort, { code: 'code' }),
    cursor: query.cursor,
    limit: query.limit,
  })
  return { ...page, rows: page.rows.map(inShop) }
}

export async function readTooling({ transaction, actor }: Work, id: string): Promise<{ shopId: string; tooling: ToolingInShop }> {
  const { shopId } = actor
  authorize(actor, 'tooling:read', { shopId })
  const stored = await Tooling.findOne({ where: { id, shopId }, raw: true, transaction })
  if (stored === null) throw notFound('This piece of tooling')
  return { shopId, tooling: inShop(stored) }
}

async function lockTooling({ transaction, actor }: Work, id: string): Promise<Tooling> {
  const tooling = await Tooling.findOne({ where: { id, shopId: actor.shopId }, transaction, lock: transaction.LOCK.UPDATE })
  if (tooling === null) throw notFound('This piece of tooling')
  return tooling
}

async function refusingTakenCode<T>(code: string, write: () => Promise<T>): Promise<T> {
  try {
    return await write()
  } catch (error) {
    if (!(error instanceof UniqueConstraintError)) throw error
    throw invalid({ code: `Another piece of this shop has the number ${code}, in use or retired. Give this one a number of its own.` })
  }
}

export async function addTooling({ transaction, actor, now }: Work, details: ToolingDetails): Promise<string> {
  const { shopId } = actor
  authorize(actor, 'tooling:write', { shopId })
  const { code, name } = details
  const made = await refusingTakenCode(code, () =>
    Tooling.create({ id: newId(), shopId, code, name, details, createdAt: now }, { transaction }),
  )
  return made.id
}

/** What a test froze stays as it was; a change counts from the next test on. */
export async function changeTooling(work: Work, id: string, details: ToolingDetails): Promise<void> {
  const { transaction, actor } = work
  authorize(actor, 'tooling:write', { shopId: actor.shopId })
  const tooling = await lockTooling(work, id)
  if (tooling.retiredAt !== null) throw conflict('retired', 'This piece is retired. Bring it back into use first.')
  const { code, name } = details
  await refusingTakenCode(code, () => tooling.update({ code, name, details }, { transaction }))
}

export async function retireTooling(work: Work, id: string, retired: boolean): Promise<void> {
  const { transaction, actor, now } = work
  authorize(actor, 'tooling:write', { shopId: actor.shopId })
  const tooling = await lockTooling(work, id)
  // Asked twice, the first day stays.
  await tooling.update({ retiredAt: retired ? (tooling.retiredAt ?? now) : null }, { transaction })
}

/** Pieces of the register as parts of the train that a test freezes, each with its own rating. */
export async function toolingForTest({ transaction, actor }: Work, ids: readonly string[]): Promise<TrainPart[]> {
  const stored = await Tooling.findAll({ where: { shopId: actor.shopId, id: [...ids] }, raw: true, transaction })
  return ids.map((id) => {
    const piece = stored.find((one) => one.id === id)
    if (piece === undefined) throw invalid({ toolingIds: 'One of these pieces is not in this shop’s register. Choose from the list.' })
    const { details, retired } = inShop(piece)
    if (retired) throw invalid({ toolingIds: `${details.code} is retired. Choose another piece, or bring it back into use.` })
    return { id, kind: 'tooling', name: `${details.code} ${details.name}`.slice(0, 80), ratedForce: details.ratedLoad, ratedPressure: null }
  })
}
