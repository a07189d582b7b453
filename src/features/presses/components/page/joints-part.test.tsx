import { QueryClientProvider } from '@tanstack/react-query'
import { fireEvent, render, screen, waitFor, within } from '@testing-library/react'
import { useState } from 'react'
import { MemoryRouter } from 'react-router-dom'
import { beforeEach, describe, expect, it, vi } from 'vitest'
import { ids, openedPayload } from '../../../../../tests/factories/test-press'
import { emptyPress } from '#shared/press/apply'
import type { PressJoint, PressState } from '#shared/press/state'
import { HereContext, type Here } from '../../../../lib/here'
import { createQueryClient } from '../../../../lib/query-client'
import type { PressWriting } from '../../api/append-to-press'
import { JointsPart } from './joints-part'
import { usePressWalk, walkedSince } from './use-press-walk'
import { useSpotting } from './use-spotting'

const { press: description, joints: example } = openedPayload()

const pressJoint = (joint: (typeof example)[number], change: Partial<PressJoint> = {}): PressJoint => ({
  ...joint,
  makeUp: 'finished',
  examination: null,
  fellBackBecause: null,
  workedAt: null,
  retired: false,
  ...change,
})
const examinedAt = (at: string): Partial<PressJoint> => ({
  examination: { result: 'accepted', method: 'visual', by: ids.lead, at, remark: '', proofTestNumber: null },
})

function stateOf(change: Record<number, Partial<PressJoint>> = {}): PressState {
  const joints = example.map((joint) => pressJoint(joint, change[joint.number]))
  return { ...emptyPress(ids.press), description, joints }
}

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
const send = vi.fn<(drafts: PressWriting[], answers: { onSuccess: () => void }) => void>()

function Page({ state }: { state: PressState }) {
  const [selectedId, setSelectedId] = useState<string | null>(null)
  const { spotting } = useSpotting()
  const walk = usePressWalk(state.id, 'h-frame', state.joints)
  return (
    <JointsPart
      {...{
        state,
        joints: state.joints.filter((joint) => !joint.retired),
        selectedId,
        onSelect: setSelectedId,
        walk,
        spotting,
        send,
        busy: false,
        children: null,
      }}
    />
  )
}

const show = (state: PressState) =>
  render(
    <MemoryRouter>
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <HereContext value={here}>
          <Page state={state} />
        </HereContext>
      </QueryClientProvider>
    </MemoryRouter>,
  )
const nameOf = (number: number) => new RegExp(example.find((joint) => joint.number === number)?.name ?? '-')
const press = (name: string | RegExp) => fireEvent.click(screen.getByRole('button', { name }))

describe('the joints of a press', () => {
  beforeEach(() => {
    localStorage.clear()
    send.mockReset()
  })

  it('are retired with a reason, after it is said that the load path opens', async () => {
    show(stateOf({ 4: { retired: true } }))
    press(nameOf(3))
    press('Retire it')
    expect(screen.getByText(/^The load path is open without it\./)).toBeInTheDocument()
    press('Joint 3 is retired')
    await screen.findByText('Say why in a few words.')
    expect(send).not.toHaveBeenCalled()
    fireEvent.change(screen.getByLabelText(/^Why joint 3/), { target: { value: 'Cut off' } })
    press('Joint 3 is retired')
    await waitFor(() => expect(send).toHaveBeenCalledOnce())
    expect(send.mock.calls[0]?.[0]).toEqual([{ kind: 'joint-retired', payload: { jointId: example[2]?.id, why: 'Cut off' } }])
  })

  it('are split into two or more, each with a number of its own', async () => {
    show(stateOf())
    press(nameOf(7))
    press('Split it')
    const names = screen.getAllByLabelText('Name')
    expect(names).toHaveLength(2)
    names.forEach((name, index) => fireEvent.change(name, { target: { value: `Run ${index + 1}` } }))
    fireEvent.change(screen.getByLabelText('Why it is split'), { target: { value: 'Two runs' } })
    press('Joint 7 is 2 joints')
    await waitFor(() => expect(send).toHaveBeenCalledOnce())
    const payload = send.mock.calls[0]?.[0][0]?.payload
    expect(payload).toMatchObject({
      jointId: example[6]?.id,
      into: [
        { number: 9, name: 'Run 1' },
        { number: 10, name: 'Run 2' },
      ],
    })
  })

  it('are described by maker, filler or fastener and day', async () => {
    show(stateOf({ 3: examinedAt('2026-09-15T10:00:00.000Z') }))
    press(nameOf(3))
    press('Describe it')
    expect(screen.getByText(/^Joint 3 falls back to unexamined/)).toBeInTheDocument()
    fireEvent.change(screen.getByLabelText(/^Made by/), { target: { value: 'D. Mallory' } })
    press('Joint 3 is described')
    await waitFor(() => expect(send).toHaveBeenCalledOnce())
    expect(send.mock.calls[0]?.[0]).toMatchObject([
      { kind: 'joint-described', payload: { joint: { number: 3, madeBy: 'D. Mallory', makeUp: 'finished' } } },
    ])
  })

  it('ask why a weld is examined before its 12 hours are over', async () => {
    const weld = example.find(({ kind }) => kind === 'weld')?.number ?? 0
    show(stateOf({ [weld]: { workedAt: new Date(Date.now() - 3_600_000).toISOString() } }))
    press(new RegExp(example.find(({ number }) => number === weld)?.name ?? ''))
    press('It was examined')
    fireEvent.click(screen.getByRole('radio', { name: /^Accepted/ }))
    press(`Joint ${weld} was examined`)
    await screen.findByText(/or wait until the 12 hours are over/)
    fireEvent.change(screen.getByLabelText(/^Why it is examined now, 1\.0 hours/), { target: { value: 'Preheated, cooled slowly' } })
    press(`Joint ${weld} was examined`)
    await waitFor(() => expect(send).toHaveBeenCalledOnce())
    expect(send.mock.calls[0]?.[0]).toMatchObject([{ overrides: [{ rule: 'P8', reason: 'Preheated, cooled slowly' }] }])
  })

  it('are walked down one after another; where the walk stood is there after a reload', async () => {
    const { unmount } = show(stateOf())
    press('Walk down the joints')
    expect(screen.getByRole('heading', { name: 'Joint 1: Head beam to left upright' })).toBeInTheDocument()
    fireEvent.click(screen.getByRole('radio', { name: /^Accepted/ }))
    press('Joint 1 was examined')
    await waitFor(() => expect(send).toHaveBeenCalledOnce())
    unmount()
    show(stateOf({ 1: examinedAt(new Date(Date.now() + 1000).toISOString()) }))
    expect(screen.getByText('1 of 8 joints looked at.')).toBeInTheDocument()
    expect(screen.getByRole('heading', { name: 'Joint 2: Head beam to right upright' })).toBeInTheDocument()
    expect(within(screen.getByRole('list')).getByText(/^1st of 8, \d\d:\d\d/)).toBeInTheDocument()
  })
})

describe('a walk-down outside a test', () => {
  it('counts what was examined since it began, in that order, and takes joints that need work last', () => {
    const state = stateOf({
      2: examinedAt('2026-09-15T10:00:00.000Z'),
      5: examinedAt('2026-09-15T12:00:00.000Z'),
      1: examinedAt('2026-09-15T12:30:00.000Z'),
      3: { makeUp: 'tacked' },
    })
    const { order, toCome } = walkedSince('2026-09-15T11:00:00.000Z', 'h-frame', state.joints)
    expect(order.map(({ id }) => state.joints.find((joint) => joint.id === id)?.number)).toEqual([5, 1])
    expect(toCome.map(({ number }) => number)).toEqual([2, 4, 6, 7, 8, 3])
  })
})
