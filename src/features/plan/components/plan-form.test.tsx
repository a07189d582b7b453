import { QueryClientProvider } from '@tanstack/react-query'
import { fireEvent, render, screen, waitFor } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { OpenTestRequest } from '#shared/api/proof-tests'
import type { MemberStrength } from '#shared/structure/member-data'
import { SHIPPED_PROTOCOLS } from '#shared/proof-test/protocol'
import { ids, names, openedPayload } from '../../../../tests/factories/test-press'
import { HereContext, type Here } from '../../../lib/here'
import { createQueryClient } from '../../../lib/query-client'
import type { PlanRegisters } from '../api/get-plan-registers'
import { PlanForm } from './plan-form'

const example = openedPayload()
const AT = '2026-09-15T10:00:00.000Z'
const WEAK = '01990000-0000-7000-8000-0000000000ab'
const ABOVE = '01990000-0000-7000-8000-0000000000aa'

const shop: Here['shop'] = {
  id: ids.shop,
  name: 'Hollin Bridge',
  role: 'lead',
  forceUnit: 'short-ton',
  pressureUnit: 'psi',
  lengthUnit: 'mm',
  buildPauseDays: 30,
  walkDownHours: 12,
}
const here: Here = { user: { id: ids.lead, name: 'Marit Sandoval', email: '' }, shops: [shop], shop, adopt: () => undefined }

function registers(): PlanRegisters {
  const shipped = SHIPPED_PROTOCOLS.find(({ content }) => content.aboveRating)
  if (!shipped) throw new Error('A protocol that goes above rating is shipped.')
  return {
    presses: [],
    protocols: [
      { ...example.protocol, archived: false },
      { id: ABOVE, name: shipped.name, version: 1, archived: false, content: shipped.content },
    ],
    instruments: example.instruments.map((instrument) => ({ ...instrument, retired: false })),
    tooling: [
      {
        id: WEAK,
        retired: false,
        details: {
          code: 'T-09',
          name: 'Old die',
          kind: 'die',
          ratedLoad: { text: '8', unit: 'short-ton' },
          ratingFrom: 'Stamped',
          fit: 'On the bed',
          height: null,
          remark: '',
        },
      },
    ],
    people: Object.entries(names).map(([userId, name]) => ({ userId, name, role: 'lead' as const, addedAt: AT, endedAt: null })),
  }
}

const ledger = {
  ledgerId: ids.press,
  entries: [
    {
      id: ids.press,
      ledgerId: ids.press,
      kind: 'registered',
      v: 1,
      payload: { description: example.press, joints: example.joints, lastWorkedOn: null },
      authorId: ids.lead,
      deviceId: ids.test,
      deviceSeq: 1,
      basedOnSeq: 0,
      observedAt: AT,
      bootId: ids.test,
      monotonicMs: 0,
      attachments: [],
      overrides: [],
      seq: 1,
      receivedAt: AT,
      irregular: [],
      prevHash: '0'.repeat(64),
      hash: '1'.repeat(64),
    },
  ],
  headSeq: 1,
  headHash: '1'.repeat(64),
  people: {},
  sealed: [],
}

let opened: OpenTestRequest[] = []

const json = (body: unknown, status = 200) =>
  Promise.resolve(new Response(JSON.stringify(body), { status, headers: { 'content-type': 'application/json' } }))

function answer(url: string, init?: { method?: string; body?: string }) {
  if (init?.method === 'POST') {
    opened.push(JSON.parse(init.body ?? '') as OpenTestRequest)
    const fields = { 'aboveRating.percent': 'The order asks for 110 %.' }
    return json({ type: 'about:blank', title: '', status: 422, code: 'invalid', detail: 'Some fields need another look.', fields }, 422)
  }
  return url.includes('/entries') ? json(ledger) : json({ proofTests: [], older: null, newer: null })
}

function show() {
  render(
    <MemoryRouter>
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <HereContext value={here}>
          <PlanForm registers={registers()} asked={{ press: ids.press, repeats: '' }} onOpened={() => undefined} />
        </HereContext>
      </QueryClientProvider>
    </MemoryRouter>,
  )
}

/** By the field's name: on a form as long as this, labels and roles take jsdom seconds to work out. */
function field(name: string): HTMLInputElement | HTMLSelectElement {
  const found = document.querySelector<HTMLInputElement | HTMLSelectElement>(`[name="${name}"]`)
  if (!found) throw new Error(`There is no field ${name}.`)
  return found
}
const enter = (name: string, value: string) => fireEvent.change(field(name), { target: { value } })
const asked = () => document.querySelector('[name^="aboveRating"]') !== null

describe('the plan of a test above rating', { timeout: 20_000 }, () => {
  beforeEach(() => {
    localStorage.clear()
    opened = []
    vi.stubGlobal('fetch', vi.fn(answer))
  })
  afterEach(() => vi.unstubAllGlobals())

  it('asks how far and by which rule where the protocol does, shows the target, and keeps the sentence of the server', async () => {
    show()
    await waitFor(() => field('points.0.instrumentId'))
    enter('protocolId', ids.protocol)
    expect(asked()).toBe(false)
    enter('protocolId', ABOVE)
    expect(field('aboveRating.percent').value).toBe('')
    enter('forceInstrumentIds.0', ids.gauge)
    for (const [index, id] of ids.indicators.entries()) enter(`points.${index}.instrumentId`, id)
    for (const index of [0, 1]) enter(`legs.${index}.bedHole`, String(index + 4))
    enter('pumpHand.id', ids.pumpHand)
    enter('witness.id', ids.witness)
    enter('witness.relation', 'works next door')
    fireEvent.click(screen.getByText('Open this test'))
    expect(await screen.findByText('Enter a percentage.')).toBeVisible()
    expect(screen.getByText('Name the rule that asks for it.')).toBeVisible()
    expect(opened).toEqual([])

    enter('aboveRating.percent', '112,5')
    enter('aboveRating.rule', 'Customer’s order, clause 4')
    expect(await screen.findByText('second climb')).toBeVisible()
    fireEvent.click(screen.getByText('Open this test'))
    expect(await screen.findByText('The order asks for 110 %.')).toBeVisible()
    expect(opened[0]?.aboveRating).toEqual({ percent: 112.5, rule: 'Customer’s order, clause 4' })
    expect(field('aboveRating.percent').value).toBe('112,5')
  })
})

describe('the plan of a test with loose tooling', { timeout: 20_000 }, () => {
  beforeEach(() => {
    localStorage.clear()
    opened = []
    vi.stubGlobal(
      'fetch',
      vi.fn((url: string, init?: { method?: string; body?: string }) => {
        if (init?.method !== 'POST') return answer(url, init)
        opened.push(JSON.parse(init.body ?? '') as OpenTestRequest)
        return json({ id: ids.test, number: 'PT-0001' }, 201)
      }),
    )
  })
  afterEach(() => vi.unstubAllGlobals())

  it('refuses a piece that carries less than the highest load at the piece, before anything is sent', async () => {
    show()
    await waitFor(() => field('points.0.instrumentId'))
    enter('protocolId', ids.protocol)
    enter('forceInstrumentIds.0', ids.gauge)
    for (const [index, id] of ids.indicators.entries()) enter(`points.${index}.instrumentId`, id)
    enter('legs.0.bedHole', '4')
    enter('pumpHand.id', ids.pumpHand)
    enter('witness.id', ids.witness)
    enter('witness.relation', 'works next door')
    fireEvent.click(field(`tooling.${WEAK}`))
    expect(await screen.findByText(/^T-09 carries no more than 8\sshort tons, and this test goes to/)).toBeVisible()
    fireEvent.click(screen.getByText('Open this test'))
    await waitFor(() => expect(field(`tooling.${WEAK}`)).toHaveFocus())
    expect(opened).toEqual([])

    fireEvent.click(field(`tooling.${WEAK}`))
    await waitFor(() => expect(screen.queryByText(/^T-09 carries no more than/)).toBeNull())
    fireEvent.click(screen.getByText('Open this test'))
    await waitFor(() => expect(opened).toHaveLength(1))
    expect(opened[0]?.toolingIds).toEqual([])
  })
})

describe('the plan of a test whose estimate is over 100 %', { timeout: 20_000 }, () => {
  const mm = (text: string) => ({ text, unit: 'mm' as const })
  const weakBed: MemberStrength = {
    role: 'beam',
    section: { shape: 'flat', height: mm('80'), width: mm('20'), sideBySide: 2, plates: [] },
    material: { grade: 'S355JR' },
    support: 'both ends',
    span: mm('640'),
    ramOffset: null,
    hole: null,
    loadShare: null,
  }
  const members = example.press.members.map((member) => (member.kind === 'bed-beam' ? { ...member, strength: weakBed } : member))
  const weak = {
    ...ledger,
    entries: ledger.entries.map((entry) => ({ ...entry, payload: { ...entry.payload, description: { ...example.press, members } } })),
  }

  beforeEach(() => {
    localStorage.clear()
    opened = []
    vi.stubGlobal(
      'fetch',
      vi.fn((url: string, init?: { method?: string; body?: string }) =>
        init?.method !== 'POST' && url.includes('/entries') ? json(weak) : answer(url, init),
      ),
    )
  })
  afterEach(() => vi.unstubAllGlobals())

  it('says which member, asks for a named engineer’s document, and sends it', async () => {
    show()
    await waitFor(() => field('points.0.instrumentId'))
    enter('protocolId', ids.protocol)
    expect(document.querySelector('[name^="engineer"]')).toBeNull()
    enter('forceInstrumentIds.0', ids.gauge)
    await waitFor(() => field('engineer.name'))
    expect(screen.getAllByText(/By the estimate Bed comes to/).length).toBe(1)
    for (const [index, id] of ids.indicators.entries()) enter(`points.${index}.instrumentId`, id)
    enter('legs.0.bedHole', '4')
    enter('pumpHand.id', ids.pumpHand)
    enter('witness.id', ids.witness)
    enter('witness.relation', 'works next door')
    enter('engineer.name', 'P. Lindqvist')
    fireEvent.click(screen.getByText('Open this test'))
    expect(await screen.findByText('Say which document, with its number.')).toBeVisible()
    expect(opened).toEqual([])
    enter('engineer.document', 'Calculation 26-118, issue B')
    enter('engineer.on', '2026-09-01')
    await waitFor(() => expect(screen.queryByText(/By the estimate Bed comes to/)).toBeNull())
    fireEvent.click(screen.getByText('Open this test'))
    await waitFor(() => expect(opened).toHaveLength(1))
    expect(opened[0]?.engineer).toEqual({ name: 'P. Lindqvist', document: 'Calculation 26-118, issue B', on: '2026-09-01' })
  })
})

describe('the plan of a test that repeats one that went wrong', { timeout: 20_000 }, () => {
  const [first] = ledger.entries
  if (!first) throw new Error('The press is entered.')
  const why = 'Softening, 50 to 75 %: 21 %, limit 15 %'
  const stopped = { proofTestId: ids.test, number: 'PT-0041', jointIds: [], memberIds: [], why }
  const later = (seq: number, kind: string, payload: object) => ({
    ...first,
    id: `01990000-0000-7000-8000-00000000000${seq}`,
    seq,
    kind,
    payload,
  })
  const wrong = [
    first,
    later(2, 'test-opened', { proofTestId: ids.test, number: 'PT-0041' }),
    later(3, 'test-stopped', stopped),
    later(4, 'test-concluded', { proofTestId: ids.test, number: 'PT-0041', conclusion: 'rejected', jointIds: [] }),
  ]
  const repairId = wrong[2]?.id
  const repaired = [...wrong, later(5, 'repair-closed', { repairId, done: 'Bed stiffeners welded out.', doneBy: 'Pell Navarre' })]
  const serve = (entries: readonly object[]) =>
    vi.stubGlobal(
      'fetch',
      vi.fn((url: string, init?: { method?: string; body?: string }) =>
        init?.method !== 'POST' && url.includes('/entries') ? json({ ...ledger, entries }) : answer(url, init),
      ),
    )

  beforeEach(() => {
    localStorage.clear()
    opened = []
  })
  afterEach(() => vi.unstubAllGlobals())

  it('names that test by default, and says what went wrong and what was done since', async () => {
    serve(repaired)
    show()
    await waitFor(() => expect(field('repeatsId').value).toBe(ids.test))
    const repeats = (await screen.findByText('PT-0041', { selector: 'a' })).closest('div')
    expect(repeats?.textContent?.replaceAll('\u202f', ' ')).toContain(`PT-0041 was stopped. ${why}`)
    expect(repeats?.textContent).toContain('Bed stiffeners welded out. Done by Pell Navarre.')
  })

  it('P22: says at the field that the test to be repeated is missing, and sends nothing', async () => {
    serve(repaired)
    show()
    await waitFor(() => expect(field('repeatsId').value).toBe(ids.test))
    enter('repeatsId', '')
    expect(await screen.findByText(/PT-0041 did not end well on this press\. Plan this test as the one that repeats it/)).toBeVisible()
    fireEvent.click(screen.getByText('Open this test'))
    expect(opened).toEqual([])
  })

  it('P21: says at the press that a repair is open, and leads to it', async () => {
    serve(wrong)
    show()
    expect(await screen.findByText(/^A repair is open: PT-0041 was stopped/)).toBeVisible()
    expect(screen.getByText('To the open repair of this press')).toHaveAttribute('href', expect.stringContaining('#repairs'))
  })
})
