import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { QueryTypes } from 'sequelize'
import { afterAll, beforeAll, describe, expect, inject, it } from 'vitest'
import type { AppContext } from '#server/context'
import { connect } from '#server/database/connection'
import { migrateUp } from '#server/database/migrator'
import { loadDemoShop, signInLines } from '#server/database/seeders/demo'
import type { DemoSignIn } from '#server/database/seeders/demo'
import { pressColumns, proofTestColumns } from '#server/ledger/projections'
import { rebuildProjections } from '#server/ledger/rebuild'
import { loadSealKey } from '#server/ledger/seal-keys'
import { initModels, User } from '#server/models/index'
import { signIn } from '#server/services/sessions'
import { smallerPicture } from '#server/storage/pictures'
import { calibrationState, type Calibration } from '#shared/instruments/model'
import { checkChain } from '#shared/ledger/chain'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { checkSeal, type Seal } from '#shared/ledger/seal'
import { applyPress, emptyPress } from '#shared/press/apply'
import { toSI } from '#shared/units'
import { mayItBeUsed } from '#shared/press/may-it-be-used'
import type { PressState } from '#shared/press/state'
import { foldProofTest } from '#shared/proof-test/apply'
import { elapsedBetween } from '#shared/proof-test/clock'
import { checkOf, expectedOf } from '#shared/proof-test/expected'
import { evaluateTest } from '#shared/proof-test/evaluate'
import { frozenDifferences } from '#shared/proof-test/record'
import type { ProofTestState } from '#shared/proof-test/state'
import { nextStep } from '#shared/proof-test/steps'
import { testServer } from '../support/api-server'
import { schemaFor } from '../support/schema'

interface StoredRow {
  ledgerId: string
  subject: 'press' | 'proof-test'
  seq: number
  canonical: string
  hash: string
}

const directory = mkdtempSync(path.join(tmpdir(), 'quarterload-demo-'))
let context: AppContext
let signIns: DemoSignIn[]
const rows = new Map<string, StoredRow[]>()
const presses = new Map<string, PressState>()
const tests = new Map<string, { state: ProofTestState; entries: LedgerEntry[] }>()

function select<Row extends object>(sql: string): Promise<Row[]> {
  return context.database.query<Row>(sql, { type: QueryTypes.SELECT })
}

/** The day on which the demo was loaded. */
const today = () => context.now().toISOString().slice(0, 10)

function press(name: string): PressState {
  const state = presses.get(name)
  if (!state) throw new Error(`The demo has no press called ${name}.`)
  return state
}

function testsOf(name: string): ProofTestState[] {
  const { id } = press(name)
  return [...tests.values()].map((test) => test.state).filter((state) => state.opened?.pressId === id)
}

function only(states: readonly ProofTestState[]): ProofTestState {
  const [state, ...rest] = states
  if (!state || rest.length > 0) throw new Error(`There is not one test but ${states.length}.`)
  return state
}

async function readLedgers(): Promise<void> {
  const stored = await select<StoredRow>(
    `SELECT e.ledger_id AS ledgerId, l.subject, e.seq, e.canonical, e.hash
       FROM ledger_entries e JOIN ledgers l ON l.id = e.ledger_id ORDER BY e.ledger_id, e.seq`,
  )
  for (const row of stored) rows.set(row.ledgerId, [...(rows.get(row.ledgerId) ?? []), row])
  for (const [id, ledger] of rows) {
    const entries = ledger.map((row): LedgerEntry => ({ ...(JSON.parse(row.canonical) as Omit<LedgerEntry, 'hash'>), hash: row.hash }))
    if (ledger[0]?.subject === 'press') {
      const state = entries.reduce(applyPress, emptyPress(id))
      presses.set(state.description?.name ?? '', state)
    } else tests.set(id, { state: foldProofTest(id, entries), entries })
  }
}

beforeAll(async () => {
  const url = await schemaFor(inject('databaseUrl'), `demo_${process.pid}_${process.env['VITEST_POOL_ID'] ?? '1'}`)
  const now = new Date()
  const own = testServer().context
  context = {
    ...own,
    config: { ...own.config, dataDirectory: directory, secretsDirectory: path.join(directory, 'secrets') },
    database: connect(url, { poolSize: 4 }),
    now: () => now,
  }
  initModels(context.database)
  await migrateUp(context.database)
  signIns = await loadDemoShop(context)
  await readLedgers()
})

afterAll(async () => {
  await context.database.close()
  rmSync(directory, { recursive: true, force: true })
})

describe('the demo shop', () => {
  it('has people in every role who can sign in with what is printed, one of them in two shops', async () => {
    expect(new Set(signIns.map((one) => one.role.split(' of ')[0]))).toEqual(new Set(['owner', 'lead', 'witness', 'crew']))
    expect(signIns.filter((one) => one.role.startsWith('lead'))).toHaveLength(2)
    expect(signIns.filter((one) => one.role.startsWith('witness'))).toHaveLength(2)
    const printed = signInLines(signIns)
    for (const { email, password, name, role } of signIns) {
      expect(email).toMatch(/\.example$/)
      const signedIn = await signIn(context, { email, password }, { address: '127.0.0.1', userAgent: 'test' })
      expect(signedIn.name).toBe(name)
      for (const said of [email, password, name, role]) expect(printed).toContain(said)
    }
    const shopsOf = await select<{ shops: number }>('SELECT COUNT(*) AS shops FROM memberships GROUP BY user_id ORDER BY shops DESC')
    expect(shopsOf[0]?.shops).toBe(2)
  })

  it('hashes its password once', async () => {
    const hashes = await select<{ hashes: number }>('SELECT COUNT(DISTINCT password_hash) AS hashes FROM users')
    expect(hashes).toEqual([{ hashes: new Set(signIns.map((one) => one.password)).size }])
  })

  it('lies in the past, and no more than minutes ago where something is under way', () => {
    const now = context.now().getTime()
    for (const { entries } of tests.values()) {
      for (const entry of entries) {
        expect(Date.parse(entry.observedAt)).toBeLessThanOrEqual(now)
        const took = Date.parse(entry.receivedAt) - Date.parse(entry.observedAt)
        expect(took).toBeGreaterThanOrEqual(0)
        expect(took).toBeLessThan(1000)
      }
      const moments = entries.map((entry) => Date.parse(entry.observedAt))
      expect(moments).toEqual([...moments].sort((a, b) => a - b))
    }
    const underWay = testsOf('Badger').find((state) => nextStep(state).name === 'begin-stage')
    expect(now - Date.parse(underWay?.lastMark?.at ?? '')).toBeLessThan(5 * 60_000)
    const waiting = only(testsOf('Long Meg'))
    expect(now - Date.parse(waiting.signed?.signedAt ?? '')).toBeLessThan(12 * 3_600_000)
  })
})

describe('its ledgers', () => {
  it('are whole chains of stored text, none of it irregular', () => {
    expect(rows.size).toBe(presses.size + tests.size)
    for (const ledger of rows.values()) {
      expect(checkChain(ledger)).toMatchObject({ whole: true, entries: ledger.length })
      for (const row of ledger) expect((JSON.parse(row.canonical) as LedgerEntry).irregular).toEqual([])
    }
  })

  it('number each tablet’s entries without a gap, on a clock that runs forward', () => {
    for (const { entries } of tests.values()) {
      const byHand = entries.filter((entry) => !['signed', 'countersigned'].includes(entry.kind))
      const tablets = new Set(byHand.map((entry) => entry.deviceId))
      expect(tablets.size).toBe(2)
      for (const tablet of tablets) {
        const own = byHand.filter((entry) => entry.deviceId === tablet)
        expect(own.map((entry) => entry.deviceSeq)).toEqual(own.map((_entry, index) => index + 1))
        expect(new Set(own.map((entry) => entry.bootId)).size).toBe(1)
        const [first] = own
        for (const entry of own) {
          const byClock = Date.parse(entry.observedAt) - Date.parse(first?.observedAt ?? '')
          expect(entry.monotonicMs - (first?.monotonicMs ?? 0)).toBe(byClock)
        }
      }
    }
  })

  it('hold every stage for its whole time, by the marks', () => {
    let holds = 0
    for (const { state } of tests.values()) {
      for (const stage of state.legs.flatMap((leg) => leg.climbs.flatMap((climb) => climb.stages))) {
        for (const { rows: held, decided } of stage.attempts) {
          if (decided?.decision !== 'go-on') continue
          const [start] = held
          const end = held.at(-1)
          if (!start || !end) throw new Error('A stage went on without rows.')
          expect(end.occasion).toBe('hold end')
          const elapsed = elapsedBetween(start.mark, end.mark)
          expect(elapsed.monotonic).toBe(true)
          expect(elapsed.seconds).toBeGreaterThanOrEqual(stage.holdSeconds)
          holds += 1
        }
      }
    }
    expect(holds).toBeGreaterThan(25)
  })

  it('carry a seal for every signature, made with the server’s key', async () => {
    const seals = await select<Omit<Seal, 'sealedAt'> & { sealedAt: Date }>(
      'SELECT kid, ledger_id AS ledgerId, seq, head_hash AS headHash, sealed_at AS sealedAt, signature FROM seals',
    )
    const signatures = [...tests.values()].flatMap(({ entries }) =>
      entries.filter((entry) => ['signed', 'countersigned'].includes(entry.kind)),
    )
    expect(seals).toHaveLength(signatures.length)
    const { publicKey } = loadSealKey(context.config)
    for (const seal of seals) expect(checkSeal({ ...seal, sealedAt: seal.sealedAt.toISOString() }, publicKey)).toBe(true)
  })

  it('give the rows of both registers, column by column', async () => {
    const pressRows = await select<Record<string, unknown> & { id: string }>('SELECT * FROM presses')
    const testRows = await select<Record<string, unknown> & { id: string }>('SELECT * FROM proof_tests')
    expect(pressRows).toHaveLength(presses.size)
    expect(testRows).toHaveLength(tests.size)
    for (const { id, shop_id: _shop, ...row } of pressRows) {
      const state = [...presses.values()].find((one) => one.id === id)
      expect(state && pressColumns(state)).toEqual(row)
    }
    for (const { id, shop_id: _shop, ...row } of testRows) {
      const state = tests.get(id)?.state
      expect(state && proofTestColumns(state)).toEqual(row)
    }
    expect(await rebuildProjections(context.database)).toBe(rows.size)
    expect(await select('SELECT * FROM presses')).toEqual(pressRows)
    expect(await select('SELECT * FROM proof_tests')).toEqual(testRows)
  })

  it('froze evaluations that today’s arithmetic gives again', () => {
    for (const [id, { entries }] of tests) expect(frozenDifferences(id, entries)).toEqual([])
  })
})

describe('its presses', () => {
  it('Ox is cleared after a test with a repeat climb, to no more than was carried less its uncertainty', () => {
    const state = only(testsOf('Ox'))
    expect(state.conclusion?.conclusion).toBe('accepted')
    expect(state.countersigned).not.toBeNull()
    expect(state.legs[0]?.climbs).toHaveLength(2)
    const { against, clearance, climbs } = evaluateTest(state)
    expect(against).toEqual([])
    expect(climbs[0]?.set?.visible).toBe(true)
    const answer = mayItBeUsed(press('Ox'), today())
    expect(answer).toMatchObject({ answer: 'cleared', clearance: { number: state.opened?.number, gaugeCode: 'PG-1' } })
    if (answer.answer !== 'cleared' || !clearance) throw new Error('Ox is not cleared.')
    expect(answer.clearance.loadNewton).toBe(clearance.load)
    expect(clearance.load).toBeLessThanOrEqual(clearance.lowestForce - clearance.U)
    expect(answer.clearance.until > today()).toBe(true)
  })

  it('Ox moved as its sections let expect, and its check holds nothing back', () => {
    const state = only(testsOf('Ox'))
    if (!state.opened) throw new Error('The test was opened.')
    const band = expectedOf(state.opened, 0)
    const full = evaluateTest(state).climbs[0]?.stages.find((stage) => stage.percent === 100)?.start?.lead?.deflection ?? 0
    expect(full).toBeGreaterThan(band?.low ?? Infinity)
    expect(full).toBeLessThan(band?.high ?? 0)
    const check = checkOf(state.opened)
    expect(check.blocks).toBe(false)
    expect(check.weakest?.utilisation).toBeGreaterThan(0.5)
  })

  it('Mule is being built: one joint is only tacked, and the others are not examined', () => {
    const mule = press('Mule')
    expect(mule.joints.filter((joint) => joint.makeUp !== 'finished')).toMatchObject([{ name: 'Left bed stiffener', makeUp: 'tacked' }])
    expect(mule.joints.some((joint) => joint.examination !== null)).toBe(false)
    expect(mule.joints.some((joint) => joint.fellBackBecause !== null)).toBe(true)
    expect(pressColumns(mule)).toMatchObject({ status: 'building', joints_accepted: 0 })
    expect(mayItBeUsed(mule, today())).toMatchObject({ answer: 'do not use', why: 'It was never cleared.' })
  })

  it('Heron was stopped at 75 % by its softening, rejected, and is withdrawn', () => {
    const state = only(testsOf('Heron'))
    expect(state.stopped).toMatchObject({ cause: 'criterion', atPercent: 75 })
    expect(state.stopped?.why).toMatch(/^Softening/)
    expect(state.conclusion?.conclusion).toBe('rejected')
    expect(state.countersigned).not.toBeNull()
    expect(press('Heron').clearance.is).toBe('withdrawn')
    const answer = mayItBeUsed(press('Heron'), today())
    expect(answer).toMatchObject({ answer: 'do not use', why: `${state.opened?.number} was rejected.` })
    expect(answer.answer === 'do not use' && answer.missing[0]).toMatch(/A repair is open: PT-0004 was stopped/)
  })

  it('Badger is under test by the second lead, just before 50 %, and its earlier clearance is suspended', () => {
    const [before, now] = testsOf('Badger').sort((a, b) => (a.openedAt ?? '').localeCompare(b.openedAt ?? ''))
    expect(before?.conclusion?.conclusion).toBe('accepted')
    expect(now && nextStep(now)).toMatchObject({ name: 'begin-stage', percent: 50 })
    expect(now?.loaded).not.toBeNull()
    expect(now?.opened?.people.lead.name).toBe('Ruben Ashby')
    const { clearance } = press('Badger')
    expect(clearance).toMatchObject({ is: 'suspended', clearance: { number: before?.opened?.number }, until: 'the test is over' })
    expect(mayItBeUsed(press('Badger'), today())).toMatchObject({ answer: 'under test' })
    expect(pressColumns(press('Badger'))).toMatchObject({ status: 'under test' })
  })

  it('Long Meg passed off-centre on two legs, and waits for the witness', () => {
    const state = only(testsOf('Long Meg'))
    expect(nextStep(state)).toEqual({ name: 'countersign' })
    expect(state.opened?.protocol.name).toBe('Off-centre')
    expect(state.legs.map((leg) => leg.climbs.length)).toEqual([1, 1])
    expect(evaluateTest(state).against).toEqual([])
    expect(proofTestColumns(state)).toMatchObject({ status: 'to countersign', result: 'accepted' })
    expect(mayItBeUsed(press('Long Meg'), today())).toMatchObject({
      answer: 'do not use',
      missing: [`The signatures of ${state.opened?.number}.`],
    })
  })

  it('Ferry, rated in metric tons-force and read in bar, is overdue', () => {
    const ferry = press('Ferry')
    expect(ferry.description?.ratedLoad.unit).toBe('metric-ton-force')
    expect(ferry.clearance).toMatchObject({ is: 'cleared', clearance: { gaugePressure: { unit: 'bar' } } })
    expect(mayItBeUsed(ferry, today())).toMatchObject({ answer: 'do not use', why: expect.stringContaining('run out') })
  })

  it('Wren was abandoned once, then passed by the shop’s own shorter protocol with a correction in its record', () => {
    const [abandoned, passed] = testsOf('Wren').sort((a, b) => (a.openedAt ?? '').localeCompare(b.openedAt ?? ''))
    expect(abandoned?.conclusion?.conclusion).toBe('abandoned')
    expect(abandoned?.stopped).toMatchObject({ cause: 'called', by: abandoned?.opened?.people.witness.id })
    expect(abandoned?.opened?.protocol).toMatchObject({ version: 1 })
    expect(passed?.opened).toMatchObject({ protocol: { version: 2 }, repeats: { id: abandoned?.id } })
    expect(passed?.corrections).toMatchObject([{ underLoad: true, readAgainByBoth: true }])
    expect(passed && evaluateTest(passed).against).toEqual([])
    expect(mayItBeUsed(press('Wren'), today())).toMatchObject({ answer: 'cleared', clearance: { gaugePressure: null, gaugeCode: 'LC-1' } })
  })
})

describe('its tooling', () => {
  it('stands on the test that used it and on the clearance, never weaker than the load, and one piece is out of use', async () => {
    const register = await select<{ code: string; retired: number }>(
      'SELECT code, retired_at IS NOT NULL AS retired FROM tooling ORDER BY code',
    )
    expect(register.map(({ code, retired }) => [code, Number(retired)])).toEqual([
      ['T-01', 0],
      ['T-02', 0],
      ['T-03', 0],
      ['T-04', 1],
    ])
    const { opened } = only(testsOf('Ox'))
    const pieces = opened?.press.train.filter(({ name }) => /^T-0/.test(name)) ?? []
    expect(pieces.map(({ name }) => name.slice(0, 4))).toEqual(['T-01', 'T-02'])
    for (const { ratedForce } of pieces)
      expect(ratedForce && toSI(ratedForce)).toBeGreaterThan(toSI(opened?.press.ratedLoad ?? { text: '', unit: 'N' }))
    const answer = mayItBeUsed(press('Ox'), today())
    expect(answer.answer === 'cleared' && answer.clearance.tooling.join()).toMatch(/T-01.*T-02/)
    expect(await select('SELECT code FROM tags')).toHaveLength(1)
  })
})

describe('its instruments', () => {
  it('are of every kind, in date, out of date, out of tolerance and never compared', async () => {
    const latest = await select<{ code: string; kind: string; details: Calibration | null }>(
      `SELECT i.code, i.kind, (SELECT c.details FROM calibrations c WHERE c.instrument_id = i.id ORDER BY c.calibrated_on DESC LIMIT 1) AS details
         FROM instruments i`,
    )
    const states = latest.map(({ code, kind, details }) => `${kind} ${code.slice(0, 2)} ${calibrationState(details, today())}`)
    expect(new Set(states)).toEqual(
      new Set([
        'gauge PG in-date',
        'gauge PG out-of-date',
        'gauge PG out-of-tolerance',
        'load-cell LC in-date',
        'indicator DI in-date',
        'indicator DI out-of-date',
        'indicator DD in-date',
        'indicator DD out-of-tolerance',
        'indicator SR never',
      ]),
    )
    expect(latest.some(({ kind, details }) => kind === 'gauge' && details?.uncertainty?.k === 2)).toBe(true)
  })

  it('had their calibration on the day of each test, and none from after it', () => {
    for (const { state } of tests.values()) {
      const day = state.openedAt?.slice(0, 10) ?? ''
      for (const { calibration } of state.opened?.instruments ?? []) {
        expect(calibrationState(calibration, day)).toBe('in-date')
        expect((calibration?.calibratedOn ?? '') <= day).toBe(true)
      }
    }
  })
})

describe('the demo’s photos and certificates', () => {
  it('stand in a press’s history, in a signed test, in one under way and with a calibration, and open', async () => {
    const named = [
      ...[...presses.values()].flatMap(({ history }) => history.flatMap(({ attachments }) => attachments)),
      ...[...tests.values()].flatMap(({ state }) => state.attachments),
    ]
    expect(named.map(({ name }) => name).sort()).toEqual(['Column weld, opened', 'Head beam, left', 'Left upright'])
    const certificates = await select<{ sha256: string }>('SELECT file_sha256 AS sha256 FROM calibrations WHERE file_sha256 IS NOT NULL')
    expect(certificates).toHaveLength(1)
    const kept = await select<{ shopId: string; sha256: string; type: string }>('SELECT shop_id AS shopId, sha256, type FROM attachments')
    expect(kept.map(({ sha256 }) => sha256).sort()).toEqual([...named, ...certificates].map(({ sha256 }) => sha256).sort())
    for (const { shopId, sha256, type } of kept) {
      const bytes = await context.storage.get(`${shopId}/${sha256}`)
      if (type === 'application/pdf') expect(bytes?.toString('latin1')).toContain('DEMO CERTIFICATE')
      else expect(bytes && (await smallerPicture(bytes, 320))).toMatchObject({ width: 320, height: 240 })
    }
  })
})

describe('a second start', () => {
  it('loads nothing again, and says the same sign-ins', async () => {
    const count = () => select('SELECT (SELECT COUNT(*) FROM shops) AS shops, (SELECT COUNT(*) FROM ledger_entries) AS entries')
    const before = await count()
    expect(await loadDemoShop(context)).toEqual(signIns)
    expect(await count()).toEqual(before)
  })

  it('no longer prints what somebody has changed', async () => {
    const [first, ...rest] = signIns
    await User.update({ passwordHash: 'changed' }, { where: { email: first?.email } })
    expect(await loadDemoShop(context)).toEqual(rest)
    expect(signInLines([])).toBe('')
  })
})
