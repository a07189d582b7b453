import type { AppendRequest, AppendResponse, AppendResult, EntriesResponse } from '#shared/api/ledger'
import type { ProblemBody } from '#shared/api/problem'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { PROOF_TEST_ACTS } from '#shared/proof-test/entries'
import type { Waiting } from './outbox-database'
import type { OutboxStore } from './outbox-store'
import { ProblemError, UnreadableAnswer } from './problem'
import { StorageFault } from './storage-fault'

export type SenderState =
  | { is: 'idle' }
  | { is: 'sending' }
  /** Nothing answered, or the server was too busy: it is tried again by itself. */
  | { is: 'waiting' }
  /** The session ended: nothing is sent until the same person has signed in again. */
  | { is: 'signed-out' }
  /** Somebody else is signed in: what this page's person made waits until that person is back. */
  | { is: 'other-person' }
  /** The server would not take the request as a whole. */
  | { is: 'refused'; says: string }

export interface SenderParts {
  /** Of the lock that keeps a browser to one sender. */
  lockName: string
  store: OutboxStore
  post: (testId: string, request: AppendRequest) => Promise<AppendResponse>
  /** What the server has of a test after a number; without it, a server that was put back in time is not noticed. */
  read?: (testId: string, after: number) => Promise<EntriesResponse>
  /** The id of whoever is signed in now; throws when nobody is, or nothing answers. */
  whoIsSignedIn: () => Promise<string>
  delay: (failures: number) => number
  onState: (state: SenderState) => void
  /** The server has these; they leave what waits after this is done. */
  onKept: (testId: string, kept: readonly LedgerEntry[]) => Promise<void>
  /** Something of this ledger left, or came to need attention. */
  onMoved: (testId: string, ledgerId: string, kept: LedgerEntry[]) => Promise<void>
  onFault: (fault: StorageFault) => void
}

const MOST_AT_ONCE = 50

/**
 * One sender at a time, over all tabs where the browser can say so. Where it can't, two may send the same entries: each
 * sends from the first that waits on, so that the order stands, and the server keeps an id once.
 */
async function alone(lockName: string, work: () => Promise<void>): Promise<void> {
  if (typeof navigator !== 'undefined' && 'locks' in navigator) await navigator.locks.request(lockName, work)
  else await work()
}

/** What goes in one request: of one device, and nothing after an act, which may be refused. */
function nextBatch(waiting: readonly Waiting[]): Waiting[] {
  const device = waiting[0]?.entry.deviceId
  const ofDevice = waiting.findIndex(({ entry }) => entry.deviceId !== device)
  const act = waiting.findIndex(({ entry }) => PROOF_TEST_ACTS.has(entry.kind))
  const ends = [ofDevice === -1 ? waiting.length : ofDevice, act === -1 ? waiting.length : act + 1, MOST_AT_ONCE]
  return waiting.slice(0, Math.min(...ends))
}

function byLedger(waiting: readonly Waiting[]): Waiting[][] {
  const groups = new Map<string, Waiting[]>()
  for (const one of waiting) groups.set(one.entry.ledgerId, [...(groups.get(one.entry.ledgerId) ?? []), one])
  return [...groups.values()]
}

/** The request itself could not be read: one of its entries is at fault, not the moment. */
const isUnreadable = (failure: unknown): failure is ProblemError =>
  failure instanceof ProblemError && [400, 413, 422].includes(failure.status)

/** One ledger that is refused holds up no other; a lost link or an ended session holds up all of them. */
const holdsUpAll = (failure: unknown): boolean =>
  !(failure instanceof ProblemError) || failure.status === 401 || failure.status === 408 || failure.status === 429 || failure.status >= 500

const asProblem = (failure: ProblemError): ProblemBody => ({
  type: 'about:blank',
  title: 'Not taken',
  status: failure.status,
  code: failure.code,
  detail: failure.detail,
})

const keptIn = (answer: AppendResponse): LedgerEntry[] =>
  answer.results.flatMap((result) => (result.outcome === 'kept' ? [result.entry] : []))

/** Sends what waits, in order, as often as it takes. */
export class OutboxSender {
  private readonly parts: SenderParts
  /** Whom the page shows as signed in. */
  private pagePersonId: string | null = null
  /** Who really is, as far as known: only this person's entries are sent. */
  private personId: string | null = null
  /** The session ended or changed hands: asked before anything else is sent. */
  private unsure = false
  private sending: Promise<void> | null = null
  private askedAgain = false
  private failures = 0
  private timer: ReturnType<typeof setTimeout> | null = null
  /** Until then the server asked to be left alone. */
  private notBefore = 0
  private readonly looked = new Set<string>()
  private closed = false

  constructor(parts: SenderParts) {
    this.parts = parts
  }

  /** Only this person's entries are sent: a tablet handed over must not re-attribute. */
  sendAs(personId: string | null): void {
    if (this.pagePersonId === personId && this.personId === personId && !this.unsure) return
    this.pagePersonId = personId
    this.personId = personId
    this.unsure = false
    if (personId !== null) this.sendNow()
  }

  /** Tries at once, instead of when the timer would. */
  sendNow(): void {
    if (this.closed) return
    if (this.timer) clearTimeout(this.timer)
    this.timer = null
    this.askedAgain = true
    this.sending ??= this.sendUntilQuiet().finally(() => {
      this.sending = null
      // Asked for while the last round was being ended.
      if (this.askedAgain && this.timer === null) this.sendNow()
    })
  }

  /** The same for what can bide its time: a server that asked to be left alone is. */
  sendSoon(): void {
    if (Date.now() >= this.notBefore) this.sendNow()
  }

  /** Compares what was sent with what the server has; what it lacks is sent again. */
  lookAgain(): void {
    this.looked.clear()
    this.sendNow()
  }

  async settled(): Promise<void> {
    while (this.sending) await this.sending
  }

  close(): void {
    this.closed = true
    if (this.timer) clearTimeout(this.timer)
  }

  private async sendUntilQuiet(): Promise<void> {
    try {
      while (this.askedAgain && !this.closed) {
        this.askedAgain = false
        await alone(this.parts.lockName, () => this.sendAll())
      }
      if (this.isAnother() && (await this.pagePersonWaits())) {
        this.unsure = true
        this.parts.onState({ is: 'other-person' })
        this.tryLater(null)
        return
      }
      this.failures = 0
      this.parts.onState({ is: 'idle' })
    } catch (failure) {
      this.askedAgain = false
      this.say(failure)
      this.tryLater(failure)
    }
  }

  private isAnother(): boolean {
    return this.pagePersonId !== null && this.personId !== this.pagePersonId
  }

  private async pagePersonWaits(): Promise<boolean> {
    return (await this.parts.store.waiting()).some(({ entry }) => entry.authorId === this.pagePersonId)
  }

  private say(failure: unknown): void {
    if (failure instanceof StorageFault) this.parts.onFault(failure)
    if (failure instanceof ProblemError && failure.status === 401) {
      this.unsure = true
      this.parts.onState({ is: 'signed-out' })
    } else if (failure instanceof ProblemError && !holdsUpAll(failure)) this.parts.onState({ is: 'refused', says: failure.detail })
    else if (failure instanceof UnreadableAnswer) {
      this.parts.onState({ is: 'refused', says: 'This page is older than the server and can’t read its answer. Load it again.' })
    } else this.parts.onState({ is: 'waiting' })
  }

  private tryLater(failure: unknown): void {
    if (this.closed) return
    const asked = failure instanceof ProblemError ? (failure.retryAfterMs ?? 0) : 0
    this.notBefore = Date.now() + asked
    const wait = asked + this.parts.delay(this.failures)
    this.failures += 1
    if (this.timer) clearTimeout(this.timer)
    this.timer = setTimeout(() => this.sendNow(), wait)
  }

  private async sendAll(): Promise<void> {
    if (this.unsure) {
      this.personId = await this.parts.whoIsSignedIn()
      this.unsure = false
    }
    for (;;) {
      const mine = (await this.parts.store.waiting()).filter(({ entry }) => entry.authorId === this.personId)
      if (mine.length === 0) break
      this.parts.onState({ is: 'sending' })
      let failed: unknown
      let moved = false
      for (const waiting of byLedger(mine)) {
        try {
          moved = (await this.sendBatch(nextBatch(waiting))) || moved
        } catch (failure) {
          if (holdsUpAll(failure)) throw failure
          failed = failure
        }
      }
      if (!moved) throw failed ?? new Error('The server answered, but kept nothing.')
    }
    await this.lookAtLedgers()
  }

  /** True when something left the outbox. */
  private async sendBatch(batch: readonly Waiting[]): Promise<boolean> {
    const [first] = batch
    if (!first || this.closed) return false
    let answer: AppendResponse
    try {
      answer = await this.post(batch)
    } catch (failure) {
      if (failure instanceof ProblemError && !holdsUpAll(failure) && (await this.handedOver(first))) return true
      if (!isUnreadable(failure)) throw failure
      // One entry that can't be read must not hold up the others, among them perhaps a stop.
      if (batch.length > 1) return this.sendEach(batch)
      await this.setAside(first, asProblem(failure))
      return true
    }
    const left = await this.takeAnswer(batch, answer)
    await this.fillGaps(first, answer)
    return left
  }

  private async sendEach(batch: readonly Waiting[]): Promise<boolean> {
    let moved = false
    for (const one of batch) moved = (await this.sendBatch([one])) || moved
    return moved
  }

  private post(batch: readonly Waiting[]): Promise<AppendResponse> {
    return this.parts.post(batch[0]?.testId ?? '', { sentAt: new Date().toISOString(), entries: batch.map(({ entry }) => entry) })
  }

  private async takeAnswer(batch: readonly Waiting[], answer: AppendResponse): Promise<boolean> {
    const [first] = batch
    if (!first) return false
    const kept = keptIn(answer)
    await this.parts.onKept(first.testId, kept)
    let left = false
    for (const one of batch) {
      const result = answer.results.find(({ id }) => id === one.entry.id)
      if (result) left = (await this.takeResult(one, result)) || left
    }
    await this.parts.onMoved(first.testId, first.entry.ledgerId, kept)
    return left
  }

  private async takeResult(one: Waiting, result: AppendResult): Promise<boolean> {
    if (result.outcome === 'kept') await this.parts.store.moveToSent(one, result.entry, new Date().toISOString())
    // Not the entry is refused but the person who is signed in now: it waits for its own.
    else if (result.problem.status === 403 && (await this.handedOver(one))) return true
    else await this.parts.store.setAside({ ...one, problem: result.problem, at: new Date().toISOString() })
    return true
  }

  private async setAside(one: Waiting, problem: ProblemBody): Promise<void> {
    await this.parts.store.setAside({ ...one, problem, at: new Date().toISOString() })
    await this.parts.onMoved(one.testId, one.entry.ledgerId, [])
  }

  /** Whether somebody else than the author has signed in meanwhile; from then on only that person's entries are sent. */
  private async handedOver({ entry }: Waiting): Promise<boolean> {
    this.personId = await this.parts.whoIsSignedIn()
    return this.personId !== entry.authorId
  }

  /** The server lacks numbers of this device: what is still here of them is sent again, oldest first. */
  private async fillGaps({ testId, entry }: Waiting, answer: AppendResponse): Promise<void> {
    const { resendFrom } = answer
    if (resendFrom === null) return
    const runs = answer.missing ?? [[resendFrom, entry.deviceSeq - 1] as const]
    const found = await this.parts.store.fill(entry.ledgerId, entry.deviceId, runs)
    await this.resend(testId, found)
  }

  private async resend(testId: string, entries: readonly Waiting[]): Promise<void> {
    const mine = entries.filter(({ entry }) => entry.authorId === this.personId)
    for (let start = 0; start < mine.length; start += MOST_AT_ONCE) {
      const batch = mine.slice(start, start + MOST_AT_ONCE).map(({ entry }) => ({ testId, entry }))
      await this.takeAnswer(batch, await this.post(batch))
    }
  }

  /**
   * A server that was restored from a backup lacks what came after it, and nobody would notice while nothing new is
   * sent. So each ledger is compared once: what was sent last must still stand where the server said it does.
   */
  private async lookAtLedgers(): Promise<void> {
    const { read, store } = this.parts
    if (!read) return
    const sent = (await store.sent()).filter(({ entry }) => entry.authorId === this.personId && !this.looked.has(entry.ledgerId))
    for (const ledger of byLedger(sent)) {
      const [first] = ledger
      if (!first) continue
      const { ledgerId } = first.entry
      this.looked.add(ledgerId)
      const last = sent.filter(({ entry }) => entry.ledgerId === ledgerId).reduce((a, b) => (b.seq > a.seq ? b : a))
      try {
        const answer = await read(first.testId, last.seq - 1)
        // What is said of another ledger, by a proxy that mixes answers up, tells nothing about this one.
        if (answer.ledgerId !== ledgerId) continue
        if (answer.entries[0]?.hash !== last.hash) await this.resend(first.testId, ledger)
        else await store.markSealed(ledgerId, Math.max(0, ...answer.sealed.map(({ seq }) => seq)))
        await this.parts.onMoved(first.testId, ledgerId, [])
      } catch (failure) {
        if (!holdsUpAll(failure)) continue
        this.looked.delete(ledgerId)
        throw failure
      }
    }
  }
}
