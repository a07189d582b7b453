// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { LedgerDouble } from '../../tests/support/ledger-double'
import { Outbox, type NewEntry } from './outbox'
import { ProblemError } from './problem'
import { readStrandedFile, strandedFile } from './stranded-file'

const testId = '01990000-0000-7000-8000-000000000001'
const lead = '01990000-0000-7000-8000-000000000003'
const other = '01990000-0000-7000-8000-000000000004'

const entry = (note: string, more: Partial<NewEntry> = {}): NewEntry => ({
  ledgerId: testId,
  kind: 'observed',
  payload: { note },
  authorId: lead,
  basedOnSeq: 1,
  ...more,
})
const problem = (status: number, code: string) => ({ type: 'about:blank' as const, title: 'No', status, code, detail: `Refused: ${code}.` })

let names = 0
const opened: Outbox[] = []
function open(server: LedgerDouble, databaseName = `sender-${(names += 1)}`, post = server.post): Outbox {
  const box = new Outbox({ databaseName, post, read: server.read, whoIsSignedIn: server.whoIsSignedIn, delay: () => 5 })
  opened.push(box)
  return box
}
afterEach(() => {
  for (const box of opened.splice(0)) box.close()
  vi.unstubAllGlobals()
})
const notes = (server: LedgerDouble) => server.kept.map((one) => one.payload['note'])
const send = async (box: Outbox, ...made: string[]) => {
  for (const note of made) await box.enqueue(testId, entry(note))
  await box.settled()
}

describe('the outbox and a fact that the server refuses', () => {
  it('keeps it with its reason, sends what comes after, and sends it again as it was', async () => {
    const server = new LedgerDouble(lead)
    server.refuse = (one) => (one.payload['note'] === 'new kind' ? problem(422, 'unknown-kind') : null)
    const box = open(server)
    box.sendAs(lead)
    await send(box, 'before', 'new kind', 'after')
    expect(notes(server)).toEqual(['before', 'after'])
    const [refused] = (await box.contents()).attention
    expect(refused?.problem.detail).toBe('Refused: unknown-kind.')
    expect(await box.dismiss(testId, refused?.entry.id ?? '')).toBe(false)
    expect((await box.contents()).attention).toHaveLength(1)
    server.refuse = () => null
    await box.sendAgain(refused?.entry.id ?? '')
    await box.settled()
    expect(notes(server)).toEqual(['before', 'after', 'new kind'])
    expect(server.kept.at(-1)).toMatchObject(refused?.entry ?? {})
    expect(box.summary()).toMatchObject({ unsent: 0, attention: 0 })
  })

  it('sends one by one what can’t be read together, so that one bad entry holds up no stop', async () => {
    const server = new LedgerDouble(lead)
    const box = open(server, undefined, async (id, request) => {
      if (request.entries.some((one) => one.payload['note'] === 'bad')) throw new ProblemError(400, problem(400, 'invalid'))
      return server.post(id, request)
    })
    for (const note of ['good', 'bad', 'stop']) await box.enqueue(testId, entry(note))
    box.sendAs(lead)
    await box.settled()
    expect(notes(server)).toEqual(['good', 'stop'])
    expect((await box.contents()).attention.map((one) => one.problem.code)).toEqual(['invalid'])
  })
})

describe('the outbox and whoever is signed in', () => {
  it('holds entries back, unrefused, while another person’s session is in the browser', async () => {
    const server = new LedgerDouble(lead)
    const box = open(server)
    box.sendAs(lead)
    box.ledger(testId)
    server.signedIn = other
    await box.enqueue(testId, entry('mine'))
    await vi.waitFor(() => expect(box.ledger(testId).sender.is).toBe('other-person'))
    expect(server.kept).toEqual([])
    expect(await box.contents()).toMatchObject({ attention: [], waiting: [{ entry: { payload: { note: 'mine' } } }] })
    server.signedIn = lead
    await vi.waitFor(() => expect(notes(server)).toEqual(['mine']))
    await vi.waitFor(() => expect(box.ledger(testId).sender.is).toBe('idle'))
  })
})

describe('the outbox and a server that lacks something', () => {
  it('fills a gap with what it still has', async () => {
    const server = new LedgerDouble(lead)
    const box = open(server)
    box.sendAs(lead)
    await send(box, 'one', 'two', 'three')
    server.kept.splice(1, 1)
    await send(box, 'four')
    expect(notes(server).toSorted()).toEqual(['four', 'one', 'three', 'two'])
  })

  it('notices after a reload that an old backup was put back, and fills it, with nothing new to send', async () => {
    const server = new LedgerDouble(lead)
    const box = open(server, 'restored')
    box.sendAs(lead)
    await send(box, 'one', 'two', 'three')
    box.close()
    server.backTo(1)
    const again = open(server, 'restored')
    again.sendAs(lead)
    await again.settled()
    expect(notes(server)).toEqual(['one', 'two', 'three'])
  })

  it('sends nothing again because of what is said about another ledger', async () => {
    const server = new LedgerDouble(lead)
    const box = open(server, 'mixed up')
    box.sendAs(lead)
    await send(box, 'one', 'two')
    box.close()
    const requests = server.requests.length
    const elsewhere = new LedgerDouble(lead)
    const read = async (_id: string, after: number) => ({ ...(await elsewhere.read(other, after)), ledgerId: other })
    const again = new Outbox({ databaseName: 'mixed up', post: server.post, read, whoIsSignedIn: server.whoIsSignedIn, delay: () => 5 })
    opened.push(again)
    again.sendAs(lead)
    await again.settled()
    expect(server.requests).toHaveLength(requests)
    expect((await again.contents()).sent).toHaveLength(2)
  })

  it('asks for nothing again and again when a number will never come: a refused act’s', async () => {
    const server = new LedgerDouble(lead)
    server.refuse = (one) => (one.kind === 'concluded' ? problem(409, 'refused') : null)
    const box = open(server)
    box.sendAs(lead)
    await box.enqueue(testId, entry('conclusion', { kind: 'concluded' }))
    await send(box, 'after', 'later')
    const requests = server.requests.length
    await send(box, 'last')
    expect(server.requests.length).toBe(requests + 1)
    expect(server.kept.map((one) => one.deviceSeq)).toEqual([2, 3, 4])
  })

  it('learns what is sealed', async () => {
    const server = new LedgerDouble(lead)
    const box = open(server)
    box.sendAs(lead)
    await send(box, 'one', 'two')
    server.sealedSeq = 1
    box.lookAgain()
    await box.settled()
    expect((await box.contents()).sent.map((one) => one.sealed)).toEqual([true, false])
  })
})

describe('the outbox and a server that asks to be left alone', () => {
  it('waits as long as Retry-After says, but not with a stop', async () => {
    const server = new LedgerDouble(lead)
    let busy = true
    let asked = 0
    const box = open(server, undefined, (id, request) => {
      asked += 1
      return busy ? Promise.reject(new ProblemError(503, problem(503, 'try-again'), 60_000)) : server.post(id, request)
    })
    box.sendAs(lead)
    await send(box, 'one')
    expect(asked).toBe(1)
    await send(box, 'two')
    await new Promise((resolve) => setTimeout(resolve, 40))
    expect(asked).toBe(1)
    busy = false
    await box.enqueue(testId, entry('stop', { kind: 'stopped' }))
    await box.settled()
    expect(notes(server)).toEqual(['one', 'two', 'stop'])
  })
})

/** Web Locks as the standard has them, for one name: who asks waits for who has it. */
function locks() {
  let last: Promise<unknown> = Promise.resolve()
  return {
    request: (_name: string, work: () => Promise<void>) => {
      const mine = last.then(work)
      last = mine.catch(() => undefined)
      return mine
    },
  }
}

describe('the outbox in two tabs', () => {
  it('sends from one of them at a time under Web Locks', async () => {
    vi.stubGlobal('navigator', Object.assign(Object.create(navigator) as Navigator, { locks: locks() }))
    const server = new LedgerDouble(lead)
    const [one, two] = [open(server, 'tabs'), open(server, 'tabs')]
    for (const box of [one, two]) box.sendAs(lead)
    await Promise.all(Array.from({ length: 12 }, (_unused, index) => (index % 2 ? one : two).enqueue(testId, entry(String(index)))))
    await vi.waitFor(() => expect(server.kept).toHaveLength(12))
    await Promise.all([one.settled(), two.settled()])
    expect(server.mostAtOnce).toBe(1)
    expect(server.kept.map((kept) => kept.deviceSeq)).toEqual(Array.from({ length: 12 }, (_unused, index) => index + 1))
  })

  it('still keeps each once and in order where the browser has no locks', async () => {
    const server = new LedgerDouble(lead)
    const [one, two] = [open(server, 'lockless'), open(server, 'lockless')]
    for (const box of [one, two]) box.sendAs(lead)
    await Promise.all(Array.from({ length: 12 }, (_unused, index) => (index % 2 ? one : two).enqueue(testId, entry(String(index)))))
    await vi.waitFor(() => expect(server.kept).toHaveLength(12))
    expect(server.kept.map((kept) => kept.deviceSeq)).toEqual(Array.from({ length: 12 }, (_unused, index) => index + 1))
  })
})

describe('an entry whose tab is gone before it was sent', () => {
  it('is sent by the other tab at once', async () => {
    const server = new LedgerDouble(lead)
    const [writes, stays] = [open(server, 'closed early'), open(server, 'closed early')]
    stays.sendAs(lead)
    await stays.settled()
    await writes.enqueue(testId, entry('the last thing it did'))
    writes.close()
    await vi.waitFor(() => expect(notes(server)).toEqual(['the last thing it did']))
  })
})

describe('entries that are carried by file', () => {
  it('go out from another device as they were made, and taken in twice are entered once', async () => {
    const server = new LedgerDouble(null)
    const tablet = open(server, 'tablet')
    for (const note of ['one', 'two']) await tablet.enqueue(testId, entry(note))
    const { waiting } = await tablet.contents()
    const text = strandedFile({ author: { id: lead, name: 'Rosa' }, entries: waiting, savedAt: new Date() })
    const read = readStrandedFile(text)
    if (!read.whole) throw new Error(read.says)
    server.signedIn = lead
    const desktop = open(server, 'desktop')
    desktop.sendAs(lead)
    expect(await desktop.takeIn(read.file.entries)).toBe(2)
    await desktop.settled()
    expect(server.kept.map(({ id, deviceSeq }) => ({ id, deviceSeq }))).toEqual(
      waiting.map((one) => ({ id: one.entry.id, deviceSeq: one.entry.deviceSeq })),
    )
    expect(await desktop.takeIn(read.file.entries)).toBe(0)
    // And the tablet, when it is back, sends the same again.
    tablet.sendAs(lead)
    await tablet.settled()
    expect(notes(server)).toEqual(['one', 'two'])
    expect((await tablet.contents()).waiting).toEqual([])
  })
})
