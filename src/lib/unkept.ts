import { v7 as newId } from 'uuid'
import type { AppendRequest, AppendResponse } from '#shared/api/ledger'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { makeEntry, type EntryParts } from './entry'
import type { Waiting } from './outbox-database'
import { ProblemError } from './problem'

interface UnkeptParts {
  post: (testId: string, request: AppendRequest) => Promise<AppendResponse>
  delay: (failures: number) => number
  /** The server has it. */
  onKept: (testId: string, kept: readonly LedgerEntry[]) => void
  /** The list has changed, or the server took none of it and said why. */
  onChange: (ledgerId: string, says: string | null) => void
}

/** Whether trying the same again may help: no link, a busy server, a session that somebody can renew. */
const mayPass = ({ status }: ProblemError): boolean => status >= 500 || [401, 408, 429].includes(status)

/**
 * Stops and releases of a device that can't keep entries: rule R1 lets nothing stand in their way. They stand in the
 * memory of the page and go straight to the server, as often as it takes, under a device's name of their own: what the
 * broken storage holds back would leave a gap in its numbers.
 */
export class UnkeptEntries {
  private readonly parts: UnkeptParts
  private readonly deviceId = newId()
  private readonly counts = new Map<string, number>()
  private waiting: readonly Waiting[] = []
  private sending = false
  private failures = 0
  private timer: ReturnType<typeof setTimeout> | null = null

  constructor(parts: UnkeptParts) {
    this.parts = parts
  }

  of(ledgerId: string): EntryDraft[] {
    return this.waiting.flatMap(({ entry }) => (entry.ledgerId === ledgerId ? [entry] : []))
  }

  all(): readonly Waiting[] {
    return this.waiting
  }

  /** The disk has these now: they are sent from there. */
  handOver(taken: readonly Waiting[]): void {
    this.waiting = this.waiting.filter((one) => !taken.includes(one))
    for (const ledgerId of new Set(taken.map(({ entry }) => entry.ledgerId))) this.parts.onChange(ledgerId, null)
  }

  add(testId: string, parts: Omit<EntryParts, 'id' | 'deviceSeq' | 'deviceId'>): EntryDraft {
    const deviceSeq = (this.counts.get(parts.ledgerId) ?? 0) + 1
    this.counts.set(parts.ledgerId, deviceSeq)
    const entry = makeEntry({ ...parts, id: newId(), deviceId: this.deviceId, deviceSeq })
    this.waiting = [...this.waiting, { testId, entry }]
    this.parts.onChange(entry.ledgerId, null)
    void this.send()
    return entry
  }

  /** Tries at once, instead of when the timer would. */
  async send(): Promise<void> {
    if (this.sending) return
    this.sending = true
    if (this.timer) clearTimeout(this.timer)
    this.timer = null
    for (const one of this.waiting) await this.sendOne(one)
    this.sending = false
    if (this.waiting.length === 0) {
      this.failures = 0
      return
    }
    this.timer = setTimeout(() => void this.send(), this.parts.delay(this.failures))
    this.failures += 1
  }

  close(): void {
    if (this.timer) clearTimeout(this.timer)
  }

  /** A stop has happened: whatever the server answers, it stays until it is kept. */
  private async sendOne(one: Waiting): Promise<void> {
    const { testId, entry } = one
    let says: string | null = null
    try {
      const { results } = await this.parts.post(testId, { sentAt: new Date().toISOString(), entries: [entry] })
      const kept = results.flatMap((result) => (result.outcome === 'kept' ? [result.entry] : []))
      this.parts.onKept(testId, kept)
      if (kept.length > 0) this.waiting = this.waiting.filter((candidate) => candidate !== one)
      const refused = results.find((result) => result.outcome === 'refused')
      says = refused?.outcome === 'refused' ? refused.problem.detail : null
    } catch (failure) {
      says = failure instanceof ProblemError && !mayPass(failure) ? failure.detail : null
    }
    this.parts.onChange(entry.ledgerId, says)
  }
}
