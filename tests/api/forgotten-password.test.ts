import { QueryTypes } from 'sequelize'
import { describe, expect, it } from 'vitest'
import { RESET_MINUTES } from '#shared/api/invitations'
import { problemSchema } from '#shared/api/problem'
import { failuresPerAccount } from '#server/services/sign-in-limits'
import { ApiClient } from '../factories/client'
import { lettersOf, tokenIn } from '../factories/mail'
import { addPerson, freshEmail, openShop, openStaffedShop, password, signIn, type SignedInPerson } from '../factories/people'
import { testServer } from '../support/api-server'

const codeOf = (response: { body: unknown }) => problemSchema.parse(response.body).code
const newPassword = 'a quite new password'
const ask = (email: string) => new ApiClient().post('/api/password-resets', { email })
const use = (token: string, chosen = newPassword) => new ApiClient().post('/api/password-resets/use', { token, newPassword: chosen })

async function linkFor(owner: SignedInPerson, email: string): Promise<string> {
  await ask(email).expect(202)
  return tokenIn((await lettersOf(owner, 'password-reset')).find((one) => one.to === email))
}

describe('a forgotten password', () => {
  it('is set anew by a link, which ends every session and tells the address', async () => {
    const shop = await openStaffedShop()
    const token = await linkFor(shop.owner, shop.lead.email)
    await new ApiClient().post('/api/password-resets/look', { token }).expect(204)
    await use(token).expect(204)
    await shop.lead.client.get('/api/session').expect(401)
    await new ApiClient().post('/api/session', { email: shop.lead.email, password }).expect(401)
    await signIn(shop.lead.email, { password: newPassword })
    const [notice] = await lettersOf(shop.owner, 'password-changed')
    expect(notice).toMatchObject({ to: shop.lead.email, subject: 'Your Quarterload password was changed' })
    await shop.owner.client.get('/api/session').expect(200)
  })

  it('answers alike whether the address has an account', async () => {
    const owner = await openShop()
    const [known, unknown] = [await ask(owner.email), await ask(freshEmail())]
    expect([known.status, known.body]).toEqual([unknown.status, unknown.body])
    expect((await lettersOf(owner, 'password-reset')).length).toBe(1)
  })

  it('has a link that works once, for an hour, and ends with any that is used', async () => {
    const owner = await openShop()
    const [first, second] = [await linkFor(owner, owner.email), await linkFor(owner, owner.email)]
    await use(first).expect(204)
    owner.client = await signIn(owner.email, { password: newPassword })
    for (const token of [first, second]) expect(codeOf(await use(token, 'yet another one').expect(410))).toBe('used')
    const third = await linkFor(owner, owner.email)
    testServer().moveClock(RESET_MINUTES * 60_000 + 1000)
    expect(codeOf(await use(third).expect(410))).toBe('expired')
    expect(codeOf(await use('A'.repeat(43)).expect(410))).toBe('unknown-link')
    await use(third, 'short').expect(422)
  })

  it('sends three letters an hour to one account, and is limited as signing in is', async () => {
    const owner = await openShop()
    for (let count = 0; count < failuresPerAccount; count += 1) await ask(owner.email).expect(202)
    expect(codeOf(await ask(owner.email).expect(429))).toBe('too-many-attempts')
    expect((await lettersOf(owner, 'password-reset')).length).toBe(3)
    // Signing in is another door: who asks for letters can’t shut it.
    await signIn(owner.email)
  })

  it('of somebody in two shops is read by neither owner, since it opens both', async () => {
    const [one, two] = [await openShop(), await openShop()]
    const both = await addPerson(one, 'lead')
    await addPerson(two, 'owner', { email: both.email })
    await ask(both.email).expect(202)
    expect(await lettersOf(one, 'password-reset')).toEqual([])
    expect(await lettersOf(two, 'password-reset')).toEqual([])
    const { database } = testServer().context
    const [kept] = await database.query<{ shopId: string | null }>('SELECT shop_id AS shopId FROM mail_messages WHERE user_id = ?', {
      replacements: [both.userId],
      type: QueryTypes.SELECT,
    })
    expect(kept).toEqual({ shopId: null })
  })

  it('keeps its secret as a hash', async () => {
    const owner = await openShop()
    const token = await linkFor(owner, owner.email)
    const { database } = testServer().context
    expect(JSON.stringify(await database.query('SELECT * FROM password_resets', { type: QueryTypes.SELECT }))).not.toContain(token)
  })

  it('changed while signed in is told to the address too', async () => {
    const owner = await openShop()
    await owner.client.post('/api/session/password', { currentPassword: password, newPassword }).expect(204)
    const [notice] = await lettersOf(owner, 'password-changed')
    expect(notice?.text).toMatch(/changed on a device that was signed in/)
  })
})

describe('a page reached by a secret link', () => {
  it('sends no referrer anywhere', async () => {
    const response = await new ApiClient().post('/api/invitations/look', { token: 'A'.repeat(43) }).expect(404)
    expect(response.headers['referrer-policy']).toBe('no-referrer')
  })
})
