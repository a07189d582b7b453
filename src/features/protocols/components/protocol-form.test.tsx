import { render, screen } from '@testing-library/react'
import userEvent from '@testing-library/user-event'
import { describe, expect, it, vi } from 'vitest'
import type { ProtocolRequest } from '#shared/api/protocols'
import { FIRST_LOAD_BY_QUARTERS, SHIPPED_PROTOCOLS, type ProtocolContent } from '#shared/proof-test/protocol'
import { ProblemError } from '../../../lib/problem'
import { draftOf, toProtocolRequest } from './protocol-draft'
import { ProtocolForm } from './protocol-form'

function show(
  send: (request: ProtocolRequest) => Promise<unknown> = () => Promise.resolve(),
  content: ProtocolContent = FIRST_LOAD_BY_QUARTERS,
) {
  const sent = vi.fn(send)
  render(
    <ProtocolForm
      name="First load by quarters"
      content={content}
      lengthUnit="mm"
      version={2}
      send={sent}
      sending={false}
      onLeave={() => undefined}
    />,
  )
  return { sent, user: userEvent.setup() }
}

const box = (label: string | RegExp) => screen.getByRole('textbox', { name: label })
const keep = () => screen.getByRole('button', { name: 'Keep as version 2' })

async function retype(user: ReturnType<typeof userEvent.setup>, field: HTMLElement, text: string) {
  await user.clear(field)
  await user.type(field, text)
}

describe('the form of a protocol', { timeout: 20_000 }, () => {
  it('sends back what it was given when nothing is changed', () => {
    for (const { name, content } of SHIPPED_PROTOCOLS) {
      expect(toProtocolRequest(draftOf(name, content, 'mm'))).toEqual({ name, content })
    }
  })

  it('has a field for every limit, and takes a comma for a point', async () => {
    const { sent, user } = show()
    await retype(user, box('Softening, at most %'), '12,5')
    await user.type(box(/^Permanent set, never more than/), '2,5')
    await user.click(screen.getByRole('radio', { name: /^Guard band/ }))
    await user.click(keep())
    const { limits } = FIRST_LOAD_BY_QUARTERS
    expect(sent).toHaveBeenCalledExactlyOnceWith({
      name: 'First load by quarters',
      content: {
        ...FIRST_LOAD_BY_QUARTERS,
        limits: { ...limits, softeningPercent: 12.5, mostSet: { text: '2,5', unit: 'mm' } },
        decisionRule: 'guard-band',
      },
    })
  })

  it('adds and takes out stages, and draws them as they stand', async () => {
    const { sent, user } = show()
    await user.click(screen.getByRole('button', { name: 'Take out stage 1' }))
    await retype(user, box('Stage 1, % of rated load'), '60')
    expect(screen.getByRole('list', { name: 'Stages of load' })).toHaveTextContent('60 %, hold, 1 min, to come')
    await user.click(keep())
    expect(sent.mock.calls[0]?.[0].content.stages.map((stage) => stage.percent)).toEqual([60, 75, 100])
  })

  it('refuses a stage no higher than the one before it', async () => {
    const { sent, user } = show()
    await retype(user, box('Stage 2, % of rated load'), '20')
    await user.click(keep())
    expect(await screen.findByText('Each stage is higher than the one before it.')).toBeVisible()
    expect(box('Stage 2, % of rated load')).toHaveValue('20')
    expect(sent).not.toHaveBeenCalled()
  })

  it('asks for the rule behind a load above rating', async () => {
    const { sent, user } = show()
    await user.click(screen.getByRole('button', { name: 'Add a stage' }))
    await user.type(box('Stage 5, % of rated load'), '125')
    await user.type(screen.getAllByRole('textbox', { name: 'Held, seconds' }).at(-1) ?? box('Name'), '600')
    await user.click(keep())
    expect(await screen.findByText('Name the rule that asks for a load above rating.')).toBeVisible()
    await user.type(box(/^The rule that asks/), 'ASME ASP-2010 3-4.1.3')
    await user.click(keep())
    // A second climb is where a load above rating is put on: without one the stage would be passed over.
    expect(await screen.findByText('A load above rating is put on in the second climb. Choose “Always”.')).toBeVisible()
    await user.click(screen.getByRole('radio', { name: 'Always' }))
    await user.click(keep())
    expect(sent.mock.calls[0]?.[0].content).toMatchObject({ aboveRatingRule: 'ASME ASP-2010 3-4.1.3', stages: { length: 5 } })
  })

  it('takes a last stage above rating whose percentage is asked when a test is planned', async () => {
    const { sent, user } = show()
    expect(screen.queryByRole('textbox', { name: 'Held above rating, seconds' })).toBeNull()
    await user.click(screen.getByRole('checkbox', { name: /^A last stage above rating/ }))
    await user.click(keep())
    expect(await screen.findByText('Enter whole seconds.')).toBeVisible()
    await user.type(box('Held above rating, seconds'), '600')
    await user.click(keep())
    expect(sent.mock.calls[0]?.[0].content).toEqual({ ...FIRST_LOAD_BY_QUARTERS, aboveRating: { holdSeconds: 600 } })
  })

  it('leaves out the stage above rating when it is switched off again', async () => {
    const shipped = SHIPPED_PROTOCOLS.find(({ content }) => content.aboveRating)
    const { sent, user } = show(undefined, shipped?.content)
    expect(box('Held above rating, seconds')).toHaveValue('600')
    await user.click(screen.getByRole('checkbox', { name: /^A last stage above rating/ }))
    await user.click(keep())
    expect(sent.mock.calls[0]?.[0].content).not.toHaveProperty('aboveRating')
  })

  it('does not take a stage above rating and one to be asked for', async () => {
    const { sent, user } = show(undefined, { ...FIRST_LOAD_BY_QUARTERS, aboveRating: { holdSeconds: 600 } })
    await user.click(screen.getByRole('button', { name: 'Add a stage' }))
    await user.type(box('Stage 5, % of rated load'), '125')
    await user.type(screen.getAllByRole('textbox', { name: 'Held, seconds' }).at(-1) ?? box('Name'), '600')
    await user.click(keep())
    expect(await screen.findByText(/^A stage lies above rating already/)).toBeVisible()
    expect(sent).not.toHaveBeenCalled()
  })

  it('adds a leg with its place of ram and bed', async () => {
    const { sent, user } = show()
    await user.click(screen.getByRole('button', { name: 'Add a leg' }))
    await user.click(keep())
    expect(await screen.findByText('Name this leg.')).toBeVisible()
    await user.type(box('Leg 2'), 'Lowest pin hole')
    const [, secondBed] = screen.getAllByRole('combobox', { name: 'Bed' })
    if (secondBed === undefined) throw new Error('The second leg has no bed.')
    await user.selectOptions(secondBed, 'lowest')
    await user.click(keep())
    expect(sent.mock.calls[0]?.[0].content.legs[1]).toEqual({ label: 'Lowest pin hole', ramPosition: 'central', bed: 'lowest' })
  })

  it('keeps what was typed when the server refuses, with the sentence at its field', async () => {
    const fields = { name: 'Another protocol has this name.', 'content.limits.creepPercent': 'At most 50 %.' }
    const { user } = show(() =>
      Promise.reject(new ProblemError(422, { code: 'invalid', detail: 'Some fields need another look.', fields })),
    )
    await retype(user, box('Recovery before the set, seconds'), '240')
    await user.click(keep())
    expect(await screen.findByText('Another protocol has this name.')).toBeVisible()
    expect(screen.getByText('At most 50 %.')).toBeVisible()
    expect(box('Recovery before the set, seconds')).toHaveValue('240')
  })
})
