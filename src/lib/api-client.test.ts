import { afterEach, describe, expect, it, vi } from 'vitest'
import { z } from 'zod'
import { api, apiUrl } from './api-client'
import { Disconnected, ProblemError, UnreadableAnswer } from './problem'

const schema = z.object({ name: z.string() })

function answer(status: number, body: string, type = 'application/json') {
  vi.stubGlobal('fetch', () => Promise.resolve(new Response(body, { status, headers: { 'content-type': type } })))
}

afterEach(() => vi.unstubAllGlobals())

describe('a request to the server', () => {
  it('gives what the schema made of the answer', async () => {
    answer(200, '{"name":"Press 2","unknown":1}')
    expect(await api.get(schema, '/api/presses')).toEqual({ name: 'Press 2' })
  })

  it('throws a refusal with its code, fields and rules', async () => {
    answer(
      409,
      JSON.stringify({ type: 'about:blank', title: 'No', status: 409, code: 'rule', detail: 'Joint 7 is only tacked.', rules: ['R7'] }),
      'application/problem+json',
    )
    const refused = await api.send('POST', schema, '/api/presses', {}).catch((error: unknown) => error)
    expect(refused).toBeInstanceOf(ProblemError)
    expect(refused).toMatchObject({ status: 409, code: 'rule', detail: 'Joint 7 is only tacked.', rules: ['R7'], fields: {} })
  })

  it('tells a lost link from a refusal', async () => {
    vi.stubGlobal('fetch', () => Promise.reject(new TypeError('Failed to fetch')))
    await expect(api.get(schema, '/api/presses')).rejects.toBeInstanceOf(Disconnected)
  })

  it('takes a gateway’s own page in front of a dead server for a lost link', async () => {
    answer(502, '<h1>Bad gateway</h1>', 'text/html')
    await expect(api.get(schema, '/api/presses')).rejects.toBeInstanceOf(Disconnected)
  })

  it('shows nothing that the shared schema doesn’t know', async () => {
    answer(200, '{"title":"Press 2"}')
    await expect(api.get(schema, '/api/presses')).rejects.toBeInstanceOf(UnreadableAnswer)
  })

  it('lets a request that was called off be called off', async () => {
    const stopped = new AbortController()
    vi.stubGlobal('fetch', () => {
      stopped.abort()
      return Promise.reject(new DOMException('Aborted', 'AbortError'))
    })
    await expect(api.get(schema, '/api/presses', { signal: stopped.signal })).rejects.toMatchObject({ name: 'AbortError' })
  })

  it('leaves empty parts out of the query', () => {
    expect(apiUrl('/api/presses', { shop: 'a', search: '', after: undefined, limit: 25 })).toBe('/api/presses?shop=a&limit=25')
  })
})
