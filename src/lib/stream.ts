import { headsEventSchema, MOST_WATCHED, STREAM_EVENTS } from '#shared/api/stream'
import { apiUrl } from './api-client'

/** Longer than two beats of the server: then the stream counts as broken, whatever the browser thinks of it. */
const SILENCE = 9_000
const SETTLE = 60
const LONGEST_WAIT = 30_000
const LOCK = 'quarterload-stream'

/** What tabs of one browser tell each other: what each wants watched, and what the one with the stream has heard. */
type Message =
  | { says: 'want'; tab: string; ids: readonly string[] }
  | { says: 'gone'; tab: string }
  | { says: 'who' }
  | { says: 'up'; ids: readonly string[] }
  | { says: 'down' }
  | { says: 'moved'; ids: readonly string[] }

type Listener = () => void

/**
 * One stream of the server for all tabs of a browser. The tab that holds the Web Lock has it and passes on what it
 * hears; without Web Locks each tab has its own. Whoever watches a ledger is called when it has grown, and when the
 * stream came up or broke: then it asks the server, once.
 */
export class LedgerStream {
  private readonly tab = Math.random().toString(36).slice(2)
  private readonly listeners = new Map<string, Set<Listener>>()
  private readonly wants = new Map<string, readonly string[]>()
  private channel: BroadcastChannel | undefined
  private source: EventSource | undefined
  private isLeader = false
  private begun = false
  private failures = 0
  private covered: ReadonlySet<string> = new Set()
  private asked: readonly string[] = []
  private settling: ReturnType<typeof setTimeout> | undefined
  private silence: ReturnType<typeof setTimeout> | undefined
  private retry: ReturnType<typeof setTimeout> | undefined

  /** Calls back whenever the ledger should be asked for; returns how to stop. */
  watch(ledgerId: string, listener: Listener): () => void {
    this.begin()
    const already = this.listeners.get(ledgerId)
    const set = already ?? new Set<Listener>()
    set.add(listener)
    if (already === undefined) {
      this.listeners.set(ledgerId, set)
      this.tellWants()
    }
    return () => {
      set.delete(listener)
      if (set.size > 0) return
      this.listeners.delete(ledgerId)
      this.tellWants()
    }
  }

  /** Whether this ledger's growth is heard of at once, so that it need not be asked for again and again. */
  hears(ledgerId: string): boolean {
    return this.covered.has(ledgerId)
  }

  private begin(): void {
    if (this.begun || typeof EventSource === 'undefined') return
    this.begun = true
    // A browser that knows it is cut off says so long before a silence would.
    window.addEventListener('offline', () => this.lost())
    window.addEventListener('online', () => this.isLeader && this.reopen())
    if (typeof BroadcastChannel === 'undefined' || !('locks' in navigator)) {
      this.isLeader = true
      return
    }
    this.channel = new BroadcastChannel(LOCK)
    this.channel.addEventListener('message', ({ data }: MessageEvent<Message>) => this.hear(data))
    window.addEventListener('pagehide', () => this.post({ says: 'gone', tab: this.tab }))
    window.addEventListener('pageshow', () => this.tellWants())
    // Held until the tab goes: then the browser gives it to the next.
    void navigator.locks.request(LOCK, () => {
      this.isLeader = true
      // Whoever is still there says again what it wants; a tab that crashed doesn't.
      this.wants.clear()
      this.post({ says: 'who' })
      this.tellWants()
      this.reopen()
      return new Promise(() => undefined)
    })
  }

  private post(message: Message): void {
    this.channel?.postMessage(message)
  }

  private tellWants(): void {
    const ids = [...this.listeners.keys()]
    this.wants.set(this.tab, ids)
    this.post({ says: 'want', tab: this.tab, ids })
    if (this.isLeader) this.settle()
  }

  private hear(message: Message): void {
    switch (message.says) {
      case 'who':
        return this.tellWants()
      case 'want':
        this.wants.set(message.tab, message.ids)
        break
      case 'gone':
        this.wants.delete(message.tab)
        break
      case 'up':
        return this.stands(message.ids)
      case 'down':
        return this.lost()
      case 'moved':
        this.expectMore()
        return this.call(message.ids)
    }
    if (this.isLeader) this.settle()
  }

  /** Several views open and close at once: one stream is opened for what they come to. */
  private settle(): void {
    clearTimeout(this.settling)
    this.settling = setTimeout(() => {
      const wanted = this.wanted()
      if (wanted.length === this.asked.length && wanted.every((id) => this.asked.includes(id))) return
      this.reopen()
    }, SETTLE)
  }

  private wanted(): string[] {
    return [...new Set([...this.wants.values()].flat())].slice(0, MOST_WATCHED)
  }

  private reopen(): void {
    clearTimeout(this.retry)
    this.source?.close()
    this.source = undefined
    const ids = this.wanted()
    this.asked = ids
    if (ids.length === 0) return this.lost()
    const source = new EventSource(apiUrl('/api/stream', { ledgers: ids.join(',') }))
    this.source = source
    let heard = false
    source.addEventListener(STREAM_EVENTS.heads, ({ data }: MessageEvent<string>) => {
      const { heads } = headsEventSchema.parse(JSON.parse(data))
      this.failures = 0
      const moved = Object.keys(heads)
      if (!heard) {
        heard = true
        this.post({ says: 'up', ids: moved })
        return this.stands(moved)
      }
      this.post({ says: 'moved', ids: moved })
      this.expectMore()
      this.call(moved)
    })
    source.addEventListener(STREAM_EVENTS.beat, () => {
      this.post({ says: 'moved', ids: [] })
      this.expectMore()
    })
    source.addEventListener(STREAM_EVENTS.signedOut, () => this.breakOff())
    source.addEventListener('error', () => this.breakOff())
  }

  /** Ends the stream and tries again later, each time a little later. */
  private breakOff(): void {
    this.source?.close()
    this.source = undefined
    this.post({ says: 'down' })
    this.lost()
    this.failures += 1
    clearTimeout(this.retry)
    const wait = Math.min(LONGEST_WAIT, 500 * 2 ** this.failures) * (0.5 + Math.random() / 2)
    this.retry = setTimeout(() => this.reopen(), wait)
  }

  private expectMore(): void {
    clearTimeout(this.silence)
    this.silence = setTimeout(() => (this.isLeader ? this.breakOff() : this.lost()), SILENCE)
  }

  private stands(ids: readonly string[]): void {
    this.covered = new Set(ids)
    this.expectMore()
    this.call(ids)
  }

  private lost(): void {
    clearTimeout(this.silence)
    const had = [...this.covered]
    this.covered = new Set()
    this.call(had)
  }

  private call(ids: readonly string[]): void {
    for (const id of ids) for (const listener of this.listeners.get(id) ?? []) listener()
  }
}

export const ledgerStream = new LedgerStream()
