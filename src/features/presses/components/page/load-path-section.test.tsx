import { render, screen, within } from '@testing-library/react'
import { MemoryRouter } from 'react-router-dom'
import { describe, expect, it } from 'vitest'
import type { MemberStrength } from '#shared/structure/member-data'
import { openedPayload } from '../../../../../tests/factories/test-press'
import { LoadPathSection } from './load-path-section'

const mm = (text: string) => ({ text, unit: 'mm' as const })

/** Two flats on edge, 640 mm between their supports. */
const flats = (height: string): MemberStrength => ({
  role: 'beam',
  section: { shape: 'flat', height: mm(height), width: mm('20'), sideBySide: 2, plates: [] },
  material: { grade: 'S355JR' },
  support: 'both ends',
  span: mm('640'),
  ramOffset: null,
  hole: null,
  loadShare: null,
})

const opened = openedPayload()

function show(strengths: Partial<Record<string, MemberStrength>>, changes: Partial<typeof opened> = {}) {
  const press = {
    ...opened.press,
    members: opened.press.members.map((member) => ({ ...member, strength: strengths[member.kind] ?? null })),
  }
  const { joints } = { ...opened, ...changes }
  return render(
    <MemoryRouter>
      <LoadPathSection description={press} joints={joints} forceUnit="kN" lengthUnit="mm" editTo="/presses/1/edit" />
    </MemoryRouter>,
  )
}

const bars = () => within(screen.getByRole('list', { name: /the weakest first/ })).getAllByRole('listitem')

describe('the load path check on the page of a press', () => {
  it('leads to where sections are given while nothing is known, and claims nothing', () => {
    show({})
    expect(screen.getByText(/Nothing in the load path could be checked/)).toBeInTheDocument()
    expect(screen.queryByRole('list', { name: /the weakest first/ })).toBeNull()
    expect(screen.getByRole('link', { name: 'Give its sections' })).toHaveAttribute('href', '/presses/1/edit')
    expect(screen.getByText(`NOT CHECKED: ${opened.press.members.length + opened.joints.length}`)).toBeInTheDocument()
  })

  it('names the weakest first, with mark, word, number and limit, and lists what is not checked with its reason', () => {
    show({ 'bed-beam': flats('160'), 'head-beam': flats('200') })
    const [first, second] = bars()
    // By hand: M = 106.757 kN × 0.64 m / 4 = 17.08 kN·m of 0.5 × 345 MPa × 2·20·160²/6 mm³ = 29.44 kN·m: 58 %.
    expect(first).toHaveTextContent(/^Bed .*within 58\s%, 17\.08 of 29\.44\skN·m/)
    expect(second).toHaveTextContent(/^Head beam/)
    const unchecked = within(screen.getByRole('list', { name: 'Not checked' })).getAllByRole('listitem')
    expect(unchecked.every((row) => /^NOT CHECKED .+\. .+\./.test(row.textContent ?? ''))).toBe(true)
    expect(unchecked.find((row) => row.textContent?.includes('No section'))).toHaveTextContent('Left upright; Right upright; Ram seat')
  })

  it('says which limit is passed and what holds the load back', () => {
    show({ 'bed-beam': flats('110') })
    expect(bars()[0]).toHaveTextContent(/beyond 1\d\d\s%/)
    expect(screen.getByText(/No load until it is made stronger/)).toBeInTheDocument()
  })

  it('counts a tacked joint for nothing', () => {
    show(
      { 'bed-beam': flats('160') },
      { joints: opened.joints.map((joint) => (joint.number === 3 ? { ...joint, makeUp: 'tacked' } : joint)) },
    )
    expect(bars()[0]).toHaveTextContent(/Joint 3, .*beyond may carry nothing/)
  })

  it('gives the source of every figure on request, and never speaks of an approval it is not', () => {
    const { container } = show({ 'bed-beam': flats('160') })
    expect(container).toHaveTextContent(/0\.5 of yield/)
    expect(container).toHaveTextContent(/EN 10025-2/)
    expect(container.textContent).not.toMatch(/\b(safe|approved|yes)\b/i)
  })
})
