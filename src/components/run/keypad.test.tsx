import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { useRef } from 'react'
import { describe, expect, it, vi } from 'vitest'
import { Keypad } from './keypad'

function Typing({ onKey }: { onKey: (key: string) => void }) {
  const field = useRef<HTMLInputElement>(null)
  return (
    <>
      <input ref={field} aria-label="Gauge" />
      <Keypad onKey={onKey} onBackspace={() => undefined} onEnter={() => undefined} enterLabel="Enter" />
    </>
  )
}

describe('the keypad', () => {
  it('sends digits, the decimal mark and the deletion', async () => {
    const onKey = vi.fn()
    const onBackspace = vi.fn()
    render(<Keypad onKey={onKey} onBackspace={onBackspace} onEnter={() => undefined} enterLabel="Enter" />)
    await userEvent.click(screen.getByRole('button', { name: '7' }))
    await userEvent.click(screen.getByRole('button', { name: 'decimal point' }))
    await userEvent.click(screen.getByRole('button', { name: 'Delete the last digit' }))
    expect(onKey.mock.calls).toEqual([['7'], ['.']])
    expect(onBackspace).toHaveBeenCalledOnce()
  })

  it('offers the comma to those who write it, and a minus only where a reading can be below zero', () => {
    const plain = { onKey: () => undefined, onBackspace: () => undefined, onEnter: () => undefined, enterLabel: 'Enter' }
    const { rerender } = render(<Keypad {...plain} decimal="," />)
    expect(screen.getByRole('button', { name: 'decimal comma' })).toBeInTheDocument()
    expect(screen.queryByRole('button', { name: 'minus' })).toBeNull()
    rerender(<Keypad {...plain} signed />)
    expect(screen.getByRole('button', { name: 'minus' })).toBeInTheDocument()
  })

  it('leaves the focus in the field that is being typed', async () => {
    render(<Typing onKey={() => undefined} />)
    const field = screen.getByLabelText('Gauge')
    field.focus()
    await userEvent.click(screen.getByRole('button', { name: '4' }))
    expect(field).toHaveFocus()
  })

  it('says what Enter does next, and does nothing while it is shut', async () => {
    const onEnter = vi.fn()
    const props = { onKey: () => undefined, onBackspace: () => undefined, onEnter, enterLabel: 'Enter', enterNote: 'then left pin' }
    const { rerender } = render(<Keypad {...props} enterShut />)
    await userEvent.click(screen.getByRole('button', { name: 'Enter, then left pin' }))
    expect(onEnter).not.toHaveBeenCalled()
    rerender(<Keypad {...props} />)
    await userEvent.click(screen.getByRole('button', { name: 'Enter, then left pin' }))
    expect(onEnter).toHaveBeenCalledOnce()
  })
})
