import { QueryClientProvider } from '@tanstack/react-query'
import { cleanup, fireEvent, render, screen, waitFor, within } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { AppendRequest } from '#shared/api/ledger'
import type { PressDraft } from '#shared/press/entries'
import type { PressState } from '#shared/press/state'
import type { Role } from '#shared/policy'
import { ACCEPTED, CLEARED, clearanceUntil, entryId, pressAfter, TEST } from '../../../../../tests/factories/press-states'
import { ids } from '../../../../../tests/factories/test-press'
import { HereContext, type Here } from '../../../../lib/here'
import { createQueryClient } from '../../../../lib/query-client'
import { PressPage } from './press-page'

let sent: AppendRequest[] = []

function show(state: PressState, role: Role = 'lead') {
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

const moved: PressDraft = { kind: 'changed', payload: { change: 'moved', jointIds: [], why: 'To the other bay.' } }
const overload: PressDraft = { kind: 'changed', payload: { change: 'overload', jointIds: [], why: 'Pumped past the mark.' } }
const joints = pressAfter().joints
const jointId = (number: number): string => joints.find((joint) => joint.number === number)?.id ?? ''
const bed = pressAfter().description?.members.find((member) => member.kind === 'bed-beam')?.id ?? ''
/** A test that was stopped for the bed, and concluded: its repair is named for the entry of the stop. */
const wentWrong: readonly PressDraft[] = [
  { kind: 'test-opened', payload: TEST },
  { kind: 'test-stopped', payload: { ...TEST, why: 'Softening, 50 to 75 %: 21 %, limit 15 %', jointIds: [jointId(7)], memberIds: [bed] } },
  { kind: 'test-concluded', payload: { ...TEST, conclusion: 'rejected', jointIds: [jointId(7)] } },
]
const REPAIR = entryId(3)
const closed: PressDraft = { kind: 'repair-closed', payload: { repairId: REPAIR, done: 'Stiffener welded out.', doneBy: 'Pell Navarre' } }

/** Numbers keep to their units by spaces that do not break. */
const plain = (text: string | null | undefined): string => (text ?? '').replaceAll(/[\u00a0\u202f]/g, ' ')
/** By its value: roles of a page as long as this take jsdom seconds to work out. */
function box(value: string): HTMLElement {
  const found = document.querySelector<HTMLElement>(`input[type=checkbox][value="${value}"]`)
  if (!found) throw new Error(`There is no box for ${value}.`)
  return found
}
/** A joint's balloon on the drawing, which is a button there. */
function balloon(number: number): HTMLElement {
  const found = document.querySelector<HTMLElement>(`button[aria-pressed][aria-label^="Joint ${number}, "]`)
  if (!found) throw new Error(`Joint ${number} is not on the drawing.`)
  return found
}
const part = (id: string): HTMLElement => document.getElementById(id) ?? document.body
const kept = () => sent.flatMap(({ entries }) => entries)

describe('a press’s life on its page', { timeout: 30_000 }, () => {
  beforeEach(() => {
    localStorage.clear()
    sent = []
    vi.stubGlobal('fetch', (url: string, init?: { body?: string }) => {
      if (url.endsWith('/history')) return Promise.resolve(new Response(JSON.stringify({ climbs: [] })))
      const request = JSON.parse(init?.body ?? '') as AppendRequest
      sent.push(request)
      const results = request.entries.map((entry) => ({
        outcome: 'refused',
        id: entry.id,
        problem: { type: 'about:blank', title: '', status: 409, code: 'refused', detail: 'Another device was quicker.' },
      }))
      return Promise.resolve(new Response(JSON.stringify({ results, headSeq: 1, headHash: '', resendFrom: null })))
    })
  })
  afterEach(() => vi.unstubAllGlobals())

  it('tells the whole clearance: test, protocol, tooling with its rating, conditions, what was not measured', () => {
    show(pressAfter(...ACCEPTED, CLEARED))
    const whole = within(screen.getByText('The whole clearance').closest('section') ?? document.body)
    expect(whole.getByRole('link', { name: 'PT-0043' })).toHaveAttribute('href', expect.stringContaining(ids.test))
    const text = plain(screen.getByText('The whole clearance').closest('section')?.textContent)
    for (const said of [
      'First load by quarters, version 1',
      '1, to the full load and back',
      'G-02, not past',
      'T-01 Flat nose, 80 mm round; the lowest is rated 20.00 short tons',
      'Examined and tested again by 1 January 2999',
      'Head beam',
      'Pressed slowly, with the load in line with the ram.',
    ])
      expect(text).toContain(said)
    expect(screen.queryByText('Take the tag off the press')).not.toBeInTheDocument()
  })

  it('waits for its joints after a move: says until when it is suspended and what it is cleared to then', () => {
    show(pressAfter(...ACCEPTED, CLEARED, moved))
    expect(screen.getByText('Do not use')).toBeInTheDocument()
    expect(
      screen.getByText(
        'Suspended until every joint is accepted again. Then it is cleared as before: up to 11.7 short tons, until 1 January 2999.',
      ),
    ).toBeInTheDocument()
    expect(screen.getByText('The clearance was suspended with it.')).toBeInTheDocument()
  })

  it('waits for somebody when its gauge was found out of tolerance', () => {
    show(
      pressAfter(...ACCEPTED, CLEARED, {
        kind: 'instrument-recalled',
        payload: { instrumentId: ids.gauge, code: 'G-02', calibratedOn: '2026-10-01' },
      }),
    )
    expect(screen.getByText(/^Suspended until somebody has looked into it/)).toBeInTheDocument()
    expect(screen.getByText('G-02 was found out of tolerance on 2026-10-01')).toBeInTheDocument()
  })

  it('P25: keeps asking for the paper tag until somebody, of the crew too, says that it is off', async () => {
    show(pressAfter(...ACCEPTED, CLEARED, overload), 'crew')
    fireEvent.click(within(part('tag')).getByText('The tag is off'))
    await within(part('tag')).findByText('Another device was quicker.')
    expect(kept()).toMatchObject([{ kind: 'tag-taken-off', payload: { remark: '' } }])
  })

  it('asks for no tag where it is off, none was given, or the press is in use', () => {
    show(pressAfter(...ACCEPTED, CLEARED, overload, { kind: 'tag-taken-off', payload: { remark: '' } }))
    expect(screen.queryByText('Take the tag off the press')).not.toBeInTheDocument()
    expect(screen.getByText('Tag taken off the press')).toBeInTheDocument()
    expect(
      screen.getByText('Withdrawn on 15 September 2026. Before that it was cleared up to 11.7 short tons, until 1 January 2999.'),
    ).toBeInTheDocument()
  })

  it('takes joints of a change from the drawing as from the list', async () => {
    show(pressAfter(...ACCEPTED, CLEARED))
    fireEvent.click(screen.getByText('Report a change'))
    fireEvent.click(screen.getByLabelText(/^Knock/))
    fireEvent.click(balloon(7))
    expect(screen.getByText('Joints 5, 7 and 8 fall back to unexamined.')).toBeInTheDocument()
    fireEvent.click(box(jointId(8)))
    fireEvent.click(balloon(7))
    fireEvent.change(screen.getByLabelText('What was done, in a few words'), { target: { value: 'The forklift ran into it' } })
    fireEvent.click(screen.getByText('Report this change'))
    await screen.findByText('Another device was quicker.')
    expect(kept()).toMatchObject([
      { kind: 'changed', payload: { change: 'knock', jointIds: [jointId(8)], why: 'The forklift ran into it' } },
    ])
  })

  it('keeps a change that was begun over a reload, until it is left', () => {
    const state = pressAfter(...ACCEPTED, CLEARED)
    show(state)
    expect(screen.queryByLabelText('What was done, in a few words')).not.toBeInTheDocument()
    fireEvent.click(screen.getByText('Report a change'))
    fireEvent.click(screen.getByLabelText(/^Knock/))
    fireEvent.click(balloon(7))
    fireEvent.change(screen.getByLabelText('What was done, in a few words'), { target: { value: 'The forklift' } })
    cleanup()
    show(state)
    expect(screen.getByText('Joints 5, 7 and 8 fall back to unexamined.')).toBeInTheDocument()
    expect(screen.getByLabelText('What was done, in a few words')).toHaveValue('The forklift')
    fireEvent.click(screen.getByText('Leave it'))
    cleanup()
    show(state)
    expect(screen.queryByLabelText('What was done, in a few words')).not.toBeInTheDocument()
    expect(screen.getByText('Report a change')).toBeInTheDocument()
  })

  it('P21: names the repair that a failed test opened, with members and joints, and lets nobody plan before it is closed', () => {
    show(pressAfter(...wentWrong))
    const repairs = within(part('repairs'))
    expect(repairs.getByText('Bed', { exact: true })).toBeInTheDocument()
    expect(repairs.getByRole('link', { name: 'PT-0043' })).toBeInTheDocument()
    expect(screen.getByRole('button', { name: /^Plan the test that repeats PT-0043/ })).toBeDisabled()
    expect(screen.getByRole('link', { name: 'To the open repair' })).toHaveAttribute('href', '#repairs')
  })

  it('marks on the drawing the joints of a repair, and those on the members that it names', () => {
    show(pressAfter(...wentWrong))
    fireEvent.click(screen.getByText('Mark on the drawing'))
    const onBed = joints.filter((joint) => joint.id === jointId(7) || joint.between.includes(bed)).map((joint) => joint.number)
    expect(onBed.length).toBeGreaterThan(1)
    for (const { number } of joints) expect(balloon(number).getAttribute('aria-pressed')).toBe(String(onBed.includes(number)))
  })

  it('lets the crew say what was done, and a lead alone close it', async () => {
    show(pressAfter(...wentWrong), 'crew')
    expect(screen.queryByText('Close this repair')).not.toBeInTheDocument()
    fireEvent.click(screen.getByText('Say what was done'))
    fireEvent.change(screen.getByLabelText('What was done'), { target: { value: 'Ground out the old weld.' } })
    fireEvent.click(screen.getByText('This was done'))
    await waitFor(() => expect(kept()).toHaveLength(1))
    expect(kept()[0]).toMatchObject({
      kind: 'repair-noted',
      payload: { repairId: REPAIR, note: 'Ground out the old weld.', doneBy: 'Marit Sandoval' },
    })
  })

  it('P24: is not closed before the test that called for it is concluded', () => {
    show(pressAfter(...wentWrong.slice(0, 2)))
    expect(screen.queryByText('Close this repair')).not.toBeInTheDocument()
    expect(within(part('repairs')).getByText('PT-0043 is not concluded yet. Conclude it, then close the repair.')).toBeInTheDocument()
  })

  it('after it is closed, says what is examined again and leads to the test that repeats the one that went wrong', () => {
    show(pressAfter(...wentWrong, closed))
    const repairs = within(part('repairs'))
    expect(repairs.getByText(/^A repair is closed\. Examine joint 7 again\./)).toBeInTheDocument()
    expect(repairs.getByText('Stiffener welded out.')).toBeInTheDocument()
    const plan = screen.getByRole('link', { name: 'Plan the test that repeats PT-0043' })
    expect(plan).toHaveAttribute('href', expect.stringContaining(`repeats=${ids.test}`))
  })

  it('opens a repair by hand with the joints and members that somebody points out', async () => {
    show(pressAfter(...ACCEPTED, CLEARED), 'crew')
    fireEvent.click(screen.getByText('Open a repair'))
    fireEvent.change(screen.getByLabelText('What has to be put right'), { target: { value: 'A crack beside joint 3' } })
    fireEvent.click(box(jointId(3)))
    fireEvent.click(box(bed))
    fireEvent.click(screen.getByText('A repair is wanted'))
    await waitFor(() => expect(kept()).toHaveLength(1))
    expect(kept()[0]).toMatchObject({
      kind: 'repair-opened',
      payload: { why: 'A crack beside joint 3', jointIds: [jointId(3)], memberIds: [bed] },
    })
  })

  it('tells in the history how each clearance ended: by a change, by hand, by its day', () => {
    show(
      pressAfter(
        ...ACCEPTED,
        CLEARED,
        overload,
        CLEARED,
        { kind: 'withdrawn', payload: { why: 'The bed looks bent.' } },
        {
          kind: 'clearance-given',
          payload: clearanceUntil('2026-09-30'),
        },
      ),
    )
    const told = plain(screen.getByText('What happened').closest('section')?.textContent)
    expect(told).toContain('The clearance up to 11.7 short tons ran out')
    expect(told).toContain('Withdrawn by hand. The bed looks bent.')
    expect(told).toContain('Overload: Pumped past the mark.')
    expect(told).toContain('The clearance ended with it.')
  })

  it('says where there is no test yet what to do, and shows no chart', async () => {
    show(pressAfter())
    expect(await screen.findByText('No test of this press has been read yet.')).toBeInTheDocument()
  })
})
