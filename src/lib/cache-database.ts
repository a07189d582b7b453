import { openDB, type DBSchema, type IDBPDatabase } from 'idb'
import type { SessionResponse } from '#shared/api/session'
import type { LedgerEntry } from '#shared/ledger/envelope'

/** What is known of one test's ledger besides its entries. */
export interface KeptHead {
  testId: string
  ledgerId: string
  people: Readonly<Record<string, string>>
  sealedSeq: number
  /** When the server was last heard about it. */
  heardAt: string
}

interface CacheSchema extends DBSchema {
  session: { key: string; value: SessionResponse }
  ledgers: { key: string; value: KeptHead }
  entries: { key: [string, number]; value: LedgerEntry }
}

export type CacheDatabase = IDBPDatabase<CacheSchema>

export const CACHE_NAME = 'quarterload-cache'

const opened = new Map<string, Promise<CacheDatabase>>()

/**
 * What this browser keeps of the server's answers, to go on without it. Apart from the outbox: nothing here exists only
 * here, and any of it may be thrown away.
 */
export function openCache(name: string = CACHE_NAME): Promise<CacheDatabase> {
  const known = opened.get(name)
  if (known) return known
  const forget = (): void => void opened.delete(name)
  const opening = openDB<CacheSchema>(name, 1, {
    upgrade(database) {
      database.createObjectStore('session')
      database.createObjectStore('ledgers', { keyPath: 'testId' })
      database.createObjectStore('entries')
    },
    blocking(_current, _blocked, event) {
      forget()
      ;(event.target as IDBDatabase).close()
    },
    terminated: forget,
  })
  opened.set(name, opening)
  opening.catch(forget)
  return opening
}

/** Every entry of one test. */
export const entriesOf = (testId: string): IDBKeyRange => IDBKeyRange.bound([testId, 0], [testId, Number.MAX_SAFE_INTEGER])
