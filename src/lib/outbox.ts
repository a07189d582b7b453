import type { IDBPDatabase } from 'idb'
import { v7 as newId } from 'uuid'
import { appendResponseSchema, type AppendRequest, type AppendResponse } from '#shared/api/ledger'
import { sessionResponseSchema } from '#shared/api/session'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { ALWAYS_ALLOWED, PROOF_TEST_ACTS } from '#shared/proof-test/entries'
import { api } from './api-client'
import { makeEntry, type EntryParts } from './entry'
import { inTime, openOutbox, type OutboxSchema, type Refused, type Waiting } from './outbox-database'
import { ProblemError } from './problem'
import { UnkeptEntries } from './unkept'

export type SenderState =
  | { is: 'idle' }
  | { is: 'sending' }
  /** Nothing answered, or the server was too busy: it is tried again by itself. */
  | { is: 'waiting' }
  /** The session ended: nothing is sent until the same person has signed in again. */
  | { is: 'signed-out' }
  /** The server would not take the request as a whole. */
  | { is: 'refused'; says: string }

/** One ledger's part of the outbox, as a screen shows it. */
export interface LedgerOutbox {
  /** False until what this device kept has been read. */
  loaded: boolean
  pending: readonly EntryDraft[]
  attention: readonly Refused[]
  sender: SenderState
  /** Why nothing can be kept on this device; entry is blocked while it stands. */
  fault: string | null
}

/** Everything that this browser keeps, over all ledgers and people. */
export interface OutboxSummary {
  /** False until what this device kept has been read. */
  loaded: boolean
  /** Entries that the server has not answered for. */
  unsent: number
  /** Entries that the server refused, and nobody has dealt with. */
  attention: number
  /** The ledgers with any of these. */
  ledgers: readonly string[]
}

export interface OutboxParts {
  databaseName: string
  post: (testId: string, request: AppendRequest) => Promise<AppendResponse>
  /** The id of whoever is signed in now; throws when nobody is, or nothing answers. */
  whoIsSignedIn: () => Promise<string>
  /** How long to wait before trying again, by how often it has failed (ms). */
  delay?: (failures: number) => number
}

export type NewEntry = Omit<EntryParts, 'deviceSeq' | 'id'> & { id?: string }
type KeptListener = (testId: string, entries: readonly LedgerEntry[]) => void

const LOCK = 'quarterload-outbox'
const MOST_AT_ONCE = 50
const NOTHING: readonly never[] = []

const backoff = (failures: number): number => Math.min(30_000, 1000 * 2 ** Math.min(failures, 5))

/** One sender at a time, over all tabs where the browser can say so. */
async function alone(work: () => Promise<void>): Promise<void> {
  if (typeof navigator !== 'undefined' && 'locks' in navigator) await navigator.locks.request(LOCK, work)
  else await work()
}

/** An act may be refused; what follows it is sent only once it is answered, so that the numbers stay without a gap. */
function nextBatch(waiting: readonly Waiting[]): Waiting[] {
  const act = waiting.findIndex(({ entry }) => PROOF_TEST_ACTS.has(entry.kind))
  return waiting.slice(0, Math.min(act === -1 ? waiting.length : act + 1, MOST_AT_ONCE))
}

function byLedger(waiting: readonly Waiting[]): Waiting[][] {
  const groups = new Map<string, Waiting[]>()
  for (const one of waiting) groups.set(one.entry.ledgerId, [...(groups.get(one.entry.ledgerId) ?? []), one])
  return [...groups.values()]
}

/**
 * Keeps entries on this device until the server has them. An entry is written through to the disk before it
 * is shown as kept or sent; it is sent in the order it was made, as often as it takes, and leaves the outbox
 * only after the server's answer has been handed on.
 */
export class Outbox {
  private readonly parts: OutboxParts
  private database: Promise<IDBPDatabase<OutboxSchema>> | null = null
  private readonly listeners = new Set<() => void>()
  private readonly keptListeners = new Set<KeptListener>()
  private readonly ledgers = new Map<string, LedgerOutbox>()
  private readonly channel: BroadcastChannel | null
  private readonly unkept: UnkeptEntries
  private sender: SenderState = { is: 'idle' }
  private fault: string | null = null
  private totals: OutboxSummary = { loaded: false, unsent: 0, attention: 0, ledgers: NOTHING }
  private readonly shownUnkept = new Set<string>()
  private personId: string | null = null
  private sending: Promise<void> | null = null
  private askedAgain = false
  private failures = 0
  private timer: ReturnType<typeof setTimeout> | null = null

  constructor(parts: OutboxParts) {
    this.parts = parts
    this.unkept = new UnkeptEntries({
      post: parts.post,
      delay: parts.delay ?? backoff,
      onKept: (testId, kept) => this.handOn(testId, kept),
      onChange: (ledgerId, says) => this.showUnkept(ledgerId, says),
    })
    this.channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(parts.databaseName)
    this.channel?.addEventListener('message', (event: MessageEvent<{ testId: string; ledgerId: string; kept: LedgerEntry[] }>) => {
      const { testId, ledgerId, kept } = event.data
      if (kept.length > 0) this.handOn(testId, kept)
      void this.refresh(ledgerId)
    })
    if (typeof window !== 'undefined') window.addEventListener('online', () => this.sendNow())
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  /** The same object until something about this ledger changes. */
  ledger = (ledgerId: string): LedgerOutbox => {
    const known = this.ledgers.get(ledgerId)
    if (known) return known
    const empty: LedgerOutbox = { loaded: false, pending: NOTHING, attention: NOTHING, sender: this.sender, fault: this.fault }
    this.ledgers.set(ledgerId, empty)
    // Not before this has answered: where there is no storage at all, it fails at once.
    queueMicrotask(() => void this.refresh(ledgerId))
    return empty
  }

  /** The same object until something changes; what it says is read when it is first asked for. */
  summary = (): OutboxSummary => {
    if (!this.totals.loaded && this.fault === null) queueMicrotask(() => void this.count())
    return this.totals
  }

  unsentCount(): number {
    return this.summary().unsent
  }

  /** Called with what the server kept, before it leaves the outbox. */
  onKept(listener: KeptListener): () => void {
    this.keptListeners.add(listener)
    return () => this.keptListeners.delete(listener)
  }

  /** Only this person's entries are sent: a tablet handed over must not re-attribute. */
  sendAs(personId: string | null): void {
    if (this.personId === personId && this.sender.is !== 'signed-out') return
    this.personId = personId
    if (personId !== null) this.sendNow()
  }

  /**
   * Writes an entry through to the disk, numbered in the same transaction, and resolves when it is there.
   * The same id a second time gives the entry that is kept already. Rejects when nothing can be kept, but for a stop
   * or a release: these go to the server without the disk.
   * `knownSeq`: the highest number the server has from this device.
   */
  async enqueue(testId: string, parts: NewEntry, knownSeq = 0): Promise<EntryDraft> {
    const id = parts.id ?? newId()
    try {
      const writing = this.put(testId, { ...parts, id }, knownSeq)
      const entry = await (ALWAYS_ALLOWED.has(parts.kind) ? inTime(writing) : writing)
      await this.refresh(parts.ledgerId)
      this.tell(testId, parts.ledgerId, [])
      this.sendNow()
      return entry
    } catch (failure) {
      this.fail(failure)
      if (!ALWAYS_ALLOWED.has(parts.kind)) throw failure
      return this.unkept.add(testId, parts)
    }
  }

  /** Somebody has read why an act was refused. */
  async dismiss(ledgerId: string, entryId: string): Promise<void> {
    const database = await this.opened()
    await database.delete('attention', entryId)
    await this.refresh(ledgerId)
  }

  /** Tries at once, instead of when the timer would. */
  sendNow(): void {
    if (this.timer) clearTimeout(this.timer)
    this.timer = null
    this.askedAgain = true
    void this.unkept.send()
    this.sending ??= this.sendUntilQuiet().finally(() => {
      this.sending = null
    })
  }

  /** Resolves when the sender has nothing to do now. */
  async settled(): Promise<void> {
    while (this.sending) await this.sending
  }

  close(): void {
    if (this.timer) clearTimeout(this.timer)
    this.unkept.close()
    this.channel?.close()
    void this.database?.then((database) => database.close())
  }

  private opened(): Promise<IDBPDatabase<OutboxSchema>> {
    this.database ??= openOutbox(this.parts.databaseName)
    return this.database
  }

  private async put(testId: string, parts: NewEntry & { id: string }, knownSeq: number): Promise<EntryDraft> {
    const database = await this.opened()
    const tx = database.transaction(['pending', 'counts'], 'readwrite', { durability: 'strict' })
    const pending = tx.objectStore('pending')
    const counts = tx.objectStore('counts')
    const kept = await pending.index('id').get(parts.id)
    if (kept) {
      await tx.done
      return kept.entry
    }
    const deviceSeq = Math.max((await counts.get(parts.ledgerId)) ?? 0, knownSeq) + 1
    const entry = makeEntry({ ...parts, deviceSeq })
    await Promise.all([pending.put({ testId, entry }, [parts.ledgerId, deviceSeq]), counts.put(deviceSeq, parts.ledgerId), tx.done])
    return entry
  }

  private async refresh(ledgerId: string): Promise<void> {
    try {
      const database = await this.opened()
      const tx = database.transaction(['pending', 'attention'])
      const range = IDBKeyRange.bound([ledgerId, 0], [ledgerId, Number.MAX_SAFE_INTEGER])
      const waiting = await tx.objectStore('pending').getAll(range)
      const refused = await tx.objectStore('attention').getAll()
      await tx.done
      this.ledgers.set(ledgerId, {
        loaded: true,
        pending: [...waiting.map(({ entry }) => entry), ...this.unkept.of(ledgerId)],
        attention: refused.filter(({ entry }) => entry.ledgerId === ledgerId),
        sender: this.sender,
        fault: this.fault,
      })
      await this.count()
    } catch (failure) {
      this.fail(failure)
    }
  }

  private async count(): Promise<void> {
    try {
      const database = await this.opened()
      const tx = database.transaction(['pending', 'attention'])
      const [waiting, refused] = await Promise.all([tx.objectStore('pending').getAll(), tx.objectStore('attention').getAll()])
      const ledgers = [...new Set([...waiting, ...refused].map(({ entry }) => entry.ledgerId))]
      this.totals = { loaded: true, unsent: waiting.length, attention: refused.length, ledgers }
      this.notify()
    } catch (failure) {
      this.fail(failure)
    }
  }

  private fail(failure: unknown): void {
    const said = typeof failure === 'object' && failure !== null && 'message' in failure ? String(failure.message).replace(/\.$/, '') : ''
    this.fault = `This device can’t keep entries${said === '' ? '' : ` (${said})`}. Nothing more is taken in. Under load: stop, and release. Both go straight to the server.`
    this.spread({ fault: this.fault })
  }

  private showUnkept(ledgerId: string, says: string | null): void {
    const before = this.ledger(ledgerId)
    const unkept = this.unkept.of(ledgerId)
    const kept = before.pending.filter((entry) => !this.shownUnkept.has(entry.id))
    for (const entry of unkept) this.shownUnkept.add(entry.id)
    this.ledgers.set(ledgerId, { ...before, pending: [...kept, ...unkept] })
    if (says !== null) this.say({ is: 'refused', says })
    this.notify()
  }

  private say(sender: SenderState): void {
    this.sender = sender
    this.spread({ sender })
  }

  private spread(change: Partial<LedgerOutbox>): void {
    for (const [ledgerId, ledger] of this.ledgers) this.ledgers.set(ledgerId, { ...ledger, ...change })
    this.notify()
  }

  private notify(): void {
    for (const listener of this.listeners) listener()
  }

  private handOn(testId: string, entries: readonly LedgerEntry[]): void {
    for (const listener of this.keptListeners) listener(testId, entries)
  }

  private tell(testId: string, ledgerId: string, kept: LedgerEntry[]): void {
    this.channel?.postMessage({ testId, ledgerId, kept })
  }

  private tryLater(): void {
    const delay = (this.parts.delay ?? backoff)(this.failures)
    this.failures += 1
    if (this.timer) clearTimeout(this.timer)
    this.timer = setTimeout(() => this.sendNow(), delay)
  }

  private async sendUntilQuiet(): Promise<void> {
    try {
      while (this.askedAgain) {
        this.askedAgain = false
        await alone(() => this.sendAll())
      }
      this.failures = 0
      this.say({ is: 'idle' })
    } catch (failure) {
      this.askedAgain = false
      if (failure instanceof ProblemError && failure.status === 401) this.say({ is: 'signed-out' })
      else if (failure instanceof ProblemError && failure.status < 500 && ![408, 429].includes(failure.status)) {
        this.say({ is: 'refused', says: failure.detail })
      } else this.say({ is: 'waiting' })
      this.tryLater()
    }
  }

  private async sendAll(): Promise<void> {
    if (this.sender.is === 'signed-out') this.personId = await this.parts.whoIsSignedIn()
    const database = await this.opened()
    let failed: unknown
    for (;;) {
      const mine = (await database.getAll('pending')).filter(({ entry }) => entry.authorId === this.personId)
      if (mine.length === 0) return
      this.say({ is: 'sending' })
      failed = undefined
      let moved = false
      for (const waiting of byLedger(mine)) {
        try {
          moved = (await this.sendBatch(nextBatch(waiting))) || moved
        } catch (failure) {
          // One ledger that is refused holds up no other; a lost link or an ended session holds up all of them.
          if (!(failure instanceof ProblemError) || failure.status === 401 || failure.status >= 500) throw failure
          failed = failure
        }
      }
      if (!moved) throw failed ?? new Error('The server answered, but kept nothing.')
    }
  }

  /** True when something left the outbox. */
  private async sendBatch(batch: readonly Waiting[]): Promise<boolean> {
    const [first] = batch
    if (!first) return false
    const { testId } = first
    const { ledgerId } = first.entry
    const answer = await this.parts.post(testId, { sentAt: new Date().toISOString(), entries: batch.map(({ entry }) => entry) })
    const kept = answer.results.flatMap((result) => (result.outcome === 'kept' ? [result.entry] : []))
    this.handOn(testId, kept)
    let left = 0
    for (const { entry } of batch) {
      const result = answer.results.find(({ id }) => id === entry.id)
      if (!result) continue
      if (result.outcome === 'kept') await this.forget(entry)
      else await this.setAside({ testId, entry, problem: result.problem, at: new Date().toISOString() })
      left += 1
    }
    await this.refresh(ledgerId)
    this.tell(testId, ledgerId, kept)
    return left > 0
  }

  private async forget(entry: EntryDraft): Promise<void> {
    const database = await this.opened()
    await database.delete('pending', [entry.ledgerId, entry.deviceSeq])
  }

  /** A refused entry never came to be: its number goes to the next one, none of which has been sent yet. */
  private async setAside(refused: Refused): Promise<void> {
    const { ledgerId, deviceSeq, id } = refused.entry
    const database = await this.opened()
    const tx = database.transaction(['pending', 'attention', 'counts'], 'readwrite', { durability: 'strict' })
    const pending = tx.objectStore('pending')
    await tx.objectStore('attention').put(refused, id)
    await pending.delete([ledgerId, deviceSeq])
    if (PROOF_TEST_ACTS.has(refused.entry.kind)) {
      const later = await pending.getAll(IDBKeyRange.bound([ledgerId, deviceSeq + 1], [ledgerId, Number.MAX_SAFE_INTEGER]))
      for (const waiting of later) {
        const entry = { ...waiting.entry, deviceSeq: waiting.entry.deviceSeq - 1 }
        await pending.delete([ledgerId, waiting.entry.deviceSeq])
        await pending.put({ ...waiting, entry }, [ledgerId, entry.deviceSeq])
      }
      const count = await tx.objectStore('counts').get(ledgerId)
      if (count !== undefined) await tx.objectStore('counts').put(count - 1, ledgerId)
    }
    await tx.done
  }
}

const LONGEST_WAIT = 20_000

/** The outbox of this browser. */
export const outbox = new Outbox({
  databaseName: 'quarterload',
  post: (testId, request) =>
    api.send('POST', appendResponseSchema, `/api/proof-tests/${encodeURIComponent(testId)}/entries`, request, {
      signal: AbortSignal.timeout(LONGEST_WAIT),
    }),
  whoIsSignedIn: async () => (await api.get(sessionResponseSchema, '/api/session')).user.id,
})
