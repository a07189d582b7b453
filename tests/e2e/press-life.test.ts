import sharp from 'sharp'
import { beforeAll, describe, expect, it } from 'vitest'
import { entriesResponseSchema } from '#shared/api/ledger'
import { foldPress } from '#shared/press/apply'
import type { PressDraft } from '#shared/press/entries'
import type { PressState } from '#shared/press/state'
import { ApiRun, Device, enterPress, post, type Staff } from '../factories/api-run'
import { aimClientsAt } from '../factories/client'
import { openStaffedShop, type SignedInPerson } from '../factories/people'
import { serverAddress } from '../support/browser'
import { howMany, pageOf, PATIENT, PHONE, planAgain, PressScreen } from '../support/press-screen'

/** What a field for a moment takes, on a device that keeps UTC. */
const hoursAgo = (hours: number): string => new Date(Date.now() - hours * 3_600_000).toISOString().slice(0, 16)

/** From what the test asks for next to both signatures. */
async function bringHome(run: ApiRun): Promise<void> {
  await run.driveTo('sign')
  await run.sign('lead').expect(201)
  await run.refresh()
  await run.sign('witness').expect(201)
}

/** The press of the record's example, with a weld under its bed that is only tacked. */
const halfBuilt = (staff: Staff): Promise<string> =>
  enterPress(staff.lead, ({ joints }) => ({
    joints: joints.map((joint) => (joint.number === 7 ? { ...joint, kind: 'weld', makeUp: 'tacked' } : joint)),
  }))

async function pressOf({ lead }: Staff, pressId: string): Promise<PressState> {
  const { body } = await lead.client.get(`/api/presses/${pressId}/entries`).expect(200)
  return foldPress(pressId, entriesResponseSchema.parse(body).entries)
}

async function say(person: SignedInPerson, pressId: string, ...drafts: PressDraft[]) {
  const device = new Device(person, pressId)
  const { results } = await post(
    person,
    `/api/presses/${pressId}/entries`,
    drafts.map((draft) => device.draft(draft)),
  )
  return results.map((result) => (result.outcome === 'refused' ? result.problem.detail : result.outcome))
}

/** Accepts over HTTP every joint of a press that is not accepted. */
async function examineRest(staff: Staff, pressId: string): Promise<void> {
  const left = (await pressOf(staff, pressId)).joints.filter(({ examination }) => examination === null)
  const answers = await say(
    staff.lead,
    pressId,
    ...left.map(({ id }): PressDraft => ({
      kind: 'joint-examined',
      payload: { jointId: id, method: 'visual', result: 'accepted', remark: '', test: null },
    })),
  )
  expect(answers).toEqual(left.map(() => 'kept'))
}

beforeAll(() => aimClientsAt(serverAddress()))

describe('the life of a press', () => {
  it('goes from half-built to cleared, is knocked and moved at once, falls back, and is cleared again by a retest', async () => {
    const staff = await openStaffedShop()
    const pressId = await halfBuilt(staff)
    const count = (kind: string) => howMany(staff.lead, pressId, kind)
    const lead = await PressScreen.open(staff.lead, pressId)
    const today = await lead.page.context().newPage()
    await today.goto('/')

    await lead.sees('Joint 7 (Bed on left pin) is only tacked. Weld it out.')
    await lead.tapJoint('Bed on left pin')
    await lead.button('It is welded out').click()
    await lead.page.getByRole('textbox', { name: /^How/ }).fill('E7018, four passes')
    await lead.page.getByLabel('When the work was done').fill(hoursAgo(20))
    await lead.button('Joint 7 was worked on').dblclick()
    await lead.sees('Joints 1 to 8 are not examined.')
    expect(await count('joint-worked')).toBe(1)

    const first = await ApiRun.open({ staff, pressId })
    await bringHome(first)
    await lead.sees('Cleared up to')

    const crew = await PressScreen.open(staff.crew, pressId, PHONE)
    await crew.beginChange(/^Knock/)
    await crew.sees('Every joint, 1 to 8, falls back to unexamined.')
    await crew.sees('The clearance ends with it. The press needs a proof test before it is used.')
    await crew.page.getByRole('checkbox', { name: /Bed on left pin/ }).check({ force: true })
    await crew.sees('Joints 5, 7 and 8 fall back to unexamined.')
    await crew.why.fill('The forklift ran into its')
    const halfFilled = async () => {
      await crew.sees('Joints 5, 7 and 8 fall back to unexamined.')
      expect(await crew.why.inputValue()).toBe('The forklift ran into its')
      expect(await crew.page.getByRole('radio', { name: /^Knock/ }).isChecked()).toBe(true)
    }
    await crew.page.reload()
    await halfFilled()
    await crew.page.goto('/presses')
    await crew.page.goBack()
    await halfFilled()
    expect(await count('changed')).toBe(0)
    await crew.why.fill('The forklift ran into its left side.')

    await lead.beginChange(/^Moved/)
    await lead.sees('Joints 4 to 6 and 8 fall back to unexamined.')
    await lead.sees('The clearance waits: the press is not used until these joints are accepted again.')
    await lead.why.fill('To the other bay, after that.')
    await Promise.all([crew.button(/^Report this change/).dblclick(), lead.button(/^Report this change/).click()])
    await expect.poll(() => count('changed'), PATIENT).toBe(2)

    for (const screen of [crew, lead]) {
      await screen.answer.getByText('Do not use').waitFor()
      await screen.sees('Joints 4 to 8 fell back to unexamined. Examine them again.')
      await screen.sees('A proof test, concluded and countersigned.')
      expect(await screen.page.getByText('Cleared up to', { exact: true }).count()).toBe(0)
    }
    await crew.page.reload()
    await crew.button('Report a change').waitFor()
    expect(await crew.why.count()).toBe(0)

    await today.getByText('Take the tag off Press 2').waitFor()
    await crew.page.goto('/')
    await crew.page.getByText('Take the tag off Press 2').click()
    await crew.button('The tag is off').dblclick()
    await crew.page.getByText('Take the tag off the press').waitFor({ state: 'detached' })
    await crew.sees('Tag taken off the press')
    expect(await count('tag-taken-off')).toBe(1)
    await today.getByText('Take the tag off Press 2').waitFor({ state: 'detached' })
    await today.getByText('Press 2 may not be used').waitFor()

    await lead.button('Walk down the joints').click()
    const walked = [await lead.examineNext(), await lead.examineNext(), await lead.examineNext()]
    await lead.page.reload()
    await lead.sees('3 of 8 joints looked at.')
    while (walked.length < 8) walked.push(await lead.examineNext())
    expect([...walked].sort()).toEqual([1, 2, 3, 4, 5, 6, 7, 8])
    await lead.sees('All 8 joints were looked at.')
    await lead.button('The walk-down is over').click()
    expect(await lead.answer.getByText(/Examine (it|them) again/).count()).toBe(0)
    await lead.answer.getByText('Do not use').waitFor()

    await today.getByText('Press 2 may not be used').click()
    const again = await planAgain(today, staff, first)
    await crew.answer.getByText('Under test', { exact: true }).waitFor()
    await again.driveTo('sign')
    await crew.sees(`${again.number} is concluded, and a signature is missing.`)
    await today.goto(`/proof-tests/${again.id}`)
    const form = today.getByRole('form', { name: 'Sign' })
    await form.getByLabel('Your password').fill(staff.lead.password)
    await form.getByRole('button', { name: 'Sign as lead' }).dblclick()
    await today
      .getByText(/Waits for Wim Faber/)
      .first()
      .waitFor()
    const witness = await pageOf(staff.witness, '/', PHONE)
    await witness.getByText(`Countersignature wanted on ${again.number}`).waitFor()
    await again.refresh()
    await again.sign('witness').expect(201)

    await crew.answer.getByText('Cleared up to', { exact: true }).waitFor()
    await witness.getByText(`Countersignature wanted on ${again.number}`).waitFor({ state: 'detached' })
    await today.goto('/')
    await today.getByText(/^Cleared up to/).waitFor()
    expect(await today.getByText(/Press 2 may not be used|Take the tag off/).count()).toBe(0)
  })

  it('a stopped test is repaired by the crew, closed by the lead, and passed by the test that repeats it', async () => {
    const staff = await openStaffedShop()
    // Named as the plan in the browser names it: lines are drawn beside each other only where the same is measured.
    const label = 'bed middle less mean of left pin and right pin'
    const run = await ApiRun.open({ staff, change: (request) => ({ ...request, net: request.net && { ...request.net, label } }) })
    const { pressId } = run
    const softens = { stiffness: (percent: number) => (percent < 75 ? 60e6 : 48e6), set: 0.0004 }
    await run.driveTo('stop-now', softens)
    await run.driveTo('stopped-release', softens)

    const crew = await PressScreen.open(staff.crew, pressId, PHONE)
    await crew.answer.getByText('Do not use').waitFor()
    await crew.sees(`${run.number} is not concluded yet. Conclude it, then close the repair.`)
    await crew.button('Say what was done').click()
    await crew.page.getByLabel('What was done').fill('Ground out the old weld under the bed.')
    const photo = await sharp({ create: { width: 640, height: 480, channels: 3, background: '#345' } })
      .jpeg()
      .toBuffer()
    await crew.page
      .getByLabel('Photos or documents: choose a file')
      .setInputFiles({ name: 'ground out.jpg', mimeType: 'image/jpeg', buffer: photo })
    await crew.page.getByRole('list', { name: 'Chosen' }).getByRole('listitem').waitFor()
    await crew.button('This was done').dblclick()
    const notes = crew.page.getByRole('list', { name: 'What was done' })
    await notes.getByText('Ground out the old weld under the bed.').waitFor()
    await notes.getByRole('button', { name: /^Photo ground out\.jpg/ }).waitFor()
    expect(await howMany(staff.lead, pressId, 'repair-noted')).toBe(1)

    const lead = await PressScreen.open(staff.lead, pressId)
    await lead.sees(`${run.number} is not concluded yet. Conclude it, then close the repair.`)
    expect(await lead.page.getByRole('button', { name: 'Close this repair' }).count()).toBe(0)
    // What a page of before would still send.
    const repairId = (await pressOf(staff, pressId)).repairs[0]?.id ?? ''
    const closing: PressDraft = { kind: 'repair-closed', payload: { repairId, done: 'Welded.', doneBy: 'Cora Lind' } }
    expect(await say(staff.lead, pressId, closing)).toEqual([`${run.number} is not concluded yet. Conclude it, then close the repair.`])
    await bringHome(run)
    expect(await say(staff.crew, pressId, closing)).toEqual(['Your role in this shop does not allow this. Ask the owner or the lead.'])
    await lead.button('Close this repair').waitFor()
    await crew.page.getByText('is not concluded yet').waitFor({ state: 'detached' })
    expect(await crew.page.getByRole('button', { name: 'Close this repair' }).count()).toBe(0)
    await crew.button('Say what was done').waitFor()
    expect(await lead.page.getByRole('button', { name: /^Plan the test that repeats/ }).isDisabled()).toBe(true)

    await lead.button('Close this repair').click()
    await lead.button(/^The repair is done/).click()
    const allInAll = lead.page.getByLabel('What was done, all in all')
    await expect.poll(() => allInAll.getAttribute('aria-invalid'), PATIENT).toBe('true')
    await allInAll.fill('Stiffener welded in under the bed.')
    await lead.button(/^The repair is done/).dblclick()
    await lead.sees(/A repair is closed\. Examine joints 1 to 8 again\./)
    await lead.sees('Stiffener welded in under the bed.')
    expect(await howMany(staff.lead, pressId, 'repair-closed')).toBe(1)

    await lead.tapJoint('Left pin in upright')
    await lead.button('It was examined').click()
    await lead.page.getByRole('radio', { name: 'Accepted' }).check({ force: true })
    await lead.button('Joint 5 was examined').dblclick()
    await lead.sees(/Examine joints 1 to 4 and 6 to 8 again\./)
    await examineRest(staff, pressId)
    await lead.page.getByText(/^A repair is closed/).waitFor({ state: 'detached' })
    await lead.sees(`A proof test that repeats ${run.number}, concluded and countersigned.`)

    await lead.page.getByRole('link', { name: `Plan the test that repeats ${run.number}` }).click()
    await lead.sees(/^Repaired on .*: Stiffener welded in under the bed\./)
    const retest = await planAgain(lead.page, staff, run)
    expect(retest.state.opened?.repeats).toEqual({ id: run.id, number: run.number })
    const oldLine = lead.page.getByText(new RegExp(`^${run.number}, \\d`)).first()
    await retest.driveTo('begin-stage')
    await oldLine.waitFor()
    await bringHome(retest)
    await lead.page.goto(`/proof-tests/${retest.id}`)
    await oldLine.waitFor()
    await lead.page.goto(`/presses/${pressId}`)
    await lead.answer.getByText('Cleared up to', { exact: true }).waitFor()
    // The load keeps clear of what stands beside it.
    const [load, beside] = await Promise.all(
      [lead.answer.getByText('short tons', { exact: true }), lead.answer.getByText('No other bed hole was tested.')].map((text) =>
        text.first().boundingBox(),
      ),
    )
    expect((load?.x ?? Infinity) + (load?.width ?? 0)).toBeLessThan(beside?.x ?? 0)
    await lead.sees(new RegExp(`stiffer at ${retest.number} than at ${run.number}`))
  })
})
