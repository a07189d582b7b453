import { QueryTypes } from 'sequelize'
import { v7 as newId } from 'uuid'
import { describe, expect, it } from 'vitest'
import { entriesResponseSchema } from '#shared/api/ledger'
import type { OpenTestRequest } from '#shared/api/proof-tests'
import { problemSchema } from '#shared/api/problem'
import { checkChain, type StoredEntry } from '#shared/ledger/chain'
import { checkSeal } from '#shared/ledger/seal'
import { foldPress } from '#shared/press/apply'
import { evaluateTest } from '#shared/proof-test/evaluate'
import { loadSealKey } from '#server/ledger/seal-keys'
import { rebuildProjections } from '#server/ledger/rebuild'
import { ApiRun, Device, enterPress, post } from '../factories/api-run'
import { openShop, openStaffedShop } from '../factories/people'
import { testServer } from '../support/api-server'

const note = (text: string) => ({ kind: 'observed', payload: { at: null, what: 'noise', note: text } }) as const

async function stored(ledgerId: string): Promise<StoredEntry[]> {
  return testServer().context.database.query<StoredEntry>(
    'SELECT seq, canonical, hash FROM ledger_entries WHERE ledger_id = ? ORDER BY seq',
    {
      replacements: [ledgerId],
      type: QueryTypes.SELECT,
    },
  )
}

async function pressOf(run: ApiRun) {
  const response = await run.staff.lead.client.get(`/api/presses/${run.pressId}/entries`).expect(200)
  return foldPress(run.pressId, entriesResponseSchema.parse(response.body).entries)
}

async function projection(table: 'presses' | 'proof_tests', id: string) {
  const [row] = await testServer().context.database.query<Record<string, unknown>>(`SELECT * FROM ${table} WHERE id = ?`, {
    replacements: [id],
    type: QueryTypes.SELECT,
  })
  return row
}

describe('appending to a ledger', () => {
  it('answers a resent entry the same and writes nothing', async () => {
    const run = await ApiRun.open()
    const draft = run.lead.draft(note('A click at the left pin.'))
    const first = await post(run.staff.lead, run.path, [draft])
    const again = await post(run.staff.lead, run.path, [draft])
    expect(again.results).toEqual(first.results)
    expect(await stored(run.id)).toHaveLength(2)
  })

  it('refuses an id that was used with another body, in another ledger or by another person', async () => {
    const run = await ApiRun.open()
    const draft = run.lead.draft(note('A click.'))
    await post(run.staff.lead, run.path, [draft])
    const other = { ...draft, payload: { ...draft.payload, note: 'A bang.' } }
    const { results } = await post(run.staff.lead, run.path, [other])
    expect(results[0]).toMatchObject({ outcome: 'refused', problem: { status: 409, code: 'id-reused' } })
  })

  it('keeps what two people send at once: every entry once, in one chain', async () => {
    const run = await ApiRun.open()
    const both = [run.lead, run.witness].flatMap((device) =>
      Array.from({ length: 10 }, (_, index) => ({ device, draft: device.draft(note(`Note ${index} of one.`)) })),
    )
    await Promise.all(both.map(({ device, draft }) => post(device.person, run.path, [draft])))
    await Promise.all(both.map(({ device, draft }) => post(device.person, run.path, [draft])))
    const entries = await stored(run.id)
    expect(entries).toHaveLength(21)
    expect(checkChain(entries)).toMatchObject({ whole: true, entries: 21 })
  })

  it('takes a batch in order, with a result for each', async () => {
    const run = await ApiRun.open()
    const conclude = { kind: 'concluded', payload: { conclusion: 'accepted', why: '', evaluation: {}, coreVersion: '1' } }
    const { results, headSeq } = await post(run.staff.lead, run.path, [
      run.lead.draft(note('First.')),
      run.lead.draft(conclude),
      run.lead.draft(note('Third.')),
    ])
    expect(results.map((result) => result.outcome)).toEqual(['kept', 'refused', 'kept'])
    expect(headSeq).toBe(3)
  })

  it('asks for a resend when a device’s count has a gap', async () => {
    const run = await ApiRun.open()
    const lost = run.lead.draft(note('On the way.'))
    await post(run.staff.lead, run.path, [lost])
    const missing = run.lead.draft(note('Lost on the way.'))
    const answer = await post(run.staff.lead, run.path, [run.lead.draft(note('After it.'))])
    expect(answer.resendFrom).toBe(missing.deviceSeq)
    expect((await post(run.staff.lead, run.path, [missing])).results[0]?.outcome).toBe('kept')
  })

  it('names every missing number of a device until it has come, late and out of order', async () => {
    const run = await ApiRun.open()
    const device = new Device(run.staff.lead, run.id)
    const [one, two, three, four, five] = Array.from({ length: 5 }, (_unused, index) => device.draft(note(`Number ${index + 1}.`)))
    if (!one || !two || !three || !four || !five) throw new Error('There are five.')
    const send = async (draft: typeof one) => {
      const { resendFrom, missing } = await post(run.staff.lead, run.path, [draft])
      return { resendFrom, missing }
    }
    expect(await send(three)).toEqual({ resendFrom: 1, missing: [[1, 2]] })
    expect(await send(five)).toEqual({
      resendFrom: 1,
      missing: [
        [1, 2],
        [4, 4],
      ],
    })
    expect(await send(one)).toEqual({
      resendFrom: 2,
      missing: [
        [2, 2],
        [4, 4],
      ],
    })
    // A resend of what is there already changes nothing, and still says what is lacking.
    expect((await send(five)).resendFrom).toBe(2)
    expect(await send(two)).toEqual({ resendFrom: 4, missing: [[4, 4]] })
    expect(await send(four)).toEqual({ resendFrom: null, missing: [] })
  })

  it('lands a fact that goes against a rule, marked, inside the hash', async () => {
    const run = await ApiRun.open()
    const at = { leg: 0, climb: 0, stage: 0, attempt: 0 }
    const result = await run.send(run.lead, { kind: 'stage-begun', payload: { at } })
    expect(result.outcome === 'kept' && result.entry.irregular).toEqual(expect.arrayContaining(['R15', 'R17', 'R19']))
    expect(run.state.irregular).toHaveLength(1)
    expect(checkChain(await stored(run.id)).whole).toBe(true)
  })

  it('marks an entry from a device whose clock is off', async () => {
    const run = await ApiRun.open()
    const sentAt = new Date(Date.now() + 10 * 60_000).toISOString()
    const response = await run.staff.lead.client.post(run.path, { sentAt, entries: [run.lead.draft(note('Ticking ahead.'))] }).expect(200)
    expect(response.body.results[0].entry.irregular).toEqual(['R40'])
  })

  it('refuses what nobody may write: another author, a signature, a consequence, an unknown kind, a half row', async () => {
    const run = await ApiRun.open()
    const refused = async (draft: object, path = run.path) => {
      const { results } = await post(run.staff.lead, path, [draft as never])
      const [result] = results
      return result?.outcome === 'refused' ? `${result.problem.status} ${result.problem.code}` : result?.outcome
    }
    expect(await refused({ ...run.lead.draft(note('Not mine.')), authorId: run.staff.witness.userId })).toBe('403 forbidden')
    expect(await refused(run.lead.draft({ kind: 'signed', payload: {} }))).toBe('409 own-route')
    expect(await refused(run.lead.draft({ kind: 'weighed', payload: {} }))).toBe('422 unknown-kind')
    expect(await refused(run.lead.draft({ kind: 'row-read', payload: { at: {} } }))).toBe('422 invalid')
    const press = new Device(run.staff.lead, run.pressId)
    const given = press.draft({ kind: 'test-opened', payload: { proofTestId: run.id, number: run.number } })
    expect(await refused(given, `/api/presses/${run.pressId}/entries`)).toBe('409 not-by-hand')
  })
})

describe('who reaches a ledger', () => {
  it('is nobody of another shop: 404 for reading and writing', async () => {
    const run = await ApiRun.open()
    const stranger = await openShop({ shopName: 'Elsewhere' })
    for (const path of [run.path, `/api/presses/${run.pressId}/entries`]) {
      await stranger.client.get(path).expect(404)
      const sent = await stranger.client.post(path, {
        sentAt: new Date().toISOString(),
        entries: [new Device(stranger, path.split('/')[3] ?? '').draft(note('Hello.'))],
      })
      expect(sent.status).toBe(404)
    }
    await stranger.client.get(`/api/proof-tests/${newId()}/entries`).expect(404)
  })

  it('is not the crew: they read, and may neither enter a press nor open a test nor add to one', async () => {
    const run = await ApiRun.open()
    const { crew } = run.staff
    await crew.client.get(run.path).expect(200)
    const { results } = await post(crew, run.path, [new Device(crew, run.id).draft(note('From the crew.'))])
    expect(results[0]).toMatchObject({ outcome: 'refused', problem: { status: 403 } })
    const request = await run.request()
    await crew.client.post(`/api/proof-tests?shop=${crew.shopId}`, { ...request, id: newId() }).expect(403)
  })
})

describe('opening a test', () => {
  it('is answered the same when it is sent twice, and takes the press', async () => {
    const staff = await openStaffedShop()
    const pressId = await enterPress(staff.lead)
    const sent: object[] = []
    const run = await ApiRun.open({ staff, pressId, change: (request) => (sent.push(request), request) })
    const again = await staff.lead.client.post(`/api/proof-tests?shop=${staff.lead.shopId}`, sent[0]).expect(201)
    expect(again.body).toEqual({ id: run.id, number: run.number })
    expect((await pressOf(run)).underTest?.number).toBe(run.number)
    const second = await staff.lead.client
      .post(`/api/proof-tests?shop=${staff.lead.shopId}`, { ...sent[0], id: newId(), entryId: newId() })
      .expect(409)
    expect(problemSchema.parse(second.body)).toMatchObject({ rules: ['P11'] })
  })

  it('freezes the joints as described, with the sizes that the load path check needs', async () => {
    const staff = await openStaffedShop()
    const weld = {
      kind: 'weld' as const,
      size: { by: 'leg' as const, value: { text: '8', unit: 'mm' as const } },
      length: { text: '300', unit: 'mm' as const },
      electrode: { grade: 'E70' as const },
      base: null,
      loadShare: null,
    }
    const pressId = await enterPress(staff.lead, ({ joints }) => ({
      joints: joints.map((joint, index) => (index === 0 ? { ...joint, kind: 'weld', strength: weld } : joint)),
    }))
    const run = await ApiRun.open({ staff, pressId })
    const described = (await pressOf(run)).joints[0]
    expect(described?.strength).toMatchObject({ kind: 'weld' })
    expect(run.state.opened?.joints[0]?.strength).toEqual(described?.strength)
  })

  it('refuses, at the field, a witness who may not be one, and by rule R5 the lead as own witness', async () => {
    const staff = await openStaffedShop()
    const asWitness = (id: string) =>
      ApiRun.open({ staff, change: (request) => ({ ...request, witness: { ...request.witness, id } }) }).catch(
        (error: Error) => error.message,
      )
    expect(await asWitness(staff.crew.userId)).toContain('422')
    expect(await asWitness(staff.lead.userId)).toContain('409')
  })
})

describe('a whole test over HTTP', () => {
  it('goes from the walk-down to a sealed record and clears the press', async () => {
    const run = await ApiRun.open()
    await run.driveTo('sign')
    expect(run.state.conclusion?.conclusion).toBe('accepted')

    const wrong = await run.sign('lead', { password: 'not this one' }).expect(422)
    expect(problemSchema.parse(wrong.body).fields).toHaveProperty('password')
    await run.sign('witness').expect(409)
    const stale = await run.sign('lead', { headHash: 'f'.repeat(64) }).expect(409)
    expect(stale.body.code).toBe('stale-head')

    await run.sign('lead').expect(201)
    await run.refresh()
    expect((await pressOf(run)).clearance.is).toBe('suspended')
    expect(await projection('presses', run.pressId)).toMatchObject({ status: 'suspended' })
    await run.sign('lead').expect(409)
    const figures = evaluateTest(run.state).clearance
    await run.sign('witness').expect(201)
    await run.refresh()

    const press = await pressOf(run)
    expect(press.clearance).toMatchObject({
      is: 'cleared',
      clearance: { load: { text: figures?.text, unit: 'short-ton' }, proofTestId: run.id, staticLoads: 1 },
    })
    expect(press.underTest).toBeNull()
    const late = await run.send(run.lead, note('Too late.'))
    expect(late.outcome === 'kept' && late.entry.irregular).toEqual(['R3'])
    expect((await pressOf(run)).clearance.is).toBe('suspended')

    const response = await run.staff.witness.client.get(run.path).expect(200)
    const { sealed, entries } = entriesResponseSchema.parse(response.body)
    const { publicKey } = loadSealKey(testServer().context.config)
    expect(sealed).toHaveLength(2)
    for (const seal of sealed) {
      expect(checkSeal({ ...seal, ledgerId: run.id }, publicKey)).toBe(true)
      expect(checkSeal({ ...seal, ledgerId: run.id, headHash: 'e'.repeat(64) }, publicKey)).toBe(false)
      expect(entries.find((entry) => entry.seq === seal.seq)?.hash).toBe(seal.headHash)
    }
    expect(checkChain(await stored(run.id)).whole).toBe(true)
    expect(checkChain(await stored(run.pressId)).whole).toBe(true)
  })

  it('is stopped where the frame softens, withdraws the press, and cannot be accepted', async () => {
    const run = await ApiRun.open()
    await run.driveTo('stop-now', { stiffness: (percent) => (percent < 75 ? 60e6 : 48e6), set: 0.0004 })
    await run.driveTo('sign', { stiffness: () => 48e6, set: 0.0004 })
    expect(run.state.stopped?.why).toContain('Softening')
    expect(run.state.conclusion?.conclusion).toBe('rejected')
    const press = await pressOf(run)
    expect(press.clearance.is).toBe('withdrawn')
    expect(press.joints.every((joint) => joint.examination === null)).toBe(true)
    expect(await projection('presses', run.pressId)).toMatchObject({ status: 'withdrawn', joints_accepted: 0 })
    expect(await projection('proof_tests', run.id)).toMatchObject({
      status: 'concluded',
      result: 'rejected',
      stopped_at_percent: 75,
      reached_percent: 75,
    })
  })

  it('goes back to the lead when the witness declines', async () => {
    const run = await ApiRun.open()
    await run.driveTo('sign')
    await run.sign('lead').expect(201)
    await run.refresh()
    const decline = {
      as: 'decline',
      entryId: newId(),
      password: run.staff.witness.password,
      headHash: run.state.headHash,
      why: 'I did not see the set read.',
    }
    await run.staff.witness.client.post(`/api/proof-tests/${run.id}/signatures`, decline).expect(201)
    await run.refresh()
    await run.sign('lead').expect(409)
    await run.driveTo('sign')
    await run.sign('lead').expect(201)
  })
})

describe('the other protocols', () => {
  it('off-centre: two legs, each with its own datum, climb and set', async () => {
    const run = await ApiRun.open({ protocol: 'Off-centre' })
    await run.driveTo('sign')
    expect(run.state.conclusion?.conclusion).toBe('accepted')
    expect(run.state.legs.map((leg) => leg.climbs.map((climb) => [climb.stages.length, climb.set.length]))).toEqual([[[4, 1]], [[4, 1]]])
    await run.sign('lead').expect(201)
    await run.refresh()
    await run.sign('witness').expect(201)
    const { clearance } = await pressOf(run)
    expect(clearance).toMatchObject({
      is: 'cleared',
      clearance: { ramPositions: ['far left', 'far right'], bedHoles: ['4', '5'], staticLoads: 2 },
    })
  })

  it('above rating: asks how far and by which rule, and goes there in a second climb from a new datum', async () => {
    const without = await ApiRun.open({ protocol: 'Proof above rating' }).catch((error: Error) => error.message)
    expect(without).toContain('422')
    expect(without).toContain('aboveRating.percent')
    const above = { percent: 110, rule: 'Customer’s order, clause 4' }
    const run = await ApiRun.open({ protocol: 'Proof above rating', change: (request) => ({ ...request, aboveRating: above }) })
    await run.driveTo('sign')
    expect(run.state.conclusion?.conclusion).toBe('accepted')
    const first = ['25/60', '50/60', '75/120', '100/300']
    const second = ['25/60', '50/60', '75/60', '100/60', '110/600']
    expect(
      run.state.legs.map((leg) => leg.climbs.map((climb) => climb.stages.map((stage) => `${stage.percent}/${stage.holdSeconds}`))),
    ).toEqual([
      [first, second],
      [first, second],
    ])
    expect(run.state.opened?.protocol.content.aboveRatingRule).toBe(above.rule)
    expect(await projection('proof_tests', run.id)).toMatchObject({ reached_percent: 110 })
    // Never above the rating, however far the proof went.
    expect(evaluateTest(run.state).clearance?.load).toBeLessThanOrEqual(12 * 8896.443230521)
  })

  it('above rating: never past a component’s rating', async () => {
    const far = { percent: 150, rule: 'Customer’s order, clause 4' }
    const change = (request: OpenTestRequest) => ({ ...request, aboveRating: far })
    expect(await ApiRun.open({ protocol: 'Proof above rating', change }).catch((error: Error) => error.message)).toContain('R6')
  })
})

describe('a gauge found out of tolerance', () => {
  it('suspends the clearance that rests on it, in the same transaction', async () => {
    const run = await ApiRun.open()
    await run.driveTo('sign')
    await run.sign('lead').expect(201)
    await run.refresh()
    await run.sign('witness').expect(201)
    const gaugeId = run.state.opened?.forceInstrumentIds[0] ?? ''
    expect((await pressOf(run)).clearance.is).toBe('cleared')
    const today = new Date().toISOString().slice(0, 10)
    const found = {
      calibratedOn: today,
      dueOn: '2099-01-01',
      certificate: 'C-9',
      comparedWith: '',
      result: 'out of tolerance',
      uncertainty: null,
    }
    await run.staff.lead.client.post(`/api/instruments/${gaugeId}/calibrations`, found).expect(201)
    expect((await pressOf(run)).clearance).toMatchObject({ is: 'suspended', why: expect.stringContaining('out of tolerance') })
    expect(await projection('presses', run.pressId)).toMatchObject({ status: 'suspended' })
  })
})

describe('the lists', () => {
  it('show what a rebuild from the ledgers would show', async () => {
    const run = await ApiRun.open()
    await run.driveTo('begin-stage')
    const shown = [await projection('presses', run.pressId), await projection('proof_tests', run.id)]
    const { database } = testServer().context
    await database.query('DELETE FROM proof_tests WHERE id = ?', { replacements: [run.id] })
    await database.query("UPDATE presses SET status = 'cleared', name = 'Altered' WHERE id = ?", { replacements: [run.pressId] })
    expect(await rebuildProjections(database)).toBeGreaterThan(1)
    expect([await projection('presses', run.pressId), await projection('proof_tests', run.id)]).toEqual(shown)
  })
})
