import { createServer, type Server } from 'node:http'
import { afterAll, afterEach, beforeAll, describe, expect, it, vi } from 'vitest'
import { v7 as newId } from 'uuid'
import { problemSchema } from '#shared/api/problem'
import { createApp } from '#server/app'
import { BEAT_MILLISECONDS, MOST_STREAMS } from '#server/routes/stream'
import { POLL_MILLISECONDS } from '#server/services/heads'
import { ApiRun, enterPress, post } from '../factories/api-run'
import { ApiClient } from '../factories/client'
import { openStaffedShop, type SignedInPerson } from '../factories/people'
import { testServer } from '../support/api-server'
import { EventStream } from '../support/event-stream'

const note = (text: string) => ({ kind: 'observed', payload: { at: null, what: 'noise', note: text } }) as const

let server: Server
let origin: string
let closing: AbortController
const open: EventStream[] = []

beforeAll(async () => {
  closing = new AbortController()
  server = createServer(createApp({ ...testServer().context, closing: closing.signal }))
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const address = server.address()
  origin = `http://127.0.0.1:${typeof address === 'object' ? address?.port : 0}`
})

afterEach(async () => {
  await Promise.all(open.splice(0).map((stream) => stream.close()))
})

afterAll(() => {
  server.closeAllConnections()
  server.close()
})

async function cookieOf(person: Pick<SignedInPerson, 'email' | 'password'>): Promise<string> {
  const response = await new ApiClient().post('/api/session', { email: person.email, password: person.password }).expect(200)
  return String(response.headers['set-cookie']).split(';')[0] ?? ''
}

async function watch(cookie: string, ledgers: readonly string[]): Promise<EventStream> {
  const stream = await EventStream.open(`${origin}/api/stream?ledgers=${ledgers.join(',')}`, { cookie })
  open.push(stream)
  return stream
}

async function refusal(cookie: string, ledgers: string): Promise<{ status: number; code: string }> {
  const response = await fetch(`${origin}/api/stream?ledgers=${ledgers}`, { headers: { cookie } })
  return { status: response.status, code: problemSchema.parse(await response.json()).code }
}

describe('the stream', () => {
  it('tells the witness within a second that the lead has written', async () => {
    const run = await ApiRun.open()
    const stream = await watch(await cookieOf(run.staff.witness), [run.id])
    await stream.until((one) => one.heads()[run.id] === 1)
    expect(stream.response.headers.get('content-type')).toMatch(/^text\/event-stream/)
    expect(stream.response.headers.get('x-accel-buffering')).toBe('no')
    expect(stream.response.headers.get('cache-control')).toContain('no-transform')
    const waits: number[] = []
    for (let seq = 2; seq <= 6; seq += 1) {
      await post(run.staff.lead, run.path, [run.lead.draft(note('A click.'))])
      waits.push(await stream.until((one) => one.heads()[run.id] === seq))
    }
    process.stdout.write(`stream: told after ${waits.map((wait) => wait.toFixed(0)).join(', ')} ms\n`)
    expect(Math.max(...waits)).toBeLessThan(3_000)
  })

  it('tells each watcher of what it watches only, and asks the database once for all of them', async () => {
    const run = await ApiRun.open()
    const lead = await cookieOf(run.staff.lead)
    const otherPress = await enterPress(run.staff.lead)
    const streams = await Promise.all([watch(lead, [run.id]), watch(lead, [run.pressId, otherPress]), watch(lead, [run.id, run.pressId])])
    await Promise.all(streams.map((stream) => stream.until((one) => one.events.length > 0)))
    const query = vi.spyOn(testServer().context.database, 'query')
    const asked = () => query.mock.calls.filter(([sql]) => String(sql).includes('FROM ledgers WHERE id IN')).length
    await new Promise((resolve) => {
      setTimeout(resolve, 5 * POLL_MILLISECONDS)
    })
    const count = asked()
    query.mockRestore()
    expect(count).toBeGreaterThanOrEqual(3)
    expect(count).toBeLessThanOrEqual(6)
    await post(run.staff.lead, run.path, [run.lead.draft(note('A click.'))])
    await Promise.all([streams[0], streams[2]].map((stream) => stream?.until((one) => one.heads()[run.id] === 2)))
    expect(Object.keys(streams[1]?.heads() ?? {}).sort()).toEqual([run.pressId, otherPress].sort())
    await Promise.all(open.splice(0).map((stream) => stream.close()))
    await new Promise((resolve) => {
      setTimeout(resolve, 2 * POLL_MILLISECONDS)
    })
    const idle = vi.spyOn(testServer().context.database, 'query')
    await new Promise((resolve) => {
      setTimeout(resolve, 3 * POLL_MILLISECONDS)
    })
    expect(idle).not.toHaveBeenCalled()
    idle.mockRestore()
  })

  it('says nothing of another shop, and knows its ledgers as little as ids that nobody gave out', async () => {
    const [mine, other] = [await ApiRun.open(), await ApiRun.open()]
    const cookie = await cookieOf(mine.staff.crew)
    const stream = await watch(cookie, [mine.id, other.id, newId()])
    await stream.until((one) => one.events.length > 0)
    await post(other.staff.lead, other.path, [other.lead.draft(note('A click.'))])
    await post(mine.staff.lead, mine.path, [mine.lead.draft(note('A click.'))])
    await stream.until((one) => one.heads()[mine.id] === 2)
    expect(Object.keys(stream.heads())).toEqual([mine.id])
    expect(await refusal(cookie, other.id)).toEqual({ status: 404, code: 'not-found' })
    expect(await refusal(cookie, newId())).toEqual({ status: 404, code: 'not-found' })
  })

  it('is for people who are signed in, and has limits', async () => {
    const { lead } = await openStaffedShop()
    const cookie = await cookieOf(lead)
    expect(await refusal('', newId())).toEqual({ status: 401, code: 'not-signed-in' })
    expect((await refusal(cookie, '')).status).toBe(422)
    expect((await refusal(cookie, Array.from({ length: 51 }, () => newId()).join(','))).status).toBe(422)
    const pressId = await enterPress(lead)
    for (let count = 0; count < MOST_STREAMS; count += 1) await watch(cookie, [pressId])
    expect(await refusal(cookie, pressId)).toEqual({ status: 429, code: 'too-many-streams' })
    // Another browser of the same person has its own; one that is closed makes room.
    await watch(await cookieOf(lead), [pressId])
    await open.shift()?.close()
    await vi.waitFor(async () => expect((await watch(cookie, [pressId])).response.status).toBe(200))
  })

  it('beats, and ends with a word when the session has ended', async () => {
    const { lead } = await openStaffedShop()
    const pressId = await enterPress(lead)
    const cookie = await cookieOf(lead)
    vi.useFakeTimers({ toFake: ['setInterval'] })
    let stream: EventStream
    try {
      stream = await watch(cookie, [pressId])
      await stream.until((one) => one.events.length > 0)
      vi.advanceTimersByTime(BEAT_MILLISECONDS)
      await stream.until((one) => one.events.some(({ event }) => event === 'beat'))
      const signedOut = await fetch(`${origin}/api/session`, {
        method: 'DELETE',
        headers: { cookie, 'sec-fetch-site': 'same-origin', origin },
      })
      expect(signedOut.status).toBe(204)
      vi.advanceTimersByTime(30_000)
      await stream.until((one) => one.events.some(({ event }) => event === 'signed-out'))
    } finally {
      vi.useRealTimers()
    }
    await stream.ended
  })

  it('tells no more of a shop that the person has left', async () => {
    const run = await ApiRun.open()
    const cookie = await cookieOf(run.staff.crew)
    vi.useFakeTimers({ toFake: ['setInterval'] })
    try {
      const stream = await watch(cookie, [run.id])
      await stream.until((one) => one.heads()[run.id] === 1)
      await run.staff.owner.client.patch(`/api/people/${run.staff.crew.userId}?shop=${run.staff.owner.shopId}`, { ended: true }).expect(200)
      vi.advanceTimersByTime(30_000)
      await new Promise((resolve) => {
        setTimeout(resolve, 300)
      })
      await post(run.staff.lead, run.path, [run.lead.draft(note('A click.'))])
      await new Promise((resolve) => {
        setTimeout(resolve, 3 * POLL_MILLISECONDS)
      })
      expect(stream.heads()[run.id]).toBe(1)
    } finally {
      vi.useRealTimers()
    }
  })

  it('ends when the server is asked to stop', async () => {
    const { lead } = await openStaffedShop()
    const stream = await watch(await cookieOf(lead), [await enterPress(lead)])
    await stream.until((one) => one.events.length > 0)
    closing.abort()
    await stream.ended
  })
})
