import { QueryClientProvider } from '@tanstack/react-query'
import { fireEvent, render, screen, waitFor, within } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { AppendRequest } from '#shared/api/ledger'
import { foldPress } from '#shared/press/apply'
import type { Clearance, PressDraft } from '#shared/press/entries'
import type { Role } from '#shared/policy'
import { ids, openedPayload } from '../../../../../tests/factories/test-press'
import { HereContext, type Here } from '../../../../lib/here'
import { createQueryClient } from '../../../../lib/query-client'
import { PressPage } from './press-page'

const { press: description, joints } = openedPayload()
const registered: PressDraft = { kind: 'registered', payload: { description, joints, lastWorkedOn: null } }
const test = { proofTestId: ids.test, number: 'PT-0043' }

const clearance = (until: string): Clearance => ({
  load: { text: '11.7', unit: 'short-ton' },
  loadNewton: 104_088,
  gaugePressure: { text: '7650', unit: 'psi' },
  gaugeCode: 'G-02',
  instrumentIds: [],
  bedHoles: ['4'],
  ramPositions: ['central'],
  tooling: [],
  until,
  clearedOn: '2026-09-15',
  clearedBy: 'Marit Sandoval',
  ...test,
  staticLoads: 1,
  notMeasured: ['Head beam'],
})

function stateOf(...drafts: PressDraft[]) {
  return foldPress(
    ids.press,
    [registered, ...drafts].map((draft, index) => ({
      id: `01990000-0000-7000-8000-${String(index).padStart(12, '0')}`,
      ledgerId: ids.press,
      v: 1,
      ...draft,
      authorId: ids.lead,
      deviceId: ids.test,
      deviceSeq: index + 1,
      basedOnSeq: index,
      observedAt: '2026-09-15T10:00:00.000Z',
      bootId: ids.test,
      monotonicMs: index,
      attachments: [],
      overrides: [],
      seq: index + 1,
      receivedAt: '2026-09-15T10:00:00.000Z',
      irregular: [],
      prevHash: '0'.repeat(64),
      hash: '1'.repeat(64),
    })),
  )
}

let sent: AppendRequest[] = []

function show(state: ReturnType<typeof stateOf>, role: Role = 'lead') {
  const shop: Here['shop'] = {
    id: ids.shop,
    name: 'Hollin Bridge',
    role,
    forceUnit: 'short-ton',
    pressureUnit: 'psi',
    lengthUnit: 'mm',
    buildPauseDays: 30,
    walkDownHours: 12,
  }
  const here: Here = { user: { id: ids.lead, name: 'Marit Sandoval', email: '' }, shops: [shop], shop, adopt: () => undefined }
  render(
    <MemoryRouter>
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <HereContext value={here}>
          <PressPage state={state} people={{ [ids.lead]: 'Marit Sandoval' }} />
        </HereContext>
      </QueryClientProvider>
    </MemoryRouter>,
  )
}

const inDate = { kind: 'clearance-given', payload: clearance('2999-01-01') } as const
const buttons = () => screen.getAllByRole('button').map((button) => button.textContent)

describe('a press’s page', { timeout: 20_000 }, () => {
  beforeEach(() => {
    localStorage.clear()
    sent = []
    vi.stubGlobal('fetch', (url: string, { body }: { body: string }) => {
      if (url.endsWith('/history')) return Promise.resolve(new Response(JSON.stringify({ climbs: [] })))
      const request = JSON.parse(body) as AppendRequest
      sent.push(request)
      const results = request.entries.map((entry) => ({
        outcome: 'refused',
        id: entry.id,
        problem: { type: 'about:blank', title: '', status: 409, code: 'refused', detail: 'Another test is under way.' },
      }))
      return Promise.resolve(new Response(JSON.stringify({ results, headSeq: 1, headHash: '', resendFrom: null })))
    })
  })
  afterEach(() => vi.unstubAllGlobals())

  it('names the load with its unit, what it was proven with, until when and by whom, and never says yes', () => {
    show(stateOf(inDate))
    const page = document.body.textContent
    expect(page).toContain('May I use Press 2, straightening press?')
    expect(page).toMatch(/Cleared up to\s*11\.7\s*short tons/)
    expect(page).toContain('Gauge G-02 not past')
    expect(page).toContain('Bed hole 4, ram central')
    expect(page).toContain('No other bed hole was tested.')
    expect(page).toContain('Until 1 January 2999')
    expect(page).toContain('Cleared by Marit Sandoval on 15 September 2026 after one static load.')
    expect(page).toContain('Not measured: Head beam.')
    expect(page).not.toMatch(/\b(yes|safe|approved)\b/i)
  })

  it('hands out its ledger as a file beside what happened, but not to the crew', () => {
    show(stateOf(inDate))
    expect(screen.getByRole('link', { name: 'Download ledger file' })).toHaveAttribute('href', `/api/presses/${ids.press}/ledger.json`)
    expect(screen.getByRole('link', { name: 'Check a ledger file' })).toHaveAttribute('href', '/check')
    document.body.replaceChildren()
    show(stateOf(inDate), 'crew')
    expect(screen.getByText('Until 1 January 2999', { exact: false })).toBeInTheDocument()
    expect(screen.queryByRole('link', { name: 'Download ledger file' })).toBeNull()
  })

  it('says do not use, why, and which joints are missing', () => {
    show(stateOf(inDate, { kind: 'changed', payload: { change: 'repair', jointIds: [], why: 'Hose changed' } }))
    expect(screen.getByText('Do not use')).toBeInTheDocument()
    expect(screen.getByText('Repair: Hose changed', { selector: 'p.text-20' })).toBeInTheDocument()
    expect(screen.getByText('Joints 1 to 8 are not examined.')).toBeInTheDocument()
    expect(screen.getByRole('link', { name: 'Plan a proof test' })).toHaveAttribute('href', expect.stringContaining(`press=${ids.press}`))
  })

  it('is not cleared the day after the last one', () => {
    show(stateOf({ kind: 'clearance-given', payload: clearance('2026-09-30') }))
    expect(screen.getByText('Do not use')).toBeInTheDocument()
    expect(screen.queryByText('Cleared up to')).not.toBeInTheDocument()
    expect(screen.getByText('It was cleared up to 11.7 short tons, until 30 September 2026.')).toBeInTheDocument()
  })

  it('leads to the test while one is under way, and lets nobody plan another', () => {
    show(stateOf(inDate, { kind: 'test-opened', payload: test }))
    expect(screen.getByText('Under test')).toBeInTheDocument()
    expect(screen.getByRole('link', { name: 'Open PT-0043' })).toBeInTheDocument()
    expect(screen.queryByRole('link', { name: 'Plan a proof test' })).not.toBeInTheDocument()
  })

  it('lets the crew report a change, and nothing else', () => {
    show(stateOf(inDate), 'crew')
    expect(buttons()).toContain('Report a change')
    expect(buttons()).not.toContain('Withdraw it from use')
    expect(screen.queryByRole('link', { name: 'Plan a proof test' })).not.toBeInTheDocument()
    expect(screen.queryByRole('link', { name: 'Change what is written here' })).not.toBeInTheDocument()
  })

  it('sends a reported change to the ledger, and shows why it was refused with what was typed', async () => {
    show(stateOf(inDate))
    fireEvent.click(screen.getByText('Report a change'))
    fireEvent.click(screen.getByLabelText(/^Overload/))
    const why = screen.getByLabelText('What was done, in a few words')
    fireEvent.change(why, { target: { value: 'Pumped to 14 short tons by mistake' } })
    fireEvent.click(screen.getByText('Report this change'))
    await screen.findByText('Another test is under way.')
    expect(sent[0]?.entries[0]).toMatchObject({
      kind: 'changed',
      payload: { change: 'overload', jointIds: [], why: 'Pumped to 14 short tons by mistake' },
      basedOnSeq: 2,
    })
    expect(why).toHaveValue('Pumped to 14 short tons by mistake')
  })

  it('asks for a kind of change and a few words before it sends anything', async () => {
    show(stateOf(inDate))
    fireEvent.click(screen.getByText('Report a change'))
    fireEvent.click(screen.getByText('Report this change'))
    await screen.findByText('Choose what happened.')
    expect(screen.getByText('Say why in a few words.')).toBeInTheDocument()
    expect(sent).toEqual([])
  })

  it('names the neighbours that fall back when a joint is worked on', async () => {
    show(stateOf())
    fireEvent.click(screen.getByRole('button', { name: /^Joint 7 Bed on left pin|Bed on left pin/, expanded: false }))
    fireEvent.click(screen.getByText('It was worked on'))
    expect(screen.getByText(/It shares members with joints 5 and 8/)).toBeInTheDocument()
    fireEvent.click(screen.getByText('Joint 7 was worked on'))
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(sent[0]?.entries[0]).toMatchObject({ kind: 'joint-worked', payload: { jointId: joints[6]?.id, makeUp: 'finished', test: null } })
  })

  it('tells what happened, the latest first', () => {
    show(stateOf(inDate))
    const events = within(screen.getByText('What happened').closest('section') ?? document.body).getAllByRole('listitem')
    expect(events.map((event) => event.textContent)).toEqual([
      expect.stringContaining('Cleared up to 11.7 short tons'),
      expect.stringContaining('Entered with 8 joints'),
    ])
  })
})
