import { QueryClientProvider } from '@tanstack/react-query'
import { fireEvent, render, screen, waitFor } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import type { AppendRequest } from '#shared/api/ledger'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import { sectionProperties } from '#shared/structure/sections'
import { HereContext, type Here } from '../../../../../lib/here'
import { createQueryClient } from '../../../../../lib/query-client'
import { NewPressForm } from '../new-press-form'

const SHOP = '01990000-0000-7000-8000-000000000001'
const shop: Here['shop'] = {
  id: SHOP,
  name: 'Kiln Lane Fabrication',
  role: 'lead',
  forceUnit: 'short-ton',
  pressureUnit: 'psi',
  lengthUnit: 'mm',
  buildPauseDays: 30,
  walkDownHours: 12,
}
const here: Here = { user: { id: SHOP, name: 'Lena Vogt', email: '' }, shops: [], shop, adopt: () => undefined }

let sent: AppendRequest[] = []

function show() {
  return render(
    <MemoryRouter>
      <QueryClientProvider client={createQueryClient(() => undefined)}>
        <HereContext value={here}>
          <NewPressForm shopId={SHOP} units={{ length: 'mm', pressure: 'psi' }} onEntered={() => undefined} />
        </HereContext>
      </QueryClientProvider>
    </MemoryRouter>,
  )
}

function field(name: string): HTMLInputElement {
  const found = document.querySelector<HTMLInputElement>(`[name="${name}"]`)
  if (found === null) throw new Error(`No field is called ${name}.`)
  return found
}
const put = (name: string, value: string) => fireEvent.change(field(name), { target: { value } })
const press = (label: string) => fireEvent.click(screen.getByLabelText(label))
const send = () => fireEvent.click(screen.getByText('Enter this press'))

function whole() {
  put('description.name', 'Press 2')
  press('H-frame')
  put('description.rams.0.bore.text', '44,5')
  put('description.rams.0.ratedCapacity.text', '12')
  put('description.rams.0.ratedCapacity.unit', 'short-ton')
  put('description.rams.0.ratedPressure.text', '10000')
  put('description.rams.0.stroke.text', '150')
  put('description.train.0.ratedPressure.text', '10000')
  put('description.train.1.ratedPressure.text', '10000')
  put('description.train.2.ratedForce.text', '15')
  put('description.train.2.ratedForce.unit', 'short-ton')
  put('description.ratedLoad.text', '12')
  put('description.ratedLoad.unit', 'short-ton')
}

const HEAD = 'description.members.0.strength'

function giveHeadBeam() {
  fireEvent.click(screen.getByLabelText('Give its section: Head beam'))
  put(`${HEAD}.section.shape`, 'rectangular tube')
  put(`${HEAD}.section.height.text`, '150')
  put(`${HEAD}.section.width.text`, '100')
  put(`${HEAD}.section.wall.text`, '9,5')
  put(`${HEAD}.material.grade`, 'S355JR')
  put(`${HEAD}.span.text`, '640')
}

const entry = () => PRESS_PAYLOADS.registered.parse(sent[0]?.entries[0]?.payload)

describe('what the load path check asks for', { timeout: 30_000 }, () => {
  beforeEach(() => {
    localStorage.clear()
    sent = []
    vi.stubGlobal('fetch', (_url: string, { body }: { body: string }) => {
      sent.push(JSON.parse(body) as AppendRequest)
      return Promise.reject(new TypeError('network'))
    })
  })
  afterEach(() => vi.unstubAllGlobals())

  it('is folded away, and a press is entered without any of it', async () => {
    show()
    whole()
    expect(document.querySelector(`[name^="${HEAD}"]`)).toBeNull()
    send()
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(entry().description.members[0]?.strength ?? null).toBeNull()
    expect(entry().joints.every((joint) => joint.strength === null)).toBe(true)
  })

  it('draws the section and works its figures out while it is typed, with a comma', () => {
    show()
    press('H-frame')
    giveHeadBeam()
    expect(document.querySelector('svg[aria-label="The section, rectangular tube, to scale"]')).not.toBeNull()
    const typed = (text: string) => ({ text, unit: 'mm' as const })
    const { area } = sectionProperties({
      shape: 'rectangular tube',
      height: typed('150'),
      width: typed('100'),
      wall: typed('9.5'),
      cornerRadius: null,
      sideBySide: 1,
      plates: [],
    })
    const shown = screen.getByText('Area A').nextElementSibling?.textContent?.replace(/\s/g, '')
    expect(Number(shown)).toBeCloseTo(area * 1e6, 0)
  })

  it('sends what was typed, as the shared schema takes it', async () => {
    show()
    whole()
    giveHeadBeam()
    send()
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(entry().description.members[0]?.strength).toEqual({
      role: 'beam',
      section: {
        shape: 'rectangular tube',
        height: { text: '150', unit: 'mm' },
        width: { text: '100', unit: 'mm' },
        wall: { text: '9,5', unit: 'mm' },
        cornerRadius: null,
        sideBySide: 1,
        plates: [],
      },
      material: { grade: 'S355JR' },
      support: 'both ends',
      span: { text: '640', unit: 'mm' },
      ramOffset: null,
      hole: null,
      loadShare: null,
    })
  })

  it('says at the field what is missing, unfolds for it, and sends nothing', async () => {
    show()
    whole()
    giveHeadBeam()
    put(`${HEAD}.span.text`, '')
    put(`${HEAD}.material.grade`, '')
    press('Fold away the strength of Head beam')
    send()
    await waitFor(() => expect(field(`${HEAD}.span.text`)).toBeInvalid())
    expect(field(`${HEAD}.material.grade`)).toHaveAccessibleDescription(/Choose a grade/)
    expect(sent).toEqual([])
  })

  it('refuses walls that leave no room inside, with a sentence', async () => {
    show()
    whole()
    giveHeadBeam()
    put(`${HEAD}.section.wall.text`, '60')
    send()
    expect(await screen.findByText('The walls of the tube leave no room inside. Measure them again.')).toBeInTheDocument()
    expect(sent).toEqual([])
  })

  it('asks a joint by the way it is made, and leaves it unchecked when that is chosen', async () => {
    show()
    whole()
    press('More of joint 1')
    press('Give its measures: joint 1')
    put('joints.0.strength.size.value.text', '8')
    put('joints.0.strength.length.text', '400')
    put('joints.0.strength.electrode.grade', 'E70')
    send()
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(entry().joints[0]?.strength).toEqual({
      kind: 'weld',
      size: { by: 'leg', value: { text: '8', unit: 'mm' } },
      length: { text: '400', unit: 'mm' },
      electrode: { grade: 'E70' },
      base: null,
      loadShare: null,
    })
    sent = []
    fireEvent.click(screen.getByText('Leave it unchecked'))
    send()
    await waitFor(() => expect(sent).toHaveLength(1))
    expect(entry().joints[0]?.strength).toBeNull()
  })

  it('keeps what was typed over a reload', () => {
    const first = show()
    press('H-frame')
    giveHeadBeam()
    first.unmount()
    show()
    press('Show the strength of Head beam')
    expect(field(`${HEAD}.section.wall.text`)).toHaveValue('9,5')
  })
})
