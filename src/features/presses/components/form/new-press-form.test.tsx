import { QueryClientProvider } from '@tanstack/react-query'
import { fireEvent, render, screen, waitFor } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { AppendRequest, AppendResponse } from '#shared/api/ledger'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import { HereContext, type Here } from '../../../../lib/here'
import { createQueryClient } from '../../../../lib/query-client'
import { NewPressForm } from './new-press-form'

const SHOP = '01990000-0000-7000-8000-000000000001'
const LEAD = '01990000-0000-7000-8000-000000000002'
const HASH = '0'.repeat(64)

const here: Here = {
  user: { id: LEAD, name: 'Lena Vogt', email: 'lena@people.example' },
  shops: [],
  shop: {
    id: SHOP,
    name: 'Kiln Lane Fabrication',
    role: 'lead',
    forceUnit: 'short-ton',
    pressureUnit: 'psi',
    lengthUnit: 'mm',
    buildPauseDays: 30,
    walkDownHours: 12,
  },
  adopt: () => undefined,
}

let sent: AppendRequest[] = []
/** How many requests get no answer before one does. */
let lost = 0

function answer({ entries }: AppendRequest): AppendResponse {
  const results = entries.map((entry, index) => ({
    outcome: 'kept' as const,
    id: entry.id,
    entry: { ...entry, seq: index + 1, receivedAt: entry.observedAt, irregular: [], prevHash: HASH, hash: HASH },
  }))
  return { results, headSeq: 1, headHash: HASH, resendFrom: null }
}

function show(onEntered = vi.fn()) {
  const shown = render(
    <MemoryRouter>
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <HereContext value={here}>
          <NewPressForm shopId={SHOP} units={{ length: 'mm', pressure: 'psi' }} onEntered={onEntered} />
        </HereContext>
      </QueryClientProvider>
    </MemoryRouter>,
  )
  return { ...shown, onEntered, user: userEvent.setup() }
}

/** By the field's name: on a form as long as this, labels and roles take jsdom seconds to work out. */
function field(name: string): Element {
  const found = document.querySelector(`[name="${name}"]`)
  if (found === null) throw new Error(`No field is called ${name}.`)
  return found
}
const put = (name: string, value: string) => fireEvent.change(field(name), { target: { value } })
const press = (label: string) => fireEvent.click(screen.getByLabelText(label))

const NAME = 'description.name'
const BORE = 'description.rams.0.bore.text'
const RATED = 'description.ratedLoad.text'
const send = () => screen.getByText('Enter this press')

/** Everything but the rated load, of a jack marked 12 short tons on an H-frame rated 15. */
function fillAllButLoad() {
  put(NAME, 'Press 2')
  press('H-frame')
  put(BORE, '44,5')
  put('description.rams.0.ratedCapacity.text', '12')
  put('description.rams.0.ratedCapacity.unit', 'short-ton')
  put('description.rams.0.ratedPressure.text', '10000')
  put('description.rams.0.stroke.text', '150')
  put('description.train.0.ratedPressure.text', '10000')
  put('description.train.1.ratedPressure.text', '10000')
  put('description.train.2.ratedForce.text', '15')
  put('description.train.2.ratedForce.unit', 'short-ton')
}

function rate(load: string, unit: string) {
  put(RATED, load)
  put('description.ratedLoad.unit', unit)
}

describe('entering a press', { timeout: 20_000 }, () => {
  beforeEach(() => {
    localStorage.clear()
    sent = []
    lost = 0
    vi.stubGlobal('fetch', (_url: string, { body }: { body: string }) => {
      const request = JSON.parse(body) as AppendRequest
      sent.push(request)
      if (sent.length <= lost) return Promise.reject(new TypeError('network'))
      return Promise.resolve(new Response(JSON.stringify(answer(request)), { status: 201 }))
    })
  })
  afterEach(() => vi.unstubAllGlobals())

  it('takes a comma for the decimal sign, says what it read, and keeps what was typed', async () => {
    const { user } = show()
    await user.type(field(BORE), '44,5')
    expect(field(BORE)).toHaveAccessibleDescription(/read as 44\.5 mm/)
    expect(field(BORE)).toHaveValue('44,5')
  })

  it('refuses grouping instead of guessing', async () => {
    const { user } = show()
    await user.type(field('description.rams.0.ratedPressure.text'), '10 000')
    await user.tab()
    expect(field('description.rams.0.ratedPressure.text')).toHaveAccessibleDescription(/Leave out the grouping/)
  })

  it('proposes the members and joints of the kind of frame, all joints open, and says that nothing is missing', () => {
    show()
    press('H-frame')
    expect(field('joints.5.name')).toHaveValue('Left bed pin')
    expect(screen.getByText('0 of 11 finished')).toBeInTheDocument()
    expect(screen.getByText(/Entered without a gap/)).toBeInTheDocument()
    expect(screen.getByLabelText('Joint 6, Left bed pin, open')).toBeInTheDocument()
  })

  it('replaces an untouched proposal when another kind is chosen, and never a list that somebody changed', () => {
    show()
    press('H-frame')
    press('C-frame')
    expect(field('joints.0.name')).toHaveValue('Head arm to column')
    put('joints.0.makeUp', 'tacked')
    press('H-frame')
    expect(field('joints.0.name')).toHaveValue('Head arm to column')
  })

  it('names the gap when a joint is taken out', () => {
    show()
    press('H-frame')
    press('Take out joint 5')
    expect(screen.getByText(/Adaptor hangs on no joint/)).toBeInTheDocument()
  })

  it('asks which ton, and sends nothing until it is said', async () => {
    show()
    fillAllButLoad()
    put(RATED, '12')
    fireEvent.click(send())
    await waitFor(() => expect(field(RATED)).toHaveAccessibleDescription(/short ton, long ton or metric ton-force/))
    expect(sent).toEqual([])
    const choices = [...field('description.ratedLoad.unit').querySelectorAll('option')].map((option) => option.textContent)
    expect(choices).toEqual(expect.arrayContaining(['short tons', 'long tons', 'metric tons-force']))
    expect(choices).not.toContain('tons')
  })

  it('says at the field when the rated load passes the lowest rating, while it is typed', () => {
    show()
    fillAllButLoad()
    rate('12', 'long-ton')
    expect(field(RATED)).toHaveAccessibleDescription(/The rated load is 119\.6 kN, and Jack, rated capacity carries no more than 106\.8 kN/)
    fireEvent.click(send())
    expect(sent).toEqual([])
    rate('12', 'short-ton')
    expect(field(RATED)).not.toHaveAccessibleDescription(/carries no more/)
  })

  it('says what would fit when bore, capacity and pressure do not belong together', () => {
    show()
    fillAllButLoad()
    expect(screen.getByText('Area, rated capacity and rated pressure belong together.')).toBeInTheDocument()
    put(BORE, '50,8')
    expect(screen.getByText(/What would fit: a bore of 44\.4\smm, or a rated pressure of 7.639\spsi/)).toBeInTheDocument()
  })

  it('sends one entry that the shared schema takes, as typed', async () => {
    const { onEntered } = show()
    fillAllButLoad()
    rate('12', 'short-ton')
    fireEvent.click(send())
    fireEvent.click(send())
    await waitFor(() => expect(onEntered).toHaveBeenCalled())
    expect(sent).toHaveLength(1)
    const entry = sent[0]?.entries[0]
    expect(entry).toMatchObject({ kind: 'registered', authorId: LEAD, deviceSeq: 1, ledgerId: onEntered.mock.calls[0]?.[0] })
    const payload = PRESS_PAYLOADS.registered.parse(entry?.payload)
    expect(payload.description).toMatchObject({ name: 'Press 2', ratedLoad: { text: '12', unit: 'short-ton' } })
    expect(payload.description.rams[0]?.bore).toEqual({ text: '44,5', unit: 'mm' })
  })

  it('registers the same press when the answer was lost and it is sent again', async () => {
    const { onEntered } = show()
    lost = 1
    fillAllButLoad()
    rate('12', 'short-ton')
    fireEvent.click(send())
    await screen.findByText(/Not connected to the server/)
    fireEvent.click(send())
    await waitFor(() => expect(onEntered).toHaveBeenCalled())
    expect(sent[1]?.entries).toEqual(sent[0]?.entries)
  })

  it('keeps what was typed over a reload, and forgets it once the press is entered', async () => {
    const first = show()
    fillAllButLoad()
    first.unmount()
    const second = show()
    expect(field(NAME)).toHaveValue('Press 2')
    expect(field(BORE)).toHaveValue('44,5')
    rate('12', 'short-ton')
    await second.user.click(send())
    await waitFor(() => expect(second.onEntered).toHaveBeenCalled())
    second.unmount()
    show()
    expect(field(NAME)).toHaveValue('')
  })
})
