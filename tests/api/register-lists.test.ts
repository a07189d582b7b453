import { v7 as newId } from 'uuid'
import { beforeAll, describe, expect, it } from 'vitest'
import { pressListSchema, pressResponseSchema } from '#shared/api/presses'
import { testListSchema, testResponseSchema } from '#shared/api/proof-tests'
import { addPerson, openShop, openStaffedShop } from '../factories/people'
import type { SignedInPerson } from '../factories/people'
import { makePressRow, makeTestRow } from '../factories/register-rows'

type Staff = Awaited<ReturnType<typeof openStaffedShop>>

describe('the register of presses', () => {
  let owner: SignedInPerson
  const get = async (query: string) =>
    pressListSchema.parse((await owner.client.get(`/api/presses?shop=${owner.shopId}${query}`).expect(200)).body)
  const names = async (query: string) => (await get(query)).presses.map((press) => press.name)

  beforeAll(async () => {
    owner = await openShop()
    await makePressRow(owner.shopId, {
      name: 'Press 2',
      whatFor: 'straightening press',
      ratedTons: 12,
      status: 'cleared',
      clearedTons: 11.7,
      clearedUntil: '2027-03-15',
    })
    await makePressRow(owner.shopId, { name: 'Press 1', whatFor: 'forming press', ratedTons: 30, status: 'under test' })
    await makePressRow(owner.shopId, { name: 'Press 3', whatFor: 'bearing press', ratedTons: 25, status: 'withdrawn' })
  })

  it('says of each press what it may carry and until when', async () => {
    const [press] = (await get('&search=straight')).presses
    expect(press).toMatchObject({
      name: 'Press 2',
      kind: 'h-frame',
      status: 'cleared',
      ratedLoad: { text: '12', unit: 'short-ton' },
      clearedTo: { text: '11.7', unit: 'short-ton' },
      clearedUntil: '2027-03-15',
      lastChangedAt: '2026-09-15T10:00:00.000Z',
    })
  })

  it('runs by name, by rated load and by last change, both ways', async () => {
    expect(await names('')).toEqual(['Press 1', 'Press 2', 'Press 3'])
    expect(await names('&sort=-name')).toEqual(['Press 3', 'Press 2', 'Press 1'])
    expect(await names('&sort=ratedLoad')).toEqual(['Press 2', 'Press 3', 'Press 1'])
    expect(await names('&sort=-lastChanged')).toHaveLength(3)
  })

  it('finds words in the name and in what the press is for, and a status', async () => {
    expect(await names('&search=bearing')).toEqual(['Press 3'])
    expect(await names('&search=press%201')).toEqual(['Press 1'])
    expect(await names('&search=nothing%20such')).toEqual([])
    expect(await names('&status=withdrawn')).toEqual(['Press 3'])
  })

  it('turns its pages by place, and back again', async () => {
    const first = await get('&limit=2')
    expect(first.presses.map((press) => press.name)).toEqual(['Press 1', 'Press 2'])
    expect(first.newer).toBeNull()
    const second = await get(`&limit=2&cursor=${first.older}`)
    expect(second.presses.map((press) => press.name)).toEqual(['Press 3'])
    expect(second.older).toBeNull()
    const back = await get(`&limit=2&cursor=${second.newer}`)
    expect(back.presses.map((press) => press.name)).toEqual(['Press 1', 'Press 2'])
  })

  it('refuses an order it has no index for, and a cursor of another order', async () => {
    await owner.client.get(`/api/presses?shop=${owner.shopId}&sort=kind`).expect(422)
    const { older } = await get('&limit=1')
    await owner.client.get(`/api/presses?shop=${owner.shopId}&sort=-name&limit=1&cursor=${older}`).expect(422)
  })

  it('opens one press by its id, to everyone of its shop and nobody else', async () => {
    const id = await makePressRow(owner.shopId, { name: 'Press 9' })
    const crew = await addPerson(owner, 'crew')
    const answer = pressResponseSchema.parse((await crew.client.get(`/api/presses/${id}`).expect(200)).body)
    expect(answer).toMatchObject({ shopId: owner.shopId, press: { id, name: 'Press 9' } })
    const stranger = await openShop()
    await stranger.client.get(`/api/presses/${id}`).expect(404)
    await stranger.client.get(`/api/presses?shop=${owner.shopId}`).expect(404)
    await owner.client.get(`/api/presses/${newId()}`).expect(404)
    await owner.client.get('/api/presses/not-an-id').expect(404)
  })
})

describe('the register of proof tests', () => {
  let staff: Staff
  let press: string
  let other: string
  const get = async (query: string) =>
    testListSchema.parse((await staff.crew.client.get(`/api/proof-tests?shop=${staff.owner.shopId}${query}`).expect(200)).body)
  const numbers = async (query: string) => (await get(query)).proofTests.map((test) => test.number)

  beforeAll(async () => {
    staff = await openStaffedShop()
    const { shopId } = staff.owner
    press = await makePressRow(shopId, { name: 'Press 2' })
    other = await makePressRow(shopId, { name: 'Press 5' })
    const people = { lead: staff.lead, witness: staff.witness }
    const swapped = { lead: staff.owner, witness: staff.lead }
    await makeTestRow(shopId, press, people, { number: 41, result: 'rejected', openedAt: new Date('2026-09-08T09:00:00Z') })
    await makeTestRow(shopId, press, people, { number: 43, result: 'accepted', openedAt: new Date('2026-09-14T15:20:00Z') })
    await makeTestRow(shopId, other, swapped, {
      number: 42,
      status: 'to countersign',
      pressName: 'Press 5',
      openedAt: new Date('2026-09-12T23:30:00Z'),
    })
    await makeTestRow(shopId, other, people, {
      number: 44,
      status: 'under way',
      pressName: 'Press 5',
      openedAt: new Date('2026-09-21T08:00:00Z'),
    })
  })

  it('runs newest first, and by number and press', async () => {
    expect(await numbers('')).toEqual(['PT-0044', 'PT-0043', 'PT-0042', 'PT-0041'])
    expect(await numbers('&sort=number')).toEqual(['PT-0041', 'PT-0042', 'PT-0043', 'PT-0044'])
    expect(await numbers('&sort=press&limit=2')).toEqual(expect.arrayContaining(['PT-0041', 'PT-0043']))
  })

  it('says how far a test climbed and where it was stopped', async () => {
    const [stopped] = (await get('&search=PT-0041')).proofTests
    expect(stopped).toMatchObject({
      result: 'rejected',
      reachedPercent: 75,
      stoppedAtPercent: 75,
      ratedLoad: { text: '12', unit: 'short-ton' },
      sealedAt: null,
    })
  })

  it('finds number, press, lead and witness', async () => {
    expect(await numbers('&search=0043')).toEqual(['PT-0043'])
    expect(await numbers('&search=press%205')).toEqual(['PT-0044', 'PT-0042'])
    expect(await numbers(`&search=${encodeURIComponent(staff.witness.name)}`)).toEqual(['PT-0044', 'PT-0043', 'PT-0041'])
    expect(await numbers(`&search=${encodeURIComponent(staff.lead.name)}`)).toHaveLength(4)
    expect(await numbers(`&search=${encodeURIComponent(`${staff.lead.name} press 5`)}`)).toEqual(['PT-0044', 'PT-0042'])
  })

  it('narrows by press, result, status and lead, together', async () => {
    expect(await numbers(`&press=${press}`)).toEqual(['PT-0043', 'PT-0041'])
    expect(await numbers('&result=rejected')).toEqual(['PT-0041'])
    expect(await numbers('&status=to%20countersign')).toEqual(['PT-0042'])
    expect(await numbers(`&lead=${staff.owner.userId}`)).toEqual(['PT-0042'])
    expect(await numbers(`&lead=${staff.owner.userId}&result=accepted`)).toEqual([])
  })

  it('takes days as the reader’s own: what was opened late in the evening belongs to that evening', async () => {
    expect(await numbers('&from=2026-09-13&to=2026-09-14')).toEqual(['PT-0043'])
    // Two hours ahead of UTC 23:30 on the 12th is 01:30 on the 13th.
    expect(await numbers('&from=2026-09-13&to=2026-09-14&zone=-120')).toEqual(['PT-0043', 'PT-0042'])
    expect(await numbers('&to=2026-09-08')).toEqual(['PT-0041'])
  })

  it('turns its pages while a filter holds', async () => {
    const first = await get(`&press=${press}&limit=1`)
    expect(first.proofTests.map((test) => test.number)).toEqual(['PT-0043'])
    const second = await get(`&press=${press}&limit=1&cursor=${first.older}`)
    expect(second.proofTests.map((test) => test.number)).toEqual(['PT-0041'])
    expect(second.older).toBeNull()
  })

  it('opens one test by its id, and not to another shop', async () => {
    const id = await makeTestRow(
      staff.owner.shopId,
      press,
      { lead: staff.lead, witness: staff.witness },
      { number: 39, openedAt: new Date('2020-01-01') },
    )
    const answer = testResponseSchema.parse((await staff.witness.client.get(`/api/proof-tests/${id}`).expect(200)).body)
    expect(answer).toMatchObject({ shopId: staff.owner.shopId, proofTest: { number: 'PT-0039', leadName: staff.lead.name } })
    const stranger = await openShop()
    await stranger.client.get(`/api/proof-tests/${id}`).expect(404)
    await stranger.client.get(`/api/proof-tests?shop=${staff.owner.shopId}`).expect(404)
  })
})
