import { QueryTypes } from 'sequelize'
import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import { beforeAll, describe, expect, it } from 'vitest'
import { testListQuerySchema } from '#shared/api/proof-tests'
import type { TestListQuery } from '#shared/api/proof-tests'
import { FIRST_PREV_HASH } from '#shared/ledger/chain'
import { inTransaction } from '#server/context'
import { Ledger, ProofTest } from '#server/models/index'
import { listProofTests } from '#server/services/proof-test-register'
import { openStaffedShop } from '../factories/people'
import { makePressRow } from '../factories/register-rows'
import { testServer } from '../support/api-server'

const TESTS = 4_000
let shopId: string
let userId: string

beforeAll(async () => {
  const { lead, witness } = await openStaffedShop()
  shopId = lead.shopId
  userId = lead.userId
  const pressId = await makePressRow(shopId)
  const rows = Array.from({ length: TESTS }, (_, index) => ({ id: newId(), number: index + 1 }))
  const createdAt = new Date()
  const ledger = { shopId, subject: 'proof-test' as const, headSeq: 0, headHash: FIRST_PREV_HASH, createdAt }
  await Ledger.bulkCreate(rows.map(({ id }) => ({ ...ledger, id })))
  await ProofTest.bulkCreate(
    rows.map(({ id, number }) => ({
      id,
      shopId,
      number: `PT-${number}`,
      numberIndex: number,
      pressId,
      pressName: 'Press 2',
      protocolName: 'First load by quarters',
      status: 'signed',
      result: 'accepted',
      ratedLoadNewton: 100_000,
      ratedLoadText: '100',
      ratedLoadUnit: 'kN',
      reachedPercent: 100,
      stoppedAtPercent: null,
      leadId: lead.userId,
      leadName: lead.name,
      witnessId: witness.userId,
      witnessName: witness.name,
      openedAt: new Date(Date.parse('2024-01-01T00:00:00Z') + number * 3_600_000),
      concludedAt: null,
      sealedAt: null,
      headSeq: 1,
    })),
  )
  await testServer().context.database.query('ANALYZE TABLE proof_tests')
}, 60_000)

/** Rows and index entries that this connection has read so far. */
async function readSoFar(transaction: Transaction): Promise<number> {
  const rows = await testServer().context.database.query<{ Value: string }>("SHOW SESSION STATUS LIKE 'Handler_read_%'", {
    type: QueryTypes.SELECT,
    transaction,
  })
  return rows.reduce((sum, { Value }) => sum + Number(Value), 0)
}

describe('a page of a long register', () => {
  it.each(['-opened', 'opened', '-number'] as const)('reads little more than it shows, wherever it lies, in order of %s', async (sort) => {
    const { database } = testServer().context
    const reads: number[] = []
    await inTransaction({ database }, async (transaction) => {
      const work = { transaction, actor: { userId, shopId, role: 'lead' as const }, now: new Date() }
      let cursor: string | undefined
      let shown = 0
      do {
        const query: TestListQuery = testListQuerySchema.parse({ shop: shopId, sort, limit: 100, cursor })
        const before = await readSoFar(transaction)
        const page = await listProofTests(work, query)
        reads.push((await readSoFar(transaction)) - before)
        shown += page.rows.length
        cursor = page.older ?? undefined
      } while (cursor !== undefined)
      expect(shown).toBe(TESTS)
    })
    expect(reads).toHaveLength(TESTS / 100)
    expect(Math.max(...reads)).toBeLessThan(300)
  })
})
