import 'fake-indexeddb/auto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { appendResponseSchema, entriesResponseSchema } from '#shared/api/ledger'
import { applyProofTest, foldProofTest } from '#shared/proof-test/apply'
import { nextStep } from '#shared/proof-test/steps'
import { Disconnected, readProblem } from '../../src/lib/problem'
import { ApiRun, type Staff } from '../factories/api-run'
import { aimClientsAt } from '../factories/client'
import { openStaffedShop, type SignedInPerson } from '../factories/people'
import { expectInOrder, expectOnce, expectWhole } from '../support/ledger-checks'
import { isFullRun, pauseFor, runSeed, Seeded } from '../support/seeded'
import { Tablet, type Deliver } from '../support/tablet'
import { killBrowsers } from './browser-kills'
import { Rig } from './rig'
import { killsByProcess, leaveTotals, Tally } from './tally'

const seed = runSeed()
/** A start of the server takes seconds, of its database a fraction of one. */
const times = isFullRun() ? { server: 64, database: 118 } : { server: 3, database: 5 }
const browserTimes = isFullRun() ? 24 : 2
const tally = new Tally()
let rig: Rig
let staff: Staff
/** Requests that the server answered, and when it last did. */
const answered = { times: 0, at: 0 }
/** Requests that a kill cut off under way, or that nobody was there to answer. */
let cutOff = 0

/** One at a time: a test is opened while everything runs, and nothing is opened while something is being killed. */
class Turn {
  private last: Promise<unknown> = Promise.resolve()

  take<T>(work: () => Promise<T>): Promise<T> {
    const mine = this.last.then(work)
    this.last = mine.catch(() => undefined)
    return mine
  }
}
const turn = new Turn()

const deliverAs =
  (person: SignedInPerson): Deliver =>
  async (testId, request) => {
    let response
    try {
      response = await person.client.post(`/api/proof-tests/${testId}/entries`, request).timeout(20_000)
    } catch (failure) {
      cutOff += 1
      throw new Disconnected(failure)
    }
    if (response.status !== 200) throw readProblem(response.status, response.body)
    answered.times += 1
    answered.at = Date.now()
    return appendResponseSchema.parse(response.body)
  }

const tabletOf = (person: SignedInPerson): Tablet =>
  new Tablet({
    name: person.name,
    userId: person.userId,
    deliver: deliverAs(person),
    whoIsSignedIn: () => Promise.resolve(person.userId),
    again: () => 60,
  })

interface Driven {
  run: ApiRun
  tablets: Tablet[]
}

async function sent(tablet: Tablet, run: ApiRun): Promise<void> {
  // However slow the machine and however often it is killed meanwhile: it must get on.
  const begun = Date.now()
  while (!tablet.isSent(run.id)) {
    if (Date.now() - Math.max(begun, answered.at) > 120_000) throw new Error(`${tablet.name} can’t send what waits.`)
    await pauseFor(10)
  }
}

/** A whole test from the walk-down to its conclusion, entered as fast as two people never could. */
async function drive(random: Seeded, driven: Driven[]): Promise<void> {
  const run = await turn.take(() => ApiRun.open({ staff }))
  const lead = tabletOf(staff.lead)
  const witness = tabletOf(staff.witness)
  driven.push({ run, tablets: [lead, witness] })
  let last = lead
  for (;;) {
    const drafts = run.draftsFor(nextStep(run.state))
    if (drafts.length === 0) break
    for (const [device, draft] of drafts) {
      const tablet = device === run.lead ? lead : witness
      // Each goes on from what the other has entered, as people do.
      if (tablet !== last) await sent(last, run)
      last = tablet
      await pauseFor(random.between(0, 30))
      const entry = await tablet.enter(run.id, draft, device.clock)
      const seq = run.state.headSeq + 1
      run.state = applyProofTest(run.state, { ...entry, seq, receivedAt: entry.observedAt, irregular: [], prevHash: '', hash: '' })
      if (random.chance(0.05)) tablet.reload()
    }
  }
  await sent(lead, run)
  await sent(witness, run)
}

async function entriesOf(path: string) {
  return entriesResponseSchema.parse((await staff.lead.client.get(path).expect(200)).body)
}

/** Before anything is judged, so that a run that failed is counted too. */
async function count({ run, tablets }: Driven): Promise<void> {
  for (const tablet of tablets) for (const id of tablet.acknowledged.keys()) tally.acknowledged(id)
  tally.saw((await entriesOf(run.path)).entries.map((entry) => entry.id))
}

async function check({ run, tablets }: Driven): Promise<void> {
  const { entries, headHash } = await entriesOf(run.path)
  expectWhole(entries, headHash)
  for (const tablet of tablets) {
    expectOnce(entries, tablet.written)
    // Word for word what the server answered, number and hash included.
    expectOnce(entries, [...tablet.acknowledged.values()])
    expectInOrder(entries, [tablet.deviceId])
  }
  expect(entries.flatMap((entry) => entry.irregular)).toEqual([])
  expect(foldProofTest(run.id, entries).conclusion?.conclusion).toBe('accepted')
  const press = await entriesOf(`/api/presses/${run.pressId}/entries`)
  expectWhole(press.entries, press.headHash)
}

/** A moment in the middle of a run: so many requests answered later, on a slow machine as on a fast one. */
async function untilAnswered(more: number): Promise<void> {
  const wanted = answered.times + more
  const end = Date.now() + 20_000
  while (answered.times < wanted && Date.now() < end) await pauseFor(2)
}

/** Kills until each has been killed as often as planned; a moment later or in the middle of the next start. */
async function killAtRandom(random: Seeded, stop: AbortSignal): Promise<void> {
  const left = { ...times }
  const all = left.server + left.database
  for (let said = 0; left.server + left.database > 0 && !stop.aborted;) {
    const done = all - left.server - left.database
    if (isFullRun() && done >= said + 20) process.stdout.write(`${(said = done)} of ${all} kills, seed ${seed}\n`)
    await untilAnswered(random.between(0, 8))
    await pauseFor(random.between(0, 60))
    const again = random.chance(0.15) ? 1 : 0
    await turn.take(async () => {
      const victim = random.next() * (left.server + left.database) < left.server ? 'server' : 'database'
      if (left.server > 0 && left.database > 0 && random.chance(0.12)) {
        left.server -= 1
        left.database -= 1
        const more = Math.min(again, left.server)
        left.server -= more
        await rig.killBoth(random, more)
      } else {
        const more = Math.min(again, left[victim] - 1)
        left[victim] -= 1 + more
        await (victim === 'server' ? rig.killServer(random, more) : rig.killDatabase(random, more))
      }
    })
  }
}

beforeAll(async () => {
  rig = await Rig.open(tally)
  aimClientsAt(rig.address)
  staff = await openStaffedShop()
})

afterAll(async () => {
  await rig.close()
  leaveTotals('kills', tally.totals())
  process.stdout.write(
    `kills: ${tally.line()} (${killsByProcess(tally.totals())}; ${cutOff} requests cut off, ${rig.cutShort} starts cut short, ${rig.failedStarts} failed; SEED=${seed})\n`,
  )
})

describe(`kill -9 of the server and of its database during runs, seed ${seed}`, () => {
  it('runs on a database that keeps what it commits', () => {
    const options = rig.databaseOptions()
    expect(options).toContain('--innodb-flush-log-at-trx-commit=1')
    expect(options.filter((option) => /(doublewrite|sync-binlog)=0/.test(option))).toEqual([])
  })

  it('loses nothing that was shown as on the server, and writes nothing twice', async () => {
    const driven: Driven[] = []
    let over = false
    const stuck = new AbortController()
    const killing = killAtRandom(new Seeded(seed), stuck.signal).finally(() => {
      over = true
    })
    const driving = (async () => {
      for (let number = 1; !over; number += 1) await drive(new Seeded(seed + number), driven)
    })().finally(() => stuck.abort())
    const outcomes = await Promise.allSettled([killing, driving])
    for (const tablet of driven.flatMap((one) => one.tablets)) tablet.close()
    await rig.killBoth(new Seeded(seed))
    for (const one of driven) await count(one)
    expect(tally.lost()).toEqual([])
    expect(tally.duplicated()).toEqual([])
    expect(outcomes.flatMap((outcome) => (outcome.status === 'rejected' ? [outcome.reason as unknown] : []))).toEqual([])
    for (const one of driven) await check(one)
    expect(tally.totals().acknowledged).toBeGreaterThan(3 * (times.server + times.database))
    expect(rig.failedStarts, 'starts that ended by themselves').toBe(0)
    expect(rig.errors(), 'the server logs no error').toEqual([])
  })

  it('shows again what a killed browser showed as kept, and has it on the server once', async () => {
    await killBrowsers({ address: rig.address, staff, tally }, browserTimes, new Seeded(seed))
    expect(tally.lost()).toEqual([])
    expect(tally.duplicated()).toEqual([])
    expect(rig.errors(), 'the server logs no error').toEqual([])
  })
})
