import { describe, expect, it } from 'vitest'
import { DatabaseError, ConnectionRefusedError } from 'sequelize'
import type { Sequelize, Transaction } from 'sequelize'
import { passingReason, runTransaction } from './transaction'

function databaseError(errno: number, code = ''): DatabaseError {
  const original = Object.assign(new Error(`errno ${errno}`), { errno, code, sql: '' })
  return new DatabaseError(original)
}

/** Gives each transaction the failure that was set for its turn: before COMMIT, or in it. */
class FakeDatabase {
  ran = 0
  constructor(private readonly failures: ({ in: 'work' | 'commit'; error: Error } | null)[]) {}

  async transaction(_options: object, work: (transaction: Transaction) => Promise<unknown>): Promise<unknown> {
    this.ran += 1
    const failure = this.failures.shift()
    if (failure?.in === 'work') throw failure.error
    const result = await work({} as Transaction)
    if (failure?.in === 'commit') throw failure.error
    return result
  }

  asSequelize(): Sequelize {
    return this as unknown as Sequelize
  }
}

const lost = databaseError(45009, 'ER_SOCKET_UNEXPECTED_CLOSE')
const deadlock = databaseError(1213)
const done = () => Promise.resolve('done')

describe('why a transaction may be run again', () => {
  it.each([
    [1213, 'taken-back'],
    [1205, 'taken-back'],
    [1047, 'went-away'],
    [1180, 'went-away'],
    [1053, 'went-away'],
    [45009, 'went-away'],
    [1062, undefined],
    [1045, undefined],
  ])('the database said %i: %s', (errno, reason) => {
    expect(passingReason(databaseError(errno))).toBe(reason)
  })

  it('nobody answered', () => {
    expect(passingReason(new ConnectionRefusedError(Object.assign(new Error('x'), { code: 'ECONNREFUSED' })))).toBe('went-away')
    expect(passingReason(new Error('something else'))).toBeUndefined()
  })
})

describe('a transaction', () => {
  it('runs again when the database took it back, in COMMIT too, whatever it does', async () => {
    const database = new FakeDatabase([{ in: 'work', error: deadlock }, { in: 'commit', error: deadlock }, null])
    expect(await runTransaction(database.asSequelize(), { idempotent: false }, done)).toBe('done')
    expect(database.ran).toBe(3)
  })

  it('runs again when the connection broke before COMMIT: nothing was written', async () => {
    const database = new FakeDatabase([{ in: 'work', error: lost }, null])
    expect(await runTransaction(database.asSequelize(), { idempotent: false }, done)).toBe('done')
  })

  it('runs again after a broken COMMIT only where that changes nothing', async () => {
    const harmless = new FakeDatabase([{ in: 'commit', error: lost }, null])
    expect(await runTransaction(harmless.asSequelize(), { idempotent: true }, done)).toBe('done')
    const once = new FakeDatabase([{ in: 'commit', error: lost }, null])
    await expect(runTransaction(once.asSequelize(), { idempotent: false }, done)).rejects.toMatchObject({
      code: 'outcome-unknown',
      status: 503,
    })
    expect(once.ran).toBe(1)
  })

  it('does not run again for what trying again cannot mend', async () => {
    const database = new FakeDatabase([{ in: 'work', error: databaseError(1062) }, null])
    await expect(runTransaction(database.asSequelize(), { idempotent: true }, done)).rejects.toThrow()
    expect(database.ran).toBe(1)
  })
})
