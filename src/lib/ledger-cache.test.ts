// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import type { SessionResponse } from '#shared/api/session'
import { recordedTest } from '../../tests/factories/recorded-test'
import { ids, names } from '../../tests/factories/test-press'
import { openCache } from './cache-database'
import { forgetSession, keepSession, readSession } from './kept-session'
import { areWhole, LedgerCache } from './ledger-cache'

const { entries } = recordedTest()
const testId = entries[0]?.ledgerId ?? ''
const at = new Date('2026-10-05T09:00:00Z')
const ledger = (count: number) => ({ ledgerId: testId, entries: entries.slice(0, count), people: names, sealedSeq: 0 })
const session = (id: string): SessionResponse => ({
  user: { id, name: names[id] ?? '', email: 'someone@shop.example' },
  shops: [],
  expiresAt: '2026-11-01T00:00:00.000Z',
})

let opened = 0
let name: string
let cache: LedgerCache
beforeEach(() => {
  opened += 1
  name = `cache-${opened}`
  cache = new LedgerCache(name)
})
/** The same disk, as the next page finds it. */
const nextPage = () => new LedgerCache(name)

describe('what a device keeps of a test', () => {
  it('is found again by the next page, with who wrote it and when the server was last heard', async () => {
    await cache.keep(testId, ledger(5), at)
    const kept = await nextPage().read(testId)
    expect(kept?.entries).toEqual(entries.slice(0, 5))
    expect(kept).toMatchObject({ ledgerId: testId, people: names, heardAt: at.toISOString() })
  })

  it('grows by what came after, and by what the server answered for to the outbox', async () => {
    await cache.keep(testId, ledger(3), at)
    await cache.keep(testId, ledger(4), at)
    await cache.add(testId, entries.slice(4, 6))
    expect((await nextPage().read(testId))?.entries.map(({ seq }) => seq)).toEqual([1, 2, 3, 4, 5, 6])
  })

  it('holds what lies behind a gap, which another device’s entry fills later', async () => {
    await cache.keep(testId, ledger(3), at)
    await cache.add(testId, entries.slice(4, 5))
    expect((await cache.read(testId))?.entries.map(({ seq }) => seq)).toEqual([1, 2, 3, 5])
    await cache.add(testId, entries.slice(3, 4))
    expect((await cache.read(testId))?.entries).toEqual(entries.slice(0, 5))
  })

  it('keeps nothing of a test that was never opened here', async () => {
    await cache.add(testId, entries.slice(0, 2))
    expect(await cache.read(testId)).toBeUndefined()
  })

  it.each([
    ['a reading was changed', { payload: { note: 'another' } }],
    ['an entry hangs on another one', { prevHash: 'f'.repeat(64) }],
    ['a hash was changed', { hash: 'e'.repeat(64) }],
  ])('is thrown away when %s', async (_what, change) => {
    await cache.keep(testId, ledger(5), at)
    const damaged = entries[2]
    if (!damaged) throw new Error('The recorded test has more than two entries.')
    await (await openCache(name)).put('entries', { ...damaged, ...change }, [testId, damaged.seq])
    expect(await cache.read(testId)).toBeUndefined()
    expect(await (await openCache(name)).count('entries')).toBe(0)
  })

  it('is not whole without its first entry', () => {
    expect(areWhole(entries.slice(1, 4))).toBe(false)
    expect(areWhole(entries)).toBe(true)
  })

  it('goes when nobody opened it for sixty days', async () => {
    await cache.keep(testId, ledger(5), at)
    const day = 24 * 3_600_000
    expect(await cache.readAll(new Date(at.getTime() + 59 * day))).toHaveLength(1)
    expect(await cache.readAll(new Date(at.getTime() + 61 * day))).toEqual([])
    expect(await cache.read(testId)).toBeUndefined()
  })

  it('remembers when the server was heard although it had nothing new', async () => {
    await cache.keep(testId, ledger(5), at)
    const later = new Date(at.getTime() + 60_000)
    await cache.heard(testId, later)
    expect((await nextPage().read(testId))?.heardAt).toBe(later.toISOString())
  })

  it('is nothing, and no failure, where the browser keeps nothing', async () => {
    const broken = vi.spyOn(indexedDB, 'open').mockImplementation(() => {
      throw new DOMException('Forbidden.', 'SecurityError')
    })
    expect(await cache.read(testId)).toBeUndefined()
    expect(await cache.readAll(at)).toEqual([])
    await cache.add(testId, entries)
    expect(await readSession(name)).toBeUndefined()
    broken.mockRestore()
  })
})

describe('who was signed in on a device', () => {
  it('is known to the next page until somebody signs out, and so are the tests', async () => {
    await keepSession(session(ids.lead), name)
    await cache.keep(testId, ledger(5), at)
    await keepSession(session(ids.lead), name)
    expect((await readSession(name))?.user.id).toBe(ids.lead)
    expect(await cache.read(testId)).toBeDefined()
    await forgetSession(name)
    expect(await readSession(name)).toBeUndefined()
    expect(await cache.read(testId)).toBeUndefined()
  })

  it('takes along what it opened when another person signs in', async () => {
    await keepSession(session(ids.lead), name)
    await cache.keep(testId, ledger(5), at)
    await keepSession(session(ids.witness), name)
    expect((await readSession(name))?.user.id).toBe(ids.witness)
    expect(await cache.read(testId)).toBeUndefined()
  })
})
