import { QueryTypes, UniqueConstraintError } from 'sequelize'
import type { OpenTestRequest } from '#shared/api/proof-tests'
import { can } from '#shared/policy'
import type { EntryDraft } from '#shared/ledger/envelope'
import { openedSchema, PROOF_TEST_VERSION, type Opened } from '#shared/proof-test/entries'
import { jointSchema } from '#shared/press/model'
import type { PressState } from '#shared/press/state'
import { forceUnitSchema, lengthUnitSchema, pressureUnitSchema } from '#shared/units'
import { withAboveRating } from '#shared/proof-test/protocol'
import type { Work } from '../context'
import { Membership, ProofTest, Shop, User } from '../models'
import { conflict, invalid, notFound } from '../problem'
import { bindGuest } from './guests'
import { authorize } from './membership'
import { instrumentsForTest } from './instruments'
import { protocolForTest } from './protocols'
import { toolingForTest } from './tooling'
import { appendToTest, lockTest } from './test-entries'
import { pressState } from '../ledger/folds'
import { lockHead } from '../ledger/read'
import { createLedger, type Writing } from '../ledger/write'

const DAY = 86_400_000

/** The witness of this test: a member of the shop, or somebody from outside who accepted for this press's next test. */
async function witnessNamed(work: Work, { id: testId, pressId, witness }: OpenTestRequest): Promise<string> {
  const guestName = await bindGuest(work, { userId: witness.id, pressId, testId })
  return guestName ?? memberNamed(work, witness.id, 'proof-test:be-witness', 'witness.id')
}

async function memberNamed(
  { transaction, actor }: Work,
  userId: string,
  action: 'proof-test:be-pump-hand' | 'proof-test:be-witness',
  field: string,
): Promise<string> {
  const membership = await Membership.findOne({ where: { shopId: actor.shopId, userId, endedAt: null }, raw: true, transaction })
  const user = membership && (await User.findByPk(userId, { attributes: ['name'], raw: true, transaction }))
  if (!membership || !user) throw invalid({ [field]: 'This person does not belong to the shop. Choose somebody from the list.' })
  const person = { userId, shopId: actor.shopId, role: membership.role }
  if (!can(person, action, { shopId: actor.shopId }))
    throw invalid({ [field]: `${user.name}’s role in this shop does not allow this. Choose somebody else.` })
  return user.name
}

/** The next number of the shop; its row is locked so that two tests opened at once get two numbers. */
async function nextNumber({ transaction, actor }: Work): Promise<string> {
  await Shop.findByPk(actor.shopId, { attributes: ['id'], transaction, lock: transaction.LOCK.UPDATE })
  const last = (await ProofTest.max('numberIndex', { where: { shopId: actor.shopId }, transaction })) as number | null
  return `PT-${String((last ?? 0) + 1).padStart(4, '0')}`
}

/** The protocol with the load above rating that the lead entered for this test, where it asks for one. */
async function protocolOf(work: Work, { protocolId, aboveRating }: OpenTestRequest): Promise<Opened['protocol']> {
  const protocol = await protocolForTest(work, protocolId)
  if (protocol.content.aboveRating && !aboveRating) {
    throw invalid({ 'aboveRating.percent': 'This protocol goes above the rated load. Enter how far, and the rule that asks for it.' })
  }
  return { ...protocol, content: withAboveRating(protocol.content, aboveRating ?? null) }
}

async function repeated({ transaction, actor }: Work, request: OpenTestRequest): Promise<Opened['repeats']> {
  if (!request.repeatsId) return null
  const test = await ProofTest.findOne({
    where: { id: request.repeatsId, shopId: actor.shopId, pressId: request.pressId },
    raw: true,
    transaction,
  })
  if (!test) throw invalid({ repeatsId: 'The test that this one repeats is not one of this press.' })
  return { id: test.id, number: test.number }
}

/** What a test freezes of the shop's registers at the moment it opens. */
async function composeOpened(work: Work, request: OpenTestRequest, press: PressState, headSeq: number): Promise<Opened> {
  const { actor, now } = work
  const { description } = press
  if (!description) throw notFound('This press')
  const { transaction } = work
  const shop = await Shop.findByPk(actor.shopId, { raw: true, transaction })
  const lead = await User.findByPk(actor.userId, { attributes: ['name'], raw: true, transaction })
  if (!shop || !lead) throw notFound('This shop')
  const ids = [...new Set([...request.forceInstrumentIds, ...request.points.map((point) => point.instrumentId)])]
  const measured = new Set(request.points.map((point) => point.memberId))
  const witnessName = await witnessNamed(work, request)
  const pumpHandName = request.pumpHand.id
    ? await memberNamed(work, request.pumpHand.id, 'proof-test:be-pump-hand', 'pumpHand.id')
    : request.pumpHand.name
  return {
    number: await nextNumber(work),
    shop: { id: shop.id, name: shop.name },
    pressId: press.id,
    pressHeadSeq: headSeq,
    // Loose tooling joins the train, so that no load of the test passes its rating.
    press: { ...description, train: [...description.train, ...(await toolingForTest(work, request.toolingIds ?? []))] },
    // As described, with what the load path check needs; examinations are the test's own.
    joints: press.joints.filter((joint) => !joint.retired).map((joint) => jointSchema.parse(joint)),
    stoodStillDays: press.lastWorkedOn ? Math.max(0, Math.floor((now.getTime() - Date.parse(press.lastWorkedOn)) / DAY)) : null,
    instruments: await instrumentsForTest(work, ids),
    forceInstrumentIds: request.forceInstrumentIds,
    points: request.points,
    net: request.net,
    protocol: await protocolOf(work, request),
    legs: request.legs,
    people: {
      lead: { id: actor.userId, name: lead.name, relation: actor.role === 'owner' ? 'owner of the shop' : 'lead of the shop' },
      pumpHand: {
        id: request.pumpHand.id,
        name: pumpHandName,
        relation: request.pumpHand.id ? 'member of the shop' : 'not a member of the shop',
      },
      witness: { id: request.witness.id, name: witnessName, relation: request.witness.relation },
    },
    forceUnit: forceUnitSchema.parse(shop.forceUnit),
    pressureUnit: pressureUnitSchema.parse(shop.pressureUnit),
    lengthUnit: lengthUnitSchema.parse(shop.lengthUnit),
    notMeasured: description.members.filter((member) => !measured.has(member.id)).map((member) => member.name),
    repeats: await repeated(work, request),
    walkDownHours: shop.walkDownHours,
    instrumentOverride: request.instrumentOverride,
    engineer: request.engineer ?? null,
  }
}

/**
 * Opens a test: freezes what the registers say into its first entry, suspends the press's clearance and takes
 * the press. Sending the same request again answers the same test.
 */
export async function openTest(writing: Writing, work: Work, request: OpenTestRequest): Promise<{ id: string; number: string }> {
  const { actor } = work
  authorize(actor, 'proof-test:open', { shopId: actor.shopId })
  await createLedger(writing, { id: request.id, shopId: actor.shopId, subject: 'proof-test' })
  const locked = await lockTest(writing, actor.userId, request.id)
  const { opened } = locked.state
  if (opened) {
    if (opened.pressId === request.pressId && opened.people.lead.id === actor.userId) return { id: request.id, number: opened.number }
    throw conflict('id-reused', 'This test’s id was used for another test already. Plan it again.')
  }
  const pressHead = await lockHead(writing.database, writing.transaction, request.pressId)
  if (!pressHead || pressHead.subject !== 'press' || pressHead.shopId !== actor.shopId) throw notFound('This press')
  const press = await pressState(writing.database, writing.transaction, pressHead)
  const payload = openedSchema.parse(await composeOpened(work, request, press, pressHead.headSeq))
  const draft: EntryDraft = {
    id: request.entryId,
    ledgerId: request.id,
    kind: 'opened',
    v: PROOF_TEST_VERSION,
    payload,
    authorId: actor.userId,
    deviceId: request.deviceId,
    deviceSeq: 1,
    basedOnSeq: 0,
    observedAt: request.observedAt,
    bootId: request.bootId,
    monotonicMs: request.monotonicMs,
    attachments: request.attachments ?? [],
    overrides: [],
  }
  await appendToTest(writing, locked, draft)
  await takePress(writing, actor.shopId, request)
  return { id: request.id, number: payload.number }
}

async function takePress({ database, transaction }: Writing, shopId: string, request: OpenTestRequest): Promise<void> {
  try {
    await database.query('INSERT INTO active_tests (press_id, shop_id, proof_test_id) VALUES (?, ?, ?)', {
      replacements: [request.pressId, shopId, request.id],
      type: QueryTypes.INSERT,
      transaction,
    })
  } catch (error) {
    if (!(error instanceof UniqueConstraintError)) throw error
    throw conflict('press-taken', 'Another proof test is under way on this press. Conclude it before opening this one.', ['P11'])
  }
}
