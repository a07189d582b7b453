import { Router } from 'express'
import type { Response } from 'express'
import { STREAM_EVENTS, streamQuerySchema } from '#shared/api/stream'
import type { HeadsEvent } from '#shared/api/stream'
import type { AppContext } from '../context'
import { authenticate, personOf, sessionTokenOf } from '../middleware/authenticate'
import { parseQuery } from '../middleware/validate'
import { Problem, notFound } from '../problem'
import { headWatch, readableHeads } from '../services/heads'
import type { Heads } from '../services/heads'
import { resumeSession } from '../services/sessions'

/** A device that hears nothing for longer than two of these goes back to asking, and says that it is not connected. */
export const BEAT_MILLISECONDS = 4_000
export const RECHECK_MILLISECONDS = 30_000
/** Of one session at one server: a browser needs one, and some more while it is being left and opened again. */
export const MOST_STREAMS = 10

/** Counts the streams of each session; `take` answers how to give one back. */
function streamCounter() {
  const counts = new Map<string, number>()
  return (sessionId: string): (() => void) => {
    const count = counts.get(sessionId) ?? 0
    if (count >= MOST_STREAMS) {
      throw new Problem(429, 'too-many-streams', 'This browser watches in too many places at once. Close some of its tabs.', {
        retryAfterSeconds: 30,
      })
    }
    counts.set(sessionId, count + 1)
    return () => {
      const left = (counts.get(sessionId) ?? 1) - 1
      if (left > 0) counts.set(sessionId, left)
      else counts.delete(sessionId)
    }
  }
}

function begin(response: Response): void {
  response.status(200)
  response.set({
    'Content-Type': 'text/event-stream; charset=utf-8',
    // Neither kept nor packed nor gathered on the way: each event goes out as it is written.
    'Cache-Control': 'no-store, no-transform',
    'X-Accel-Buffering': 'no',
    'Content-Encoding': 'identity',
  })
  response.flushHeaders()
}

function send(response: Response, event: string, data: HeadsEvent | Record<string, never>): void {
  if (!response.writableEnded) response.write(`event: ${event}\ndata: ${JSON.stringify(data)}\n\n`)
}

interface Streaming {
  context: AppContext
  userId: string
  token: string
  ids: readonly string[]
  /** Called when the server is asked to stop; returns how to stop listening for that. */
  onClosing(end: () => void): () => unknown
}

/** Writes heads and beats until the session, the right to read, the connection or the server ends. */
async function stream(response: Response, { context, userId, token, ids, onClosing }: Streaming): Promise<void> {
  let forget: () => unknown = () => undefined
  const ended = new Promise<void>((resolve) => {
    response.once('close', resolve)
    forget = onClosing(resolve)
  })
  let readable = new Set<string>()
  const tell = (heads: Heads) => {
    const own = Object.entries(heads).filter(([id]) => readable.has(id))
    if (own.length > 0) send(response, STREAM_EVENTS.heads, { heads: Object.fromEntries(own) })
  }
  const unwatch = headWatch(context).watch(ids, tell)
  const beat = setInterval(() => send(response, STREAM_EVENTS.beat, {}), BEAT_MILLISECONDS)
  const recheck = setInterval(() => void check(), RECHECK_MILLISECONDS)
  const check = async () => {
    try {
      const session = await resumeSession(context, token)
      if (session === undefined) {
        send(response, STREAM_EVENTS.signedOut, {})
        response.end()
      } else readable = new Set(Object.keys(await readableHeads(context, userId, ids)))
    } catch (error) {
      // Better none than one that is not known to be allowed; the client opens another when the database is back.
      context.logger.warn({ err: error }, 'A stream could not be checked and was ended')
      response.end()
    }
  }
  try {
    const heads = await readableHeads(context, userId, ids)
    readable = new Set(Object.keys(heads))
    send(response, STREAM_EVENTS.heads, { heads })
    await ended
  } catch (error) {
    // The answer has begun: all that can be said is its end, and the client tries again.
    context.logger.warn({ err: error }, 'A stream could not begin')
  } finally {
    clearInterval(beat)
    clearInterval(recheck)
    unwatch()
    forget()
    response.end()
  }
}

/** Server-sent events: which of the watched ledgers have moved. What they hold is fetched by the ledgers' own routes. */
export function streamRoutes(context: AppContext): Router {
  const router = Router()
  const take = streamCounter()
  const closers = new Set<() => void>()
  context.closing.addEventListener('abort', () => closers.forEach((end) => end()), { once: true })
  const onClosing = (end: () => void) => {
    closers.add(end)
    return () => closers.delete(end)
  }

  router.get('/stream', authenticate(context), async (request, response) => {
    const { ledgers: ids } = parseQuery(request, streamQuerySchema)
    const { userId, sessionId } = personOf(request)
    const token = sessionTokenOf(request) ?? ''
    if (Object.keys(await readableHeads(context, userId, ids)).length === 0) throw notFound('What this stream was to watch')
    const giveBack = take(sessionId)
    try {
      begin(response)
      await stream(response, { context, userId, token, ids, onClosing })
    } finally {
      giveBack()
    }
  })

  return router
}
