import { fireEvent, render, screen, waitFor, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it, vi } from 'vitest'
import type { InstrumentDetails } from '#shared/instruments/model'
import { ProblemError } from '../../../lib/problem'
import { InstrumentForm } from './instrument-form'

const units = { pressureUnit: 'bar', lengthUnit: 'mm' } as const

function show(given: { existing?: InstrumentDetails; send?: (details: InstrumentDetails) => Promise<unknown>; sending?: boolean } = {}) {
  const send = vi.fn(given.send ?? (() => Promise.resolve()))
  render(<InstrumentForm units={units} existing={given.existing} send={send} sending={given.sending ?? false} onLeave={() => undefined} />)
  return { send, user: userEvent.setup() }
}

const box = (label: string | RegExp) => screen.getByRole('textbox', { name: label })
const enter = () => screen.getByRole('button', { name: 'Enter this instrument' })

async function fillGauge(user: ReturnType<typeof userEvent.setup>) {
  await user.type(box('Code'), 'G-07')
  await user.type(box('Full scale'), '250')
  await user.type(box('One step'), '2,5')
}

describe('the form of an instrument', { timeout: 20_000 }, () => {
  it('takes a comma for a point, says how it was read, and sends it as typed', async () => {
    const { send, user } = show()
    await fillGauge(user)
    expect(box('One step')).toHaveValue('2,5')
    expect(box('One step')).toHaveAccessibleDescription('read as 2.5 bar')
    await user.selectOptions(screen.getByRole('combobox', { name: 'Class' }), '1.6')
    await user.click(enter())
    expect(send).toHaveBeenCalledExactlyOnceWith({
      kind: 'gauge',
      code: 'G-07',
      description: '',
      style: 'dial',
      fullScale: { text: '250', unit: 'bar' },
      increment: { text: '2,5', unit: 'bar' },
      accuracy: { standard: 'en-837-1', class: 1.6 },
    })
  })

  it('says the limit of error in the gauge’s own unit while one types', async () => {
    const { user } = show()
    await user.type(box('Full scale'), '250')
    await user.type(box('One step'), '2.5')
    await user.selectOptions(screen.getByRole('combobox', { name: 'Class' }), '1.6')
    // EN 837-1: class 1.6 is 1.6 % of span, 4 bar of 250.
    expect(screen.getByRole('status')).toHaveTextContent('Limit of error ± 4 bar anywhere on its scale.')
    await user.click(screen.getByRole('radio', { name: 'ASME B40.100 grade' }))
    await user.selectOptions(screen.getByRole('combobox', { name: 'Grade' }), 'A')
    // ASME B40.100 grade A: 2, 1, 2 % of span.
    expect(screen.getByRole('status')).toHaveTextContent('± 5 bar in the lower and the upper quarter of its scale, ± 2.5 bar between them')
    await user.click(screen.getByRole('radio', { name: 'Stated in percent' }))
    await user.type(box(/Percent of span/), '0,25')
    expect(screen.getByRole('status')).toHaveTextContent('± 0.625 bar anywhere on its scale')
  })

  it('offers no ton that stands alone, takes none for granted, and says so', async () => {
    const { send, user } = show()
    await user.click(screen.getByRole('radio', { name: /Load cell/ }))
    const unit = screen.getByRole('combobox', { name: 'Unit of full scale' })
    const offered = within(unit)
      .getAllByRole('option')
      .map((option) => option.textContent)
    expect(offered.filter((one) => /\btons?\b/.test(one ?? ''))).toEqual(['short tons', 'long tons', 'metric tons-force'])
    expect(unit).toHaveValue('')
    await user.type(box('Code'), 'L-01')
    await user.type(box('Full scale'), '25')
    await user.type(box('One step'), '0.01')
    await user.type(box(/Limit of error/), '0.5')
    await user.click(enter())
    expect(await screen.findAllByText('Choose a unit of force: N, kN, lbf, short ton, long ton or metric ton-force.')).toHaveLength(2)
    expect(send).not.toHaveBeenCalled()
    await user.selectOptions(unit, 'long-ton')
    await user.selectOptions(screen.getByRole('combobox', { name: 'Unit of one step' }), 'kN')
    await user.click(enter())
    expect(send).toHaveBeenCalledExactlyOnceWith(
      expect.objectContaining({ fullScale: { text: '25', unit: 'long-ton' }, errorPercentOfSpan: 0.5 }),
    )
  })

  it('shows an indicator only units of length, and asks again for a step as long as its range', async () => {
    const { send, user } = show()
    await user.click(screen.getByRole('radio', { name: /Indicator/ }))
    const unit = screen.getByRole('combobox', { name: 'Unit of range' })
    expect(
      within(unit)
        .getAllByRole('option')
        .map((option) => option.textContent),
    ).toEqual(['mm', 'in', 'm'])
    await user.type(box('Code'), 'I-01')
    await user.type(box('Range'), '10')
    await user.type(box('One step'), '1')
    await user.selectOptions(screen.getByRole('combobox', { name: 'Unit of one step' }), 'in')
    await user.click(enter())
    expect(await screen.findByText(/The step is smaller than the whole scale/)).toBeVisible()
    await user.clear(box('One step'))
    await user.type(box('One step'), '0.0005')
    await user.click(enter())
    expect(send).toHaveBeenCalledExactlyOnceWith(
      expect.objectContaining({ kind: 'indicator', increment: { text: '0.0005', unit: 'in' }, errorLimit: null, revolution: null }),
    )
  })

  it('refuses numbers it can’t read with the reason, and leaves them as typed', async () => {
    const { send, user } = show()
    await user.type(box('Full scale'), '10,000.0')
    await user.tab()
    expect(screen.getByText('There is more than one decimal sign: write 1234.5, without grouping.')).toBeVisible()
    await user.click(enter())
    expect(send).not.toHaveBeenCalled()
    expect(box('Full scale')).toHaveValue('10,000.0')
  })

  it('keeps what was typed when the server refuses, with the sentence at its field', async () => {
    const refusal = new ProblemError(422, {
      code: 'invalid',
      detail: 'Some fields need another look.',
      fields: { code: 'Another instrument has it.' },
    })
    const { send, user } = show({ send: () => Promise.reject(refusal) })
    await fillGauge(user)
    await user.selectOptions(screen.getByRole('combobox', { name: 'Class' }), '1')
    await user.click(enter())
    expect(await screen.findByText('Another instrument has it.')).toBeVisible()
    expect(send).toHaveBeenCalledOnce()
    expect(box('Code')).toHaveFocus()
    expect(box('Full scale')).toHaveValue('250')
  })

  it('isn’t sent twice: not by a second press, nor by Enter, while it is on its way', async () => {
    const existing: InstrumentDetails = {
      kind: 'gauge',
      code: 'G-01',
      description: '',
      style: 'dial',
      fullScale: { text: '250', unit: 'bar' },
      increment: { text: '2', unit: 'bar' },
      accuracy: { standard: 'asme-b40.100', grade: '1A' },
    }
    const { send, user } = show({ existing, sending: true })
    await user.click(screen.getByRole('button', { name: 'Keeping it' }))
    await user.type(box('Code'), '{Enter}')
    expect(send).not.toHaveBeenCalled()
  })

  it('isn’t sent twice by two presses at once', async () => {
    let answer = () => undefined as void
    const { send, user } = show({ send: () => new Promise<void>((resolve) => (answer = resolve)) })
    await fillGauge(user)
    await user.selectOptions(screen.getByRole('combobox', { name: 'Class' }), '1')
    fireEvent.click(enter())
    fireEvent.click(enter())
    await waitFor(() => expect(send).toHaveBeenCalled())
    fireEvent.click(enter())
    answer()
    expect(send).toHaveBeenCalledOnce()
  })

  it('shows what stands, and doesn’t let a gauge become something else', () => {
    show({
      existing: {
        kind: 'load-cell',
        code: 'L-02',
        description: 'hollow',
        fullScale: { text: '12', unit: 'metric-ton-force' },
        increment: { text: '0,01', unit: 'metric-ton-force' },
        errorPercentOfSpan: 0.5,
      },
    })
    expect(box('Full scale')).toHaveValue('12')
    expect(screen.getByRole('combobox', { name: 'Unit of full scale' })).toHaveDisplayValue('metric tons-force')
    expect(screen.getByRole('radio', { name: /Pressure gauge/ })).toBeDisabled()
    expect(screen.getByRole('status')).toHaveTextContent('± 0.06 metric tons-force anywhere on its scale')
  })
})
