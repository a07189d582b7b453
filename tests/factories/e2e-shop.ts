import { randomUUID } from 'node:crypto'
import type { APIRequestContext } from 'playwright-core'
import { v7 as newId } from 'uuid'
import { instrumentResponseSchema } from '#shared/api/instruments'
import { appendResponseSchema } from '#shared/api/ledger'
import { openTestResponseSchema } from '#shared/api/proof-tests'
import { protocolResponseSchema } from '#shared/api/protocols'
import { sessionResponseSchema } from '#shared/api/session'
import type { InstrumentDetails } from '#shared/instruments/model'
import { FIRST_LOAD_BY_QUARTERS } from '#shared/proof-test/protocol'
import { newDevice, serverAddress } from '../support/browser'
import { calibration, gauge, indicator } from './instruments'
import { openedPayload } from './test-press'

export interface Person {
  id: string
  name: string
  email: string
  password: string
}

export interface E2eShop {
  id: string
  name: string
  lead: Person
  witness: Person
  pressId: string
  testId: string
  number: string
}

const day = (fromToday: number): string => new Date(Date.now() + fromToday * 86_400_000).toISOString().slice(0, 10)
const password = 'long enough to be one'
const headers = () => ({ origin: serverAddress() })

async function send(request: APIRequestContext, method: 'POST' | 'DELETE', path: string, data?: object): Promise<unknown> {
  const response = await request.fetch(path, { method, headers: headers(), data })
  if (!response.ok()) throw new Error(`${method} ${path}: ${response.status()} ${await response.text()}`)
  return response.status() === 204 ? null : response.json()
}

async function addPerson(request: APIRequestContext, shopId: string, role: 'lead' | 'witness', name: string): Promise<Person> {
  const email = `${randomUUID()}@people.example`
  const added = (await send(request, 'POST', `/api/people?shop=${shopId}`, { name, email, role, password })) as { userId: string }
  return { id: added.userId, name, email, password }
}

/** Seconds instead of minutes, so that a whole test runs in a browser; every limit is the shipped protocol's. */
const shortHolds = {
  ...FIRST_LOAD_BY_QUARTERS,
  stages: FIRST_LOAD_BY_QUARTERS.stages.map((stage) => ({ ...stage, holdSeconds: 2 })),
  datumWatchSeconds: 1,
  recoverySeconds: 1,
  repeatHoldSeconds: 1,
}

async function enterInstruments(request: APIRequestContext, shopId: string): Promise<string[]> {
  const inDate = calibration({ calibratedOn: day(-100), dueOn: day(265) })
  const all: InstrumentDetails[] = [
    gauge({ code: 'G-02', fullScale: { text: '15000', unit: 'psi' }, increment: { text: '50', unit: 'psi' } }),
    ...['I-04', 'I-05', 'I-06'].map((code) =>
      indicator({ code, increment: { text: '0.01', unit: 'mm' }, errorLimit: { text: '0.005', unit: 'mm' } }),
    ),
  ]
  const ids: string[] = []
  for (const details of all) {
    const { instrument } = instrumentResponseSchema.parse(await send(request, 'POST', `/api/instruments?shop=${shopId}`, details))
    await send(request, 'POST', `/api/instruments/${instrument.id}/calibrations`, inDate)
    ids.push(instrument.id)
  }
  return ids
}

export interface ShopToTest extends Omit<E2eShop, 'testId' | 'number'> {
  owner: Person
  /** Opens a proof test of the press, as the lead. */
  openTest(witness: { id: string; relation: string }): Promise<{ testId: string; number: string }>
}

/**
 * A shop with an owner, a lead and a witness, instruments in date, a protocol of short holds, and the press of
 * the record's example with joint 7 only tacked.
 */
export async function shopToTest(): Promise<ShopToTest> {
  const owner = (await newDevice()).request
  const name = 'Kiln Lane Fabrication'
  const opening = { shopName: name, ownerName: 'Ida Marsh', email: `${randomUUID()}@people.example`, password }
  const session = sessionResponseSchema.parse(await send(owner, 'POST', '/api/shops', opening))
  const shopId = session.shops[0]?.id ?? ''
  const lead = await addPerson(owner, shopId, 'lead', 'Lena Vogt')
  const witness = await addPerson(owner, shopId, 'witness', 'Wim Faber')

  const request = (await newDevice()).request
  await send(request, 'POST', '/api/session', { email: lead.email, password })
  const [force = '', ...indicators] = await enterInstruments(request, shopId)
  const protocol = protocolResponseSchema.parse(
    await send(request, 'POST', `/api/protocols?shop=${shopId}`, { name: 'First load, short holds', content: shortHolds }),
  ).protocol

  const example = openedPayload()
  const pressId = newId()
  const device = { deviceId: newId(), bootId: newId(), monotonicMs: 0, observedAt: new Date().toISOString() }
  const joints = example.joints.map((joint) =>
    joint.number === 7 ? { ...joint, kind: 'weld' as const, makeUp: 'tacked' as const } : joint,
  )
  const entry = {
    ...device,
    id: newId(),
    ledgerId: pressId,
    kind: 'registered',
    v: 1,
    authorId: lead.id,
    deviceSeq: 1,
    basedOnSeq: 0,
    attachments: [],
    overrides: [],
    payload: { description: example.press, joints, lastWorkedOn: null },
  }
  appendResponseSchema.parse(await send(request, 'POST', `/api/presses?shop=${shopId}`, { sentAt: device.observedAt, entries: [entry] }))

  const openTest = async (witness: { id: string; relation: string }) => {
    const testId = newId()
    const opened = openTestResponseSchema.parse(
      await send(request, 'POST', `/api/proof-tests?shop=${shopId}`, {
        ...device,
        id: testId,
        entryId: newId(),
        pressId,
        protocolId: protocol.id,
        forceInstrumentIds: [force],
        points: example.points.map((point, index) => ({ ...point, instrumentId: indicators[index] ?? '' })),
        net: example.net,
        legs: [{ label: 'Ram central', ramPosition: 'central', bedHole: '4' }],
        pumpHand: { id: null, name: 'Pim Noor' },
        witness,
        repeatsId: null,
        instrumentOverride: null,
      }),
    )
    return { testId, number: opened.number }
  }
  const ownerPerson = { id: session.user.id, name: session.user.name, email: opening.email, password }
  return { id: shopId, name, owner: ownerPerson, lead, witness, pressId, openTest }
}

/** The same with a proof test that the lead has opened, and that the shop's own witness attends. */
export async function shopWithOpenTest(): Promise<E2eShop> {
  const shop = await shopToTest()
  return { ...shop, ...(await shop.openTest({ id: shop.witness.id, relation: 'works next door' })) }
}
