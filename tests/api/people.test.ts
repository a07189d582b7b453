import { randomUUID } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { peopleResponseSchema, personSchema } from '#shared/api/people'
import { problemSchema } from '#shared/api/problem'
import { sessionResponseSchema } from '#shared/api/session'
import { shopSchema } from '#shared/api/shops'
import { ApiClient } from '../factories/client'
import { addPerson, freshEmail, openShop, openStaffedShop, password, signIn } from '../factories/people'

function problemOf(response: { body: unknown }) {
  return problemSchema.parse(response.body)
}

describe('opening a shop', () => {
  it('makes its opener the owner and signs in', async () => {
    const owner = await openShop({ shopName: 'Harbour Steel', ownerName: 'Nils Roth' })
    const session = sessionResponseSchema.parse((await owner.client.get('/api/session').expect(200)).body)
    expect(session.user.name).toBe('Nils Roth')
    expect(session.shops).toMatchObject([{ name: 'Harbour Steel', role: 'owner', buildPauseDays: 30, walkDownHours: 12 }])
  })

  it('gives a person with an account a second shop, by the same password only', async () => {
    const owner = await openShop({ shopName: 'A first shop' })
    const second = { shopName: 'B second shop', ownerName: 'Ignored', email: owner.email }
    const refused = await new ApiClient().post('/api/shops', { ...second, password: 'another password' }).expect(422)
    expect(problemOf(refused).fields?.['email']).toMatch(/has an account already/)
    const client = new ApiClient()
    const opened = await client.post('/api/shops', { ...second, password }).expect(201)
    const session = sessionResponseSchema.parse(opened.body)
    expect(session.user).toMatchObject({ id: owner.userId, name: owner.name })
    expect(session.shops.map((shop) => shop.name)).toEqual(['A first shop', 'B second shop'])
  })

  it('makes one account of two attempts at the same moment', async () => {
    const body = { shopName: 'Twice', ownerName: 'Ida', email: freshEmail(), password }
    const answers = await Promise.all([new ApiClient().post('/api/shops', body), new ApiClient().post('/api/shops', body)])
    expect(answers.filter((answer) => answer.status === 201).length).toBeGreaterThanOrEqual(1)
    expect(answers.every((answer) => [201, 422].includes(answer.status))).toBe(true)
    await signIn(body.email)
  })

  it('says for each field what is wrong', async () => {
    const response = await new ApiClient()
      .post('/api/shops', { shopName: ' ', ownerName: 'Ida', email: 'x', password: 'short', forceUnit: 'ton' })
      .expect(422)
    expect(problemOf(response).fields).toMatchObject({
      shopName: 'Enter the name of the shop.',
      email: 'Enter a whole e-mail address, such as name@shop.example.',
      password: 'Use at least 10 characters.',
      forceUnit: expect.stringContaining('which ton'),
    })
  })
})

describe('the settings of a shop', () => {
  it('are read by everybody in it and changed by the owner', async () => {
    const shop = await openStaffedShop()
    const path = `/api/shops/${shop.owner.shopId}`
    const changed = await shop.owner.client.patch(path, { forceUnit: 'kN', walkDownHours: 8 }).expect(200)
    expect(shopSchema.parse(changed.body)).toMatchObject({ forceUnit: 'kN', walkDownHours: 8, buildPauseDays: 30 })
    for (const role of ['lead', 'witness', 'crew'] as const) {
      expect(shopSchema.parse((await shop[role].client.get(path).expect(200)).body).forceUnit).toBe('kN')
      expect(problemOf(await shop[role].client.patch(path, { name: 'Mine now' }).expect(403)).code).toBe('forbidden')
    }
  })

  it('refuse what they do not know', async () => {
    const owner = await openShop()
    await owner.client.patch(`/api/shops/${owner.shopId}`, { id: randomUUID() }).expect(422)
    const response = await owner.client.patch(`/api/shops/${owner.shopId}`, { walkDownHours: 0 }).expect(422)
    expect(problemOf(response).fields).toEqual({ walkDownHours: 'Enter whole hours, 1 to 24.' })
  })
})

describe('another shop', () => {
  it('is not there, no more than one that does not exist or an id that is none', async () => {
    const [mine, other] = [await openShop(), await openShop()]
    for (const shopId of [other.shopId, randomUUID(), 'nonsense']) {
      const answers = [
        await mine.client.get(`/api/shops/${shopId}`),
        await mine.client.patch(`/api/shops/${shopId}`, { name: 'Taken' }),
        await mine.client.get(`/api/people?shop=${shopId}`),
        await mine.client.post(`/api/people?shop=${shopId}`, { name: 'Me', email: freshEmail(), role: 'owner', password }),
        await mine.client.patch(`/api/people/${other.userId}?shop=${shopId}`, { ended: true }),
      ]
      expect(answers.map((answer) => answer.status)).toEqual([404, 404, 404, 404, 404])
    }
    await mine.client.patch(`/api/people/${other.userId}?shop=${mine.shopId}`, { ended: true }).expect(404)
    await other.client.get(`/api/shops/${other.shopId}`).expect(200)
  })

  it('is not there for somebody who is not signed in either', async () => {
    const owner = await openShop()
    await new ApiClient().get(`/api/shops/${owner.shopId}`).expect(401)
    await new ApiClient().get(`/api/people?shop=${owner.shopId}`).expect(401)
  })

  it('must be named: no shop is the active one', async () => {
    const owner = await openShop()
    expect(problemOf(await owner.client.get('/api/people').expect(422)).fields).toEqual({ shop: 'Name the shop.' })
  })
})

describe('the people of a shop', () => {
  it('are added by the owner, with a role and a first password that works', async () => {
    const owner = await openShop()
    const lead = await addPerson(owner, 'lead', { name: 'Lena Vogt' })
    const session = sessionResponseSchema.parse((await lead.client.get('/api/session').expect(200)).body)
    expect(session.shops).toMatchObject([{ id: owner.shopId, role: 'lead' }])
  })

  it('are listed for everybody, with e-mail addresses for the owner only', async () => {
    const shop = await openStaffedShop()
    const listFor = async (role: keyof typeof shop) =>
      peopleResponseSchema.parse((await shop[role].client.get(`/api/people?shop=${shop.owner.shopId}`).expect(200)).body).people
    expect((await listFor('owner')).map((person) => person.email)).toContain(shop.crew.email)
    for (const role of ['lead', 'witness', 'crew'] as const) {
      const people = await listFor(role)
      expect(people.map((person) => person.name)).toEqual(['Cora Lind', 'Ida Marsh', 'Lena Vogt', 'Wim Faber'])
      expect(people.every((person) => person.email === undefined)).toBe(true)
    }
  })

  it('are neither added nor changed by anybody else', async () => {
    const shop = await openStaffedShop()
    for (const role of ['lead', 'witness', 'crew'] as const) {
      const { client } = shop[role]
      const query = `?shop=${shop.owner.shopId}`
      await client.post(`/api/people${query}`, { name: 'New', email: freshEmail(), role: 'crew', password }).expect(403)
      await client.patch(`/api/people/${shop[role].userId}${query}`, { role: 'owner' }).expect(403)
      await client.patch(`/api/people/${shop.owner.userId}${query}`, { ended: true }).expect(403)
    }
  })

  it('may belong to several shops, with one account and its own password', async () => {
    const [first, second] = [await openShop({ shopName: 'One' }), await openShop({ shopName: 'Two' })]
    const witness = await addPerson(first, 'witness', { name: 'Wim Faber' })
    const response = await second.client
      .post(`/api/people?shop=${second.shopId}`, { name: 'Somebody else', email: witness.email, role: 'crew', password: 'not used at all' })
      .expect(201)
    expect(personSchema.parse(response.body)).toMatchObject({ userId: witness.userId, name: 'Wim Faber', role: 'crew' })
    const session = sessionResponseSchema.parse((await witness.client.get('/api/session').expect(200)).body)
    expect(session.shops.map(({ name, role }) => [name, role])).toEqual([
      ['One', 'witness'],
      ['Two', 'crew'],
    ])
    await new ApiClient().post('/api/session', { email: witness.email, password: 'not used at all' }).expect(401)
  })

  it('are not added twice, and come back after they left', async () => {
    const owner = await openShop()
    const crew = await addPerson(owner, 'crew')
    const again = { name: crew.name, email: crew.email, role: 'lead', password }
    const refused = await owner.client.post(`/api/people?shop=${owner.shopId}`, again).expect(422)
    expect(problemOf(refused).fields).toEqual({ email: 'This person belongs to the shop already.' })
    await owner.client.patch(`/api/people/${crew.userId}?shop=${owner.shopId}`, { ended: true }).expect(200)
    const back = await owner.client.post(`/api/people?shop=${owner.shopId}`, again).expect(201)
    expect(personSchema.parse(back.body)).toMatchObject({ userId: crew.userId, role: 'lead', endedAt: null })
  })

  it('lose the shop at once when they leave, stay on its list, and keep their account', async () => {
    const owner = await openShop()
    const lead = await addPerson(owner, 'lead')
    await owner.client.patch(`/api/people/${lead.userId}?shop=${owner.shopId}`, { ended: true }).expect(200)
    await lead.client.get(`/api/shops/${owner.shopId}`).expect(404)
    expect(sessionResponseSchema.parse((await lead.client.get('/api/session').expect(200)).body).shops).toEqual([])
    const { people } = peopleResponseSchema.parse((await owner.client.get(`/api/people?shop=${owner.shopId}`)).body)
    expect(people.map((person) => [person.userId, person.endedAt !== null])).toEqual([
      [owner.userId, false],
      [lead.userId, true],
    ])
  })

  it('change roles, and what they may do changes with them', async () => {
    const owner = await openShop()
    const crew = await addPerson(owner, 'crew')
    await owner.client.patch(`/api/people/${crew.userId}?shop=${owner.shopId}`, { role: 'owner' }).expect(200)
    await crew.client.patch(`/api/shops/${owner.shopId}`, { name: 'Renamed' }).expect(200)
  })

  it('always include an owner, also when two step down at once', async () => {
    const first = await openShop()
    const path = (userId: string) => `/api/people/${userId}?shop=${first.shopId}`
    expect(problemOf(await first.client.patch(path(first.userId), { role: 'crew' }).expect(409)).code).toBe('last-owner')
    expect(problemOf(await first.client.patch(path(first.userId), { ended: true }).expect(409)).code).toBe('last-owner')
    const second = await addPerson(first, 'owner')
    const answers = await Promise.all([
      first.client.patch(path(first.userId), { role: 'crew' }),
      second.client.patch(path(second.userId), { role: 'crew' }),
    ])
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 409])
  })

  it('get one change at a time', async () => {
    const owner = await openShop()
    const crew = await addPerson(owner, 'crew')
    const path = `/api/people/${crew.userId}?shop=${owner.shopId}`
    await owner.client.patch(path, { role: 'lead', ended: true }).expect(422)
    await owner.client.patch(path, {}).expect(422)
  })
})
