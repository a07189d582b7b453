import 'fake-indexeddb/auto'
import { QueryClientProvider } from '@tanstack/react-query'
import { render, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { AppendRequest } from '#shared/api/ledger'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import type { Joint } from '#shared/press/model'
import { ids, names, openedPayload } from '../../../../tests/factories/test-press'
import { recordedTest, stoppedTest } from '../../../../tests/factories/recorded-test'
import { HereContext } from '../../../lib/here'
import { createQueryClient } from '../../../lib/query-client'
import { AttendPage } from '../attend/attend-page'
import { RunPage } from './run-page'

/**
 * The ledger as a server would answer it, with a link that can be cut. Each test has a ledger of its own, and the outbox is
 * the page's: what it asks late of an earlier test's ledger is not on this server.
 */
class FakeServer {
  entries: LedgerEntry[]
  readonly sent: EntryDraft[] = []
  down = false
  private readonly testId: string

  constructor(testId: string, entries: readonly LedgerEntry[]) {
    this.testId = testId
    this.entries = entries.map((entry) => ({ ...entry, ledgerId: testId }))
  }

  fetch = (url: string, init?: RequestInit): Promise<Response> => {
    if (this.down) return Promise.reject(new TypeError('Failed to fetch'))
    const json = (body: unknown, status = 200) => Promise.resolve(new Response(JSON.stringify(body), { status }))
    const { pathname, searchParams } = new URL(url, 'http://shop.example')
    if (pathname !== `/api/proof-tests/${this.testId}/entries`) {
      return json({ type: 'about:blank', title: 'Not found', status: 404, code: 'not-found', detail: 'There is no such test.' }, 404)
    }
    if (init?.method === 'POST') {
      const { entries } = JSON.parse(String(init.body)) as AppendRequest
      return json({ results: entries.map((draft) => this.keep(draft)), headSeq: this.entries.length, headHash: 'a', resendFrom: null })
    }
    const after = Number(searchParams.get('after'))
    const entries = this.entries.filter((entry) => entry.seq > after)
    return json({ ledgerId: this.testId, entries, headSeq: this.entries.length, headHash: 'a', people: names, sealed: [] })
  }

  private keep(draft: EntryDraft) {
    this.sent.push(draft)
    const seq = this.entries.length + 1
    const chained = { seq, receivedAt: draft.observedAt, irregular: [], prevHash: '0'.repeat(64), hash: seq.toString(16).padStart(64, 'b') }
    const entry = { ...draft, ...chained }
    this.entries.push(entry)
    return { outcome: 'kept', id: draft.id, entry }
  }
}

let tests = 0
const shop = {
  id: ids.shop,
  name: 'Hollin Bridge Fabricating',
  forceUnit: 'short-ton',
  pressureUnit: 'psi',
  lengthUnit: 'mm',
  buildPauseDays: 30,
  walkDownHours: 12,
} as const
const here = (userId: string) => ({
  user: { id: userId, name: names[userId] ?? '', email: 'someone@shop.example' },
  shops: [{ ...shop, role: 'lead' as const }],
  shop: { ...shop, role: 'lead' as const },
  adopt: () => undefined,
})

function open(entries: readonly LedgerEntry[], { as = ids.lead, attend = false } = {}) {
  tests += 1
  const testId = `01994a00-0007-7000-8000-${String(tests).padStart(12, '0')}`
  const server = new FakeServer(testId, entries)
  vi.stubGlobal('fetch', vi.fn(server.fetch))
  const show = () =>
    render(
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <HereContext value={here(as)}>
          <MemoryRouter>{attend ? <AttendPage testId={testId} /> : <RunPage testId={testId} />}</MemoryRouter>
        </HereContext>
      </QueryClientProvider>,
    )
  return { server, show, ...show() }
}

const whole = recordedTest().entries
/** Up to and with the n-th entry of a kind, counted from 1. */
function upTo(entries: readonly LedgerEntry[], kind: string, nth: number): LedgerEntry[] {
  let left = nth
  const end = entries.findIndex((entry) => entry.kind === kind && (left -= 1) === 0)
  return entries.slice(0, end + 1)
}
const readyFor75 = upTo(whole, 'stage-begun', 3)
const sentOf = (server: FakeServer, kind: string) => server.sent.filter((entry) => entry.kind === kind)

beforeEach(() => localStorage.clear())
afterEach(() => vi.unstubAllGlobals())

describe('a run', () => {
  it('refuses a tacked joint by its number, says what to do, and offers no way to accept it', async () => {
    const joints = openedPayload().joints.map((joint): Joint => (joint.number === 7 ? { ...joint, makeUp: 'tacked' } : joint))
    const { server } = open(recordedTest({ opened: { joints }, until: 'opened' }).entries)
    expect(await screen.findByRole('heading', { name: 'Not ready to load: joint 7 is only tacked.' })).toBeVisible()
    expect(screen.getByText(/A tack counts as no weld.*examine joints .* after\./)).toBeVisible()
    expect(screen.queryByRole('button', { name: /Joint 7 is accepted/ })).toBeNull()
    expect(screen.getByText('Seating load')).toBeVisible()
    await userEvent.click(screen.getByRole('button', { name: /Joint 7 is .*then examine/ }))
    await waitFor(() => expect(sentOf(server, 'joint-worked')).toHaveLength(1))
    expect(sentOf(server, 'joint-worked')[0]?.payload).toMatchObject({ jointId: joints[6]?.id, makeUp: 'finished' })
    await waitFor(() => expect(screen.queryByText(/only tacked/)).toBeNull())
  })

  it('keeps readings as they were typed, with a comma as well', async () => {
    const { server } = open(readyFor75)
    await userEvent.click(await screen.findByRole('button', { name: /^Mark/ }))
    await userEvent.keyboard('5900{Enter}1,64{Enter}0.33{Enter}0.31{Enter}')
    await waitFor(() => expect(sentOf(server, 'row-read')).toHaveLength(1))
    const { readings, typedAgain, occasion } = sentOf(server, 'row-read')[0]?.payload as {
      readings: { text: string }[]
      typedAgain: string[]
      occasion: string
    }
    expect(readings.map(({ text }) => text)).toEqual(['5900', '1,64', '0.33', '0.31'])
    expect({ typedAgain, occasion }).toEqual({ typedAgain: [], occasion: 'hold start' })
  })

  it('says in words at the field what cannot be read, and enters nothing', async () => {
    const { server } = open(readyFor75)
    await userEvent.click(await screen.findByRole('button', { name: /^Mark/ }))
    await userEvent.keyboard('5900{Enter}1.6.4{Enter}')
    expect(screen.getByText(/Middle: There is more than one decimal sign/)).toBeVisible()
    expect(screen.getByLabelText(/^Middle/)).toHaveValue('1.6.4')
    expect(sentOf(server, 'row-read')).toEqual([])
  })

  it('empties a reading that the line does not predict, and takes it when it was typed the same twice', async () => {
    const { server } = open(readyFor75)
    await userEvent.click(await screen.findByRole('button', { name: /^Mark/ }))
    await userEvent.keyboard('5900{Enter}1.52{Enter}0.33{Enter}0.31{Enter}')
    expect(await screen.findByText(/Middle: That is not what the line predicts. Look again and type it once more./)).toBeVisible()
    expect(screen.getByLabelText(/^Middle/)).toHaveValue('')
    expect(sentOf(server, 'row-read')).toEqual([])
    await userEvent.keyboard('1.52{Enter}')
    await userEvent.keyboard('{Enter}{Enter}')
    await waitFor(() => expect(sentOf(server, 'row-read')).toHaveLength(1))
    expect(sentOf(server, 'row-read')[0]?.payload).toMatchObject({ typedAgain: [ids.middle] })
  })

  it('asks for the gauge again outside the window of the stage', async () => {
    open(readyFor75)
    await userEvent.click(await screen.findByRole('button', { name: /^Mark/ }))
    await userEvent.keyboard('590{Enter}')
    expect(screen.getByText(/Gauge: That is outside 5 800 to 6 200 psi\./)).toBeVisible()
    await userEvent.keyboard('5900{Enter}')
    expect(screen.getByText('Gauge inside 5 800 to 6 200')).toBeVisible()
  })

  it('still holds a half-typed row after the page is loaded again', async () => {
    const { unmount, show } = open(readyFor75)
    await userEvent.click(await screen.findByRole('button', { name: /^Mark/ }))
    await userEvent.keyboard('5900{Enter}1.6')
    unmount()
    show()
    await waitFor(() => expect(screen.getByLabelText(/^Middle/)).toHaveValue('1.6'))
    expect(screen.getByText('Marked')).toBeVisible()
  })

  it('stops at one tap: it is written once, and the screen says to release', async () => {
    const { server } = open(upTo(whole, 'row-read', 5))
    await userEvent.dblClick(await screen.findByRole('button', { name: 'Stop' }))
    expect(await screen.findByText('Open the release valve slowly, now.')).toBeVisible()
    expect(screen.queryByRole('dialog')).toBeNull()
    await waitFor(() => expect(sentOf(server, 'stopped')).toHaveLength(1))
    expect(sentOf(server, 'stopped')[0]?.payload).toEqual({ cause: 'called', why: 'Called by Marit Sandoval' })
    await userEvent.click(screen.getByRole('button', { name: /Gauge zero, ram clear of the stack/ }))
    await waitFor(() => expect(sentOf(server, 'released')).toHaveLength(1))
    expect(sentOf(server, 'stopped')).toHaveLength(1)
  })

  it('stops without a connection, and sends the stop when the link is back', async () => {
    const { server } = open(upTo(whole, 'row-read', 5))
    const stop = await screen.findByRole('button', { name: 'Stop' })
    server.down = true
    await userEvent.click(stop)
    expect(await screen.findByText('Open the release valve slowly, now.')).toBeVisible()
    expect(
      await screen.findByText(
        /Not connected\. The test goes on here\. The stop has reached no other device: say it aloud\. One entry waits on this tablet/,
        {},
        { timeout: 4000 },
      ),
    ).toBeVisible()
    server.down = false
    window.dispatchEvent(new Event('online'))
    await waitFor(() => expect(sentOf(server, 'stopped')).toHaveLength(1), { timeout: 4000 })
  })

  it('writes a stop that the readings call for by itself, and once', async () => {
    const bent = stoppedTest().entries
    const { server } = open(
      bent.slice(
        0,
        bent.findIndex((entry) => entry.kind === 'decided' && entry.payload['decision'] === 'stop'),
      ),
    )
    expect(await screen.findByText('Open the release valve slowly, now.')).toBeVisible()
    await waitFor(() => expect(sentOf(server, 'decided')).toHaveLength(1))
    expect(sentOf(server, 'decided')[0]?.payload).toMatchObject({ decision: 'stop' })
    await screen.findByText(/This test cannot go back under load\./)
    expect(sentOf(server, 'decided')).toHaveLength(1)
  })

  it('asks for a reason beside Stop, and writes it with the rule', async () => {
    const { server } = open(whole.slice(0, 9))
    await userEvent.click(await screen.findByRole('button', { name: /Told to me by Tomas Achterberg/ }))
    expect(await screen.findByRole('heading', { name: 'This needs a reason.' })).toBeVisible()
    expect(screen.getByRole('button', { name: 'Stop' })).toBeVisible()
    await userEvent.click(screen.getByRole('button', { name: 'Go on for this reason' }))
    expect(screen.getByText('Say why in a few words.')).toBeVisible()
    await userEvent.type(screen.getByLabelText('Your reason'), 'His phone is flat.')
    await userEvent.click(screen.getByRole('button', { name: 'Go on for this reason' }))
    await waitFor(() => expect(sentOf(server, 'load-path-confirmed')).toHaveLength(1))
    expect(sentOf(server, 'load-path-confirmed')[0]?.overrides).toEqual([{ rule: 'R18', reason: 'His phone is flat.' }])
  })
})

describe('the witness’s view', () => {
  it('hides the lead’s figures at full load until the own reading is in', async () => {
    const full = upTo(whole, 'row-read', 8)
      .filter((entry) => entry.kind !== 'independent-read')
      .map((entry, index) => ({ ...entry, seq: index + 1 }))
    const { server } = open(full, { as: ids.witness, attend: true })
    expect(await screen.findByRole('heading', { name: 'Read the gauge yourself' })).toBeVisible()
    expect(screen.queryByText(/7850|7750/)).toBeNull()
    await userEvent.keyboard('7850{Enter}')
    await waitFor(() => expect(sentOf(server, 'independent-read')).toHaveLength(1))
    expect(await screen.findByRole('heading', { name: 'Last rows, as read' })).toBeVisible()
  })

  it('says to shout when nothing is heard, and shows nothing stale', async () => {
    const { server } = open(upTo(whole, 'row-read', 5), { as: ids.witness, attend: true })
    expect(await screen.findByRole('heading', { name: 'Last rows, as read' })).toBeVisible()
    server.down = true
    const shout = await screen.findByRole('alert', {}, { timeout: 4000 })
    expect(within(shout).getByRole('heading', { name: 'Not connected: shout stop' })).toBeVisible()
    expect(screen.getByRole('button', { name: /Shout stop/ })).toBeVisible()
    expect(screen.queryByText('5900')).toBeNull()
    expect(screen.queryByRole('timer')).toBeNull()
    expect(screen.getByText(/What is entered now waits on this phone and is sent when there is a link\./)).toBeVisible()
    await userEvent.click(screen.getByRole('button', { name: /Shout stop/ }))
    expect(await screen.findByText(/The stop has reached no other device: say it aloud\. One entry waits on this phone/)).toBeVisible()
    server.down = false
    window.dispatchEvent(new Event('online'))
    await waitFor(() => expect(sentOf(server, 'stopped')).toHaveLength(1), { timeout: 4000 })
  })
})
