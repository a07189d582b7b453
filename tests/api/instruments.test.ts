import { randomUUID } from 'node:crypto'
import { describe, expect, it } from 'vitest'
import { inTransaction } from '#server/context'
import { instrumentsForTest } from '#server/services/instruments'
import { instrumentListSchema, instrumentResponseSchema } from '#shared/api/instruments'
import { problemSchema } from '#shared/api/problem'
import { ApiClient } from '../factories/client'
import { calibration, enterInstrument, gauge, indicator, loadCell } from '../factories/instruments'
import { openShop, openStaffedShop } from '../factories/people'
import type { SignedInPerson } from '../factories/people'
import { testServer } from '../support/api-server'

const problemOf = (response: { body: unknown }) => problemSchema.parse(response.body)
const responseOf = (response: { body: unknown }) => instrumentResponseSchema.parse(response.body)

async function list(person: SignedInPerson, query = '') {
  return instrumentListSchema.parse((await person.client.get(`/api/instruments?shop=${person.shopId}${query}`).expect(200)).body)
}

const codes = (answer: { instruments: { details: { code: string } }[] }) => answer.instruments.map((one) => one.details.code)

describe('an instrument', () => {
  it('comes back as it was typed, in the words and decimal sign of who typed it', async () => {
    const owner = await openShop()
    for (const details of [gauge(), indicator(), loadCell()]) {
      const { instrument, calibrations, shopId } = await enterInstrument(owner, details)
      const read = responseOf(await owner.client.get(`/api/instruments/${instrument.id}`).expect(200))
      expect(read).toEqual({ shopId, instrument: { id: instrument.id, details, calibration: null, retired: false }, calibrations })
      expect(calibrations).toEqual([])
    }
    expect(codes(await list(owner))).toEqual(['G-01', 'I-01', 'L-01'])
  })

  it('is changed as a whole, but stays the kind it is', async () => {
    const owner = await openShop()
    const { instrument } = await enterInstrument(owner, gauge())
    const finer = gauge({ accuracy: { standard: 'asme-b40.100', grade: '1A' } })
    expect(responseOf(await owner.client.put(`/api/instruments/${instrument.id}`, finer).expect(200)).instrument.details).toEqual(finer)
    const refused = await owner.client.put(`/api/instruments/${instrument.id}`, loadCell()).expect(422)
    expect(problemOf(refused).fields?.['kind']).toMatch(/a pressure gauge and stays one/)
  })

  it('has a code that no other instrument of the shop has, in large or small letters', async () => {
    const [owner, other] = [await openShop(), await openShop()]
    await enterInstrument(owner, gauge({ code: 'G-07' }))
    const { instrument: second } = await enterInstrument(owner, gauge({ code: 'G-08' }))
    await enterInstrument(other, gauge({ code: 'G-07' }))
    for (const answer of [
      await owner.client.post(`/api/instruments?shop=${owner.shopId}`, indicator({ code: 'g-07' })).expect(422),
      await owner.client.put(`/api/instruments/${second.id}`, gauge({ code: 'G-07' })).expect(422),
    ]) {
      expect(problemOf(answer).fields?.['code']).toMatch(/^Another instrument of this shop has the code/)
    }
    expect(codes(await list(owner))).toEqual(['G-07', 'G-08'])
  })

  it('is told field by field what is missing or wrong', async () => {
    const owner = await openShop()
    const post = (body: object) => owner.client.post(`/api/instruments?shop=${owner.shopId}`, body).expect(422)
    const cell = problemOf(
      await post({ ...loadCell(), code: ' ', fullScale: { text: '12', unit: 'ton' }, increment: { text: '0..1', unit: 'kN' } }),
    )
    expect(cell.fields).toEqual({
      code: 'Give it the code that is written on it.',
      'fullScale.unit': 'Say which ton: short ton (2,000 lbf), long ton (2,240 lbf) or metric ton-force (1,000 kgf).',
      'increment.text': 'There is more than one decimal sign: write 1234.5, without grouping.',
    })
    const wrongUnit = problemOf(await post({ ...gauge(), fullScale: { text: '700', unit: 'kN' } }))
    expect(wrongUnit.fields).toEqual({ 'fullScale.unit': 'Choose a unit of pressure: Pa, kPa, bar, MPa or psi.' })
    const coarse = problemOf(await post(gauge({ increment: { text: '700', unit: 'bar' } })))
    expect(coarse.fields?.['increment']).toMatch(/smaller than the whole scale/)
    const unknownClass = problemOf(await post({ ...gauge(), accuracy: { standard: 'en-837-1', class: 2 } }))
    expect(unknownClass.fields?.['accuracy.class']).toMatch(/class printed on the dial/)
  })

  it('is retired and brought back, and keeps its code meanwhile', async () => {
    const owner = await openShop()
    const { instrument } = await enterInstrument(owner, gauge())
    const path = `/api/instruments/${instrument.id}`
    expect(responseOf(await owner.client.post(`${path}/retirement`).expect(200)).instrument.retired).toBe(true)
    expect(codes(await list(owner))).toEqual([])
    expect(codes(await list(owner, '&retired=yes'))).toEqual(['G-01'])
    expect(problemOf(await owner.client.put(path, gauge()).expect(409)).code).toBe('retired')
    expect(problemOf(await owner.client.post(`${path}/calibrations`, calibration()).expect(409)).code).toBe('retired')
    await owner.client.post(`/api/instruments?shop=${owner.shopId}`, gauge()).expect(422)
    expect(responseOf(await owner.client.delete(`${path}/retirement`).expect(200)).instrument.retired).toBe(false)
    expect(codes(await list(owner))).toEqual(['G-01'])
  })
})

describe('a calibration', () => {
  it('is in force when its day is the latest, however late it was entered', async () => {
    const owner = await openShop()
    const newer = calibration({ calibratedOn: '2026-02-01', dueOn: '2027-02-01', certificate: 'C-2' })
    const older = calibration({ certificate: 'C-1' })
    const answer = await enterInstrument(owner, gauge(), [newer, older])
    expect(answer.instrument.calibration).toEqual(newer)
    expect(answer.calibrations.map((one) => [one.calibration.certificate, one.createdBy])).toEqual([
      ['C-2', owner.name],
      ['C-1', owner.name],
    ])
    expect((await list(owner)).instruments[0]?.calibration).toEqual(newer)
  })

  it('of the same day as another is in force when it was entered later', async () => {
    const owner = await openShop()
    const first = calibration({ certificate: 'C-1' })
    const second = calibration({ certificate: 'C-2', result: 'out of tolerance' })
    expect((await enterInstrument(owner, gauge(), [first, second])).instrument.calibration).toEqual(second)
  })

  it('states its uncertainty in what the instrument reads', async () => {
    const owner = await openShop()
    const { instrument } = await enterInstrument(owner, gauge())
    const path = `/api/instruments/${instrument.id}/calibrations`
    const inForce = calibration({ uncertainty: { value: { text: '0,2', unit: 'kN' }, k: 2 } })
    expect(problemOf(await owner.client.post(path, inForce).expect(422)).fields).toEqual({
      'uncertainty.value.unit': 'Choose a unit of pressure: Pa, kPa, bar, MPa or psi.',
    })
    const inPressure = calibration({ uncertainty: { value: { text: '30', unit: 'psi' }, k: 2 } })
    expect(responseOf(await owner.client.post(path, inPressure).expect(201)).instrument.calibration).toEqual(inPressure)
  })

  it('falls due after its day, and its day has come', async () => {
    const owner = await openShop()
    const { instrument } = await enterInstrument(owner, gauge())
    const path = `/api/instruments/${instrument.id}/calibrations`
    const backwards = await owner.client.post(path, calibration({ dueOn: '2025-03-09' })).expect(422)
    expect(problemOf(backwards).fields).toEqual({ dueOn: 'The next calibration falls due after this one.' })
    const ahead = await owner.client.post(path, calibration({ calibratedOn: '2999-01-01', dueOn: '2999-06-01' })).expect(422)
    expect(problemOf(ahead).fields?.['calibratedOn']).toMatch(/still to come/)
    expect(responseOf(await owner.client.get(`/api/instruments/${instrument.id}`)).calibrations).toEqual([])
  })
})

describe('the register of instruments', () => {
  it('is read page by page in every order, never twice the same, never one left out', async () => {
    const owner = await openShop()
    const due = ['2026-05-01', null, '2026-04-01', '2026-05-01', null, '2027-01-01', '2026-04-15']
    for (const [index, dueOn] of due.entries()) {
      await enterInstrument(owner, gauge({ code: `G-${index}` }), dueOn === null ? [] : [calibration({ dueOn })])
    }
    const byDue = ['G-1', 'G-4', 'G-2', 'G-6', 'G-0', 'G-3', 'G-5']
    const byCode = ['G-0', 'G-1', 'G-2', 'G-3', 'G-4', 'G-5', 'G-6']
    for (const [sort, expected] of [
      ['due', byDue],
      ['-due', [...byDue].reverse()],
      ['code', byCode],
      ['-code', [...byCode].reverse()],
    ] as const) {
      const pages: string[][] = []
      let answer = await list(owner, `&sort=${sort}&limit=3`)
      for (pages.push(codes(answer)); answer.older !== null; pages.push(codes(answer))) {
        answer = await list(owner, `&sort=${sort}&limit=3&cursor=${answer.older}`)
      }
      expect(pages.flat()).toEqual(expected)
      expect(pages.map((page) => page.length)).toEqual([3, 3, 1])
      const back: string[][] = []
      while (answer.newer !== null) {
        answer = await list(owner, `&sort=${sort}&limit=3&cursor=${answer.newer}`)
        back.unshift(codes(answer))
      }
      expect(back).toEqual(pages.slice(0, 2))
    }
  })

  it('is searched by every word of what is typed, and narrowed by kind', async () => {
    const owner = await openShop()
    await enterInstrument(owner, gauge({ code: 'G-01', description: 'Glycerine, north bench' }))
    await enterInstrument(owner, gauge({ code: 'G-02', description: 'Dry 100%' }))
    await enterInstrument(owner, indicator({ code: 'I-01', description: 'Long stroke, north bench' }))
    expect(codes(await list(owner, '&search=north'))).toEqual(['G-01', 'I-01'])
    expect(codes(await list(owner, '&search=BENCH+g-'))).toEqual(['G-01'])
    expect(codes(await list(owner, '&search=%25'))).toEqual(['G-02'])
    expect(codes(await list(owner, '&search=_'))).toEqual([])
    expect(codes(await list(owner, '&kind=indicator'))).toEqual(['I-01'])
  })

  it('refuses orders it does not keep and places that belong to another order', async () => {
    const owner = await openShop()
    for (const code of ['G-1', 'G-2']) await enterInstrument(owner, gauge({ code }))
    const at = (query: string) => owner.client.get(`/api/instruments?shop=${owner.shopId}${query}`)
    expect(Object.keys(problemOf(await at('&sort=details').expect(422)).fields ?? {})).toEqual(['sort'])
    const { older } = await list(owner, '&limit=1')
    expect(Object.keys(problemOf(await at(`&sort=due&cursor=${older}`).expect(422)).fields ?? {})).toEqual(['cursor'])
    await at('&cursor=nonsense').expect(422)
    await at('&limit=1000').expect(422)
  })
})

describe('who may do what with instruments', () => {
  it('lets everybody of the shop read them, and owner and lead write them', async () => {
    const shop = await openStaffedShop()
    const { instrument } = await enterInstrument(shop.lead, gauge(), [calibration()])
    const path = `/api/instruments/${instrument.id}`
    for (const role of ['witness', 'crew'] as const) {
      const { client } = shop[role]
      await client.get(path).expect(200)
      expect(codes(await list(shop[role]))).toEqual(['G-01'])
      const answers = [
        await client.post(`/api/instruments?shop=${shop.owner.shopId}`, gauge({ code: 'G-09' })),
        await client.put(path, gauge()),
        await client.post(`${path}/calibrations`, calibration()),
        await client.post(`${path}/retirement`),
        await client.delete(`${path}/retirement`),
      ]
      expect(answers.map((answer) => answer.status)).toEqual([403, 403, 403, 403, 403])
    }
    expect((await list(shop.owner)).instruments).toHaveLength(1)
  })

  it('shows nobody another shop’s, nor tells it from one that does not exist', async () => {
    const [mine, other] = [await openShop(), await openShop()]
    const { instrument } = await enterInstrument(other, gauge())
    const answersTo = async (id: string) => {
      const path = `/api/instruments/${id}`
      const answers = [
        await mine.client.get(path),
        await mine.client.put(path, gauge()),
        await mine.client.post(`${path}/calibrations`, calibration()),
        await mine.client.post(`${path}/retirement`),
        await mine.client.delete(`${path}/retirement`),
      ]
      expect(answers.map((answer) => answer.status)).toEqual([404, 404, 404, 404, 404])
      return answers.map((answer) => problemOf(answer).detail)
    }
    expect(await answersTo(instrument.id)).toEqual(await answersTo(randomUUID()))
    await mine.client.get('/api/instruments/nonsense').expect(404)
    await mine.client.get(`/api/instruments?shop=${other.shopId}`).expect(404)
    await new ApiClient().get(`/api/instruments/${instrument.id}`).expect(401)
  })
})

describe('instruments for a test', () => {
  it('are frozen in the order asked, each with the calibration in force', async () => {
    const owner = await openShop()
    const dated = calibration()
    const first = await enterInstrument(owner, gauge(), [dated])
    const second = await enterInstrument(owner, indicator())
    const { context } = testServer()
    const freeze = (ids: string[]) =>
      inTransaction(context, (transaction) =>
        instrumentsForTest({ transaction, now: context.now(), actor: { userId: owner.userId, shopId: owner.shopId, role: 'owner' } }, ids),
      )
    expect(await freeze([second.instrument.id, first.instrument.id])).toEqual([
      { id: second.instrument.id, details: indicator(), calibration: null },
      { id: first.instrument.id, details: gauge(), calibration: dated },
    ])
    await expect(freeze([randomUUID()])).rejects.toMatchObject({ status: 404 })
    await owner.client.post(`/api/instruments/${first.instrument.id}/retirement`).expect(200)
    await expect(freeze([first.instrument.id])).rejects.toMatchObject({
      code: 'retired',
      detail: expect.stringContaining('G-01 is retired'),
    })
  })
})
