import type { DBSchema, IDBPDatabase } from 'idb'
import { openDB } from 'idb'
import type { ProblemBody } from '#shared/api/problem'
import type { EntryDraft } from '#shared/ledger/envelope'

/** What waits to be sent: the entry, and the test whose ledger it belongs to. */
export interface Waiting {
  testId: string
  entry: EntryDraft
}

/** An act that the server refused, kept until somebody has seen why. */
export interface Refused {
  testId: string
  entry: EntryDraft
  problem: ProblemBody
  at: string
}

export interface OutboxSchema extends DBSchema {
  pending: { key: [string, number]; value: Waiting; indexes: { id: string } }
  attention: { key: string; value: Refused }
  counts: { key: string; value: number }
}

/** What this browser keeps: what waits, what was refused and not read yet, and how far each ledger is numbered. */
export function openOutbox(name: string): Promise<IDBPDatabase<OutboxSchema>> {
  return openDB<OutboxSchema>(name, 1, {
    upgrade(database) {
      database.createObjectStore('pending').createIndex('id', 'entry.id', { unique: true })
      database.createObjectStore('attention')
      database.createObjectStore('counts')
    },
  })
}

const LONGEST_WRITE = 3000

/** A disk that doesn't answer is a disk that refuses: nobody waits at Stop for it. */
export function inTime<T>(write: Promise<T>): Promise<T> {
  let timer: ReturnType<typeof setTimeout> | undefined
  const late = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => reject(new Error('the storage does not answer')), LONGEST_WRITE)
  })
  return Promise.race([write, late]).finally(() => clearTimeout(timer))
}
