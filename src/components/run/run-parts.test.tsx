import { render, screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it, vi } from 'vitest'
import { clockFigure, HoldTimer, holdSteps } from './hold-timer'
import { RunFrame } from './run-frame'
import { StopPlate } from './stop-plate'
import { VerdictScale } from './verdict-scale'
import { VerdictTable } from './verdict-table'

describe('the hold', () => {
  it('tells what is left in minutes and seconds, by whole seconds', () => {
    const { rerender } = render(<HoldTimer total={120} elapsed={36} label="Hold 75 %" sub="left, from the mark" />)
    expect(screen.getByRole('timer')).toHaveAccessibleName('Hold 75\u202f%, 1:24 left')
    rerender(<HoldTimer total={120} elapsed={36.9} label="Hold 75 %" sub="left, from the mark" />)
    expect(screen.getByRole('timer')).toHaveTextContent('1:24')
    rerender(<HoldTimer total={120} elapsed={500} label="Hold 75 %" sub="left, from the mark" />)
    expect(screen.getByRole('timer')).toHaveTextContent('0:00')
  })

  it.each([10, 60, 90, 120, 300, 600, 900, 3600])('labels a hold of %d seconds a few times', (total) => {
    const labels = total / holdSteps(total).label
    expect(labels).toBeGreaterThanOrEqual(1)
    expect(labels).toBeLessThanOrEqual(6)
  })

  it('writes a minute as a minute', () => {
    expect([0, 9, 60, 61, 600].map(clockFigure)).toEqual(['0:00', '0:09', '1:00', '1:01', '10:00'])
  })
})

describe('Stop', () => {
  it('asks nothing back', async () => {
    const onStop = vi.fn()
    render(<StopPlate stopped={null} onStop={onStop} />)
    await userEvent.click(screen.getByRole('button', { name: 'Stop' }))
    expect(onStop).toHaveBeenCalledOnce()
  })

  it('says when it was called, and can then not be pressed again', () => {
    render(<StopPlate stopped={{ at: '14:28:31' }} onStop={() => undefined} />)
    expect(screen.getByRole('status')).toHaveTextContent('Stoppedat 14:28:31')
    expect(screen.queryByRole('button')).toBeNull()
  })

  it('says to shout where nobody would be told', () => {
    render(<StopPlate stopped={null} connected={false} onStop={() => undefined} />)
    expect(screen.getByRole('button')).toHaveTextContent('Shout stop')
  })

  it('is on the screen of a run whatever else is', () => {
    const frame = { title: null, ladder: () => null, line: () => null, bench: null, onStop: () => undefined }
    const { rerender } = render(<RunFrame {...frame} stopped={null} />)
    expect(screen.getByRole('button', { name: 'Stop' })).toBeInTheDocument()
    rerender(<RunFrame {...frame} stopped={{ at: '14:28:31' }} />)
    expect(screen.getByRole('status')).toHaveTextContent('Stopped')
  })
})

describe('verdicts', () => {
  it('have a word beside every mark, and reading and limit in the same row', () => {
    render(
      <VerdictTable
        caption="75 %, criteria"
        rows={[
          { id: 'softening', verdict: 'beyond', what: 'Softening, 50 to 75', reading: '21 % ± 5', limit: '≤ 15 %' },
          { id: 'creep', verdict: 'not-read', what: 'Creep in hold', reading: '—', limit: '≤ 0.03 mm' },
        ]}
      />,
    )
    const row = screen.getByRole('row', { name: /Softening/ })
    expect(
      within(row)
        .getAllByRole('cell')
        .map((cell) => cell.textContent),
    ).toEqual(['', 'Beyond', '21\u202f% ± 5', '≤ 15\u202f%'])
    expect(screen.getByRole('row', { name: /Creep/ })).toHaveTextContent('Not read')
  })

  it('name the value and its limit for those who cannot see the number line', () => {
    render(
      <VerdictScale
        about="Softening"
        unit="%"
        value={20.8}
        uncertainty={4.6}
        text="21 % ± 5"
        limit={{ value: 15, label: 'limit 15 %' }}
        verdict="beyond"
      />,
    )
    expect(screen.getByRole('img')).toHaveAccessibleName('Softening: 21\u202f% ± 5, limit 15\u202f%')
  })
})
