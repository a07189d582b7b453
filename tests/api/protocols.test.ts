import { randomUUID } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { inTransaction } from '#server/context'
import { protocolForTest } from '#server/services/protocols'
import { problemSchema } from '#shared/api/problem'
import { protocolListSchema, protocolResponseSchema } from '#shared/api/protocols'
import type { ProtocolRequest } from '#shared/api/protocols'
import { SHIPPED_PROTOCOLS } from '#shared/proof-test/protocol'
import { ApiClient } from '../factories/client'
import { openShop, openStaffedShop } from '../factories/people'
import type { SignedInPerson } from '../factories/people'
import { testServer } from '../support/api-server'

const problemOf = (response: { body: unknown }) => problemSchema.parse(response.body)
const responseOf = (response: { body: unknown }) => protocolResponseSchema.parse(response.body)

function byQuarters(given: Partial<ProtocolRequest['content']> = {}, name = 'Our own'): ProtocolRequest {
  const shipped = SHIPPED_PROTOCOLS[0]
  if (shipped === undefined) throw new Error('No protocol ships.')
  return { name, content: { ...structuredClone(shipped.content), ...given } }
}

async function list(person: SignedInPerson) {
  return protocolListSchema.parse((await person.client.get(`/api/protocols?shop=${person.shopId}`).expect(200)).body).protocols
}

async function write(person: SignedInPerson, request = byQuarters()) {
  return responseOf(await person.client.post(`/api/protocols?shop=${person.shopId}`, request).expect(201))
}

describe('the protocols of a shop', () => {
  it('begin with those that ship, as written, in the name of who opened the shop', async () => {
    const owner = await openShop()
    const protocols = await list(owner)
    expect(protocols.map(({ name, content, version, archived }) => ({ name, content, version, archived }))).toEqual(
      SHIPPED_PROTOCOLS.map(({ name, content }) => ({ name, content, version: 1, archived: false })),
    )
    const { versions } = responseOf(await owner.client.get(`/api/protocols/${protocols[0]?.id}`).expect(200))
    expect(versions.map((one) => [one.version, one.createdBy])).toEqual([[1, owner.name]])
  })

  it('get a new version by a change, and older versions stay as they were', async () => {
    const owner = await openShop()
    const { protocol } = await write(owner)
    const changed = byQuarters({ recoverySeconds: 240, marginDivisor: 1.25 }, 'Our own, longer')
    const answer = responseOf(await owner.client.post(`/api/protocols/${protocol.id}/versions`, changed).expect(201))
    expect(answer.protocol).toEqual({ id: protocol.id, name: 'Our own, longer', version: 2, content: changed.content, archived: false })
    expect(answer.versions.map((one) => [one.version, one.content.recoverySeconds])).toEqual([
      [2, 240],
      [1, 120],
    ])
    expect((await list(owner)).find((one) => one.id === protocol.id)?.content.recoverySeconds).toBe(240)
  })

  it('number their versions without a gap when two people write at once', async () => {
    const shop = await openStaffedShop()
    const { protocol } = await write(shop.lead)
    const path = `/api/protocols/${protocol.id}/versions`
    const answers = await Promise.all([
      shop.lead.client.post(path, byQuarters({ seatingPercent: 6 })),
      shop.owner.client.post(path, byQuarters({ seatingPercent: 7 })),
    ])
    expect(answers.map((answer) => answer.status)).toEqual([201, 201])
    const { versions } = responseOf(await shop.lead.client.get(`/api/protocols/${protocol.id}`))
    expect(versions.map((one) => one.version)).toEqual([3, 2, 1])
    expect(
      versions
        .slice(0, 2)
        .map((one) => one.content.seatingPercent)
        .sort(),
    ).toEqual([6, 7])
  })

  it('have names of their own, also when two people give the same one at once', async () => {
    const owner = await openShop()
    const path = `/api/protocols?shop=${owner.shopId}`
    const answers = await Promise.all([owner.client.post(path, byQuarters()), owner.client.post(path, byQuarters())])
    expect(answers.map((answer) => answer.status).sort()).toEqual([201, 422])
    const refused = await owner.client.post(path, byQuarters({}, 'off-CENTRE')).expect(422)
    expect(problemOf(refused).fields?.['name']).toMatch(/^Another protocol of this shop is called/)
  })

  it('are told field by field what is missing or wrong', async () => {
    const owner = await openShop()
    const post = (request: object) => owner.client.post(`/api/protocols?shop=${owner.shopId}`, request).expect(422)
    const stages = [
      { percent: 50, holdSeconds: 60 },
      { percent: 50, holdSeconds: 0 },
    ]
    expect(problemOf(await post(byQuarters({ stages }, ' '))).fields).toEqual({
      name: 'Enter a name.',
      'content.stages.1.holdSeconds': 'At least one second.',
      'content.stages.1.percent': 'Each stage is higher than the one before it.',
    })
    const short = [
      { percent: 50, holdSeconds: 60 },
      { percent: 75, holdSeconds: 60 },
    ]
    expect(problemOf(await post(byQuarters({ stages: short }))).fields).toEqual({
      'content.stages.1.percent': 'The last stage reaches at least 100 %.',
    })
    const above = [
      { percent: 100, holdSeconds: 60 },
      { percent: 125, holdSeconds: 600 },
    ]
    expect(problemOf(await post(byQuarters({ stages: above }))).fields).toEqual({
      'content.aboveRatingRule': 'Name the rule that asks for a load above rating.',
      'content.repeatClimb': 'A load above rating is put on in the second climb. Choose “Always”.',
    })
    const limits = { ...byQuarters().content.limits, softeningPercent: 80, mostSet: { text: '1', unit: 'kN' } }
    const wrong = problemOf(await post({ name: 'Wrong limits', content: { ...byQuarters().content, limits } })).fields
    expect(wrong).toEqual({
      'content.limits.softeningPercent': 'At most 50 %.',
      'content.limits.mostSet.unit': 'Choose a unit of length: mm, in or m.',
    })
  })

  it('are archived and brought back, after those for new tests', async () => {
    const owner = await openShop()
    const { protocol } = await write(owner, byQuarters({}, 'A first by name'))
    const path = `/api/protocols/${protocol.id}`
    expect(responseOf(await owner.client.post(`${path}/archive`).expect(200)).protocol.archived).toBe(true)
    expect((await list(owner)).map((one) => [one.name, one.archived])).toEqual([
      ['First load by quarters', false],
      ['Off-centre', false],
      ['Proof above rating', false],
      ['A first by name', true],
    ])
    expect(problemOf(await owner.client.post(`${path}/versions`, byQuarters()).expect(409)).code).toBe('archived')
    expect(responseOf(await owner.client.delete(`${path}/archive`).expect(200)).protocol.archived).toBe(false)
    await owner.client.post(`${path}/versions`, byQuarters()).expect(201)
  })
})

describe('who may do what with protocols', () => {
  it('lets everybody of the shop read them, and owner and lead write them', async () => {
    const shop = await openStaffedShop()
    const { protocol } = await write(shop.lead)
    const path = `/api/protocols/${protocol.id}`
    for (const role of ['witness', 'crew'] as const) {
      const { client } = shop[role]
      await client.get(path).expect(200)
      const answers = [
        await client.post(`/api/protocols?shop=${shop.owner.shopId}`, byQuarters({}, 'Mine')),
        await client.post(`${path}/versions`, byQuarters()),
        await client.post(`${path}/archive`),
        await client.delete(`${path}/archive`),
      ]
      expect(answers.map((answer) => answer.status)).toEqual([403, 403, 403, 403])
    }
    expect((await list(shop.crew)).map((one) => one.version)).toEqual([1, 1, 1, 1])
  })

  it('shows nobody another shop’s, nor tells it from one that does not exist', async () => {
    const [mine, other] = [await openShop(), await openShop()]
    const { protocol } = await write(other)
    const answersTo = async (id: string) => {
      const path = `/api/protocols/${id}`
      const answers = [
        await mine.client.get(path),
        await mine.client.post(`${path}/versions`, byQuarters()),
        await mine.client.post(`${path}/archive`),
        await mine.client.delete(`${path}/archive`),
      ]
      expect(answers.map((answer) => answer.status)).toEqual([404, 404, 404, 404])
      return answers.map((answer) => problemOf(answer).detail)
    }
    expect(await answersTo(protocol.id)).toEqual(await answersTo(randomUUID()))
    await mine.client.get(`/api/protocols?shop=${other.shopId}`).expect(404)
    await new ApiClient().get(`/api/protocols/${protocol.id}`).expect(401)
  })
})

describe('a protocol for a test', () => {
  it('is its current version, unless it is archived', async () => {
    const owner = await openShop()
    const { protocol } = await write(owner)
    await owner.client.post(`/api/protocols/${protocol.id}/versions`, byQuarters({ seatingPercent: 8 })).expect(201)
    const { context } = testServer()
    const freeze = () =>
      inTransaction(context, (transaction) =>
        protocolForTest(
          { transaction, now: context.now(), actor: { userId: owner.userId, shopId: owner.shopId, role: 'owner' } },
          protocol.id,
        ),
      )
    expect(await freeze()).toEqual({ id: protocol.id, name: 'Our own', version: 2, content: byQuarters({ seatingPercent: 8 }).content })
    await owner.client.post(`/api/protocols/${protocol.id}/archive`).expect(200)
    await expect(freeze()).rejects.toMatchObject({ status: 409, code: 'archived' })
  })
})
