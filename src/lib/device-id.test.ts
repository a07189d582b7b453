// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { afterEach, expect, it, vi } from 'vitest'
import { openDB } from 'idb'
import { LedgerDouble } from '../../tests/support/ledger-double'
import type { NewEntry, Outbox } from './outbox'

const ledgerId = '01990000-0000-7000-8000-000000000001'
const lead = '01990000-0000-7000-8000-000000000003'
const creak: NewEntry = { ledgerId, kind: 'observed', payload: { note: 'a creak' }, authorId: lead, basedOnSeq: 1 }

const opened: Outbox[] = []
/** The page as it is loaded anew: nothing but what the disk holds. */
async function load(databaseName: string) {
  vi.resetModules()
  const outbox = await import('./outbox')
  const entry = await import('./entry')
  const server = new LedgerDouble(lead)
  const box = new outbox.Outbox({ databaseName, post: server.post, whoIsSignedIn: server.whoIsSignedIn, delay: () => 5 })
  opened.push(box)
  return { box, ...entry }
}
afterEach(() => {
  for (const box of opened.splice(0)) box.close()
  localStorage.clear()
})

it('a device whose battery died before the browser wrote its name goes on under it, without a gap in its numbers', async () => {
  const before = await load('dies')
  const first = await before.box.enqueue(ledgerId, creak)
  before.box.close()
  localStorage.clear()
  const after = await load('dies')
  // A screen may have asked for the name before the outbox was read.
  expect(after.deviceId()).not.toBe(first.deviceId)
  const second = await after.box.enqueue(ledgerId, creak)
  expect(second).toMatchObject({ deviceId: first.deviceId, deviceSeq: first.deviceSeq + 1 })
  expect(after.deviceId()).toBe(first.deviceId)
})

it('what a form counts is named by the counter that was lost with it, so that no number is given twice', async () => {
  const before = await load('forms')
  await before.box.enqueue(ledgerId, creak)
  const form = before.makeEntry(creak)
  before.box.close()
  localStorage.clear()
  const after = await load('forms')
  await after.box.enqueue(ledgerId, creak)
  const again = after.makeEntry(creak)
  expect(again.deviceSeq).toBe(form.deviceSeq)
  expect(again.deviceId).not.toBe(form.deviceId)
})

it('a device that counted before its name was kept beside the counts keeps both', async () => {
  const device = (await load('unused')).deviceId()
  const older = await openDB('older', 2, {
    upgrade(database) {
      for (const name of ['pending', 'sent']) database.createObjectStore(name).createIndex('id', 'entry.id', { unique: true })
      database.createObjectStore('attention')
      void database.createObjectStore('counts').put(7, `${ledgerId}/${device}`)
    },
  })
  older.close()
  const { box } = await load('older')
  expect(await box.enqueue(ledgerId, creak)).toMatchObject({ deviceId: device, deviceSeq: 8 })
})
