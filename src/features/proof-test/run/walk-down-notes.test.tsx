import { render, screen } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { describe, expect, it } from 'vitest'
import { ids, openedPayload } from '../../../../tests/factories/test-press'
import type { JointState } from '#shared/proof-test/state'
import { HereContext, type Here } from '../../../lib/here'
import { jointAtHand, orderWalked, walkedWords } from '../joint-words'
import { RejectedJoint, StoodStill } from './walk-down-notes'

const { joints } = openedPayload()
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

const walked = (at: Record<number, string>, result: 'accepted' | 'rejected' = 'accepted'): JointState[] =>
  joints.map((joint) => {
    const moment = at[joint.number]
    const before =
      moment === undefined ? null : { entryId: ids.test, at: moment, by: ids.lead, method: 'visual' as const, result, remark: '' }
    return { joint, makeUp: 'finished', workedAt: null, before, after: null, fellBackBecause: null }
  })

describe('a walk-down in a test', () => {
  it('says how long the press stood still, once that is past the shop’s limit, and why it matters', () => {
    const { rerender } = render(
      <HereContext value={here}>
        <StoodStill days={30} />
      </HereContext>,
    )
    expect(screen.queryByRole('heading')).toBeNull()
    rerender(
      <HereContext value={here}>
        <StoodStill days={31} />
      </HereContext>,
    )
    expect(screen.getByRole('heading', { name: 'It stood still for 31 days. Walk it down as if it were new.' })).toBeInTheDocument()
    expect(screen.getByText(/No earlier examination counts/)).toBeInTheDocument()
  })

  it('remembers the order, and suggests the next joint round the frame', () => {
    const state = walked({ 5: '2026-09-15T14:02:00.000Z', 1: '2026-09-15T14:00:00.000Z' })
    const order = orderWalked(state, 'before load')
    expect(order.map(({ joint, rank }) => [joint.joint.number, rank])).toEqual([
      [1, 1],
      [5, 2],
    ])
    const last = order[1]
    if (!last) throw new Error('Two joints were walked.')
    expect(walkedWords(last, 11)).toMatch(/^2nd of 11, \d\d:\d\d$/)
    expect(jointAtHand('h-frame', state, 'before load', null)?.joint.number).toBe(2)
    expect(jointAtHand('h-frame', state, 'before load', joints[7]?.id ?? null)?.joint.number).toBe(8)
  })

  it('leads from a rejected joint to the repair that it opened', () => {
    const [rejected] = walked({ 1: '2026-09-15T14:00:00.000Z' }, 'rejected')
    if (!rejected) throw new Error('The press has a first joint.')
    render(
      <MemoryRouter>
        <RejectedJoint joint={rejected} occasion="before load" pressId={ids.press} />
      </MemoryRouter>,
    )
    expect(screen.getByRole('link', { name: 'See the repair' })).toHaveAttribute('href', expect.stringMatching(/#repairs$/))
  })
})
