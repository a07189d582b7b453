import { checkChain, entryText, sha256Hex, type StoredEntry } from '#shared/ledger/chain'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { CACHE_NAME, entriesOf, openCache, type KeptHead } from './cache-database'
import { wholeUpTo, type KnownLedger } from './known-ledger'
import { inTime } from './storage-fault'

/** A ledger as this device kept it. */
export interface KeptLedger extends KnownLedger {
  testId: string
  /** When the server was last heard about it. */
  heardAt: string
}

/** A test that nobody has opened here for so long is fetched anew. */
const STAYS = 60 * 24 * 3_600_000
/** "Last heard" may be so much older than it was, so that a quiet test isn't written every second. */
const HEARD_WITHIN = 10_000

function asStored({ hash, ...entry }: LedgerEntry): StoredEntry {
  const { seq, receivedAt, irregular, prevHash, ...draft } = entry
  return { seq, hash, canonical: entryText(draft, { seq, receivedAt, irregular, prevHash }) }
}

/** Whether entries are what the server chained: from the first to the first gap as a chain, behind it each on its own. */
export function areWhole(entries: readonly LedgerEntry[]): boolean {
  const stored = entries.map(asStored)
  const whole = wholeUpTo(entries)
  return (
    whole > 0 &&
    checkChain(stored.slice(0, whole)).whole &&
    stored.slice(whole).every(({ canonical, hash }) => sha256Hex(canonical) === hash)
  )
}

/**
 * Every ledger that was opened on this device, as the server sent it. It is checked when it is read, and thrown away when
 * it is damaged: the server has it. An entry that the server has answered for stands here before it leaves the outbox,
 * so that the two together always hold everything this device has shown.
 */
export class LedgerCache {
  private readonly databaseName: string
  private readonly written = new Map<string, KeptHead>()

  constructor(databaseName: string = CACHE_NAME) {
    this.databaseName = databaseName
  }

  /** Keeps what the server has sent of a test. Rejects when it can't be kept. */
  async keep(testId: string, ledger: KnownLedger, heardAt: Date): Promise<void> {
    const head: KeptHead = {
      testId,
      ledgerId: ledger.ledgerId,
      people: ledger.people,
      sealedSeq: ledger.sealedSeq,
      heardAt: heardAt.toISOString(),
    }
    const tx = (await openCache(this.databaseName)).transaction(['ledgers', 'entries'], 'readwrite', { durability: 'strict' })
    const entries = tx.objectStore('entries')
    const have = new Set((await entries.getAllKeys(entriesOf(testId))).map(([, seq]) => seq))
    const added = ledger.entries.filter(({ seq }) => !have.has(seq))
    await Promise.all([tx.objectStore('ledgers').put(head), ...added.map((entry) => entries.put(entry, [testId, entry.seq])), tx.done])
    this.written.set(testId, head)
  }

  /** Notes that the server was heard and had nothing new. */
  async heard(testId: string, at: Date): Promise<void> {
    const head = this.written.get(testId)
    if (!head || at.getTime() - Date.parse(head.heardAt) < HEARD_WITHIN) return
    const next = { ...head, heardAt: at.toISOString() }
    this.written.set(testId, next)
    await (await openCache(this.databaseName)).put('ledgers', next)
  }

  /** Adds what the server has just answered for to a ledger that is kept here; resolves when it is on the disk, or can't be. */
  async add(testId: string, kept: readonly LedgerEntry[]): Promise<void> {
    try {
      await inTime(this.addToKept(testId, kept))
    } catch {
      // The server has them; only a reload without a network would show less.
      return
    }
  }

  /** What is kept of a test, once its chain was checked; undefined when there is nothing, or nothing that can be trusted. */
  async read(testId: string): Promise<KeptLedger | undefined> {
    try {
      const tx = (await openCache(this.databaseName)).transaction(['ledgers', 'entries'])
      const [head, entries] = await Promise.all([
        tx.objectStore('ledgers').get(testId),
        tx.objectStore('entries').getAll(entriesOf(testId)),
        tx.done,
      ])
      if (!head) return undefined
      if (!areWhole(entries)) {
        await this.forget(testId)
        return undefined
      }
      this.written.set(testId, head)
      return { ...head, entries }
    } catch {
      return undefined
    }
  }

  /** Every ledger that is kept here, the one heard last first. What was not opened for long goes on the way. */
  async readAll(now: Date): Promise<KeptLedger[]> {
    try {
      const heads = await (await openCache(this.databaseName)).getAll('ledgers')
      const old = heads.filter(({ heardAt }) => now.getTime() - Date.parse(heardAt) > STAYS)
      for (const { testId } of old) await this.forget(testId)
      const ledgers = await Promise.all(heads.filter((head) => !old.includes(head)).map(({ testId }) => this.read(testId)))
      return ledgers.filter((ledger) => ledger !== undefined).sort((a, b) => b.heardAt.localeCompare(a.heardAt))
    } catch {
      return []
    }
  }

  async forget(testId: string): Promise<void> {
    this.written.delete(testId)
    const tx = (await openCache(this.databaseName)).transaction(['ledgers', 'entries'], 'readwrite')
    await Promise.all([tx.objectStore('ledgers').delete(testId), tx.objectStore('entries').delete(entriesOf(testId)), tx.done])
  }

  private async addToKept(testId: string, kept: readonly LedgerEntry[]): Promise<void> {
    const tx = (await openCache(this.databaseName)).transaction(['ledgers', 'entries'], 'readwrite', { durability: 'strict' })
    const known = (await tx.objectStore('ledgers').count(testId)) > 0
    const entries = tx.objectStore('entries')
    await Promise.all([...(known ? kept : []).map((entry) => entries.put(entry, [testId, entry.seq])), tx.done])
  }
}

/** The ledgers kept by this browser. */
export const ledgerCache = new LedgerCache()
