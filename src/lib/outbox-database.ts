import type { DBSchema, IDBPDatabase, IDBPTransaction, StoreNames } from 'idb'
import { openDB } from 'idb'
import type { ProblemBody } from '#shared/api/problem'
import type { EntryDraft } from '#shared/ledger/envelope'
import { adoptDeviceId, deviceId, type EntryParts } from './entry'

/** What a screen gives the outbox; the outbox numbers it. */
export type NewEntry = Omit<EntryParts, 'deviceSeq' | 'deviceId' | 'id'> & { id?: string }

/** What waits to be sent: the entry, and the test whose ledger it belongs to. */
export interface Waiting {
  testId: string
  entry: EntryDraft
}

/** What the server refused, kept with its reason until somebody has dealt with it. */
export interface Refused extends Waiting {
  problem: ProblemBody
  at: string
}

/** What the server has answered for, kept to fill a gap should the server ever lack it. */
export interface Sent extends Waiting {
  /** Its number and hash in the ledger, as the server answered. */
  seq: number
  hash: string
  sentAt: string
  /** A seal stands on it. */
  sealed: boolean
}

/**
 * In the order of a device's numbers within a ledger. What was taken in from a file keeps the numbers of its device,
 * which a browser that was cleared may have given again: the id tells the two apart.
 */
export type EntryKey = [ledgerId: string, deviceId: string, deviceSeq: number, id: string]

export interface OutboxSchema extends DBSchema {
  pending: { key: EntryKey; value: Waiting; indexes: { id: string } }
  attention: { key: string; value: Refused }
  counts: { key: string; value: number }
  sent: { key: EntryKey; value: Sent; indexes: { id: string } }
  /** Under `device`, the id that the counts are kept under. */
  about: { key: string; value: string }
}

export const keyOf = ({ ledgerId, deviceId: device, deviceSeq, id }: EntryDraft): EntryKey => [ledgerId, device, deviceSeq, id]
export const countKey = (ledgerId: string, device: string): string => `${ledgerId}/${device}`

type Upgrade = IDBPTransaction<OutboxSchema, StoreNames<OutboxSchema>[], 'versionchange'>

/** The first version numbered by ledger alone: its entries and counts are this device's. */
async function carryOver(database: IDBPDatabase<OutboxSchema>, upgrade: Upgrade): Promise<void> {
  const waiting = await upgrade.objectStore('pending').getAll()
  const counts = upgrade.objectStore('counts')
  const ledgers = await counts.getAllKeys()
  for (const ledgerId of ledgers) {
    await counts.put((await counts.get(ledgerId)) ?? 0, countKey(ledgerId, deviceId()))
    await counts.delete(ledgerId)
  }
  database.deleteObjectStore('pending')
  const pending = database.createObjectStore('pending')
  pending.createIndex('id', 'entry.id', { unique: true })
  for (const one of waiting) await pending.put(one, keyOf(one.entry))
}

export interface ConnectionListener {
  /** Another tab holds an older version of the database open: nothing opens until it is closed. */
  onBlocked: () => void
  /** The connection is gone: taken over by a newer version in another tab, or closed by the browser. */
  onLost: (why: 'newer' | 'closed') => void
}

const VERSION = 3
const DEVICE = 'device'

/** What this browser keeps: what waits, what was refused, what was sent, and how far each ledger is numbered. */
export async function openOutbox(name: string, { onBlocked, onLost }: ConnectionListener): Promise<IDBPDatabase<OutboxSchema>> {
  const database = await openDB<OutboxSchema>(name, VERSION, {
    async upgrade(opening, from, _to, upgrade) {
      if (from === 0) {
        opening.createObjectStore('pending').createIndex('id', 'entry.id', { unique: true })
        opening.createObjectStore('attention')
        opening.createObjectStore('counts')
      }
      if (from === 1) await carryOver(opening, upgrade)
      if (from < 2) opening.createObjectStore('sent').createIndex('id', 'entry.id', { unique: true })
      await opening.createObjectStore('about').put(deviceId(), DEVICE)
    },
    blocked: onBlocked,
    blocking: (_current, _blocked, event) => {
      // Who stays connected keeps the newer tab from opening at all.
      ;(event.target as IDBDatabase).close()
      onLost('newer')
    },
    terminated: () => onLost('closed'),
  })
  const device = await database.get('about', DEVICE)
  if (device !== undefined) adoptDeviceId(device)
  return database
}
