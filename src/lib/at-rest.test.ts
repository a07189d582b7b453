// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { afterEach, beforeEach, expect, it, vi } from 'vitest'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { recordedTest } from '../../tests/factories/recorded-test'
import { names } from '../../tests/factories/test-press'
import { isAtRest } from './at-rest'
import { files } from './attachments'
import { forgetSession } from './kept-session'
import { ledgerCache } from './ledger-cache'
import { outbox } from './outbox'

const { entries } = recordedTest()
const testId = entries[0]?.ledgerId ?? ''
const now = new Date()
/** Up to the first row under load, and up to the release after it. */
const underLoad = entries.slice(0, entries.findIndex(({ kind }) => kind === 'row-read') + 1)
const released = entries.slice(0, entries.findIndex(({ kind }, index) => kind === 'released' && index >= underLoad.length) + 1)

const keep = (some: readonly LedgerEntry[]) =>
  ledgerCache.keep(testId, { ledgerId: testId, entries: some, people: names, sealedSeq: 0 }, now)

/** The server, with the test as far as it has come. */
function serve(some: readonly LedgerEntry[] | null): void {
  vi.stubGlobal('fetch', (url: string) => {
    if (some === null) return Promise.reject(new TypeError('Failed to fetch'))
    const after = Number(new URL(url, 'http://shop.example').searchParams.get('after'))
    const head = { headSeq: some.length, headHash: some.at(-1)?.hash ?? '' }
    const body = { ledgerId: testId, entries: some.filter(({ seq }) => seq > after), ...head, people: names, sealed: [] }
    return Promise.resolve(new Response(JSON.stringify(body), { status: 200 }))
  })
}

beforeEach(async () => {
  await forgetSession()
  outbox.summary()
  await vi.waitFor(() => expect(outbox.summary().loaded).toBe(true))
})
afterEach(() => vi.unstubAllGlobals())

it('a device that knows of no load may be disturbed', async () => {
  serve(null)
  expect(await isAtRest(now)).toBe(true)
  await keep(released)
  expect(await isAtRest(now)).toBe(true)
})

it('a device that knows of a load may not, when the server says so too, or says nothing', async () => {
  await keep(underLoad)
  serve(underLoad)
  expect(await isAtRest(now)).toBe(false)
  serve(null)
  expect(await isAtRest(now)).toBe(false)
})

it('a load that came off on another device meanwhile is none', async () => {
  await keep(underLoad)
  serve(released)
  expect(await isAtRest(now)).toBe(true)
})

it('a device with a photo that the server waits for may not, until the server has it', async () => {
  const bytes = new TextEncoder().encode('a photo')
  const attachment = { sha256: 'd'.repeat(64), type: 'image/jpeg' as const, size: bytes.length }
  serve(null)
  await files.keep(`ledger:${testId}`, { attachment, bytes })
  expect(await isAtRest(now)).toBe(true)
  await files.named(`ledger:${testId}`, [attachment.sha256])
  expect(await isAtRest(now)).toBe(false)
  serve([])
  files.sendNow()
  await files.settled()
  expect(await isAtRest(now)).toBe(true)
})

it('a device with an entry that waits to be sent may not', async () => {
  serve(null)
  const entry = { ledgerId: testId, kind: 'observed', payload: { note: 'a creak' }, authorId: entries[0]?.authorId ?? '', basedOnSeq: 1 }
  await outbox.enqueue(testId, entry)
  expect(await isAtRest(now)).toBe(false)
})
