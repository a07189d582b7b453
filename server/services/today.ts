import { Op } from 'sequelize'
import type { Sequelize, Transaction } from 'sequelize'
import { SOON_DAYS, WEEKS_AHEAD } from '#shared/api/today'
import type { Due, Need } from '#shared/api/today'
import { calibrationState } from '#shared/instruments/model'
import type { Calibration } from '#shared/instruments/model'
import { can } from '#shared/policy'
import { isAccepted } from '#shared/press/apply'
import { nameJoints } from '#shared/press/joints'
import { mayItBeUsed, tagToTakeOff } from '#shared/press/may-it-be-used'
import type { PressState } from '#shared/press/state'
import { emptyProofTest } from '#shared/proof-test/apply'
import { summariseClimb } from '#shared/proof-test/climb-summary'
import type { ClimbSummary } from '#shared/proof-test/climb-summary'
import type { Work } from '../context'
import { pressState, proofTestState } from '../ledger/folds'
import { readHead } from '../ledger/read'
import type { LedgerHead } from '../ledger/read'
import { Instrument, Press, ProofTest } from '../models'
import { calibrationsInForce } from './calibrations'
import { authorize } from './membership'
import type { PressRecord } from './press-register'
import type { TestRecord } from './proof-test-register'

const MOST_PRESSES = 60
const MOST_TESTS = 60
const DAY = 86_400_000

export interface TestUnderWay {
  test: TestRecord
  whatFor: string
  pumpHandId: string | null
  climb: ClimbSummary
}

export interface PressToday {
  press: PressRecord
  why: string | null
  test: { proofTestId: string; number: string; status: string } | null
}

export interface Today {
  day: string
  underWay: TestUnderWay[]
  needs: Need[]
  presses: PressToday[]
  due: Due[]
}

type Fold<S> = (database: Sequelize, transaction: Transaction, head: LedgerHead) => Promise<S>

interface InstrumentToday {
  instrumentId: string
  code: string
  instrumentKind: 'gauge' | 'load-cell' | 'indicator'
  calibration: Calibration | null
}

function addDays(day: string, count: number): string {
  return new Date(Date.parse(`${day}T00:00:00Z`) + count * DAY).toISOString().slice(0, 10)
}

/** Tests that somebody still has to do something about, the latest first. */
function openTests({ transaction, actor }: Work): Promise<TestRecord[]> {
  return ProofTest.findAll({
    where: { shopId: actor.shopId, status: { [Op.in]: ['under way', 'stopped', 'concluded', 'to countersign', 'declined'] } },
    order: [
      ['openedAt', 'DESC'],
      ['id', 'DESC'],
    ],
    limit: MOST_TESTS,
    raw: true,
    transaction,
  })
}

async function instrumentsInUse({ transaction, actor }: Work): Promise<InstrumentToday[]> {
  const { shopId } = actor
  const instruments = await Instrument.findAll({
    where: { shopId, retiredAt: null },
    attributes: ['id', 'code', 'kind'],
    order: [['code', 'ASC']],
    raw: true,
    transaction,
  })
  const ids = instruments.map((instrument) => instrument.id)
  const inForce = await calibrationsInForce(shopId, ids, transaction)
  return instruments.map(({ id, code, kind }) => ({ instrumentId: id, code, instrumentKind: kind, calibration: inForce.get(id) ?? null }))
}

/** The folded ledgers behind rows of this shop, by id. */
async function foldEach<S>({ transaction }: Work, rows: readonly { id: string }[], fold: Fold<S>): Promise<Map<string, S>> {
  const states = new Map<string, S>()
  const database = Press.sequelize
  if (database === undefined) throw new Error('The models are not bound to a connection.')
  for (const { id } of rows) {
    const head = await readHead(database, transaction, id)
    if (head !== null) states.set(id, await fold(database, transaction, head))
  }
  return states
}

async function testsUnderWay(work: Work, tests: readonly TestRecord[], presses: readonly PressRecord[]): Promise<TestUnderWay[]> {
  const underWay = tests.filter((test) => test.status === 'under way' || test.status === 'stopped')
  const states = await foldEach(work, underWay, proofTestState)
  return underWay.map((test) => {
    const state = states.get(test.id) ?? emptyProofTest(test.id)
    return {
      test,
      whatFor: presses.find((press) => press.id === test.pressId)?.whatFor ?? '',
      pumpHandId: state.opened?.people.pumpHand.id ?? null,
      climb: summariseClimb(state),
    }
  })
}

/** Presses whose ledger is asked for more than its row says: those in use once, or shut, or with a tag. */
function foldEachInUse(work: Work, presses: readonly PressRecord[]): Promise<Map<string, PressState>> {
  return foldEach(
    work,
    presses.filter((press) => press.status !== 'building'),
    pressState,
  )
}

/** Since when a press is as it is; one whose clearance has run out, since the end of its last day. */
function since({ clearance, history }: PressState): string | null {
  if (clearance.is === 'cleared') return `${clearance.clearance.until}T23:59:59.000Z`
  return clearance.is === 'withdrawn' ? clearance.at : (history.at(-1)?.at ?? null)
}

/** What a press that may not be used waits for, the first thing first: one row for it, not one for each that is missing. */
function shutNeed(state: PressState, named: { pressId: string; pressName: string }, why: string): Need {
  const repair = state.repairs.find((one) => !one.closed && one.from !== 'joint')
  if (repair) return { kind: 'repair-open', ...named, repairId: repair.id, why: repair.why, since: repair.openedAt }
  const { clearance, toRepeat } = state
  if (clearance.is === 'suspended' && clearance.until === 'the joints are accepted') {
    const joints = nameJoints(state.joints.filter((joint) => !isAccepted(joint)).map((joint) => joint.number))
    return { kind: 'joints-to-examine', ...named, joints, since: since(state) }
  }
  if (toRepeat) return { kind: 'retest', ...named, repeatsId: toRepeat.proofTestId, number: toRepeat.number, since: since(state) }
  return { kind: 'press-shut', ...named, why, since: since(state) }
}

function pressNeeds(presses: readonly PressToday[], states: ReadonlyMap<string, PressState>, day: string): Need[] {
  return presses.flatMap(({ press, why, test }): Need[] => {
    const named = { pressId: press.id, pressName: press.name }
    const state = states.get(press.id)
    const wasInUse = press.status === 'withdrawn' || press.status === 'suspended'
    if (test === null && state !== undefined && why !== null && wasInUse) return [shutNeed(state, named, why)]
    if (press.status !== 'cleared' || press.clearedUntil === null) return []
    if (press.clearedUntil < day) return [{ kind: 'press-overdue', ...named, until: press.clearedUntil }]
    return press.clearedUntil <= addDays(day, SOON_DAYS) ? [{ kind: 'press-due', ...named, until: press.clearedUntil }] : []
  })
}

/** Tags that hang on presses that may not be used: for everybody, because whoever stands nearest takes it off. */
function tagNeeds(presses: readonly PressToday[], states: ReadonlyMap<string, PressState>, day: string): Need[] {
  return presses.flatMap(({ press, why }): Need[] => {
    const state = states.get(press.id)
    if (state === undefined || !tagToTakeOff(state, day)) return []
    return [{ kind: 'tag-hangs', pressId: press.id, pressName: press.name, why: why ?? 'Its clearance has run out.', since: since(state) }]
  })
}

/** What waits for this person's own hand in a test, whatever else the person is in the shop. */
function testNeeds(tests: readonly TestRecord[], userId: string): Need[] {
  return tests.flatMap((test): Need[] => {
    const { id: proofTestId, number, pressName, protocolName } = test
    const named = { proofTestId, number, pressName, protocolName, since: (test.concludedAt ?? test.openedAt).toISOString() }
    if (test.status === 'to countersign' && test.witnessId === userId) return [{ kind: 'countersign', ...named }]
    if (test.leadId !== userId) return []
    if (test.status === 'concluded') return [{ kind: 'sign', ...named }]
    if (test.status === 'declined') return [{ kind: 'declined', ...named }]
    return test.status === 'stopped' ? [{ kind: 'conclude', ...named }] : []
  })
}

function instrumentNeeds(instruments: readonly InstrumentToday[], day: string): Need[] {
  return instruments.flatMap(({ calibration, ...named }): Need[] => {
    const is = calibrationState(calibration, day)
    if (is !== 'in-date') return [{ kind: 'instrument-out', ...named, is, dueOn: calibration?.dueOn ?? null }]
    const dueOn = calibration?.dueOn
    return dueOn !== undefined && dueOn <= addDays(day, SOON_DAYS) ? [{ kind: 'instrument-due', ...named, dueOn }] : []
  })
}

const order: Record<Need['kind'], number> = {
  'tag-hangs': 0,
  'repair-open': 1,
  'joints-to-examine': 1,
  retest: 1,
  'press-shut': 1,
  'press-overdue': 1,
  conclude: 2,
  declined: 3,
  sign: 4,
  countersign: 5,
  'instrument-out': 6,
  'instrument-due': 7,
  'press-due': 7,
}
const dateOf = (need: Need): string => ('dueOn' in need ? (need.dueOn ?? '') : 'until' in need ? need.until : (need.since ?? ''))

function dueDates(presses: readonly PressRecord[], instruments: readonly InstrumentToday[], day: string): Due[] {
  const end = addDays(day, WEEKS_AHEAD * 7)
  const clearances = presses.flatMap((press): Due[] =>
    press.status === 'cleared' && press.clearedUntil !== null
      ? [{ kind: 'clearance', on: press.clearedUntil, pressId: press.id, pressName: press.name }]
      : [],
  )
  const calibrations = instruments.flatMap(({ calibration, ...named }): Due[] =>
    calibration === null ? [] : [{ kind: 'calibration', on: calibration.dueOn, ...named }],
  )
  return [...clearances, ...calibrations].filter(({ on }) => on >= day && on <= end).sort((a, b) => a.on.localeCompare(b.on))
}

/** What is under way, what waits for this person, which press may be used, and what falls due. */
export async function readToday(work: Work, asked: string | undefined): Promise<Today> {
  const { transaction, actor, now } = work
  authorize(actor, 'press:read', { shopId: actor.shopId })
  const day = asked ?? now.toISOString().slice(0, 10)
  const records: PressRecord[] = await Press.findAll({
    where: { shopId: actor.shopId },
    order: [
      ['name', 'ASC'],
      ['id', 'ASC'],
    ],
    limit: MOST_PRESSES,
    raw: true,
    transaction,
  })
  const tests = await openTests(work)
  const instruments = await instrumentsInUse(work)
  const states = await foldEachInUse(work, records)
  const presses = records.map((press): PressToday => {
    const test = tests.find((one) => one.pressId === press.id && press.status !== 'cleared' && one.status !== 'stopped')
    const state = states.get(press.id)
    const answer = state && mayItBeUsed(state, day)
    return {
      press,
      why: answer?.answer === 'do not use' ? answer.why : null,
      test: test === undefined ? null : { proofTestId: test.id, number: test.number, status: test.status },
    }
  })
  const leads = can(actor, 'proof-test:open', { shopId: actor.shopId })
  const needs = [
    ...tagNeeds(presses, states, day),
    ...testNeeds(tests, actor.userId),
    ...(leads ? [...pressNeeds(presses, states, day), ...instrumentNeeds(instruments, day)] : []),
  ]
  needs.sort((a, b) => order[a.kind] - order[b.kind] || dateOf(a).localeCompare(dateOf(b)))
  return { day, underWay: await testsUnderWay(work, tests, records), needs, presses, due: dueDates(records, instruments, day) }
}
