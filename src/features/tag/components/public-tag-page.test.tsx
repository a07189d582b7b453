import { QueryClientProvider } from '@tanstack/react-query'
import { act, render, screen } from '@testing-library/react'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { PublicTag } from '#shared/api/tags'
import { createQueryClient } from '../../../lib/query-client'
import { PublicTagPage } from './public-tag-page'

const CODE = 'abcdefghjkmnpqrs'
const cleared: PublicTag = {
  shopName: 'Hollin Bridge Fabricating',
  press: { name: 'Press 2', whatFor: 'straightening press' },
  asOf: '2026-09-21T12:00:00.000Z',
  answer: {
    is: 'cleared',
    clearance: {
      load: { text: '11.7', unit: 'short-ton' },
      loadNewton: 104_110,
      gaugePressure: { text: '7650', unit: 'psi' },
      gaugeCode: 'G-02',
      bedHoles: ['4'],
      ramPositions: ['central'],
      tooling: [],
      until: '2027-03-15',
      clearedOn: '2026-09-15',
      clearedBy: 'Marit Sandoval',
      number: 'PT-0043',
      staticLoads: 1,
      notMeasured: ['Head beam'],
    },
  },
  noChangeSince: '2026-09-15',
}
const shut: PublicTag = {
  ...cleared,
  answer: { is: 'do not use', why: 'The bed looks bent', since: '2026-09-21T12:00:20.000Z' },
  noChangeSince: null,
}

type Answer = () => Promise<Response>
const json = (body: unknown, status = 200) =>
  Promise.resolve(new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } }))
let answer: Answer

const show = () =>
  render(
    <QueryClientProvider client={createQueryClient(() => undefined)}>
      <PublicTagPage code={CODE} head={(shopName) => <p>{shopName}</p>} />
    </QueryClientProvider>,
  )
const pass = (milliseconds: number) => act(() => vi.advanceTimersByTimeAsync(milliseconds))
const page = () => document.body.textContent?.replaceAll(/[\u00a0\u202f]/g, ' ') ?? ''

describe('the page that a tag’s code leads to', () => {
  beforeEach(() => {
    vi.useFakeTimers()
    vi.stubGlobal(
      'fetch',
      vi.fn(() => answer()),
    )
  })
  afterEach(() => {
    vi.useRealTimers()
    vi.unstubAllGlobals()
  })

  it('says what the press may carry, until when, and by whom, and asks search engines to leave it', async () => {
    answer = () => json(cleared)
    show()
    await pass(10)
    expect(screen.getByRole('heading', { level: 1 })).toHaveTextContent(/Cleared up to\s*11\.7\s*short tons/)
    expect(page()).toContain('Until 15 March 2027')
    expect(page()).toContain('Gauge G-02 not past7 650 psi')
    expect(page()).toContain('Not measured: Head beam.')
    expect(page()).toContain('Cleared by Marit Sandoval')
    expect(document.querySelector('meta[name=robots]')).toHaveAttribute('content', 'noindex, nofollow')
    expect(page()).not.toMatch(/\bsafe\b|\bapproved\b/i)
  })

  it('asks again by itself, and says DO NOT USE with the reason from then on', async () => {
    answer = () => json(cleared)
    show()
    await pass(10)
    answer = () => json(shut)
    await pass(30_000)
    expect(screen.getByRole('heading', { level: 1 })).toHaveTextContent('DO NOT USE')
    expect(page()).toContain('The bed looks bent.')
    expect(page()).not.toContain('11.7')
  })

  it('shows nothing older when the server is not reached: treat it as not cleared', async () => {
    answer = () => json(cleared)
    show()
    await pass(10)
    answer = () => Promise.reject(new TypeError('no network'))
    await pass(30_000)
    expect(screen.getByRole('alert')).toHaveTextContent('Can’t tell now: treat it as not cleared')
    expect(page()).not.toContain('11.7')
    answer = () => json(cleared)
    await act(async () => screen.getByRole('button', { name: 'Ask again' }).click())
    await pass(10)
    expect(page()).toContain('11.7')
  })

  it('takes an answer down that nobody renewed for a minute', async () => {
    answer = () => json(cleared)
    show()
    await pass(10)
    answer = () => new Promise(() => undefined)
    await pass(62_000)
    expect(screen.getByRole('alert')).toHaveTextContent('Can’t tell now')
    expect(page()).not.toContain('11.7')
  })

  it('knows no press for a code that nobody gave out', async () => {
    answer = () => json({ type: 'about:blank', title: '', status: 404, code: 'not-found', detail: 'This tag is not here.' }, 404)
    show()
    await pass(10)
    expect(screen.getByRole('heading', { level: 1 })).toHaveTextContent('No press has this code')
    expect(page()).toContain('Treat the press as not cleared')
  })
})
