import { v7 as newId } from 'uuid'
import type { AppendRequest, AppendResponse } from '#shared/api/ledger'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { Outbox, type NewEntry } from '../../src/lib/outbox'

export type Deliver = (testId: string, request: AppendRequest) => Promise<AppendResponse>

interface TabletParts {
  name: string
  userId: string
  /** Carries a request to the server and its answer back, or fails as a network does. */
  deliver: Deliver
  whoIsSignedIn: () => Promise<string>
  /** Milliseconds before it tries again. */
  again: () => number
}

type Clock = Pick<EntryDraft, 'bootId' | 'monotonicMs'>

const gone = new Promise<never>(() => undefined)

/**
 * A person's tablet without its screen: the outbox of the app on a database of its own, which outlives a reload. All
 * tablets of a test run in one program, where the app knows one device only: each names itself on its way out.
 */
export class Tablet {
  readonly deviceId = newId()
  /** What was handed to the outbox and came back as written through to the disk, in that order. */
  readonly written: EntryDraft[] = []
  /** What the server has said it keeps, by id. */
  readonly acknowledged = new Map<string, LedgerEntry>()
  private readonly databaseName = `tablet-${this.deviceId}`
  private readonly clocks = new Map<string, Clock>()
  private loads = 0
  private outbox: Outbox

  constructor(private readonly parts: TabletParts) {
    this.outbox = this.load()
  }

  get name(): string {
    return this.parts.name
  }

  get userId(): string {
    return this.parts.userId
  }

  private load(): Outbox {
    this.loads += 1
    const load = this.loads
    const outbox = new Outbox({
      databaseName: this.databaseName,
      // A page that is gone sends nothing more, and hears no answer.
      post: async (testId, request) => {
        if (load !== this.loads) return gone
        const answer = await this.parts.deliver(testId, { ...request, entries: request.entries.map((entry) => this.sent(entry)) })
        return load === this.loads ? answer : gone
      },
      whoIsSignedIn: this.parts.whoIsSignedIn,
      delay: this.parts.again,
    })
    outbox.onKept((_testId, entries) => {
      if (load === this.loads) for (const entry of entries) this.acknowledged.set(entry.id, entry)
    })
    outbox.sendAs(this.parts.userId)
    return outbox
  }

  private sent(entry: EntryDraft): EntryDraft {
    return { ...entry, ...this.clocks.get(entry.id), deviceId: this.deviceId }
  }

  /** The page is loaded again, whatever it was doing; the database stays. */
  reload(): void {
    const before = this.outbox
    this.outbox = this.load()
    before.close()
  }

  close(): void {
    this.loads += 1
    this.outbox.close()
  }

  /** Resolves when the entry is written through, as a screen waits before it shows a reading as kept. */
  async enter(testId: string, what: Pick<NewEntry, 'kind' | 'payload'>, clock?: Clock): Promise<EntryDraft> {
    const load = this.loads
    const id = newId()
    if (clock) this.clocks.set(id, clock)
    const entry = await this.outbox.enqueue(testId, { ...what, id, ledgerId: testId, authorId: this.parts.userId, basedOnSeq: 1 })
    if (load !== this.loads) return gone
    this.written.push(this.sent(entry))
    return entry
  }

  sendNow(): void {
    this.outbox.sendNow()
  }

  /** Nothing waits, and nothing that was written through is without the server's answer. */
  isSent(testId: string): boolean {
    const { loaded, pending } = this.outbox.ledger(testId)
    return loaded && pending.length === 0 && this.written.every(({ id }) => this.acknowledged.has(id))
  }
}
