import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { useState } from 'react'
import { describe, expect, it, vi } from 'vitest'
import { ReadingRow } from './reading-row'

interface RowProps {
  mark?: string | null
  onMark?: () => void
  onCommit?: (id: string, last: boolean) => void
  error?: string
  ownKeys?: boolean
}

function Row({ mark = '14:27:36', onMark = () => undefined, onCommit, error, ownKeys = false }: RowProps) {
  const [texts, setTexts] = useState<Record<string, string>>({ gauge: '', middle: '' })
  const [focused, setFocused] = useState<string | null>('gauge')
  return (
    <ReadingRow
      mark={mark}
      onMark={onMark}
      onCommit={onCommit}
      ownKeys={ownKeys}
      focusedId={focused}
      onFocus={setFocused}
      onChange={(id, text) => setTexts((known) => ({ ...known, [id]: text }))}
      fields={[
        { id: 'gauge', label: 'Gauge', unit: 'psi', text: texts['gauge'] ?? '', error },
        { id: 'middle', label: 'Middle', unit: 'mm', text: texts['middle'] ?? '' },
      ]}
    />
  )
}

describe('a row of readings', () => {
  it('is typed on any keyboard: Enter commits the field and moves on, and the last one says so', async () => {
    const onCommit = vi.fn()
    render(<Row onCommit={onCommit} />)
    await userEvent.keyboard('5900{Enter}1.6{Enter}')
    expect(screen.getByLabelText(/Gauge/)).toHaveValue('5900')
    expect(screen.getByLabelText(/Middle/)).toHaveValue('1.6')
    expect(onCommit.mock.calls).toEqual([
      ['gauge', false],
      ['middle', true],
    ])
    expect(screen.getByLabelText(/Middle/)).toHaveFocus()
  })

  it('shows what was typed as it was typed', async () => {
    render(<Row />)
    await userEvent.keyboard('05,90')
    expect(screen.getByLabelText(/Gauge/)).toHaveValue('05,90')
  })

  it('begins with the mark, and shows the moment afterwards', async () => {
    const onMark = vi.fn()
    const { rerender } = render(<Row mark={null} onMark={onMark} />)
    await userEvent.click(screen.getByRole('button', { name: 'Mark' }))
    expect(onMark).toHaveBeenCalledOnce()
    rerender(<Row mark="14:27:36" onMark={onMark} />)
    expect(screen.getByText('14:27:36')).toBeInTheDocument()
    expect(screen.queryByRole('button', { name: 'Mark' })).toBeNull()
  })

  it('says beside which field something is wrong', () => {
    render(<Row error="3.1. is not a number. Type 3.1 or 3.10." />)
    const field = screen.getByLabelText(/Gauge/)
    expect(field).toBeInvalid()
    expect(field).toHaveAccessibleDescription('Gauge: 3.1. is not a number. Type 3.1 or 3.10.')
  })

  it('keeps the system keyboard away from a finger, and a decimal one for everybody else', () => {
    const { rerender } = render(<Row ownKeys />)
    expect(screen.getByLabelText(/Gauge/)).toHaveAttribute('inputmode', 'none')
    rerender(<Row />)
    expect(screen.getByLabelText(/Gauge/)).toHaveAttribute('inputmode', 'decimal')
  })
})
