import type { Transaction } from 'sequelize'
import type { TestListQuery } from '#shared/api/proof-tests'
import type { Work } from '../context'
import { ProofTest } from '../models'
import { notFound } from '../problem'
import { equals, keysetPage, searchConditions, sortBy } from './keyset'
import type { Condition, KeysetPage } from './keyset'
import { authorize } from './membership'

/** A proof test as its row in the register says it. */
export type TestRecord = Omit<ProofTest['_attributes'], 'ratedLoadNewton' | 'numberIndex' | 'headSeq'>

const columns: Record<keyof TestRecord, string> = {
  id: 'id',
  shopId: 'shop_id',
  number: 'number',
  pressId: 'press_id',
  pressName: 'press_name',
  protocolName: 'protocol_name',
  status: 'status',
  result: 'result',
  ratedLoadText: 'rated_load_text',
  ratedLoadUnit: 'rated_load_unit',
  reachedPercent: 'reached_percent',
  stoppedAtPercent: 'stopped_at_percent',
  leadId: 'lead_id',
  leadName: 'lead_name',
  witnessId: 'witness_id',
  witnessName: 'witness_name',
  openedAt: 'opened_at',
  concludedAt: 'concluded_at',
  sealedAt: 'sealed_at',
}
const sorts = { opened: 'opened_at', number: 'number_index', press: 'press_name' }
const searched = ['number', 'press_name', 'lead_name', 'witness_name']

const minute = 60_000
const day = 24 * 60 * minute

/** Days begin and end where the reader is: `zone` is what the reader's clock is behind UTC, in minutes. */
function openedBetween({ from, to, zone }: TestListQuery): Condition[] {
  const start = (date: string) => Date.parse(`${date}T00:00:00Z`) + zone * minute
  return [
    ...(from === undefined ? [] : [{ sql: 'opened_at >= ?', values: [new Date(start(from))] }]),
    ...(to === undefined ? [] : [{ sql: 'opened_at < ?', values: [new Date(start(to) + day)] }]),
  ]
}

export async function listProofTests({ transaction, actor }: Work, query: TestListQuery): Promise<KeysetPage<TestRecord>> {
  authorize(actor, 'proof-test:read', { shopId: actor.shopId })
  return keysetPage<TestRecord>({
    model: ProofTest,
    transaction,
    shopId: actor.shopId,
    columns,
    conditions: [
      ...equals('press_id', query.press),
      ...equals('result', query.result),
      ...equals('status', query.status),
      ...equals('lead_id', query.lead),
      ...openedBetween(query),
      ...searchConditions(query.search, searched),
    ],
    sort: sortBy(query.sort, sorts),
    cursor: query.cursor,
    limit: query.limit,
  })
}

/** The shop that a proof test belongs to; undefined for an id that nobody gave out. */
export async function shopOfProofTest(id: string, transaction: Transaction): Promise<string | undefined> {
  return (await ProofTest.findOne({ where: { id }, attributes: ['shopId'], raw: true, transaction }))?.shopId
}

export async function readProofTest({ transaction, actor }: Work, id: string): Promise<TestRecord> {
  const { shopId } = actor
  authorize(actor, 'proof-test:read', { shopId, testId: id })
  const test = await ProofTest.findOne({ where: { id, shopId }, raw: true, transaction })
  if (test === null) throw notFound('This proof test')
  return test
}
