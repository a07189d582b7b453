// @vitest-environment jsdom
import { zodResolver } from '@hookform/resolvers/zod'
import { cleanup, render, screen, waitFor } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { afterEach, describe, expect, it } from 'vitest'
import { z } from 'zod'
import { FORCE_UNITS, typedPositiveForceSchema, type ForceUnit, type TypedForce } from '#shared/units'
import { ControlledQuantity } from './controlled'
import { DecimalField, QuantityField } from './decimal-field'

afterEach(cleanup)

function Limit({ initial = '' }: { initial?: string }) {
  const [text, setText] = useState(initial)
  return <DecimalField label="Softening limit" unit="%" value={text} onChange={setText} />
}

function Load() {
  const [load, setLoad] = useState<{ text: string; unit: ForceUnit | '' }>({ text: '', unit: '' })
  return (
    <>
      <QuantityField label="Rated load" units={FORCE_UNITS} askUnit="Which ton?" value={load} onChange={setLoad} />
      <output data-testid="kept">{JSON.stringify(load)}</output>
    </>
  )
}

const input = () => screen.getByRole<HTMLInputElement>('textbox')

describe('a decimal field', () => {
  it('takes a comma as the decimal sign and says what it understood', async () => {
    render(<Limit />)
    await userEvent.type(input(), '12,5')
    expect(input().value).toBe('12,5')
    expect(screen.getByText('12.5').closest('p')?.textContent).toBe('read as 12.5 %')
    expect(input().getAttribute('aria-invalid')).toBeNull()
  })

  it('takes a point as well, and groups the digits of what it understood only', async () => {
    render(<Limit />)
    await userEvent.type(input(), '7850.5')
    expect(input().value).toBe('7850.5')
    expect(input().nextElementSibling?.textContent).toBe('read as 7\u202f850.5 %')
  })

  it('refuses 3.1. with a sentence at the field and keeps it as typed', async () => {
    render(<Limit />)
    await userEvent.type(input(), '3.1.')
    expect(input().value).toBe('3.1.')
    expect(input().getAttribute('aria-invalid')).toBe('true')
    const said = document.getElementById(input().getAttribute('aria-describedby') ?? '')
    expect(said?.textContent).toMatch(/more than one decimal sign/)
    expect(screen.queryByText(/read as/)).toBeNull()
  })

  it('says nothing about 3. while it is being typed, and does once the cursor has left', async () => {
    render(<Limit />)
    await userEvent.type(input(), '3.')
    expect(input().getAttribute('aria-invalid')).toBeNull()
    await userEvent.tab()
    expect(input().getAttribute('aria-invalid')).toBe('true')
    expect(input().value).toBe('3.')
    expect(screen.getByText(/finish the number/)).toBeTruthy()
  })

  it('brings up a keyboard with digits, without turning the text into a number', () => {
    render(<Limit initial="0,50" />)
    expect(input().type).toBe('text')
    expect(input().inputMode).toBe('decimal')
    expect(input().value).toBe('0,50')
  })
})

describe('a quantity field', () => {
  const kept = (): unknown => JSON.parse(screen.getByTestId('kept').textContent ?? '')

  it('asks which ton it is, and keeps the text when the unit is chosen', async () => {
    render(<Load />)
    await userEvent.type(input(), '12,0')
    expect(screen.getByRole('option', { name: 'Which ton?' })).toBeTruthy()
    await userEvent.selectOptions(screen.getByRole('combobox', { name: 'Unit of rated load' }), 'long-ton')
    expect(kept()).toEqual({ text: '12,0', unit: 'long-ton' })
    expect(screen.getByText('12.0').closest('p')?.textContent).toBe('read as 12.0 long tons')
  })

  it('offers no ton that stands alone', () => {
    render(<Load />)
    const units = screen.getAllByRole('option').map((option) => option.textContent)
    expect(units).toContain('short tons')
    expect(units).not.toContain('tons')
    expect(units).not.toContain('ton')
  })

  it('says one short ton in the singular', async () => {
    render(<Load />)
    await userEvent.selectOptions(screen.getByRole('combobox'), 'short-ton')
    await userEvent.type(input(), '1')
    expect(screen.getByText('1').closest('p')?.textContent).toBe('read as 1 short ton')
  })
})

describe('a quantity in a form checked by the shared schema', () => {
  const schema = z.object({ ratedLoad: typedPositiveForceSchema })
  let sent: { ratedLoad: TypedForce } | undefined

  function PressForm() {
    const form = useForm({
      resolver: zodResolver(schema),
      defaultValues: { ratedLoad: { text: '', unit: '' as ForceUnit } },
    })
    return (
      <form onSubmit={form.handleSubmit((values) => (sent = values))}>
        <ControlledQuantity label="Rated load" control={form.control} name="ratedLoad" units={FORCE_UNITS} />
        <button type="submit">Keep</button>
      </form>
    )
  }

  it('shows the message about the unit at the field, then sends text and unit as given', async () => {
    render(<PressForm />)
    await userEvent.type(input(), '12,5')
    await userEvent.click(screen.getByRole('button', { name: 'Keep' }))
    await waitFor(() => expect(input().getAttribute('aria-invalid')).toBe('true'))
    expect(sent).toBeUndefined()
    expect(input().value).toBe('12,5')
    await userEvent.selectOptions(screen.getByRole('combobox'), 'metric-ton-force')
    await userEvent.click(screen.getByRole('button', { name: 'Keep' }))
    await waitFor(() => expect(sent).toEqual({ ratedLoad: { text: '12,5', unit: 'metric-ton-force' } }))
  })
})
