import type { z } from 'zod'
import { Disconnected, UnreadableAnswer, readProblem } from './problem'
import { retryAfter } from './retry-delay'

type Query = Record<string, string | number | boolean | undefined>
type Options = { query?: Query; signal?: AbortSignal }
type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'

/** The address of an endpoint, with its query; what is undefined or empty is left out. */
export function apiUrl(path: `/api/${string}`, query: Query = {}): string {
  const search = new URLSearchParams()
  for (const [name, value] of Object.entries(query)) {
    if (value !== undefined && value !== '') search.set(name, String(value))
  }
  const text = search.toString()
  return text === '' ? path : `${path}?${text}`
}

/** A gateway's own page in front of a dead server is no answer of the server. */
const GATEWAY = new Set([502, 503, 504])

async function readBody(response: Response): Promise<unknown> {
  if (response.status === 204) return undefined
  const text = await response.text()
  if (text === '') return undefined
  try {
    return JSON.parse(text)
  } catch {
    return text
  }
}

async function exchange(method: Method, path: `/api/${string}`, body: unknown, options: Options): Promise<unknown> {
  const headers: Record<string, string> = { accept: 'application/json, application/problem+json' }
  if (body !== undefined) headers['content-type'] = 'application/json'
  let response: Response
  let answer: unknown
  try {
    response = await fetch(apiUrl(path, options.query), {
      method,
      headers,
      credentials: 'same-origin',
      body: body === undefined ? undefined : JSON.stringify(body),
      signal: options.signal,
    })
    answer = await readBody(response)
  } catch (failure) {
    if (options.signal?.aborted) throw failure
    throw new Disconnected(failure)
  }
  if (response.ok) return answer
  const problem = readProblem(response.status, answer, retryAfter(response.headers.get('retry-after'), Date.now()))
  if (GATEWAY.has(response.status) && problem.code.startsWith('http-')) throw new Disconnected(problem)
  throw problem
}

function parse<S extends z.ZodType>(schema: S, answer: unknown, what: string): z.output<S> {
  const parsed = schema.safeParse(answer)
  if (!parsed.success) throw new UnreadableAnswer(what, parsed.error)
  return parsed.data
}

/**
 * Requests to our own server. Every answer goes through the schema that both ends share, so nothing unread
 * reaches a screen. Throws `ProblemError` when the server refuses, `Disconnected` when nothing answers.
 */
export const api = {
  async get<S extends z.ZodType>(schema: S, path: `/api/${string}`, options: Options = {}): Promise<z.output<S>> {
    return parse(schema, await exchange('GET', path, undefined, options), path)
  },
  async send<S extends z.ZodType>(
    method: Exclude<Method, 'GET'>,
    schema: S,
    path: `/api/${string}`,
    body: unknown,
    options: Options = {},
  ): Promise<z.output<S>> {
    return parse(schema, await exchange(method, path, body, options), path)
  },
  /** A request whose answer carries nothing. */
  async tell(method: Exclude<Method, 'GET'>, path: `/api/${string}`, body?: unknown, options: Options = {}): Promise<void> {
    await exchange(method, path, body, options)
  },
}
