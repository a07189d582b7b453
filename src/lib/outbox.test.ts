// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { AppendRequest, AppendResponse } from '#shared/api/ledger'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { Outbox, type NewEntry } from './outbox'
import { Disconnected, ProblemError } from './problem'

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
const noted = (made: EntryDraft): unknown => made.payload['note']

/** A server that keeps what it is sent, with a link that can be cut. */
class Server {
  readonly kept: EntryDraft[] = []
  readonly requests: AppendRequest[] = []
  down: unknown = null
  refuse: string | null = null

  post = (_testId: string, request: AppendRequest): Promise<AppendResponse> => {
    this.requests.push(request)
    if (this.down) return Promise.reject(this.down as Error)
    const results = request.entries.map((made): AppendResponse['results'][number] => {
      if (made.kind === this.refuse) {
        const problem = {
          type: 'about:blank' as const,
          title: 'Conflict',
          status: 409,
          code: 'refused',
          detail: 'A joint is not examined.',
        }
        return { outcome: 'refused', id: made.id, problem }
      }
      if (!this.kept.some((one) => one.id === made.id)) this.kept.push(made)
      const seq = this.kept.findIndex((one) => one.id === made.id) + 1
      const chained = { seq, receivedAt: made.observedAt, irregular: [], prevHash: '0'.repeat(64), hash: '1'.repeat(64) }
      return { outcome: 'kept', id: made.id, entry: { ...made, ...chained } }
    })
    return Promise.resolve({ results, headSeq: this.kept.length, headHash: '1'.repeat(64), resendFrom: null })
  }
}

let names = 0
const opened: Outbox[] = []
function makeOutbox(server: Server, databaseName = `outbox-${(names += 1)}`, signedIn = () => Promise.resolve(lead)) {
  const box = new Outbox({ databaseName, post: server.post, whoIsSignedIn: signedIn, delay: () => 5 })
  opened.push(box)
  return box
}
afterEach(() => {
  for (const box of opened.splice(0)) box.close()
})
const pendingOf = async (box: Outbox): Promise<readonly EntryDraft[]> => {
  box.ledger(testId)
  await vi.waitFor(() => expect(box.ledger(testId).loaded).toBe(true))
  return box.ledger(testId).pending
}

describe('the outbox', () => {
  it('numbers entries in the order they were made, and sends them in that order', async () => {
    const server = new Server()
    const box = makeOutbox(server)
    await Promise.all(['first', 'second', 'third'].map((note) => box.enqueue(testId, entry(note))))
    expect((await pendingOf(box)).map((made) => [made.deviceSeq, noted(made)])).toEqual([
      [1, 'first'],
      [2, 'second'],
      [3, 'third'],
    ])
    expect(server.requests).toEqual([])
    box.sendAs(lead)
    await box.settled()
    expect(server.kept.map(noted)).toEqual(['first', 'second', 'third'])
    expect(await pendingOf(box)).toEqual([])
  })

  it('goes on counting from what the server has of this device', async () => {
    const box = makeOutbox(new Server())
    expect((await box.enqueue(testId, entry('one'), 7)).deviceSeq).toBe(8)
    expect((await box.enqueue(testId, entry('two'), 7)).deviceSeq).toBe(9)
  })

  it('hands a kept entry on before it leaves', async () => {
    const box = makeOutbox(new Server())
    const seen: { entries: readonly LedgerEntry[]; stillPending: number }[] = []
    box.onKept((_id, entries) => seen.push({ entries, stillPending: box.ledger(testId).pending.length }))
    await pendingOf(box)
    await box.enqueue(testId, entry('kept'))
    box.sendAs(lead)
    await box.settled()
    expect(seen).toHaveLength(1)
    expect(seen[0]?.stillPending).toBe(1)
    expect(seen[0]?.entries[0]?.seq).toBe(1)
  })

  it.each([
    ['the link is cut', new Disconnected()],
    ['the server fails', new ProblemError(500, { code: 'internal', detail: 'It failed.' })],
    ['the server is too busy', new ProblemError(429, { code: 'too-many', detail: 'Later.' })],
  ])('sends again by itself when %s, and nothing is lost', async (_what, failure) => {
    const server = new Server()
    server.down = failure
    const box = makeOutbox(server)
    box.sendAs(lead)
    await box.enqueue(testId, entry('under load'))
    await vi.waitFor(() => expect(server.requests.length).toBeGreaterThan(2))
    expect(box.ledger(testId).pending).toHaveLength(1)
    server.down = null
    await vi.waitFor(() => expect(server.kept.map(noted)).toEqual(['under load']))
    await vi.waitFor(() => expect(box.ledger(testId).pending).toEqual([]))
  })

  it('still holds what was not sent after the page is loaded again', async () => {
    const server = new Server()
    server.down = new Disconnected()
    const before = makeOutbox(server, 'reloaded')
    const made = await before.enqueue(testId, entry('before the reload'))
    before.close()
    const after = makeOutbox(server, 'reloaded')
    expect((await pendingOf(after)).map(({ id }) => id)).toEqual([made.id])
    expect((await after.enqueue(testId, entry('after'))).deviceSeq).toBe(2)
    server.down = null
    after.sendAs(lead)
    await after.settled()
    expect(server.kept.map(noted)).toEqual(['before the reload', 'after'])
  })

  it('takes the same id once', async () => {
    const box = makeOutbox(new Server())
    const id = '01990000-0000-7000-8000-0000000000aa'
    const [one, two] = await Promise.all([box.enqueue(testId, entry('tapped', { id })), box.enqueue(testId, entry('tapped', { id }))])
    expect(two).toEqual(one)
    expect(await pendingOf(box)).toHaveLength(1)
    expect((await box.enqueue(testId, entry('next'))).deviceSeq).toBe(2)
  })

  it('stops sending when the session ends, and goes on when the same person is back', async () => {
    const server = new Server()
    server.down = new ProblemError(401, { code: 'not-signed-in', detail: 'Sign in.' })
    let back: string | null = null
    const box = makeOutbox(server, undefined, () =>
      back === null ? Promise.reject(new ProblemError(401, { code: 'not-signed-in', detail: 'Sign in.' })) : Promise.resolve(back),
    )
    box.sendAs(lead)
    await pendingOf(box)
    await box.enqueue(testId, entry('while signed out'))
    await vi.waitFor(() => expect(box.ledger(testId).sender.is).toBe('signed-out'))
    server.down = null
    const asked = server.requests.length
    await new Promise((resolve) => setTimeout(resolve, 30))
    expect(server.requests.length).toBe(asked)
    back = lead
    await vi.waitFor(() => expect(server.kept.map(noted)).toEqual(['while signed out']))
  })

  it('never sends another person’s entries', async () => {
    const server = new Server()
    const box = makeOutbox(server)
    await box.enqueue(testId, entry('theirs', { authorId: other }))
    await box.enqueue(testId, entry('mine'))
    box.sendAs(lead)
    await box.settled()
    expect(server.kept.map(noted)).toEqual(['mine'])
    expect((await pendingOf(box)).map(noted)).toEqual(['theirs'])
    box.sendAs(other)
    await box.settled()
    expect(server.kept.map(noted)).toEqual(['mine', 'theirs'])
  })

  it('sets a refused act aside with its reason, and changes no entry after it', async () => {
    const server = new Server()
    server.refuse = 'concluded'
    const box = makeOutbox(server)
    await box.enqueue(testId, entry('conclusion', { kind: 'concluded' }))
    await box.enqueue(testId, entry('a fact'))
    box.sendAs(lead)
    await box.settled()
    await pendingOf(box)
    expect(server.requests.map(({ entries }) => entries.length)).toEqual([1, 1])
    expect(server.kept.map((made) => [made.deviceSeq, noted(made)])).toEqual([[2, 'a fact']])
    const [refused] = box.ledger(testId).attention
    expect(refused?.problem.detail).toBe('A joint is not examined.')
    await box.dismiss(testId, refused?.entry.id ?? '')
    expect(box.ledger(testId).attention).toEqual([])
    expect((await box.enqueue(testId, entry('next'))).deviceSeq).toBe(3)
  })

  it('says loudly that nothing can be kept, and takes nothing in', async () => {
    const box = makeOutbox(new Server(), 'broken')
    const broken = vi.spyOn(indexedDB, 'open').mockImplementation(() => {
      throw new DOMException('The disk is full.', 'QuotaExceededError')
    })
    await expect(box.enqueue(testId, entry('lost'))).rejects.toThrow('The disk is full.')
    expect(box.ledger(testId).fault).toMatch(/can’t keep entries \(The disk is full\).*stop, and release/)
    broken.mockRestore()
  })
})
