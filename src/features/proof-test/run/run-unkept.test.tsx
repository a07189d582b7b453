import { QueryClientProvider } from '@tanstack/react-query'
import { render, screen, waitFor } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { AppendRequest } from '#shared/api/ledger'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { ids, names } from '../../../../tests/factories/test-press'
import { recordedTest } from '../../../../tests/factories/recorded-test'
import { HereContext, type Here } from '../../../lib/here'
import { createQueryClient } from '../../../lib/query-client'
import { RunPage } from './run-page'

// There is no IndexedDB in this environment: a browser that refuses its storage looks the same to the outbox.

const shop: Here['shop'] = {
  id: ids.shop,
  name: 'Hollin Bridge Fabricating',
  role: 'lead',
  forceUnit: 'short-ton',
  pressureUnit: 'psi',
  lengthUnit: 'mm',
  buildPauseDays: 30,
  walkDownHours: 12,
}
const here: Here = { user: { id: ids.lead, name: names[ids.lead] ?? '', email: '' }, shops: [shop], shop, adopt: () => undefined }

let entries: LedgerEntry[] = []
let sent: EntryDraft[] = []
let down = false

const json = (body: unknown) => Promise.resolve(new Response(JSON.stringify(body), { status: 200 }))

function keep(draft: EntryDraft) {
  sent.push(draft)
  const seq = entries.length + 1
  const entry = {
    ...draft,
    seq,
    receivedAt: draft.observedAt,
    irregular: [],
    prevHash: '0'.repeat(64),
    hash: String(seq).padStart(64, 'b'),
  }
  entries.push(entry)
  return { outcome: 'kept', id: draft.id, entry }
}

function answer(url: string, init?: RequestInit): Promise<Response> {
  if (down) return Promise.reject(new TypeError('Failed to fetch'))
  if (init?.method === 'POST') {
    const request = JSON.parse(String(init.body)) as AppendRequest
    return json({ results: request.entries.map(keep), headSeq: entries.length, headHash: 'a', resendFrom: null })
  }
  const after = Number(new URL(url, 'http://shop.example').searchParams.get('after'))
  const more = entries.filter((entry) => entry.seq > after)
  return json({ ledgerId: ids.test, entries: more, headSeq: entries.length, headHash: 'a', people: names, sealed: [] })
}

function open() {
  render(
    <QueryClientProvider client={createQueryClient(() => undefined)}>
      <HereContext value={here}>
        <MemoryRouter>
          <RunPage testId={ids.test} />
        </MemoryRouter>
      </HereContext>
    </QueryClientProvider>,
  )
}

const kindsSent = () => sent.map((entry) => entry.kind)

describe('a device that cannot keep entries', () => {
  beforeEach(() => {
    localStorage.clear()
    sent = []
    down = false
    const whole = recordedTest().entries
    const loaded = whole.findIndex((entry) => entry.kind === 'row-read' && entry.payload['occasion'] === 'hold start')
    entries = whole.slice(0, loaded + 1)
    vi.stubGlobal('fetch', vi.fn(answer))
  })
  afterEach(() => vi.unstubAllGlobals())

  it('takes nothing in, but stops and releases, straight to the server (R1)', async () => {
    open()
    expect(await screen.findByText(/This device can’t keep entries/)).toBeVisible()
    await userEvent.click(screen.getByRole('button', { name: /^Pause/ }))
    expect(kindsSent()).toEqual([])
    await userEvent.dblClick(screen.getByRole('button', { name: 'Stop' }))
    expect(await screen.findByText('Open the release valve slowly, now.')).toBeVisible()
    await waitFor(() => expect(kindsSent()).toEqual(['stopped']))
    await userEvent.click(screen.getByRole('button', { name: /Gauge zero, ram clear of the stack/ }))
    await waitFor(() => expect(kindsSent()).toEqual(['stopped', 'released']))
    // A device's name of its own: what the storage holds back leaves no gap in its numbers.
    expect(sent.map((entry) => entry.deviceSeq)).toEqual([1, 2])
    expect(new Set(sent.map((entry) => entry.deviceId)).size).toBe(1)
  })

  it('shows the stop at once without a link, says that it is not on the server, and sends it when the link is back', async () => {
    open()
    const stop = await screen.findByRole('button', { name: 'Stop' })
    down = true
    await userEvent.click(stop)
    expect(await screen.findByText('Open the release valve slowly, now.')).toBeVisible()
    expect(await screen.findByText(/The stop is not on the server yet/)).toBeVisible()
    expect(kindsSent()).toEqual([])
    down = false
    window.dispatchEvent(new Event('online'))
    await waitFor(() => expect(kindsSent()).toEqual(['stopped']), { timeout: 4000 })
    await waitFor(() => expect(screen.queryByText(/The stop is not on the server yet/)).toBeNull())
  })
})
