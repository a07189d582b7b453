import { UniqueConstraintError } from 'sequelize'
import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { InstrumentListQuery } from '#shared/api/instruments'
import { instrumentDetailsSchema } from '#shared/instruments/model'
import type { Calibration, FrozenInstrument, InstrumentDetails } from '#shared/instruments/model'
import type { Work } from '../context'
import { Instrument } from '../models'
import { conflict, invalid, notFound } from '../problem'
import { calibrationsInForce, calibrationsOf } from './calibrations'
import type { DatedCalibration } from './calibrations'
import { equals, keysetPage, searchConditions, sortBy } from './keyset'
import type { KeysetPage } from './keyset'
import { authorize } from './membership'

export interface InstrumentInShop {
  id: string
  details: InstrumentDetails
  calibration: Calibration | null
  retired: boolean
}

type Stored = Pick<Instrument, 'id' | 'details' | 'retiredAt'>

const sorts = { code: 'code', due: 'due_on' } as const
const kindWords = { gauge: 'a pressure gauge', 'load-cell': 'a load cell', indicator: 'an indicator' } as const

/** The shop that an instrument belongs to; undefined for an id that nobody gave out. */
export async function shopOfInstrument(id: string, transaction: Transaction): Promise<string | undefined> {
  return (await Instrument.findOne({ where: { id }, attributes: ['shopId'], raw: true, transaction }))?.shopId
}

async function withCalibrations(shopId: string, stored: readonly Stored[], transaction: Transaction): Promise<InstrumentInShop[]> {
  const inForce = await calibrationsInForce(
    shopId,
    stored.map((one) => one.id),
    transaction,
  )
  return stored.map((one) => ({
    id: one.id,
    details: instrumentDetailsSchema.parse(one.details),
    calibration: inForce.get(one.id) ?? null,
    retired: one.retiredAt !== null,
  }))
}

export async function listInstruments({ transaction, actor }: Work, query: InstrumentListQuery): Promise<KeysetPage<InstrumentInShop>> {
  const { shopId } = actor
  authorize(actor, 'instrument:read', { shopId })
  const page = await keysetPage<Stored>({
    model: Instrument,
    transaction,
    shopId,
    columns: { details: 'details', retiredAt: 'retired_at' },
    conditions: [
      { sql: query.retired === 'yes' ? 'retired_at IS NOT NULL' : 'retired_at IS NULL', values: [] },
      ...equals('kind', query.kind),
      ...searchConditions(query.search, ['code', 'description']),
    ],
    sort: sortBy(query.sort, sorts),
    cursor: query.cursor,
    limit: query.limit,
  })
  return { ...page, rows: await withCalibrations(shopId, page.rows, transaction) }
}

/** The instrument under its row lock, for what changes it. */
export async function lockInstrument({ transaction, actor }: Work, id: string): Promise<Instrument> {
  const instrument = await Instrument.findOne({ where: { id, shopId: actor.shopId }, transaction, lock: transaction.LOCK.UPDATE })
  if (instrument === null) throw notFound('This instrument')
  return instrument
}

export interface InstrumentWithHistory {
  shopId: string
  instrument: InstrumentInShop
  calibrations: DatedCalibration[]
}

export async function readInstrument({ transaction, actor }: Work, id: string): Promise<InstrumentWithHistory> {
  const { shopId } = actor
  authorize(actor, 'instrument:read', { shopId })
  const stored = await Instrument.findOne({ where: { id, shopId }, raw: true, transaction })
  if (stored === null) throw notFound('This instrument')
  const calibrations = await calibrationsOf(stored, transaction)
  const details = instrumentDetailsSchema.parse(stored.details)
  const calibration = calibrations[0]?.calibration ?? null
  return { shopId, instrument: { id, details, calibration, retired: stored.retiredAt !== null }, calibrations }
}

async function refusingTakenCode<T>(code: string, write: () => Promise<T>): Promise<T> {
  try {
    return await write()
  } catch (error) {
    if (error instanceof UniqueConstraintError) {
      throw invalid({ code: `Another instrument of this shop has the code ${code}, in use or retired. Give this one a code of its own.` })
    }
    throw error
  }
}

export async function addInstrument({ transaction, actor, now }: Work, details: InstrumentDetails): Promise<string> {
  const { shopId } = actor
  authorize(actor, 'instrument:write', { shopId })
  const { code, kind, description } = details
  const instrument = await refusingTakenCode(code, () =>
    Instrument.create({ id: newId(), shopId, code, kind, description, details, createdAt: now }, { transaction }),
  )
  return instrument.id
}

/** What a test froze stays as it was; a change counts from the next test on. */
export async function changeInstrument(work: Work, id: string, details: InstrumentDetails): Promise<void> {
  const { transaction, actor } = work
  authorize(actor, 'instrument:write', { shopId: actor.shopId })
  const instrument = await lockInstrument(work, id)
  if (instrument.retiredAt !== null) throw conflict('retired', 'This instrument is retired. Bring it back into use first.')
  if (instrument.kind !== details.kind) {
    throw invalid({
      kind: `This is ${kindWords[instrument.kind]} and stays one: its calibrations are in that quantity. Enter the other as a new instrument.`,
    })
  }
  const { code, description } = details
  await refusingTakenCode(code, () => instrument.update({ code, description, details }, { transaction }))
}

export async function retireInstrument(work: Work, id: string, retired: boolean): Promise<void> {
  const { transaction, actor, now } = work
  authorize(actor, 'instrument:write', { shopId: actor.shopId })
  const instrument = await lockInstrument(work, id)
  // Asked twice, the first day stays.
  await instrument.update({ retiredAt: retired ? (instrument.retiredAt ?? now) : null }, { transaction })
}

/** The instruments as a test freezes them, in the order asked, each with the calibration in force now. */
export async function instrumentsForTest({ transaction, actor }: Work, ids: readonly string[]): Promise<FrozenInstrument[]> {
  const { shopId } = actor
  const stored = await Instrument.findAll({
    where: { shopId, id: [...ids] },
    attributes: ['id', 'details', 'retiredAt'],
    raw: true,
    transaction,
  })
  const found = new Map((await withCalibrations(shopId, stored, transaction)).map((one) => [one.id, one]))
  return ids.map((id) => {
    const instrument = found.get(id)
    if (instrument === undefined) throw notFound('One of the instruments')
    if (instrument.retired)
      throw conflict('retired', `${instrument.details.code} is retired. Choose another instrument, or bring it back into use.`)
    return { id, details: instrument.details, calibration: instrument.calibration }
  })
}
