import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it, vi } from 'vitest'
import { JointDrawing } from './joint-drawing'
import type { DrawnJoint } from './joint-drawing'

const press = { kind: 'h-frame', dimensions: { height: 1.6, width: 0.71, holes: 7, holePitch: 0.15, bedHole: 5 } } as const
const joints: DrawnJoint[] = [
  { id: 'a', number: 7, name: 'Left bed stiffener', state: 'tacked', place: 'bed-stiffener-left' },
  { id: 'b', number: 1, name: 'Head beam to left upright', state: 'accepted', place: 'head-left' },
  { id: 'c', number: 9, name: 'Guard bracket', state: 'open', place: null },
]
const size = { width: 430, height: 560 }

describe('the drawing of a press', () => {
  it('names every joint with its number, its name and how far it has come', () => {
    render(<JointDrawing press={press} joints={joints} size={size} onSelect={() => undefined} />)
    expect(screen.getAllByRole('button').map((button) => button.getAttribute('aria-label'))).toEqual([
      'Joint 1, Head beam to left upright, accepted',
      'Joint 7, Left bed stiffener, tacked',
      'Joint 9, Guard bracket, open',
    ])
  })

  it('is walked with the keyboard, in the order of the numbers', async () => {
    const onSelect = vi.fn()
    render(<JointDrawing press={press} joints={joints} size={size} onSelect={onSelect} selectedId="b" />)
    await userEvent.tab()
    await userEvent.tab()
    await userEvent.keyboard('{Enter}')
    expect(onSelect).toHaveBeenCalledExactlyOnceWith('a')
    expect(screen.getByRole('button', { pressed: true })).toHaveAccessibleName(/^Joint 1,/)
  })

  it('gives a finger more than it draws', () => {
    render(<JointDrawing press={press} joints={joints} size={size} onSelect={() => undefined} />)
    for (const button of screen.getAllByRole('button')) expect(button).toHaveStyle({ width: '56px', height: '56px' })
  })

  it('writes height and opening in millimetres, and leaves out what nobody has measured', () => {
    const { container, rerender } = render(<JointDrawing press={press} joints={[]} size={size} />)
    expect(container.textContent).toContain('1\u202f600')
    expect(container.textContent).toContain('710')
    rerender(<JointDrawing press={{ kind: 'h-frame', dimensions: { height: null, width: 0.71 } }} joints={[]} size={size} />)
    expect(container.textContent).not.toContain('600')
  })
})
