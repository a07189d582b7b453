import { v7 as newId } from 'uuid'
import {
  appendResponseSchema,
  entriesResponseSchema,
  type AppendRequest,
  type AppendResponse,
  type EntriesResponse,
} from '#shared/api/ledger'
import { sessionResponseSchema } from '#shared/api/session'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { ALWAYS_ALLOWED } from '#shared/proof-test/entries'
import { api } from './api-client'
import { ledgerCache } from './ledger-cache'
import type { NewEntry, Refused, Sent, Waiting } from './outbox-database'
import { OutboxSender, type SenderState } from './outbox-sender'
import { OutboxStore } from './outbox-store'
import { fullJitter } from './retry-delay'
import { asStorageFault, sayFault, type StorageFault } from './storage-fault'
import { UnkeptEntries } from './unkept'

export type { NewEntry } from './outbox-database'
export type { SenderState } from './outbox-sender'

/** What holds for every ledger alike. */
interface OfTheDevice {
  sender: SenderState
  /** Why nothing can be kept on this device; entry is blocked while it stands. */
  fault: string | null
  /** Since when entries are kept again after a fault, until the next one is. */
  backSince: string | null
}

/** One ledger's part of the outbox, as a screen shows it. */
export interface LedgerOutbox extends OfTheDevice {
  /** False until what this device kept has been read. */
  loaded: boolean
  pending: readonly EntryDraft[]
  attention: readonly Refused[]
}

/** Everything that this browser keeps, over all ledgers and people. */
export interface OutboxSummary extends OfTheDevice {
  /** False until what this device kept has been read. */
  loaded: boolean
  /** Entries that the server has not answered for. */
  unsent: number
  /** Entries that the server refused, and nobody has dealt with. */
  attention: number
  /** The ledgers with any of these. */
  ledgers: readonly string[]
}

/** The entries themselves: on this device, refused, and on the server. */
export interface OutboxContents {
  waiting: readonly Waiting[]
  attention: readonly Refused[]
  sent: readonly Sent[]
}

export interface OutboxParts {
  databaseName: string
  post: (testId: string, request: AppendRequest) => Promise<AppendResponse>
  /** What the server has of a test after a number. */
  read?: (testId: string, after: number) => Promise<EntriesResponse>
  /** The id of whoever is signed in now; throws when nobody is, or nothing answers. */
  whoIsSignedIn: () => Promise<string>
  /** How long to wait before trying again, by how often it has failed (ms). */
  delay: (failures: number) => number
}

type KeptListener = (testId: string, entries: readonly LedgerEntry[]) => unknown
interface Told {
  testId: string
  ledgerId: string
  kept: LedgerEntry[]
}

const NOTHING: readonly never[] = []
const WELL: OfTheDevice = { sender: { is: 'idle' }, fault: null, backSince: null }
const EMPTY: OutboxSummary = { loaded: false, unsent: 0, attention: 0, ledgers: NOTHING, ...WELL }

const ofTheDevice = ({ sender, fault, backSince }: OfTheDevice): OfTheDevice => ({ sender, fault, backSince })
const sameState = (a: OfTheDevice, b: OfTheDevice): boolean => JSON.stringify(ofTheDevice(a)) === JSON.stringify(ofTheDevice(b))

const FIRST_REOPEN = 500
const LONGEST_REOPEN = 15_000

/**
 * Keeps entries on this device until the server has them. An entry is written through to the disk before it
 * is shown as kept or sent; it is sent in the order it was made, as often as it takes, and waits no more only
 * after the server's answer has been handed on.
 */
export class Outbox {
  private readonly store: OutboxStore
  private readonly sender: OutboxSender
  private readonly unkept: UnkeptEntries
  private readonly listeners = new Set<() => void>()
  private readonly keptListeners = new Set<KeptListener>()
  private readonly ledgers = new Map<string, LedgerOutbox>()
  private readonly channel: BroadcastChannel | null
  private readonly shownUnkept = new Set<string>()
  private totals = EMPTY
  private reopenTimer: ReturnType<typeof setTimeout> | null = null
  private reopened = 0
  private closed = false
  private pruned = false

  constructor(parts: OutboxParts) {
    this.store = new OutboxStore(parts.databaseName, (fault) => this.fail(fault))
    this.sender = new OutboxSender({
      lockName: `${parts.databaseName}-outbox`,
      store: this.store,
      post: parts.post,
      read: parts.read,
      whoIsSignedIn: parts.whoIsSignedIn,
      delay: parts.delay,
      onState: (sender) => this.spread({ sender }),
      onKept: (testId, kept) => this.handOn(testId, kept),
      onMoved: async (testId, ledgerId, kept) => {
        await this.refresh(ledgerId)
        this.tell({ testId, ledgerId, kept })
      },
      onFault: (fault) => this.fail(fault),
    })
    this.unkept = new UnkeptEntries({
      post: parts.post,
      delay: parts.delay,
      onKept: (testId, kept) => void this.handOn(testId, kept),
      onChange: (ledgerId, says) => this.showUnkept(ledgerId, says),
    })
    this.channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(parts.databaseName)
    this.channel?.addEventListener('message', (event: MessageEvent<Told>) => {
      const { testId, ledgerId, kept } = event.data
      if (kept.length > 0) void this.handOn(testId, kept)
      // The tab that wrote it may be closed before it has sent it.
      else this.sender.sendSoon()
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
    const empty: LedgerOutbox = { loaded: false, pending: NOTHING, attention: NOTHING, ...ofTheDevice(this.totals) }
    this.ledgers.set(ledgerId, empty)
    // Not before this has answered: where there is no storage at all, it fails at once.
    queueMicrotask(() => void this.refresh(ledgerId))
    return empty
  }

  /** The same object until something changes; what it says is read when it is first asked for. */
  summary = (): OutboxSummary => {
    if (!this.totals.loaded && this.totals.fault === null) queueMicrotask(() => void this.count())
    return this.totals
  }

  unsentCount(): number {
    return this.summary().unsent
  }

  async contents(): Promise<OutboxContents> {
    const [waiting, attention, sent] = await Promise.all([this.store.waiting(), this.store.attention(), this.store.sent()])
    return { waiting: [...waiting, ...this.unkept.all()], attention, sent }
  }

  /** Called with what the server kept; it leaves the outbox once the listeners are done, none of which may fail. */
  onKept(listener: KeptListener): () => void {
    this.keptListeners.add(listener)
    return () => this.keptListeners.delete(listener)
  }

  /** Only this person's entries are sent: a tablet handed over must not re-attribute. */
  sendAs(personId: string | null): void {
    if (!this.pruned) this.prune()
    this.sender.sendAs(personId)
  }

  /**
   * Writes an entry through to the disk, numbered in the same transaction, and resolves when it is there.
   * The same id a second time gives the entry that is kept already. Rejects when nothing can be kept, but for a stop
   * or a release: these go to the server without the disk.
   * `knownSeq`: the highest number the server has from this device.
   */
  async enqueue(testId: string, parts: NewEntry, knownSeq = 0): Promise<EntryDraft> {
    const id = parts.id ?? newId()
    const urgent = ALWAYS_ALLOWED.has(parts.kind)
    try {
      const entry = await this.store.put(testId, { ...parts, id }, knownSeq)
      this.spread({ backSince: null })
      await this.refresh(parts.ledgerId)
      this.tell({ testId, ledgerId: parts.ledgerId, kept: [] })
      if (urgent) this.sendNow()
      else this.sender.sendSoon()
      return entry
    } catch (failure) {
      this.fail(asStorageFault(failure))
      if (!urgent) throw failure
      return this.unkept.add(testId, parts)
    }
  }

  /** Somebody has read why an act was refused. False for a fact, which has happened: it is sent again, or saved. */
  async dismiss(ledgerId: string, entryId: string): Promise<boolean> {
    const gone = await this.store.dismiss(entryId)
    await this.refresh(ledgerId)
    return gone
  }

  /** What was refused waits again and is sent as it was made. */
  async sendAgain(entryId: string): Promise<void> {
    const again = await this.store.sendAgain(entryId)
    if (again) await this.refresh(again.entry.ledgerId)
    this.sendNow()
  }

  /** Entries that were saved to a file; gives back how many of them this device did not hold. */
  async takeIn(entries: readonly Waiting[]): Promise<number> {
    const added = await this.store.takeIn(entries)
    for (const ledgerId of new Set(added.map(({ entry }) => entry.ledgerId))) await this.refresh(ledgerId)
    this.sendNow()
    return added.length
  }

  /** Tries at once, instead of when the timer would. */
  sendNow(): void {
    void this.unkept.send()
    this.sender.sendNow()
  }

  /** Compares what was sent with what the server has: how far it is sealed, and whether any of it is lacking. */
  lookAgain(): void {
    this.sender.lookAgain()
  }

  /** Resolves when the sender has nothing to do now. */
  settled(): Promise<void> {
    return this.sender.settled()
  }

  close(): void {
    this.closed = true
    if (this.reopenTimer) clearTimeout(this.reopenTimer)
    this.sender.close()
    this.unkept.close()
    this.channel?.close()
    this.store.close()
  }

  private prune(): void {
    this.pruned = true
    this.store.prune(Date.now()).catch((failure: unknown) => this.fail(asStorageFault(failure)))
  }

  private async refresh(ledgerId: string): Promise<void> {
    if (this.closed) return
    try {
      const [waiting, refused] = await Promise.all([this.store.waitingOf(ledgerId), this.store.attention()])
      this.ledgers.set(ledgerId, {
        loaded: true,
        pending: [...waiting.map(({ entry }) => entry), ...this.unkept.of(ledgerId)],
        attention: refused.filter(({ entry }) => entry.ledgerId === ledgerId),
        ...ofTheDevice(this.totals),
      })
      await this.count()
    } catch (failure) {
      this.fail(asStorageFault(failure))
    }
  }

  private async count(): Promise<void> {
    if (this.closed) return
    try {
      const [waiting, refused] = await Promise.all([this.store.waiting(), this.store.attention()])
      const unkept = this.unkept.all()
      const ledgers = [...new Set([...waiting, ...unkept, ...refused].map(({ entry }) => entry.ledgerId))]
      this.totals = { ...this.totals, loaded: true, unsent: waiting.length + unkept.length, attention: refused.length, ledgers }
      this.notify()
    } catch (failure) {
      this.fail(asStorageFault(failure))
    }
  }

  private fail(fault: StorageFault): void {
    if (this.closed) return
    this.spread({ fault: sayFault(fault), backSince: null })
    if (this.reopenTimer !== null) return
    const wait = Math.min(LONGEST_REOPEN, FIRST_REOPEN * 2 ** Math.min(this.reopened, 10))
    this.reopened += 1
    this.reopenTimer = setTimeout(() => void this.reopen(), wait)
  }

  /** Tries the storage afresh; what stood in memory alone is put on the disk when it works again. */
  private async reopen(): Promise<void> {
    try {
      this.store.close()
      await this.store.probe()
      const unkept = this.unkept.all()
      await this.store.takeIn(unkept)
      this.unkept.handOver(unkept)
    } catch (failure) {
      this.reopenTimer = null
      this.fail(asStorageFault(failure))
      return
    }
    this.reopenTimer = null
    this.reopened = 0
    this.spread({ fault: null, backSince: new Date().toISOString() })
    for (const ledgerId of this.ledgers.keys()) await this.refresh(ledgerId)
    await this.count()
    this.sendNow()
  }

  private showUnkept(ledgerId: string, says: string | null): void {
    const before = this.ledger(ledgerId)
    const unkept = this.unkept.of(ledgerId)
    const kept = before.pending.filter((entry) => !this.shownUnkept.has(entry.id))
    for (const entry of unkept) this.shownUnkept.add(entry.id)
    this.ledgers.set(ledgerId, { ...before, pending: [...kept, ...unkept] })
    this.totals = { ...this.totals, unsent: Math.max(this.totals.unsent, this.unkept.all().length) }
    if (says !== null) this.spread({ sender: { is: 'refused', says } })
    this.notify()
  }

  private spread(change: Partial<OfTheDevice>): void {
    // Tried and failed the same way again: no screen needs drawing for it.
    if (sameState({ ...this.totals, ...change }, this.totals)) return
    this.totals = { ...this.totals, ...change }
    for (const [ledgerId, ledger] of this.ledgers) this.ledgers.set(ledgerId, { ...ledger, ...change })
    this.notify()
  }

  private notify(): void {
    for (const listener of this.listeners) listener()
  }

  private async handOn(testId: string, entries: readonly LedgerEntry[]): Promise<void> {
    await Promise.all([...this.keptListeners].map((listener) => listener(testId, entries)))
  }

  private tell(told: Told): void {
    if (!this.closed) this.channel?.postMessage(told)
  }
}

const LONGEST_WAIT = 20_000

const path = (testId: string) => `/api/proof-tests/${encodeURIComponent(testId)}/entries` as const

/** The outbox of this browser. */
export const outbox = new Outbox({
  databaseName: 'quarterload',
  post: (testId, request) => api.send('POST', appendResponseSchema, path(testId), request, { signal: AbortSignal.timeout(LONGEST_WAIT) }),
  read: (testId, after) => api.get(entriesResponseSchema, path(testId), { query: { after }, signal: AbortSignal.timeout(LONGEST_WAIT) }),
  whoIsSignedIn: async () => (await api.get(sessionResponseSchema, '/api/session')).user.id,
  delay: (failures) => fullJitter(failures, Math.random),
})

// What the server has answered for stands among what is kept of its ledger before it leaves: a reload shows no less.
outbox.onKept((testId, kept) => ledgerCache.add(testId, kept))
