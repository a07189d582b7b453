import { randomUUID } from 'node:crypto'
import { QueryTypes } from 'sequelize'
import { describe, expect, it } from 'vitest'
import { INVITATION_DAYS, invitationLookSchema, invitationsResponseSchema } from '#shared/api/invitations'
import { problemSchema } from '#shared/api/problem'
import { sessionResponseSchema } from '#shared/api/session'
import { enterPress } from '../factories/api-run'
import { ApiClient } from '../factories/client'
import { lettersOf, tokenIn } from '../factories/mail'
import { addPerson, freshEmail, openShop, openStaffedShop, password, signIn, type SignedInPerson } from '../factories/people'
import { testServer } from '../support/api-server'

const codeOf = (response: { body: unknown }) => problemSchema.parse(response.body).code
const newPassword = 'a quite new password'

async function inviteMember(owner: SignedInPerson, email = freshEmail(), role = 'lead') {
  const response = await owner.client.post(`/api/invitations?shop=${owner.shopId}`, { kind: 'member', email, role }).expect(201)
  const letter = (await lettersOf(owner, 'invitation')).find((one) => one.to === email)
  return { id: (response.body as { id: string }).id, email, token: tokenIn(letter), letter }
}

const accept = (token: string, more: object = { name: 'Lena Vogt', newPassword }) =>
  new ApiClient().post('/api/invitations/accept', { token, ...more })
const look = (token: string) => new ApiClient().post('/api/invitations/look', { token })

describe('an invitation', () => {
  it('goes to the address by mail, says who invites to what, and makes an account with the chosen password', async () => {
    const owner = await openShop({ shopName: 'Kiln Lane Fabrication', ownerName: 'Ida Marsh' })
    const { email, token, letter } = await inviteMember(owner)
    expect(letter?.subject).toBe('Invitation to Kiln Lane Fabrication')
    expect(letter?.text).toMatch(/Ida Marsh invites you to Kiln Lane Fabrication/)
    expect(letter?.html).toContain(token)
    const shown = invitationLookSchema.parse((await look(token).expect(200)).body)
    expect(shown).toMatchObject({
      kind: 'member',
      role: 'lead',
      email,
      shopName: 'Kiln Lane Fabrication',
      invitedBy: 'Ida Marsh',
      hasAccount: false,
    })
    const session = sessionResponseSchema.parse((await accept(token).expect(201)).body)
    expect(session.user).toMatchObject({ email, name: 'Lena Vogt' })
    expect(session.shops).toMatchObject([{ id: owner.shopId, role: 'lead' }])
    await signIn(email, { password: newPassword })
  })

  it('is used once, also when it is used twice at the same moment', async () => {
    const owner = await openShop()
    const { token } = await inviteMember(owner)
    const answers = await Promise.all([accept(token), accept(token)])
    expect(answers.map((answer) => answer.status).sort()).toEqual([
      201,
      expect.toSatisfy((status: number) => status === 410 || status === 422),
    ])
    expect(codeOf(await accept(token).expect(410))).toBe('used')
    expect(codeOf(await look(token).expect(410))).toBe('used')
  })

  it('runs out, and can be taken back before', async () => {
    const owner = await openShop()
    const [late, revoked] = [await inviteMember(owner), await inviteMember(owner)]
    await owner.client.delete(`/api/invitations/${revoked.id}`).expect(204)
    expect(codeOf(await accept(revoked.token).expect(410))).toBe('revoked')
    testServer().moveClock(INVITATION_DAYS * 86_400_000 + 1000)
    expect(codeOf(await accept(late.token).expect(410))).toBe('expired')
    expect(codeOf(await look(late.token).expect(410))).toBe('expired')
  })

  it('sent again, ends the one before', async () => {
    const owner = await openShop()
    const first = await inviteMember(owner)
    await inviteMember(owner, first.email)
    expect(codeOf(await accept(first.token).expect(410))).toBe('revoked')
  })

  it('asks somebody with an account for its password, and lets nobody else have it', async () => {
    const other = await openShop({ shopName: 'Another' })
    const owner = await openShop({ shopName: 'Kiln Lane' })
    const { token } = await inviteMember(owner, other.email, 'witness')
    expect(invitationLookSchema.parse((await look(token).expect(200)).body).hasAccount).toBe(true)
    await accept(token).expect(422)
    await accept(token, { password: 'not the password' }).expect(422)
    const session = sessionResponseSchema.parse((await accept(token, { password }).expect(201)).body)
    expect(session.user.id).toBe(other.userId)
    expect(session.shops.map(({ name, role }) => [name, role])).toEqual([
      ['Another', 'owner'],
      ['Kiln Lane', 'witness'],
    ])
  })

  it('is not there with another token, and its token is nowhere in the database but in the letter that waits', async () => {
    const owner = await openShop()
    const { token } = await inviteMember(owner)
    const other = `${token.slice(0, -1)}${token.endsWith('A') ? 'B' : 'A'}`
    expect(codeOf(await look(other).expect(404))).toBe('not-found')
    await look('short').expect(422)
    const { database } = testServer().context
    const rows = await database.query<object>('SELECT * FROM invitations', { type: QueryTypes.SELECT })
    expect(JSON.stringify(rows)).not.toContain(token)
    const mail = await database.query<{ text: string; html: string }>('SELECT text, html FROM mail_messages', { type: QueryTypes.SELECT })
    expect(JSON.stringify(mail)).not.toContain(token)
  })

  it('to a role is the owner’s; a lead invites witnesses of tests, others nobody', async () => {
    const shop = await openStaffedShop()
    const pressId = await enterPress(shop.lead)
    const path = `/api/invitations?shop=${shop.owner.shopId}`
    for (const role of ['lead', 'witness', 'crew'] as const) {
      await shop[role].client.post(path, { kind: 'member', email: freshEmail(), role: 'crew' }).expect(403)
    }
    for (const role of ['witness', 'crew'] as const) {
      await shop[role].client.post(path, { kind: 'witness', email: freshEmail(), pressId }).expect(403)
      await shop[role].client.get(path).expect(403)
    }
    const member = await inviteMember(shop.owner)
    await shop.lead.client.post(path, { kind: 'witness', email: freshEmail(), pressId }).expect(201)
    const seen = async (role: 'owner' | 'lead') =>
      invitationsResponseSchema.parse((await shop[role].client.get(path).expect(200)).body).invitations.map(({ kind }) => kind)
    expect(await seen('owner')).toEqual(['witness', 'member'])
    expect(await seen('lead')).toEqual(['witness'])
    await shop.lead.client.delete(`/api/invitations/${member.id}`).expect(403)
  })

  it('of another shop is not there', async () => {
    const [owner, other] = [await openShop(), await openShop()]
    const { id } = await inviteMember(owner)
    await other.client.delete(`/api/invitations/${id}`).expect(404)
    await other.client.delete(`/api/invitations/${randomUUID()}`).expect(404)
    await other.client.get(`/api/invitations?shop=${owner.shopId}`).expect(404)
    await other.client.post(`/api/invitations?shop=${owner.shopId}`, { kind: 'member', email: freshEmail(), role: 'owner' }).expect(404)
    const strange = { kind: 'witness', email: freshEmail(), pressId: await enterPress(await addPerson(owner, 'lead')) }
    await other.client.post(`/api/invitations?shop=${other.shopId}`, strange).expect(422)
    const letter = (await lettersOf(owner))[0]
    await other.client.get(`/api/mail/${letter?.id}`).expect(404)
    await other.client.post(`/api/mail/${letter?.id}/retry`).expect(404)
    expect(await lettersOf(other)).toEqual([])
  })

  it('is refused for somebody who belongs to the shop already', async () => {
    const shop = await openStaffedShop()
    await shop.owner.client
      .post(`/api/invitations?shop=${shop.owner.shopId}`, { kind: 'member', email: shop.crew.email, role: 'lead' })
      .expect(422)
  })
})

describe('the shop’s letters', () => {
  it('are read by the owner and nobody else', async () => {
    const shop = await openStaffedShop()
    await inviteMember(shop.owner)
    const [letter] = await lettersOf(shop.owner)
    for (const role of ['lead', 'witness', 'crew'] as const) {
      await shop[role].client.get(`/api/mail?shop=${shop.owner.shopId}`).expect(403)
      await shop[role].client.get(`/api/mail/${letter?.id}`).expect(403)
    }
    await new ApiClient().get(`/api/mail/${letter?.id}`).expect(401)
  })
})
