import { beforeAll, describe, expect, it } from 'vitest'
import { calendarFeedSchema, calendarSchema } from '#shared/api/calendar'
import { entriesResponseSchema } from '#shared/api/ledger'
import { pressHistorySchema } from '#shared/api/press-history'
import { problemSchema } from '#shared/api/problem'
import { publicTagSchema, tagResponseSchema } from '#shared/api/tags'
import { todayResponseSchema } from '#shared/api/today'
import { toolingListSchema, toolingResponseSchema } from '#shared/api/tooling'
import { foldPress } from '#shared/press/apply'
import type { PressDraft } from '#shared/press/entries'
import type { PressState } from '#shared/press/state'
import type { ToolingDetails } from '#shared/tooling'
import { ApiRun, Device, enterPress, post } from '../factories/api-run'
import { ApiClient } from '../factories/client'
import { openShop, openStaffedShop, type SignedInPerson } from '../factories/people'

const nose: ToolingDetails = {
  code: 'T-01',
  name: 'Flat nose, 80 mm round',
  kind: 'nose',
  ratedLoad: { text: '20', unit: 'short-ton' },
  ratingFrom: 'Stamped on its side',
  fit: 'Thread M42 on the rod',
  height: null,
  remark: '',
}

async function add(person: SignedInPerson, details: Partial<ToolingDetails> = {}): Promise<string> {
  const response = await person.client.post(`/api/tooling?shop=${person.shopId}`, { ...nose, ...details }).expect(201)
  return toolingResponseSchema.parse(response.body).tooling.id
}

async function pressOf(person: SignedInPerson, pressId: string): Promise<PressState> {
  const { entries } = entriesResponseSchema.parse((await person.client.get(`/api/presses/${pressId}/entries`).expect(200)).body)
  return foldPress(pressId, entries)
}

async function say(person: SignedInPerson, pressId: string, ...drafts: PressDraft[]) {
  const device = new Device(person, pressId)
  const { results } = await post(
    person,
    `/api/presses/${pressId}/entries`,
    drafts.map((draft) => device.draft(draft)),
  )
  return results
}

async function clearedRun(change?: (request: object) => object): Promise<ApiRun> {
  const run = await ApiRun.open(change ? { change: (request) => ({ ...request, ...change(request) }) } : undefined)
  await run.driveTo('sign')
  await run.sign('lead').expect(201)
  await run.refresh()
  await run.sign('witness').expect(201)
  await run.refresh()
  return run
}

let stranger: ApiClient
beforeAll(() => {
  stranger = new ApiClient()
})
const readTag = async (code: string) => publicTagSchema.parse((await stranger.get(`/api/tags/${code}`).expect(200)).body)

describe('the register of tooling', () => {
  it('takes a piece in, changes it, retires it, and gives a number once', async () => {
    const { lead, crew } = await openStaffedShop()
    const id = await add(lead)
    const twice = await lead.client.post(`/api/tooling?shop=${lead.shopId}`, nose).expect(422)
    expect(problemSchema.parse(twice.body).fields).toHaveProperty('code')
    await crew.client.post(`/api/tooling?shop=${crew.shopId}`, { ...nose, code: 'T-02' }).expect(403)
    await lead.client.put(`/api/tooling/${id}`, { ...nose, fit: 'Bore 40 mm' }).expect(200)
    await lead.client.post(`/api/tooling/${id}/retirement`).expect(200)
    const list = async (retired: string) =>
      toolingListSchema.parse((await crew.client.get(`/api/tooling?shop=${crew.shopId}&retired=${retired}`).expect(200)).body).tooling
    expect(await list('no')).toEqual([])
    expect(await list('yes')).toMatchObject([{ id, details: { fit: 'Bore 40 mm' }, retired: true }])
  })

  it('is another shop’s to nobody', async () => {
    const { lead } = await openStaffedShop()
    const id = await add(lead)
    const other = await openShop()
    await other.client.get(`/api/tooling/${id}`).expect(404)
    await other.client.put(`/api/tooling/${id}`, nose).expect(404)
  })

  it('joins the train of a test; a piece that carries less than the press is rated for holds it back', async () => {
    const staff = await openStaffedShop()
    const weak = await add(staff.lead, { code: 'T-09', ratedLoad: { text: '8', unit: 'short-ton' } })
    const refused = await ApiRun.open({ staff, change: (request) => ({ ...request, toolingIds: [weak] }) }).catch(
      (error: Error) => error.message,
    )
    expect(refused).toContain('409')
    const strong = await add(staff.lead)
    const run = await ApiRun.open({ staff, change: (request) => ({ ...request, toolingIds: [strong] }) })
    expect(run.state.opened?.press.train.at(-1)).toMatchObject({
      kind: 'tooling',
      name: 'T-01 Flat nose, 80 mm round',
      ratedForce: nose.ratedLoad,
    })
  })
})

describe('a cleared press', () => {
  it('shows on its tag, to whoever holds it, what it may carry, and no longer the moment it is withdrawn', async () => {
    const run = await clearedRun()
    const { lead, crew } = run.staff
    const made = tagResponseSchema.parse((await crew.client.post(`/api/presses/${run.pressId}/tag`).expect(200)).body)
    const again = tagResponseSchema.parse((await lead.client.post(`/api/presses/${run.pressId}/tag`).expect(200)).body)
    expect(again.code).toBe(made.code)
    const before = await readTag(made.code)
    expect(before).toMatchObject({ answer: { is: 'cleared', clearance: { number: run.number } } })
    expect(before.noChangeSince).not.toBeNull()
    expect(JSON.stringify(before)).not.toContain(run.pressId)
    await say(lead, run.pressId, { kind: 'withdrawn', payload: { why: 'The bed looks bent.' } })
    expect(await readTag(made.code)).toMatchObject({ answer: { is: 'do not use', why: 'The bed looks bent.' }, noChangeSince: null })
    await stranger.get('/api/tags/aaaaaaaaaaaaaaaa').expect(404)
    await stranger.get('/api/tags/nothing').expect(404)
  })

  it('waits for its loose joints after a move, and is cleared again when they are accepted', async () => {
    const run = await clearedRun()
    const { lead, crew } = run.staff
    await say(crew, run.pressId, { kind: 'changed', payload: { change: 'moved', jointIds: [], why: 'To the other bay.' } })
    const moved = await pressOf(lead, run.pressId)
    expect(moved.clearance).toMatchObject({ is: 'suspended', until: 'the joints are accepted' })
    const needs = todayResponseSchema.parse((await lead.client.get(`/api/today?shop=${lead.shopId}`).expect(200)).body).needs
    expect(needs.map((need) => need.kind)).toContain('joints-to-examine')
    expect(needs.map((need) => need.kind)).toContain('tag-hangs')
    const loose = moved.joints.filter((joint) => joint.examination === null)
    await say(
      lead,
      run.pressId,
      ...loose.map((joint): PressDraft => ({
        kind: 'joint-examined',
        payload: { jointId: joint.id, method: 'visual', result: 'accepted', remark: '', test: null },
      })),
    )
    expect((await pressOf(lead, run.pressId)).clearance.is).toBe('cleared')
  })

  it('keeps a withdrawal open until somebody says that the tag is off', async () => {
    const run = await clearedRun()
    const { lead, crew } = run.staff
    await say(crew, run.pressId, { kind: 'changed', payload: { change: 'overload', jointIds: [], why: 'Pressed past the mark.' } })
    const hangs = async (person: SignedInPerson) =>
      todayResponseSchema
        .parse((await person.client.get(`/api/today?shop=${person.shopId}`).expect(200)).body)
        .needs.some((need) => need.kind === 'tag-hangs')
    expect(await hangs(crew)).toBe(true)
    expect((await say(crew, run.pressId, { kind: 'tag-taken-off', payload: { remark: '' } }))[0]?.outcome).toBe('kept')
    expect(await hangs(lead)).toBe(false)
  })

  it('is not given back by a test during which it was knocked: no clearance over joints that fell back', async () => {
    const run = await ApiRun.open()
    await run.driveTo('sign')
    await say(run.staff.crew, run.pressId, {
      kind: 'changed',
      payload: { change: 'knock', jointIds: [], why: 'The forklift ran into it.' },
    })
    await run.sign('lead').expect(201)
    await run.refresh()
    await run.sign('witness').expect(201)
    const press = await pressOf(run.staff.lead, run.pressId)
    expect(press.clearance).toMatchObject({ is: 'withdrawn', why: expect.stringContaining('fell back after the press was loaded') })
    expect(press.underTest).toBeNull()
  })
})

describe('a test that went wrong', () => {
  it('opens a repair with the member that moved; after it is closed, the retest names the test it repeats', async () => {
    const run = await ApiRun.open()
    const softens = { stiffness: (percent: number) => (percent < 75 ? 60e6 : 48e6), set: 0.0004 }
    await run.driveTo('stop-now', softens)
    await run.driveTo('stopped-release', softens)
    const { lead, crew } = run.staff
    const [repair] = (await pressOf(lead, run.pressId)).repairs
    expect(repair).toMatchObject({ from: 'test', test: { number: run.number }, closed: null })
    const middle = run.state.opened?.points[0]?.memberId
    expect(repair?.memberIds).toContain(middle)
    const repairId = repair?.id ?? ''
    const closing: PressDraft = {
      kind: 'repair-closed',
      payload: { repairId, done: 'Stiffener welded out and ground.', doneBy: 'Lena Vogt' },
    }
    expect((await say(lead, run.pressId, closing))[0]?.outcome).toBe('refused')
    await run.driveTo('sign', { stiffness: () => 48e6, set: 0.0004 })
    expect(run.state.conclusion?.conclusion).toBe('rejected')
    expect(
      (
        await say(crew, run.pressId, { kind: 'repair-noted', payload: { repairId, note: 'Ground out the old weld.', doneBy: 'Cora Lind' } })
      )[0]?.outcome,
    ).toBe('kept')

    const plan = (change: object) =>
      ApiRun.open({ staff: run.staff, pressId: run.pressId, change: (request) => ({ ...request, ...change }) }).catch(
        (error: Error) => error.message,
      )
    expect(await plan({ repeatsId: run.id })).toContain('409')
    expect((await say(lead, run.pressId, closing))[0]?.outcome).toBe('kept')
    expect(await plan({})).toContain('409')
    const retest = await plan({ repeatsId: run.id })
    if (typeof retest === 'string') throw new Error(retest)
    expect(retest.state.opened?.repeats).toEqual({ id: run.id, number: run.number })
    await retest.driveTo('sign')
    const { climbs } = pressHistorySchema.parse((await lead.client.get(`/api/presses/${run.pressId}/history`).expect(200)).body)
    expect(climbs.map((climb) => climb.number)).toEqual([run.number, retest.number])
    expect(climbs[1]).toMatchObject({ repeats: run.number, result: 'accepted' })
    // The frame of the retest is as stiff as the run was told to make it, 60 kN/mm by default.
    expect((climbs[1]?.stiffness ?? 0) / 60e6).toBeCloseTo(1, 1)
    expect(climbs[1]?.line.map((point) => point.percent)).toEqual([0, 25, 50, 75, 100])
  })
})

describe('the calendar', () => {
  it('lists what falls due, and a program that has its secret address reads the same, until it is ended', async () => {
    const run = await clearedRun()
    const { lead } = run.staff
    const query = `shop=${lead.shopId}&from=2020-01-01&to=2099-12-31`
    const { items } = calendarSchema.parse((await lead.client.get(`/api/calendar?${query}`).expect(200)).body)
    expect(items.map((item) => item.kind)).toContain('clearance')
    expect(items.filter((item) => item.kind === 'calibration').length).toBeGreaterThan(0)
    const { address } = calendarFeedSchema.parse((await lead.client.post(`/api/calendar/feed?shop=${lead.shopId}`).expect(201)).body)
    const path = new URL(address ?? '').pathname
    const file = await stranger.get(path).expect(200)
    const text = file.text.replaceAll('\r\n ', '')
    expect(file.headers['content-type']).toContain('text/calendar')
    expect(text).toContain('BEGIN:VCALENDAR')
    // RFC 5545: an all-day event has a DATE; every event an id of its own.
    expect(text).toMatch(/DTSTART;VALUE=DATE:\d{8}\r\n/)
    const ids = [...text.matchAll(/^UID:(.*)\r$/gm)].map(([, id]) => id)
    expect(new Set(ids).size).toBe(ids.length)
    expect(ids.length).toBeGreaterThan(1)
    await lead.client.delete(`/api/calendar/feed?shop=${lead.shopId}`).expect(200)
    await stranger.get(path).expect(404)
  })

  it('is not read by another shop', async () => {
    const { lead } = await openStaffedShop()
    const other = await openShop()
    await other.client.get(`/api/calendar?shop=${lead.shopId}&from=2026-01-01&to=2026-12-31`).expect(404)
    const pressId = await enterPress(lead)
    await other.client.post(`/api/presses/${pressId}/tag`).expect(404)
    await other.client.get(`/api/presses/${pressId}/history`).expect(404)
  })
})
