import request from 'supertest'
import { describe, expect, it } from 'vitest'
import { problemSchema } from '#shared/api/problem'
import { sessionResponseSchema } from '#shared/api/session'
import { verifyPassword } from '#server/services/sessions'
import { failuresPerAccount, failuresPerAddress } from '#server/services/sign-in-limits'
import { ApiClient } from '../factories/client'
import { freshEmail, openShop, password, signIn } from '../factories/people'
import { testServer } from '../support/api-server'

const wrong = 'not the password'

function codeOf(response: { body: unknown }): string {
  return problemSchema.parse(response.body).code
}

describe('signing in', () => {
  it('gives a session that says who I am and which shops are mine', async () => {
    const owner = await openShop({ shopName: 'Mill Yard' })
    const client = await signIn(owner.email)
    const session = sessionResponseSchema.parse((await client.get('/api/session').expect(200)).body)
    expect(session.user).toEqual({ id: owner.userId, name: owner.name, email: owner.email })
    expect(session.shops).toMatchObject([{ id: owner.shopId, name: 'Mill Yard', role: 'owner' }])
  })

  it('takes the e-mail address in any case and with spaces around it', async () => {
    const owner = await openShop()
    await new ApiClient().post('/api/session', { email: ` ${owner.email.toUpperCase()} `, password }).expect(200)
  })

  it('puts the token where scripts and other sites cannot use it', async () => {
    const owner = await openShop()
    const response = await new ApiClient().post('/api/session', { email: owner.email, password }).expect(200)
    const cookie = String(response.headers['set-cookie'])
    expect(cookie).toMatch(/HttpOnly/)
    expect(cookie).toMatch(/SameSite=Lax/)
    expect(cookie).not.toMatch(/Secure/)
    expect(JSON.stringify(response.body)).not.toContain('password')
  })

  it('says the same about a wrong password as about an unknown address', async () => {
    const owner = await openShop()
    const first = await new ApiClient().post('/api/session', { email: owner.email, password: wrong }).expect(401)
    const second = await new ApiClient().post('/api/session', { email: freshEmail(), password: wrong }).expect(401)
    expect(codeOf(first)).toBe('wrong-sign-in')
    expect(second.body).toEqual(first.body)
  })

  it('names each field that is missing', async () => {
    const response = await new ApiClient().post('/api/session', { email: 'nobody' }).expect(422)
    expect(response.type).toBe('application/problem+json')
    expect(problemSchema.parse(response.body).fields).toEqual({
      email: 'Enter a whole e-mail address, such as name@shop.example.',
      password: 'Enter the password.',
    })
  })

  it('takes no token that the server did not sign, and none without a session behind it', async () => {
    const forged = 'eyJhbGciOiJub25lIn0.eyJzaWQiOiJ4In0.'
    await request(testServer().app).get('/api/session').set('Cookie', `quarterload_session=${forged}`).expect(401)
    await request(testServer().app).get('/api/session').expect(401)
  })
})

describe('the limits of signing in', () => {
  it('refuse an account after ten wrong passwords, the right one too, whatever address they come from', async () => {
    const owner = await openShop()
    for (let count = 0; count < failuresPerAccount; count += 1) {
      await new ApiClient().post('/api/session', { email: owner.email, password: wrong }).expect(401)
    }
    const refused = await new ApiClient().post('/api/session', { email: owner.email, password }).expect(429)
    expect(codeOf(refused)).toBe('too-many-attempts')
    expect(refused.headers['retry-after']).toBe('900')
    await owner.client.get('/api/session').expect(200)
    testServer().moveClock(15 * 60_000 + 1_000)
    await new ApiClient().post('/api/session', { email: owner.email, password }).expect(200)
  })

  it('hold against many attempts at the same moment', async () => {
    const owner = await openShop()
    const attempts = Array.from({ length: 30 }, () => new ApiClient().post('/api/session', { email: owner.email, password: wrong }))
    const statuses = (await Promise.all(attempts)).map((response) => response.status)
    expect(statuses.filter((status) => status === 401).length).toBeLessThanOrEqual(failuresPerAccount)
    expect(statuses.filter((status) => status === 429).length).toBeGreaterThanOrEqual(30 - failuresPerAccount)
  })

  it('refuse an address that tries many accounts, and no other address', async () => {
    const client = new ApiClient()
    const owner = await openShop()
    for (let count = 0; count < failuresPerAddress; count += 1) {
      await client.post('/api/session', { email: freshEmail(), password: wrong }).expect(401)
    }
    await client.post('/api/session', { email: owner.email, password }).expect(429)
    await signIn(owner.email)
  })

  it('start again after the right password', async () => {
    const owner = await openShop()
    for (let round = 0; round < 2; round += 1) {
      for (let count = 0; count < failuresPerAccount - 1; count += 1) {
        await new ApiClient().post('/api/session', { email: owner.email, password: wrong }).expect(401)
      }
      await signIn(owner.email)
    }
  })

  it('count the password that a signature asks for as well', async () => {
    const owner = await openShop()
    const { context } = testServer()
    expect(await verifyPassword(context, owner.userId, password, '10.1.1.1')).toBe(true)
    for (let count = 0; count < failuresPerAccount; count += 1) {
      expect(await verifyPassword(context, owner.userId, wrong, '10.1.1.1')).toBe(false)
    }
    await expect(verifyPassword(context, owner.userId, password, '10.1.1.1')).rejects.toMatchObject({ status: 429 })
  })
})

describe('a session', () => {
  it('ends on the server when its person signs out, so that a copied cookie is worth nothing', async () => {
    const owner = await openShop()
    const response = await new ApiClient().post('/api/session', { email: owner.email, password }).expect(200)
    const copied = String(response.headers['set-cookie']).split(';')[0] ?? ''
    const withCookie = () => request(testServer().app).get('/api/session').set('Cookie', copied)
    await withCookie().expect(200)
    await request(testServer().app).delete('/api/session').set('Cookie', copied).set('Sec-Fetch-Site', 'same-origin').expect(204)
    await withCookie().expect(401)
    await owner.client.get('/api/session').expect(200)
  })

  it('runs out after fourteen days', async () => {
    const owner = await openShop()
    testServer().moveClock(14 * 24 * 3_600_000 - 60_000)
    await owner.client.get('/api/session').expect(200)
    testServer().moveClock(2 * 60_000)
    expect(codeOf(await owner.client.get('/api/session').expect(401))).toBe('not-signed-in')
  })

  it('can be left without having one', async () => {
    await new ApiClient().delete('/api/session').expect(204)
  })
})

describe('changing the password', () => {
  const newPassword = 'an even longer one'

  it('takes the new one, refuses the old one, and ends the other sessions', async () => {
    const owner = await openShop()
    const elsewhere = await signIn(owner.email)
    await owner.client.post('/api/session/password', { currentPassword: password, newPassword }).expect(204)
    await owner.client.get('/api/session').expect(200)
    await elsewhere.get('/api/session').expect(401)
    await new ApiClient().post('/api/session', { email: owner.email, password }).expect(401)
    await signIn(owner.email, { password: newPassword })
  })

  it('asks for the present one', async () => {
    const owner = await openShop()
    const response = await owner.client.post('/api/session/password', { currentPassword: wrong, newPassword }).expect(422)
    expect(problemSchema.parse(response.body).fields).toEqual({ currentPassword: 'This is not your present password.' })
    await signIn(owner.email)
  })

  it('refuses one that is short, and one whose end bcrypt would not read', async () => {
    const owner = await openShop()
    for (const [bad, sentence] of [
      ['short', 'Use at least 10 characters.'],
      ['ü'.repeat(37), 'Use a shorter password: 72 bytes at most.'],
    ]) {
      const response = await owner.client.post('/api/session/password', { currentPassword: password, newPassword: bad }).expect(422)
      expect(problemSchema.parse(response.body).fields).toEqual({ newPassword: sentence })
    }
  })
})

describe('a write that does not come from our own page', () => {
  const body = { email: 'somebody@people.example', password: wrong }
  const post = () => request(testServer().app).post('/api/session').set('Host', 'press.example')

  it.each([
    ['without saying where it comes from', {}],
    ['from another origin', { Origin: 'https://elsewhere.example' }],
    ['from another port of the same host', { Origin: 'http://press.example:8080' }],
    ['from an opaque origin', { Origin: 'null' }],
    ['from another site', { 'Sec-Fetch-Site': 'cross-site' }],
    ['from a neighbouring host', { Origin: 'http://press.example', 'Sec-Fetch-Site': 'same-site' }],
  ])('is refused %s', async (_how, headers) => {
    expect(codeOf(await post().set(headers).send(body).expect(403))).toBe('cross-origin')
  })

  it.each([
    ['its own origin', { Origin: 'http://press.example' }],
    ['the same origin by the browser’s word', { 'Sec-Fetch-Site': 'same-origin' }],
  ])('is taken from %s', async (_how, headers) => {
    expect(codeOf(await post().set(headers).send(body).expect(401))).toBe('wrong-sign-in')
  })
})

describe('what is no proper request', () => {
  it('is told apart', async () => {
    const client = new ApiClient()
    expect(codeOf(await client.post('/api/session').expect(400))).toBe('no-json')
    expect(codeOf(await client.post('/api/session', '{').type('json').expect(400))).toBe('malformed-json')
    expect(codeOf(await client.get('/api/nothing-here').expect(404))).toBe('no-such-endpoint')
    expect(codeOf(await client.post('/api/session', { email: 'a', password: 'x'.repeat(3_000_000) }).expect(413))).toBe('too-large')
  })
})
