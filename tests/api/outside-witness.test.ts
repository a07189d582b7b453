import { describe, expect, it } from 'vitest'
import { v7 as newId } from 'uuid'
import { instrumentListSchema } from '#shared/api/instruments'
import { invitationsResponseSchema } from '#shared/api/invitations'
import { sessionResponseSchema } from '#shared/api/session'
import { ApiRun, enterPress, type Staff } from '../factories/api-run'
import { ApiClient } from '../factories/client'
import { lettersOf, tokenIn } from '../factories/mail'
import { freshEmail, openStaffedShop, type SignedInPerson } from '../factories/people'

const password = 'a password of my own'

/** Somebody from outside who was invited to the next test of a press and accepted. */
async function outsideWitness(staff: Staff, pressId: string, email = freshEmail()): Promise<SignedInPerson> {
  const { owner, lead } = staff
  await lead.client.post(`/api/invitations?shop=${lead.shopId}`, { kind: 'witness', email, pressId }).expect(201)
  const token = tokenIn((await lettersOf(owner, 'invitation')).find((one) => one.to === email))
  const client = new ApiClient()
  const answer = await client.post('/api/invitations/accept', { token, name: 'Wanda Frey', newPassword: password }).expect(201)
  const { user } = sessionResponseSchema.parse(answer.body)
  return { client, userId: user.id, name: user.name, email, password, shopId: lead.shopId }
}

async function openWithOutsider() {
  const staff = await openStaffedShop()
  const pressId = await enterPress(staff.lead)
  const witness = await outsideWitness(staff, pressId)
  const run = await ApiRun.open({ staff: { ...staff, witness }, pressId })
  return { staff, witness, pressId, run }
}

describe('a witness from outside', () => {
  it('attends, reads, countersigns and gets the sealed record by mail', async () => {
    const { staff, witness, run } = await openWithOutsider()
    expect(run.state.opened?.people.witness).toMatchObject({ id: witness.userId, name: 'Wanda Frey' })
    await run.driveTo('sign')
    await run.sign('lead').expect(201)
    await run.refresh()
    const wanted = (await lettersOf(staff.owner, 'countersignature-wanted')).filter((one) => one.to === witness.email)
    expect(wanted.length).toBe(1)
    expect(wanted[0]?.text).toContain(`/proof-tests/${run.id}`)
    await run.sign('witness').expect(201)
    await run.refresh()
    expect(run.state.countersigned?.printedName).toBe('Wanda Frey')
    const seals = (await lettersOf(staff.owner, 'record-sealed')).filter((one) => one.subject.endsWith('countersigned and sealed'))
    expect(seals.map(({ to }) => to).sort()).toEqual([staff.owner.email, staff.lead.email, witness.email].sort())
    const entries = (await witness.client.get(`/api/proof-tests/${run.id}/entries`).expect(200)).body as {
      sealed: { headHash: string; kid: string; signature: string }[]
    }
    const seal = entries.sealed.at(-1)
    for (const text of [run.number, seal?.headHash, seal?.kid, seal?.signature, 'accepted', '/check']) {
      expect(seals[0]?.text).toContain(text)
      expect(seals[0]?.html).toContain(text)
    }
    const cleared = await lettersOf(staff.owner, 'clearance-given')
    expect(cleared.map(({ to }) => to).sort()).toEqual([staff.owner.email, staff.lead.email].sort())
    expect(cleared[0]?.text).not.toMatch(/\bsafe\b|approved|\byes\b/i)
  })

  it('may decline, and everybody is told why', async () => {
    const { staff, witness, run } = await openWithOutsider()
    await run.driveTo('sign')
    await run.sign('lead').expect(201)
    await run.refresh()
    const decline = { as: 'decline', why: 'I did not see the hold at 75 %.', entryId: newId(), password, headHash: run.state.headHash }
    await witness.client.post(`/api/proof-tests/${run.id}/signatures`, decline).expect(201)
    const told = await lettersOf(staff.owner, 'declined')
    expect(told.map(({ to }) => to).sort()).toEqual([staff.owner.email, staff.lead.email, witness.email].sort())
    expect(told[0]?.text).toContain('I did not see the hold at 75 %.')
  })

  it('sees that one test, with everything that belongs to its record', async () => {
    const { witness, run } = await openWithOutsider()
    const { client } = witness
    for (const path of ['', '/entries', '/ledger.json', '/record.xlsx', '/record.pdf', '/attachments']) {
      await client.get(`/api/proof-tests/${run.id}${path}`).expect(200)
    }
    const session = sessionResponseSchema.parse((await client.get('/api/session').expect(200)).body)
    expect(session.shops).toEqual([])
    const pressName = run.state.opened?.press.name
    expect(session.guestOf).toMatchObject([{ pressName, test: { proofTestId: run.id, number: run.number } }])
  })

  it('finds nothing else of the shop: no list, no press, no other test, no person, no instrument, no letter', async () => {
    const { staff, witness, run, pressId } = await openWithOutsider()
    const { client, shopId } = witness
    const other = await ApiRun.open({ staff })
    const { instruments } = instrumentListSchema.parse((await staff.lead.client.get(`/api/instruments?shop=${shopId}`).expect(200)).body)
    const instrument = instruments[0]?.id ?? ''
    const letter = (await lettersOf(staff.owner))[0]?.id ?? ''
    const lists = ['people', 'presses', 'instruments', 'protocols', 'proof-tests', 'tooling', 'today', 'mail', 'invitations']
    const paths = [
      ...lists.map((list) => `/api/${list}?shop=${shopId}`),
      `/api/calendar?shop=${shopId}&from=2026-01-01&to=2030-01-01`,
      `/api/shops/${shopId}`,
      `/api/presses/${pressId}`,
      ...['entries', 'ledger.json', 'attachments', 'history'].map((tail) => `/api/presses/${pressId}/${tail}`),
      `/api/instruments/${instrument}`,
      `/api/protocols/${run.state.opened?.protocol.id}`,
      `/api/proof-tests/${other.id}`,
      ...['entries', 'ledger.json', 'record.xlsx', 'record.pdf', 'attachments'].map((tail) => `/api/proof-tests/${other.id}/${tail}`),
      `/api/mail/${letter}`,
      `/api/stream?ledgers=${other.id}`,
      `/api/stream?ledgers=${pressId}`,
    ]
    const answers: [string, number][] = []
    for (const path of paths) answers.push([path, (await client.get(path)).status])
    expect(answers.filter(([, status]) => status !== 404)).toEqual([])
    await client
      .post(`/api/proof-tests/${other.id}/entries`, {
        sentAt: new Date().toISOString(),
        entries: [other.witness.draft({ kind: 'observed', payload: { at: null, what: 'noise', note: 'x' } })],
      })
      .expect(404)
    await client.post(`/api/proof-tests?shop=${shopId}`, await other.request()).expect(404)
    await client.post(`/api/invitations?shop=${shopId}`, { kind: 'witness', email: freshEmail(), pressId }).expect(404)
    await client.patch(`/api/people/${witness.userId}?shop=${shopId}`, { role: 'owner' }).expect(404)
  })

  it('is named in one test by one invitation: not of another press, not again, not in another shop', async () => {
    const { staff, witness, pressId } = await openWithOutsider()
    const elsewhere = await enterPress(staff.lead)
    await expect(ApiRun.open({ staff: { ...staff, witness }, pressId: elsewhere })).rejects.toThrow(/witness.id/)
    await expect(ApiRun.open({ staff: { ...staff, witness }, pressId })).rejects.toThrow(/witness.id/)
    const other = await openStaffedShop()
    await expect(ApiRun.open({ staff: { ...other, witness } })).rejects.toThrow(/witness.id/)
  })

  it('loses sight of the test when the lead ends it, and what was entered stays', async () => {
    const { staff, witness, run } = await openWithOutsider()
    const { guests } = invitationsResponseSchema.parse(
      (await staff.lead.client.get(`/api/invitations?shop=${staff.lead.shopId}`).expect(200)).body,
    )
    expect(guests).toMatchObject([{ name: 'Wanda Frey', test: { proofTestId: run.id, number: run.number } }])
    await staff.lead.client.delete(`/api/invitations/${guests[0]?.invitationId}`).expect(204)
    await witness.client.get(`/api/proof-tests/${run.id}`).expect(404)
    await witness.client.get(`/api/proof-tests/${run.id}/entries`).expect(404)
    await staff.lead.client.get(`/api/proof-tests/${run.id}/entries`).expect(200)
  })

  it('who has not accepted yet can’t be named', async () => {
    const staff = await openStaffedShop()
    const stranger = await openStaffedShop()
    await expect(ApiRun.open({ staff: { ...staff, witness: stranger.witness } })).rejects.toThrow(/witness.id/)
  })
})
