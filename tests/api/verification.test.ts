import { QueryTypes } from 'sequelize'
import { describe, expect, it } from 'vitest'
import { entriesResponseSchema } from '#shared/api/ledger'
import { problemSchema } from '#shared/api/problem'
import { verificationKeysSchema } from '#shared/api/verification'
import { fingerprintOf, kidOf } from '#shared/ledger/check-ledger'
import { verifyLedgerFile } from '#shared/ledger/verify-ledger-file'
import { rotateSealKey } from '#server/ledger/seal-keys'
import { ApiRun } from '../factories/api-run'
import { ApiClient } from '../factories/client'
import { openShop } from '../factories/people'
import { testServer } from '../support/api-server'

async function signedRun(): Promise<ApiRun> {
  const run = await ApiRun.open()
  await run.driveTo('sign')
  await run.sign('lead').expect(201)
  await run.refresh()
  await run.sign('witness').expect(201)
  await run.refresh()
  return run
}

async function servedFingerprints(): Promise<string[]> {
  const { body } = await new ApiClient().get('/api/verification/keys').expect(200)
  return verificationKeysSchema.parse(body).keys.map(({ publicKey }) => fingerprintOf(publicKey))
}

async function fileOf(run: ApiRun): Promise<Uint8Array> {
  const response = await run.staff.owner.client.get(`/api/proof-tests/${run.id}/ledger.json`).buffer(true).expect(200)
  expect(response.headers['content-disposition']).toBe(`attachment; filename="${run.number} Press 2.ledger.json"`)
  return new TextEncoder().encode(response.text)
}

/** Rewrites an entry behind the server's back, as somebody with the database can. */
async function alter(run: ApiRun, seq: number, from: string, to: string): Promise<void> {
  const { database } = testServer().context
  const [, changed] = await database.query(
    'UPDATE ledger_entries SET canonical = REPLACE(canonical, ?, ?) WHERE ledger_id = ? AND seq = ?',
    {
      replacements: [from, to, run.id, seq],
      type: QueryTypes.UPDATE,
    },
  )
  expect(changed).toBe(1)
}

describe('the keys that seal', () => {
  it('are served to whoever asks, with nothing secret in them', async () => {
    const { body } = await new ApiClient().get('/api/verification/keys').expect(200)
    const [today] = verificationKeysSchema.parse(body).keys
    expect(today?.retiredOn).toBeNull()
    expect(kidOf(today?.publicKey ?? '')).toBe(today?.kid)
    expect(Object.keys((body as { keys: object[] }).keys[0] ?? {}).sort()).toEqual(['kid', 'publicKey', 'retiredOn', 'since'])
  })
})

describe('a ledger file', () => {
  it('of a countersigned test is whole, by the keys that the server serves', async () => {
    const run = await signedRun()
    const check = verifyLedgerFile(await fileOf(run), { trustedKeys: await servedFingerprints() })
    expect(check).toMatchObject({ verdict: 'whole', entries: run.state.headSeq, afterSeal: [] })
    expect(check.verdict === 'whole' && check.seals.map(({ kind }) => kind)).toEqual(['signed', 'countersigned'])
  })

  it('still verifies after the key was changed, and what is sealed then does too', async () => {
    const run = await signedRun()
    const before = await fileOf(run)
    rotateSealKey(testServer().context.config, new Date())
    const trustedKeys = await servedFingerprints()
    expect(verifyLedgerFile(before, { trustedKeys })).toMatchObject({ verdict: 'whole' })
    const after = verifyLedgerFile(await fileOf(run), { trustedKeys })
    expect(after).toMatchObject({ verdict: 'whole' })
    expect(after.verdict === 'whole' && after.file.keys.map(({ retired }) => retired)).toEqual([false, true])
    const { body } = await run.staff.owner.client.get(`/api/proof-tests/${run.id}/entries`).expect(200)
    expect(entriesResponseSchema.parse(body).broken).toBeNull()
    const later = await signedRun()
    expect(verifyLedgerFile(await fileOf(later), { trustedKeys })).toMatchObject({ verdict: 'whole' })
  })

  it('of a test under way is not sealed yet; that of a press is whole', async () => {
    const run = await ApiRun.open()
    expect(verifyLedgerFile(await fileOf(run))).toMatchObject({ verdict: 'not sealed yet' })
    const press = await run.staff.owner.client.get(`/api/presses/${run.pressId}/ledger.json`).buffer(true).expect(200)
    expect(press.headers['content-disposition']).toBe('attachment; filename="Press 2.ledger.json"')
    expect(verifyLedgerFile(new TextEncoder().encode(press.text))).toMatchObject({
      verdict: 'whole',
      file: { subject: 'press', title: 'Press 2' },
    })
  })

  it('is refused to the crew, and unknown to other shops', async () => {
    const run = await ApiRun.open()
    const address = `/api/proof-tests/${run.id}/ledger.json` as const
    await run.staff.crew.client.get(address).expect(403)
    const stranger = await openShop()
    await stranger.client.get(address).expect(404)
    await stranger.client.get(`/api/presses/${run.pressId}/ledger.json`).expect(404)
    await new ApiClient().get(address).expect(401)
  })
})

describe('a signed record that was altered in the database', () => {
  it('says so wherever it is read, prints nothing, and hands out the evidence', async () => {
    const run = await signedRun()
    await alter(run, 1, '"number":"PT-', '"number":"PT-9')
    const { client } = run.staff.owner
    const { body } = await client.get(`/api/proof-tests/${run.id}/entries`).expect(200)
    expect(entriesResponseSchema.parse(body).broken).toMatchObject({ at: 1 })
    const part = await client.get(`/api/proof-tests/${run.id}/entries?after=5`).expect(200)
    expect(entriesResponseSchema.parse(part.body).broken).toMatchObject({ at: 1 })
    const refused = problemSchema.parse((await client.get(`/api/proof-tests/${run.id}/record.xlsx`).expect(409)).body)
    expect(refused).toMatchObject({ code: 'altered' })
    expect(refused.detail).toContain('This record was altered at entry 1.')
    expect(problemSchema.parse((await client.get(`/api/proof-tests/${run.id}/record.pdf`).expect(409)).body)).toEqual(refused)
    const response = await client.get(`/api/proof-tests/${run.id}/ledger.json`).buffer(true).expect(200)
    expect(verifyLedgerFile(new TextEncoder().encode(response.text))).toMatchObject({ verdict: 'altered', at: 1 })
    expect(testServer().loggedErrors.splice(0).join()).toContain('not whole')
  })

  it('is not countersigned, nor signed before that: no seal vouches for what was changed', async () => {
    const run = await ApiRun.open()
    await run.driveTo('sign')
    const drafts = await run.staff.owner.client.get(`/api/proof-tests/${run.id}/entries`).expect(200)
    const middle = entriesResponseSchema.parse(drafts.body).entries.find(({ kind }) => kind === 'row-read')?.seq ?? 0
    await alter(run, middle, '"unit":"mm"', '"unit":"in"')
    const unsigned = problemSchema.parse((await run.sign('lead').expect(409)).body)
    expect(unsigned).toMatchObject({ code: 'altered' })
    expect(unsigned.detail).toContain(`This record was altered at entry ${middle}.`)

    await alter(run, middle, '"unit":"in"', '"unit":"mm"')
    await run.sign('lead').expect(201)
    await run.refresh()
    await alter(run, middle, '"unit":"mm"', '"unit":"in"')
    expect(problemSchema.parse((await run.sign('witness').expect(409)).body)).toMatchObject({ code: 'altered' })
    const declined = { as: 'decline', why: 'I read another figure.', meaning: undefined }
    expect(problemSchema.parse((await run.sign('witness', declined).expect(409)).body)).toMatchObject({ code: 'altered' })

    await alter(run, middle, '"unit":"in"', '"unit":"mm"')
    await run.refresh()
    expect(run.state.countersigned).toBeNull()
    await run.sign('witness').expect(201)
    testServer().loggedErrors.splice(0)
  })

  it('is told in a sentence too when an entry can no longer be read at all', async () => {
    const run = await signedRun()
    await alter(run, 3, '{', '')
    const { body } = await run.staff.owner.client.get(`/api/proof-tests/${run.id}/entries`).expect(409)
    expect(problemSchema.parse(body).detail).toContain('This record was altered at entry 3.')
    testServer().loggedErrors.splice(0)
  })

  it('is found when its last seal is gone', async () => {
    const run = await signedRun()
    const { database } = testServer().context
    await database.query('DELETE FROM seals WHERE ledger_id = ? ORDER BY seq DESC LIMIT 1', { replacements: [run.id] })
    const { body } = await run.staff.owner.client.get(`/api/proof-tests/${run.id}/entries`).expect(200)
    expect(entriesResponseSchema.parse(body).broken).toMatchObject({ at: run.state.headSeq })
    testServer().loggedErrors.splice(0)
  })
})
