import { describe, expect, it } from 'vitest'
import { todayResponseSchema } from '#shared/api/today'
import type { TodayResponse } from '#shared/api/today'
import type { PressDraft } from '#shared/press/entries'
import { calibration, enterInstrument, gauge, indicator } from '../factories/instruments'
import { openShop, openStaffedShop } from '../factories/people'
import type { SignedInPerson } from '../factories/people'
import { recordedTest } from '../factories/recorded-test'
import { makePressRow, makeTestRow, pressLedger, storeEntries } from '../factories/register-rows'
import { openedPayload } from '../factories/test-press'

const DAY = '2026-09-21'

async function today(person: SignedInPerson, query = `&day=${DAY}`): Promise<TodayResponse> {
  return todayResponseSchema.parse((await person.client.get(`/api/today?shop=${person.shopId}${query}`).expect(200)).body)
}

const kinds = (answer: TodayResponse) => answer.needs.map((need) => need.kind)

/** A press that was registered and then changed, with the entries behind its row. */
async function changedPress(owner: SignedInPerson, name: string): Promise<string> {
  const id = await makePressRow(owner.shopId, { name, whatFor: 'broaching press', status: 'withdrawn' })
  const { press, joints } = openedPayload()
  const drafts: PressDraft[] = [
    { kind: 'registered', payload: { description: press, joints, lastWorkedOn: null } },
    { kind: 'withdrawn', payload: { why: 'Hose changed.' } },
  ]
  await storeEntries(owner.shopId, pressLedger(id, owner.userId, drafts))
  return id
}

describe('today', () => {
  it('is empty in a new shop', async () => {
    const owner = await openShop()
    expect(await today(owner)).toEqual({ day: DAY, underWay: [], needs: [], presses: [], due: [] })
  })

  it('tells a lead which press is shut and why, and says nothing of it to the crew', async () => {
    const staff = await openStaffedShop()
    const press = await changedPress(staff.owner, 'Press 4')
    const answer = await today(staff.lead)
    expect(answer.needs).toEqual([
      { kind: 'press-shut', pressId: press, pressName: 'Press 4', why: 'Hose changed.', since: '2026-09-18T10:00:00.000Z' },
    ])
    expect(answer.presses).toMatchObject([{ press: { name: 'Press 4', status: 'withdrawn' }, why: 'Hose changed.', test: null }])
    const crew = await today(staff.crew)
    expect(crew.needs).toEqual([])
    expect(crew.presses).toEqual(answer.presses)
  })

  it('asks for a signature only of whom it waits for', async () => {
    const staff = await openStaffedShop()
    const { shopId } = staff.owner
    const press = await makePressRow(shopId, { name: 'Press 5', status: 'under test' })
    const people = { lead: staff.lead, witness: staff.witness }
    const concludedAt = new Date('2026-09-12T14:00:00Z')
    const test = await makeTestRow(shopId, press, people, {
      number: 42,
      status: 'to countersign',
      result: 'accepted',
      pressName: 'Press 5',
      concludedAt,
    })
    const witness = await today(staff.witness)
    expect(witness.needs).toEqual([
      {
        kind: 'countersign',
        proofTestId: test,
        number: 'PT-0042',
        pressName: 'Press 5',
        protocolName: 'First load by quarters',
        since: concludedAt.toISOString(),
      },
    ])
    expect(witness.presses).toMatchObject([{ test: { number: 'PT-0042', status: 'to countersign' } }])
    expect(kinds(await today(staff.lead))).toEqual([])
    expect(kinds(await today(staff.owner))).toEqual([])
  })

  it('asks the lead of a test to conclude, to sign, and to answer a declined signature', async () => {
    const staff = await openStaffedShop()
    const { shopId } = staff.owner
    const people = { lead: staff.lead, witness: staff.witness }
    for (const [number, status] of [
      [1, 'stopped'],
      [2, 'concluded'],
      [3, 'declined'],
      [4, 'signed'],
    ] as const) {
      const press = await makePressRow(shopId, { name: `Press ${number}` })
      await makeTestRow(shopId, press, people, { number, status })
    }
    expect(kinds(await today(staff.lead))).toEqual(['conclude', 'declined', 'sign'])
    expect(kinds(await today(staff.witness))).toEqual([])
  })

  it('names instruments out of date or soon due, and puts due dates on the scale for fourteen weeks', async () => {
    const owner = await openShop()
    const dates = { calibratedOn: '2025-09-01' }
    await enterInstrument(owner, indicator({ code: 'I-02' }), [calibration({ ...dates, dueOn: '2026-09-19' })])
    await enterInstrument(owner, gauge({ code: 'G-03' }), [calibration({ ...dates, dueOn: '2026-09-30' })])
    await enterInstrument(owner, gauge({ code: 'G-02' }), [calibration({ ...dates, dueOn: '2026-12-09' })])
    await enterInstrument(owner, gauge({ code: 'G-09' }), [calibration({ ...dates, dueOn: '2027-06-01' })])
    await enterInstrument(owner, gauge({ code: 'G-10' }))
    await makePressRow(owner.shopId, { name: 'Press 3', status: 'cleared', clearedTons: 24, clearedUntil: '2026-10-12' })
    await makePressRow(owner.shopId, { name: 'Press 6', status: 'cleared', clearedTons: 24, clearedUntil: '2026-09-20' })
    const answer = await today(owner)
    expect(answer.needs.map((need) => [need.kind, 'code' in need ? need.code : 'pressName' in need ? need.pressName : ''])).toEqual([
      ['press-overdue', 'Press 6'],
      ['instrument-out', 'G-10'],
      ['instrument-out', 'I-02'],
      ['instrument-due', 'G-03'],
      ['press-due', 'Press 3'],
    ])
    expect(answer.due.map((due) => due.on)).toEqual(['2026-09-30', '2026-10-12', '2026-12-09'])
  })

  it('shows the climb of a test under way, from its ledger', async () => {
    const staff = await openStaffedShop()
    const { shopId } = staff.owner
    const press = await makePressRow(shopId, { name: 'Press 1', whatFor: 'forming press', status: 'under test' })
    const id = await makeTestRow(shopId, press, { lead: staff.lead, witness: staff.witness }, { status: 'under way', pressName: 'Press 1' })
    const { entries } = recordedTest()
    const second = entries.findIndex(
      (entry, index) => entry.kind === 'decided' && entries.slice(0, index).some((one) => one.kind === 'decided'),
    )
    // The recorded people aren't of this shop's database: its lead wrote everything here.
    const own = entries.slice(0, second).map((entry) => ({ ...entry, ledgerId: id, authorId: staff.lead.userId }))
    await storeEntries(shopId, own)
    const [underWay] = (await today(staff.crew)).underWay
    expect(underWay).toMatchObject({
      whatFor: 'forming press',
      test: { pressName: 'Press 1', status: 'under way' },
      climb: { levelPercent: 50, loaded: true },
    })
    expect(underWay?.climb.rungs.map((rung) => rung.state)).toEqual(['went-on', 'now', 'to-come', 'to-come'])
  })

  it('takes the server’s day when the reader names none, and refuses what is no day', async () => {
    const owner = await openShop()
    expect((await today(owner, '')).day).toBe(new Date().toISOString().slice(0, 10))
    await owner.client.get(`/api/today?shop=${owner.shopId}&day=tomorrow`).expect(422)
  })

  it('is shown to people of the shop only', async () => {
    const owner = await openShop()
    const stranger = await openShop()
    await stranger.client.get(`/api/today?shop=${owner.shopId}`).expect(404)
  })
})
