import type { IDBPDatabase } from 'idb'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { PROOF_TEST_ACTS } from '#shared/proof-test/entries'
import { deviceId, makeEntry } from './entry'
import { countKey, keyOf, openOutbox, type NewEntry, type OutboxSchema, type Refused, type Sent, type Waiting } from './outbox-database'
import { asStorageFault, inTime, StorageFault } from './storage-fault'

type Database = IDBPDatabase<OutboxSchema>

const DAY = 86_400_000
/** How long what was sent is kept to fill a gap: a backup older than this is not put back in place. */
const KEEP_SENT = 90 * DAY
/** A sealed record is with everybody who signed it; it stays in sight for a while. */
const KEEP_SEALED = 14 * DAY

const strict = { durability: 'strict' } as const
const inLedger = (ledgerId: string): IDBKeyRange => IDBKeyRange.bound([ledgerId], [ledgerId, []])

/** This device's own entries first: what a file brought is older and must not hold up a test under load. */
function ownFirst(waiting: readonly Waiting[]): Waiting[] {
  const own = deviceId()
  return [...waiting.filter(({ entry }) => entry.deviceId === own), ...waiting.filter(({ entry }) => entry.deviceId !== own)]
}

/**
 * What the outbox keeps on the disk. Every write goes through to it (durability "strict") before it counts as done; a
 * storage that fails, or does not answer in time, throws a `StorageFault`. An entry is never changed once it is written.
 */
export class OutboxStore {
  private readonly name: string
  private readonly onFault: (fault: StorageFault) => void
  private opening: Promise<Database> | null = null

  constructor(name: string, onFault: (fault: StorageFault) => void) {
    this.name = name
    this.onFault = onFault
  }

  /**
   * Writes an entry, numbered in the same transaction; the same id a second time gives what is there already. A write
   * that is given up because the disk doesn't answer is rolled back, so that it can't turn up later.
   */
  put(testId: string, parts: NewEntry & { id: string }, knownSeq: number): Promise<EntryDraft> {
    const giveUp = new AbortController()
    return this.guarded(
      (database) => this.write(database, testId, parts, knownSeq, giveUp.signal),
      () => giveUp.abort(),
    )
  }

  waiting(): Promise<Waiting[]> {
    return this.guarded(async (database) => ownFirst(await database.getAll('pending')))
  }

  waitingOf(ledgerId: string): Promise<Waiting[]> {
    return this.guarded(async (database) => ownFirst(await database.getAll('pending', inLedger(ledgerId))))
  }

  attention(): Promise<Refused[]> {
    return this.guarded((database) => database.getAll('attention'))
  }

  sent(): Promise<Sent[]> {
    return this.guarded((database) => database.getAll('sent'))
  }

  /** The server has it: it waits no more, and is kept to fill a gap. */
  moveToSent(one: Waiting, kept: LedgerEntry, at: string): Promise<void> {
    return this.guarded(async (database) => {
      const tx = database.transaction(['pending', 'attention', 'sent'], 'readwrite', strict)
      const key = keyOf(one.entry)
      const before = await tx.objectStore('sent').get(key)
      const sent: Sent = { ...one, seq: kept.seq, hash: kept.hash, sentAt: before?.sentAt ?? at, sealed: before?.sealed ?? false }
      await tx.objectStore('sent').put(sent, key)
      await tx.objectStore('attention').delete(one.entry.id)
      await tx.objectStore('pending').delete(key)
      await tx.done
    })
  }

  setAside(refused: Refused): Promise<void> {
    return this.guarded(async (database) => {
      const tx = database.transaction(['pending', 'attention', 'sent'], 'readwrite', strict)
      await tx.objectStore('attention').put(refused, refused.entry.id)
      await tx.objectStore('pending').delete(keyOf(refused.entry))
      await tx.objectStore('sent').delete(keyOf(refused.entry))
      await tx.done
    })
  }

  /** What was refused waits again, as it was. */
  sendAgain(entryId: string): Promise<Waiting | null> {
    return this.guarded(async (database) => {
      const tx = database.transaction(['pending', 'attention'], 'readwrite', strict)
      const refused = await tx.objectStore('attention').get(entryId)
      if (refused) {
        const { testId, entry } = refused
        await tx.objectStore('pending').put({ testId, entry }, keyOf(entry))
        await tx.objectStore('attention').delete(entryId)
      }
      await tx.done
      return refused ?? null
    })
  }

  /** Somebody has read why an act was refused: it never came to be. A fact has happened and stays; false says so. */
  dismiss(entryId: string): Promise<boolean> {
    return this.guarded(async (database) => {
      const tx = database.transaction('attention', 'readwrite', strict)
      const refused = await tx.store.get(entryId)
      const isAct = refused !== undefined && PROOF_TEST_ACTS.has(refused.entry.kind)
      if (isAct) await tx.store.delete(entryId)
      await tx.done
      return refused === undefined || isAct
    })
  }

  /** Entries from elsewhere, as they are; gives back those that this device did not hold yet. */
  takeIn(entries: readonly Waiting[]): Promise<Waiting[]> {
    return this.guarded(async (database) => {
      const tx = database.transaction(['pending', 'attention', 'sent'], 'readwrite', strict)
      const added: Waiting[] = []
      for (const one of entries) {
        const { id } = one.entry
        const waits = await tx.objectStore('pending').index('id').getKey(id)
        const sent = await tx.objectStore('sent').index('id').getKey(id)
        if (waits !== undefined || sent !== undefined) continue
        await tx.objectStore('pending').put(one, keyOf(one.entry))
        await tx.objectStore('attention').delete(id)
        added.push(one)
      }
      await tx.done
      return added
    })
  }

  /** Of a device's numbers that the server lacks, what is still here of them, in order. */
  async fill(ledgerId: string, device: string, runs: readonly (readonly [number, number])[]): Promise<Sent[]> {
    const found: Sent[] = []
    for (const [first, last] of runs) {
      const range = IDBKeyRange.bound([ledgerId, device, first], [ledgerId, device, last, []])
      found.push(...(await this.guarded((database) => database.getAll('sent', range))))
    }
    return found
  }

  /** A seal stands on everything up to this number. */
  markSealed(ledgerId: string, sealedSeq: number): Promise<void> {
    return this.guarded(async (database) => {
      const tx = database.transaction('sent', 'readwrite')
      for (const one of await tx.store.getAll(inLedger(ledgerId))) {
        if (!one.sealed && one.seq <= sealedSeq) await tx.store.put({ ...one, sealed: true }, keyOf(one.entry))
      }
      await tx.done
    })
  }

  /** Lets go of what was sent long ago. */
  prune(now: number): Promise<void> {
    return this.guarded(async (database) => {
      const tx = database.transaction('sent', 'readwrite')
      for (const one of await tx.store.getAll()) {
        if (now - Date.parse(one.sentAt) > (one.sealed ? KEEP_SEALED : KEEP_SENT)) await tx.store.delete(keyOf(one.entry))
      }
      await tx.done
    })
  }

  /** Opens afresh and writes something: whether the storage does its work again. */
  async probe(): Promise<void> {
    await this.guarded(async (database) => {
      const tx = database.transaction('counts', 'readwrite', strict)
      await tx.store.put(0, 'probe')
      await tx.store.delete('probe')
      await tx.done
    })
  }

  close(): void {
    const { opening } = this
    this.opening = null
    void opening?.then(
      (database) => database.close(),
      () => undefined,
    )
  }

  private async write(
    database: Database,
    testId: string,
    parts: NewEntry & { id: string },
    knownSeq: number,
    signal: AbortSignal,
  ): Promise<EntryDraft> {
    signal.throwIfAborted()
    const tx = database.transaction(['pending', 'attention', 'sent', 'counts'], 'readwrite', strict)
    const rollBack = (): void => {
      try {
        tx.abort()
      } catch {
        // It is being written at this moment: it will be seen among what waits.
        return
      }
    }
    signal.addEventListener('abort', rollBack)
    tx.done.catch(() => undefined)
    const pending = tx.objectStore('pending')
    const kept =
      (await pending.index('id').get(parts.id)) ??
      (await tx.objectStore('sent').index('id').get(parts.id)) ??
      (await tx.objectStore('attention').get(parts.id))
    if (kept) {
      await tx.done
      return kept.entry
    }
    const counts = tx.objectStore('counts')
    const device = deviceId()
    const counter = countKey(parts.ledgerId, device)
    const deviceSeq = Math.max((await counts.get(counter)) ?? 0, knownSeq) + 1
    const entry = makeEntry({ ...parts, deviceId: device, deviceSeq })
    await Promise.all([pending.put({ testId, entry }, keyOf(entry)), counts.put(deviceSeq, counter), tx.done])
    return entry
  }

  private async guarded<T>(work: (database: Database) => Promise<T>, late?: () => void): Promise<T> {
    try {
      return await inTime(
        this.opened().then((database) => work(database)),
        late,
      )
    } catch (failure) {
      throw asStorageFault(failure)
    }
  }

  private opened(): Promise<Database> {
    this.opening ??= this.open()
    return this.opening
  }

  private open(): Promise<Database> {
    const forget = (): void => {
      if (this.opening === opening) this.opening = null
    }
    const opening: Promise<Database> = openOutbox(this.name, {
      onBlocked: () =>
        this.onFault(new StorageFault('another tab holds an older version of the storage', 'Close the other tabs of Quarterload.')),
      onLost: (why) => {
        forget()
        this.onFault(
          why === 'newer'
            ? new StorageFault('a newer version runs in another tab', 'Load this page again.')
            : new StorageFault('the browser closed the storage'),
        )
      },
    })
    opening.catch(forget)
    return opening
  }
}
