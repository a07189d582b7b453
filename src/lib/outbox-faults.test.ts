// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { forceCloseDatabase } from 'fake-indexeddb'
import { openDB } from 'idb'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { LedgerDouble } from '../../tests/support/ledger-double'
import { Outbox, type NewEntry } from './outbox'

const testId = '01990000-0000-7000-8000-000000000001'
const lead = '01990000-0000-7000-8000-000000000003'

const entry = (note: string, kind = 'observed'): NewEntry => ({
  ledgerId: testId,
  kind,
  payload: { note },
  authorId: lead,
  basedOnSeq: 1,
})

const opened: Outbox[] = []
function open(server: LedgerDouble, databaseName: string): Outbox {
  const { post, whoIsSignedIn } = server
  const box = new Outbox({ databaseName, post, whoIsSignedIn, delay: () => 5 })
  opened.push(box)
  box.ledger(testId)
  return box
}
afterEach(() => {
  for (const box of opened.splice(0)) box.close()
  vi.restoreAllMocks()
})
const fault = (box: Outbox) => box.ledger(testId).fault
const notes = (server: LedgerDouble) => server.kept.map((one) => one.payload['note'])

describe('an outbox whose storage fails', () => {
  it('says that the storage is full and what to do, and is back by itself with what stood in memory', async () => {
    const server = new LedgerDouble(lead)
    const box = open(server, 'full')
    await box.enqueue(testId, entry('kept before'))
    const full = vi.spyOn(IDBObjectStore.prototype, 'put').mockImplementation(() => {
      throw new DOMException('Quota exceeded.', 'QuotaExceededError')
    })
    await expect(box.enqueue(testId, entry('not taken in'))).rejects.toThrow('Quota exceeded')
    expect(fault(box)).toMatch(/can’t keep entries \(Quota exceeded\).*Free space on this device.*stop, and release/)
    // Nobody is signed in, so the stop waits in memory.
    server.signedIn = null
    await box.enqueue(testId, entry('stop', 'stopped'))
    full.mockRestore()
    await vi.waitFor(() => expect(fault(box)).toBeNull(), { timeout: 5000 })
    expect(box.ledger(testId).backSince).not.toBeNull()
    expect((await box.contents()).waiting.map((one) => one.entry.payload['note'])).toEqual(['kept before', 'stop'])
    server.signedIn = lead
    box.sendAs(lead)
    await vi.waitFor(() => expect(notes(server).toSorted()).toEqual(['kept before', 'stop']))
    await box.enqueue(testId, entry('after'))
    expect(box.ledger(testId).backSince).toBeNull()
  })

  it('opens again after the browser closed the connection, and has lost nothing', async () => {
    const server = new LedgerDouble(null)
    const box = open(server, 'terminated')
    const connections: IDBDatabase[] = []
    const transaction = IDBDatabase.prototype.transaction
    vi.spyOn(IDBDatabase.prototype, 'transaction').mockImplementation(function (this: IDBDatabase, ...given) {
      connections.push(this)
      return transaction.apply(this, given)
    })
    await box.enqueue(testId, entry('before'))
    const connection = connections.at(-1)
    // Its types say the class where they mean an instance.
    forceCloseDatabase(connection as unknown as Parameters<typeof forceCloseDatabase>[0])
    await vi.waitFor(() => expect(fault(box)).toMatch(/the browser closed the storage/))
    await vi.waitFor(() => expect(fault(box)).toBeNull(), { timeout: 5000 })
    expect((await box.enqueue(testId, entry('after'))).deviceSeq).toBe(2)
    expect(box.ledger(testId).pending).toHaveLength(2)
  })

  it('gives way to a newer version in another tab, and says to load the page again', async () => {
    const box = open(new LedgerDouble(null), 'newer')
    await box.enqueue(testId, entry('before'))
    const newer = await openDB('newer', 99)
    await vi.waitFor(() => expect(fault(box)).toMatch(/newer version runs in another tab.*Load this page again/))
    await expect(box.enqueue(testId, entry('after'))).rejects.toThrow()
    await vi.waitFor(() => expect(fault(box)).toMatch(/older than another tab/), { timeout: 5000 })
    newer.close()
  })

  it('says which tab is in the way when an older one holds the storage open, and is back when that is closed', async () => {
    const older = await openDB('blocked', 1, {
      upgrade(database) {
        database.createObjectStore('pending').createIndex('id', 'entry.id', { unique: true })
        database.createObjectStore('attention')
        database.createObjectStore('counts')
      },
    })
    await older.put('counts', 7, testId)
    const box = open(new LedgerDouble(null), 'blocked')
    await vi.waitFor(() => expect(fault(box)).toMatch(/another tab holds an older version.*Close the other tabs/))
    older.close()
    await vi.waitFor(() => expect(fault(box)).toBeNull(), { timeout: 10_000 })
    // What the older version had counted goes on.
    expect((await box.enqueue(testId, entry('eighth'))).deviceSeq).toBe(8)
  })

  it('does not wait for a disk that does not answer, rolls the write back, and lets a stop past', { timeout: 20_000 }, async () => {
    const server = new LedgerDouble(lead)
    const box = open(server, 'wedged')
    box.sendAs(lead)
    await box.settled()
    // Another transaction that never ends: ours stand behind it.
    const holder = await openDB('wedged')
    let wedged = true
    const hold = async (): Promise<void> => {
      const tx = holder.transaction(['pending', 'attention', 'sent', 'counts'], 'readwrite')
      while (wedged) await tx.objectStore('counts').get('nothing')
    }
    const holding = hold()
    const started = Date.now()
    await expect(box.enqueue(testId, entry('never written'))).rejects.toThrow('does not answer')
    expect(Date.now() - started).toBeLessThan(6000)
    expect(fault(box)).toMatch(/the storage does not answer/)
    await box.enqueue(testId, entry('stop', 'stopped'))
    await vi.waitFor(() => expect(notes(server)).toEqual(['stop']))
    wedged = false
    await holding
    holder.close()
    await vi.waitFor(() => expect(fault(box)).toBeNull(), { timeout: 8000 })
    expect((await box.contents()).waiting).toEqual([])
    expect((await box.enqueue(testId, entry('after'))).deviceSeq).toBe(1)
    await box.settled()
    expect(notes(server)).toEqual(['stop', 'after'])
  })
})
