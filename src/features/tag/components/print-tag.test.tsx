import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { MemoryRouter } from 'react-router-dom'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { PublicTag, TagResponse } from '#shared/api/tags'
import { PrintTag } from './print-tag'

const made: TagResponse = { code: 'abcdefghjkmnpqrs', address: 'https://press.example/tag/abcdefghjkmnpqrs', reachable: true }
const shut: PublicTag = {
  shopName: 'Hollin Bridge Fabricating',
  press: { name: 'Press 4', whatFor: 'broaching press' },
  asOf: '2026-09-21T12:00:00.000Z',
  answer: { is: 'do not use', why: 'The bed looks bent', since: null },
  noChangeSince: null,
}
const cleared: PublicTag = {
  ...shut,
  answer: {
    is: 'cleared',
    clearance: {
      load: { text: '11.7', unit: 'short-ton' },
      loadNewton: 104_110,
      gaugePressure: { text: '7650', unit: 'psi' },
      gaugeCode: 'G-02',
      bedHoles: ['4'],
      ramPositions: ['central'],
      tooling: ['T-01 Flat nose'],
      until: '2027-03-15',
      clearedOn: '2026-09-15',
      clearedBy: 'Marit Sandoval',
      number: 'PT-0043',
      staticLoads: 1,
      notMeasured: ['Head beam', 'Ram seat', 'Left upright', 'Right upright', 'Base'],
    },
  },
  noChangeSince: '2026-09-15',
}

function show(tag: PublicTag, given: { reachable?: boolean; old?: boolean } = {}) {
  const { reachable = true, old = false } = given
  render(
    <MemoryRouter>
      <PrintTag pressId="01990000-0000-7000-8000-000000000001" made={{ ...made, reachable }} tag={tag} old={old} />
    </MemoryRouter>,
  )
  return userEvent.setup()
}

const paper = () => screen.getByRole('article', { name: 'The tag' })
const print = () => screen.getByRole('button', { name: 'Print this tag' })

describe('the tag to be printed', () => {
  afterEach(() => vi.restoreAllMocks())

  it('has every member that was not measured where there is room, and says how many more where there is little', async () => {
    const user = show(cleared)
    expect(paper()).toHaveTextContent('Not measured: Head beam, Ram seat, Left upright and 2 more: scan the code.')
    await user.click(screen.getByRole('button', { name: /^A6/ }))
    expect(screen.getByRole('button', { name: /^A6/ })).toHaveAttribute('aria-pressed', 'true')
    expect(paper()).toHaveTextContent('Not measured: Head beam, Ram seat, Left upright, Right upright and Base.')
    expect(paper()).toHaveTextContent('T-01 Flat nose')
    expect(paper()).toHaveTextContent('No change reported since 15 Sep 2026.')
    expect(screen.getByRole('img', { name: `QR code of ${made.address}` })).toBeVisible()
  })

  it('says DO NOT USE and why for a press that is not cleared', () => {
    show(shut)
    expect(screen.getByRole('heading', { level: 1 })).toHaveTextContent('Do-not-use tag of Press 4, broaching press')
    expect(paper()).toHaveTextContent('DO NOT USE')
    expect(paper()).toHaveTextContent('The bed looks bent.')
    expect(paper()).not.toHaveTextContent('Cleared')
  })

  it('warns of an address that phones can’t open, and of nothing where they can', () => {
    show(cleared, { reachable: false })
    expect(screen.getByRole('status')).toHaveTextContent('Phones can’t open this code')
    expect(screen.getByRole('status')).toHaveTextContent('PUBLIC_URL')
  })

  it('is not printed while nobody knows whether it still holds', async () => {
    const printing = vi.spyOn(window, 'print').mockImplementation(() => undefined)
    const user = show(cleared, { old: true })
    expect(print()).toBeDisabled()
    expect(screen.getByRole('status')).toHaveTextContent('Not connected to the server')
    await user.click(print())
    expect(printing).not.toHaveBeenCalled()
  })

  it('is printed at one press where it holds', async () => {
    const printing = vi.spyOn(window, 'print').mockImplementation(() => undefined)
    const user = show(cleared)
    expect(screen.queryByRole('status')).toBeNull()
    await user.click(print())
    expect(printing).toHaveBeenCalledOnce()
  })
})
