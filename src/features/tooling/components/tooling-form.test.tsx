import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it, vi } from 'vitest'
import type { ToolingDetails } from '#shared/tooling'
import { ProblemError } from '../../../lib/problem'
import { ToolingForm } from './tooling-form'

const units = { forceUnit: 'short-ton', lengthUnit: 'mm' } as const

function show(given: { existing?: ToolingDetails; send?: (details: ToolingDetails) => Promise<unknown> } = {}) {
  const send = vi.fn(given.send ?? (() => Promise.resolve()))
  render(<ToolingForm units={units} existing={given.existing} send={send} sending={false} onLeave={() => undefined} />)
  return { send, user: userEvent.setup() }
}

const box = (label: string | RegExp) => screen.getByRole('textbox', { name: label })

async function fill(user: ReturnType<typeof userEvent.setup>) {
  await user.type(box('Number'), 'T-07')
  await user.type(box('What it is'), 'Flat nose')
  await user.click(screen.getByRole('radio', { name: /^Nose/ }))
  await user.type(box('Rated load'), '12,5')
  await user.type(box('Where the rating comes from'), 'Stamped on its side')
  await user.type(box('What it fits'), 'Thread M42')
}

describe('the form of a piece of tooling', { timeout: 20_000 }, () => {
  it('asks which ton is meant before it keeps a rating, and sends it as typed', async () => {
    const { send, user } = show()
    await fill(user)
    await user.click(screen.getByRole('button', { name: 'Enter this piece' }))
    expect(await screen.findByText(/^Choose a unit of force/)).toBeVisible()
    expect(send).not.toHaveBeenCalled()
    await user.selectOptions(screen.getByRole('combobox', { name: 'Unit of rated load' }), 'long-ton')
    await user.click(screen.getByRole('button', { name: 'Enter this piece' }))
    expect(send).toHaveBeenCalledExactlyOnceWith({
      code: 'T-07',
      name: 'Flat nose',
      kind: 'nose',
      ratedLoad: { text: '12,5', unit: 'long-ton' },
      ratingFrom: 'Stamped on its side',
      fit: 'Thread M42',
      height: null,
      remark: '',
    })
  })

  it('says what is missing at its field, and sends nothing', async () => {
    const { send, user } = show()
    await user.click(screen.getByRole('button', { name: 'Enter this piece' }))
    for (const sentence of [
      'Give it a number, as painted on it.',
      'Say what it is.',
      'Choose what it is.',
      'Say where the rating comes from.',
    ])
      expect(await screen.findByText(sentence)).toBeVisible()
    expect(send).not.toHaveBeenCalled()
  })

  it('puts the server’s word about a number that is taken at the number', async () => {
    const taken = 'Another piece of this shop has the number T-07.'
    const refuse = () => Promise.reject(new ProblemError(422, { code: 'invalid', detail: 'Look again.', fields: { code: taken } }))
    const existing: ToolingDetails = {
      code: 'T-07',
      name: 'Flat nose',
      kind: 'nose',
      ratedLoad: { text: '12', unit: 'kN' },
      ratingFrom: 'Stamped',
      fit: 'M42',
      height: { text: '60', unit: 'mm' },
      remark: '',
    }
    const { user } = show({ existing, send: refuse })
    expect(box(/^Height/)).toHaveValue('60')
    await user.click(screen.getByRole('button', { name: 'Keep these details' }))
    expect(await screen.findByText(taken)).toBeVisible()
    expect(box('Number')).toHaveAccessibleDescription(taken)
  })
})
