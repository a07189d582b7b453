import { fireEvent, render, screen, within } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it, vi } from 'vitest'
import type { InstrumentDetails } from '#shared/instruments/model'
import { CalibrationForm } from './calibration-form'

const details: InstrumentDetails = {
  kind: 'gauge',
  code: 'G-01',
  description: '',
  style: 'dial',
  fullScale: { text: '700', unit: 'bar' },
  increment: { text: '10', unit: 'bar' },
  accuracy: { standard: 'en-837-1', class: 1 },
}

function show() {
  const send = vi.fn(() => Promise.resolve())
  render(<CalibrationForm details={details} send={send} sending={false} onLeave={() => undefined} />)
  return { send, user: userEvent.setup() }
}

const setDate = (label: string, value: string) => fireEvent.change(screen.getByLabelText(label), { target: { value } })

async function fill(user: ReturnType<typeof userEvent.setup>) {
  setDate('Compared on', '2026-03-09')
  setDate('Next one due on', '2027-03-09')
  await user.type(screen.getByRole('textbox', { name: 'Number of the certificate' }), 'C-4471')
  await user.click(screen.getByRole('radio', { name: 'In tolerance' }))
}
const enter = () => screen.getByRole('button', { name: 'Enter this calibration' })

describe('the form of a calibration', { timeout: 20_000 }, () => {
  it('asks for everything that is missing, in words', async () => {
    const { send, user } = show()
    await user.click(enter())
    for (const sentence of [
      'Give the day of the comparison, like 2026-03-09.',
      'Give the day the next one falls due, like 2027-03-09.',
      'Give the number of the certificate.',
      'Say whether it was found in tolerance.',
    ]) {
      expect(await screen.findByText(sentence)).toBeVisible()
    }
    expect(send).not.toHaveBeenCalled()
  })

  it('takes an uncertainty with its factor, in what the instrument reads', async () => {
    const { send, user } = show()
    await fill(user)
    const unit = screen.getByRole('combobox', { name: /^Unit of uncertainty/ })
    expect(
      within(unit)
        .getAllByRole('option')
        .map((option) => option.textContent),
    ).toEqual(['Pa', 'kPa', 'bar', 'MPa', 'psi'])
    await user.type(screen.getByRole('textbox', { name: /^Uncertainty U/ }), '2,5')
    await user.click(enter())
    expect(await screen.findByText('Enter the coverage factor k.')).toBeVisible()
    await user.type(screen.getByRole('textbox', { name: /^Its coverage factor/ }), '2')
    await user.click(enter())
    expect(send).toHaveBeenCalledExactlyOnceWith(expect.objectContaining({ uncertainty: { value: { text: '2,5', unit: 'bar' }, k: 2 } }))
  })

  it('does without an uncertainty, but not with a due day that lies before', async () => {
    const { send, user } = show()
    await fill(user)
    setDate('Next one due on', '2026-03-09')
    await user.click(enter())
    expect(await screen.findByText('The next calibration falls due after this one.')).toBeVisible()
    setDate('Next one due on', '2027-03-09')
    await user.click(enter())
    expect(send).toHaveBeenCalledExactlyOnceWith({
      calibratedOn: '2026-03-09',
      dueOn: '2027-03-09',
      certificate: 'C-4471',
      comparedWith: '',
      result: 'in tolerance',
      uncertainty: null,
    })
  })

  it('says what follows when the instrument was found out of tolerance', async () => {
    const { user } = show()
    expect(screen.queryByText(/Every clearance that rests on this instrument/)).toBeNull()
    await user.click(screen.getByRole('radio', { name: 'Out of tolerance' }))
    expect(screen.getByText(/Every clearance that rests on this instrument is suspended at once/)).toBeVisible()
  })
})
