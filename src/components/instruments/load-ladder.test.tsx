import { render, screen, within } from '@testing-library/react'
import { describe, expect, it } from 'vitest'
import { LoadLadder } from './load-ladder'
import type { LadderStage } from './load-ladder'

const stages: LadderStage[] = [
  { percent: 100, label: '100 %', load: '12 short tons', note: 'stays shut', state: 'to-come' },
  { percent: 75, label: '75 %', load: '9 short tons', note: 'at 14:28', state: 'stopped' },
  { percent: 50, label: '50 %', load: '6 short tons', note: '1 min', state: 'went-on' },
  { percent: 0, label: '0 %', load: 'datum', note: 'zeroed 14:02', state: 'datum' },
]

describe('the load ladder', () => {
  it('says every stage with its load and the word of its state, from the datum up', () => {
    render(<LoadLadder scale="vertical" stages={stages} levelPercent={75} width={224} />)
    const words = within(screen.getByRole('list', { name: 'Stages of load' }))
      .getAllByRole('listitem')
      .map((item) => item.textContent)
    expect(words).toEqual([
      '0\u202f%, datum, zeroed 14:02, datum',
      '50\u202f%, 6 short tons, 1 min, went on',
      '75\u202f%, 9 short tons, at 14:28, stopped',
      '100\u202f%, 12 short tons, stays shut, to come',
    ])
  })

  it('marks the stage at hand as the current step', () => {
    const held = stages.map((stage) => (stage.state === 'stopped' ? { ...stage, state: 'now' as const } : stage))
    render(<LoadLadder scale="strip" stages={held} levelPercent={null} width={390} words={false} />)
    const current = screen.getAllByRole('listitem').filter((item) => item.getAttribute('aria-current') === 'step')
    expect(current.map((item) => item.textContent)).toEqual(['75\u202f%, 9 short tons, at 14:28, now'])
  })

  it('shows no ram where its level must stay hidden', () => {
    const { container, rerender } = render(<LoadLadder scale="strip" stages={stages} levelPercent={75} width={390} />)
    expect(container.querySelectorAll('[style*="translateX"]')).toHaveLength(1)
    rerender(<LoadLadder scale="strip" stages={stages} levelPercent={null} width={390} />)
    expect(container.querySelectorAll('[style*="translateX"]')).toHaveLength(0)
  })
})
