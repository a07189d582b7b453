import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import { LedgerStream } from './stream'

/** What a browser would have open to the server. */
class FakeSource extends EventTarget {
  static all: FakeSource[] = []
  closed = false

  constructor(readonly url: string) {
    super()
    FakeSource.all.push(this)
  }

  close(): void {
    this.closed = true
  }

  tell(event: string, data: object = {}): void {
    this.dispatchEvent(Object.assign(new Event(event), { data: JSON.stringify(data) }))
  }

  get watched(): string[] {
    return (new URL(this.url, 'http://shop.example').searchParams.get('ledgers') ?? '').split(',')
  }
}

/** Tabs of one browser hear each other, but not themselves. */
class FakeChannel extends EventTarget {
  static all = new Set<FakeChannel>()

  constructor() {
    super()
    FakeChannel.all.add(this)
  }

  postMessage(data: unknown): void {
    for (const other of FakeChannel.all) if (other !== this) other.dispatchEvent(Object.assign(new Event('message'), { data }))
  }
}

/** One lock: the first who asks holds it until the tab goes, then the next. */
class FakeLocks {
  private readonly waiting: (() => unknown)[] = []

  request(_name: string, callback: () => unknown): Promise<unknown> {
    this.waiting.push(callback)
    if (this.waiting.length === 1) callback()
    return new Promise(() => undefined)
  }

  holderGoes(): void {
    this.waiting.shift()
    this.waiting[0]?.()
  }
}

const open = () => FakeSource.all.filter((source) => !source.closed)
const settle = () => vi.advanceTimersByTime(100)

let locks: FakeLocks

beforeEach(() => {
  vi.useFakeTimers()
  FakeSource.all = []
  FakeChannel.all.clear()
  locks = new FakeLocks()
  vi.stubGlobal('EventSource', FakeSource)
  vi.stubGlobal('BroadcastChannel', FakeChannel)
  vi.stubGlobal('navigator', { locks })
})

afterEach(() => {
  vi.unstubAllGlobals()
  vi.useRealTimers()
})

/** A tab that watches ledgers and counts how often it was told to ask. */
function tab(...ids: string[]) {
  const page = new EventTarget()
  vi.stubGlobal('window', page)
  const stream = new LedgerStream()
  const asks = new Map(ids.map((id) => [id, 0]))
  const stops = ids.map((id) => stream.watch(id, () => asks.set(id, (asks.get(id) ?? 0) + 1)))
  return {
    stream,
    asks: (id: string) => asks.get(id) ?? 0,
    stop: () => stops.forEach((stop) => stop()),
    page,
    /** As a crash ends it: without a word. */
    goes: (channels: ReadonlySet<FakeChannel>) => {
      for (const channel of channels) FakeChannel.all.delete(channel)
      FakeSource.all.forEach((source) => source.close())
      locks.holderGoes()
    },
  }
}

describe('the stream of a browser', () => {
  it('is one for all its tabs, watches what any of them wants, and tells each of its own', () => {
    const one = tab('a')
    const two = tab('b')
    settle()
    expect(open()).toHaveLength(1)
    expect(open()[0]?.watched).toEqual(['a', 'b'])
    open()[0]?.tell('heads', { heads: { a: 3, b: 7 } })
    expect([one.stream.hears('a'), two.stream.hears('b')]).toEqual([true, true])
    const before = [one.asks('a'), two.asks('b')]
    open()[0]?.tell('heads', { heads: { b: 8 } })
    expect([one.asks('a'), two.asks('b')]).toEqual([before[0], (before[1] ?? 0) + 1])
  })

  it('goes over to the next tab when the one that has it goes', () => {
    const one = tab('a')
    const ownChannel = new Set(FakeChannel.all)
    const two = tab('b')
    settle()
    open()[0]?.tell('heads', { heads: { a: 1, b: 1 } })
    one.goes(ownChannel)
    settle()
    expect(open()).toHaveLength(1)
    expect(open()[0]?.watched).toEqual(['b'])
    open()[0]?.tell('heads', { heads: { b: 2 } })
    expect(two.stream.hears('b')).toBe(true)
  })

  it('counts as gone when nothing was heard for longer than two beats: every tab asks by itself again', () => {
    const one = tab('a')
    const two = tab('b')
    settle()
    const [source] = open()
    source?.tell('heads', { heads: { a: 1, b: 1 } })
    vi.advanceTimersByTime(8_000)
    source?.tell('beat')
    vi.advanceTimersByTime(8_000)
    expect([one.stream.hears('a'), two.stream.hears('b')]).toEqual([true, true])
    const before = [one.asks('a'), two.asks('b')]
    vi.advanceTimersByTime(1_500)
    expect([one.stream.hears('a'), two.stream.hears('b')]).toEqual([false, false])
    expect([one.asks('a') > (before[0] ?? 0), two.asks('b') > (before[1] ?? 0)]).toEqual([true, true])
    expect(source?.closed).toBe(true)
    vi.advanceTimersByTime(2_000)
    expect(open()).toHaveLength(1)
  })

  it('counts as gone at once when it breaks, when the browser is cut off, and when the session ends; then tries again, later each time', () => {
    const one = tab('a')
    settle()
    for (const cut of [() => open()[0]?.tell('error'), () => open()[0]?.tell('signed-out')]) {
      open()[0]?.tell('heads', { heads: { a: 1 } })
      expect(one.stream.hears('a')).toBe(true)
      cut()
      expect(one.stream.hears('a')).toBe(false)
      expect(open()).toHaveLength(0)
      vi.advanceTimersByTime(4_000)
      expect(open()).toHaveLength(1)
    }
    open()[0]?.tell('heads', { heads: { a: 1 } })
    one.page.dispatchEvent(new Event('offline'))
    expect(one.stream.hears('a')).toBe(false)
    for (let failures = 0; failures < 8; failures += 1) {
      open()[0]?.tell('error')
      vi.advanceTimersByTime(30_000)
    }
    expect(FakeSource.all.length).toBeLessThan(12)
  })

  it('does not say that it hears a ledger that the server keeps to itself, and is not opened when nothing is watched', () => {
    const one = tab('a', 'foreign')
    settle()
    open()[0]?.tell('heads', { heads: { a: 1 } })
    expect([one.stream.hears('a'), one.stream.hears('foreign')]).toEqual([true, false])
    one.stop()
    settle()
    expect(open()).toHaveLength(0)
  })

  it('leaves asking to the views where the browser has no such thing', () => {
    vi.stubGlobal('EventSource', undefined)
    expect(tab('a').stream.hears('a')).toBe(false)
  })
})
