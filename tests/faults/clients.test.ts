import 'fake-indexeddb/auto'
import '../support/api-setup'
import fc from 'fast-check'
import { QueryTypes } from 'sequelize'
import { afterAll, describe, expect, it, vi } from 'vitest'
import { inTransaction } from '#server/context'
import { proofTestState } from '#server/ledger/folds'
import { readHead } from '#server/ledger/read'
import { appendResponseSchema, entriesResponseSchema } from '#shared/api/ledger'
import { checkChain, type StoredEntry } from '#shared/ledger/chain'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { foldProofTest } from '#shared/proof-test/apply'
import { Disconnected, readProblem } from '../../src/lib/problem'
import { ApiRun } from '../factories/api-run'
import { openStaffedShop, type SignedInPerson } from '../factories/people'
import { testServer } from '../support/api-server'
import { expectInOrder, expectOnce, expectWhole } from '../support/ledger-checks'
import { isFullRun, pauseFor, runSeed, Seeded } from '../support/seeded'
import { Tablet, type Deliver } from '../support/tablet'
import { leaveTotals, Tally } from './tally'

const seed = runSeed()
const runs = isFullRun() ? 40 : 6
const TABLETS = 4

type Command =
  | { do: 'enter'; tablet: number; fact: number }
  | { do: 'enter-and-reload'; tablet: number; fact: number }
  | { do: 'reload' | 'cut' | 'join' | 'read'; tablet: number }
  | { do: 'wait'; milliseconds: number }

interface Weather {
  /** Shares of requests that never arrive, whose answer never arrives, that arrive twice, that arrive after all. */
  lost: number
  unanswered: number
  twice: number
  late: number
  seed: number
}

const tablet = fc.integer({ min: 0, max: TABLETS - 1 })
const fact = fc.nat({ max: 999 })
const command: fc.Arbitrary<Command> = fc.oneof(
  { weight: 12, arbitrary: fc.record({ do: fc.constant('enter' as const), tablet, fact }) },
  { weight: 2, arbitrary: fc.record({ do: fc.constant('enter-and-reload' as const), tablet, fact }) },
  { weight: 5, arbitrary: fc.record({ do: fc.constantFrom('reload' as const, 'cut' as const, 'join' as const, 'read' as const), tablet }) },
  { weight: 3, arbitrary: fc.record({ do: fc.constant('wait' as const), milliseconds: fc.integer({ min: 1, max: 25 }) }) },
)
const share = fc.double({ min: 0, max: 0.4, noNaN: true })
const weather: fc.Arbitrary<Weather> = fc.record({ lost: share, unanswered: share, twice: share, late: share, seed: fc.nat() })

const tally = new Tally()

/** Any fact of a run, in any order: every one lands, most of them marked. */
function factOf(number: number, run: ApiRun): { kind: string; payload: object } {
  const joints = run.state.joints
  const joint = joints[number % joints.length]
  if (!joint) throw new Error('The example press has joints.')
  const facts = [
    { kind: 'observed', payload: { at: null, what: 'noise', note: `Heard ${number}` } },
    {
      kind: 'joint-examined',
      payload: {
        occasion: number % 2 === 0 ? 'before load' : 'after load',
        jointId: joint.joint.id,
        method: 'visual',
        result: number % 5 === 0 ? 'rejected' : 'accepted',
        remark: `${number}`,
        cold: true,
      },
    },
    { kind: 'paused', payload: { why: `Pause ${number}` } },
    { kind: 'resumed', payload: {} },
    { kind: 'leg-begun', payload: { leg: number % 3, bedHoleConfirmed: '4' } },
    { kind: 'stopped', payload: { cause: 'called', why: `Called ${number}` } },
    { kind: 'released', payload: { gaugeZero: true, ramClear: true } },
  ]
  const picked = facts[number % facts.length]
  if (!picked) throw new Error('There are facts.')
  return picked
}

/** One tablet's link: requests come late, twice, or not at all; so do answers. */
class Link {
  isCut = false
  isCalm = false
  private readonly random: Seeded
  private readonly underWay = new Set<Promise<unknown>>()

  constructor(
    private readonly weather: Weather,
    number: number,
    private readonly person: SignedInPerson,
  ) {
    this.random = new Seeded(weather.seed + 7919 * number)
  }

  deliver: Deliver = async (testId, request) => {
    const { random, weather } = this
    // All are drawn each time, so that one decision does not move the next.
    const [lost, unanswered, twice, late] = [weather.lost, weather.unanswered, weather.twice, weather.late].map(
      (share) => random.chance(share) && !this.isCalm,
    )
    const [there, back, again] = [random.between(0, 12), random.between(0, 12), random.between(5, 60)]
    await pauseFor(there)
    if (this.isCut || (lost && !late)) throw new Disconnected()
    const send = () => this.post(testId, request)
    // Given up by its sender, still on its way: it comes after whatever is sent next.
    if (late) this.later(again, send)
    if (lost) throw new Disconnected()
    if (twice) this.later(again, send)
    const answer = await send()
    await pauseFor(back)
    if (this.isCut || unanswered) throw new Disconnected()
    return answer
  }

  private async post(testId: string, request: Parameters<Deliver>[1]) {
    const response = await this.person.client.post(`/api/proof-tests/${testId}/entries`, request)
    if (response.status !== 200) throw readProblem(response.status, response.body)
    return appendResponseSchema.parse(response.body)
  }

  private later(milliseconds: number, send: () => Promise<unknown>): void {
    const stray = pauseFor(milliseconds).then(send)
    this.underWay.add(stray)
    void stray.finally(() => this.underWay.delete(stray))
  }

  async strays(): Promise<void> {
    while (this.underWay.size > 0) await Promise.all(this.underWay)
  }
}

/** What a device knows of the server's prefix: what was answered, and what it read after the last number it had. */
class View {
  private readonly known = new Map<number, LedgerEntry>()

  add(entries: Iterable<LedgerEntry>): void {
    for (const entry of entries) this.known.set(entry.seq, entry)
  }

  prefix(): LedgerEntry[] {
    const entries: LedgerEntry[] = []
    for (let next = this.known.get(1); next; next = this.known.get(next.seq + 1)) entries.push(next)
    return entries
  }

  async read(run: ApiRun, person: SignedInPerson): Promise<void> {
    const { body } = await person.client.get(`${run.path}?after=${this.prefix().length}`).expect(200)
    this.add(entriesResponseSchema.parse(body).entries)
  }
}

interface Site {
  run: ApiRun
  tablets: Tablet[]
  links: Link[]
  views: View[]
  people: SignedInPerson[]
}

async function obey(site: Site, order: Command): Promise<void> {
  if (order.do === 'wait') return pauseFor(order.milliseconds)
  const { tablet: number } = order
  const [one, link, view, person] = [site.tablets[number], site.links[number], site.views[number], site.people[number]]
  if (!one || !link || !view || !person) throw new Error('There is no such tablet.')
  switch (order.do) {
    case 'enter':
      await one.enter(site.run.id, factOf(order.fact, site.run))
      return
    case 'enter-and-reload':
      // Nobody saw whether this one was kept: it may come or not, but at most once.
      void one.enter(site.run.id, factOf(7 * order.fact, site.run)).catch(() => undefined)
      one.reload()
      return
    case 'reload':
      one.reload()
      return
    case 'read':
      return view.read(site.run, person)
    case 'cut':
    case 'join':
      link.isCut = order.do === 'cut'
  }
}

async function storedIn(run: ApiRun): Promise<(StoredEntry & { id: string })[]> {
  return testServer().context.database.query<StoredEntry & { id: string }>(
    'SELECT id, seq, canonical, hash FROM ledger_entries WHERE ledger_id = ? ORDER BY seq',
    { replacements: [run.id], type: QueryTypes.SELECT },
  )
}

async function expectOneState(site: Site): Promise<void> {
  const { run, tablets, views } = site
  const { database } = testServer().context
  const stored = await storedIn(run)
  // Before anything is judged, so that a run that failed is counted too.
  for (const one of tablets) for (const id of one.acknowledged.keys()) tally.acknowledged(id)
  tally.saw(stored.map(({ id }) => id))
  const head = await inTransaction({ database }, (transaction) => readHead(database, transaction, run.id))
  if (!head) throw new Error('The test has a ledger.')
  expect(checkChain(stored)).toEqual({ whole: true, entries: head.headSeq, headHash: head.headHash })
  const server = await inTransaction({ database }, (transaction) => proofTestState(database, transaction, head))

  for (const [index, one] of tablets.entries()) {
    const view = views[index]
    const person = site.people[index]
    if (!view || !person) throw new Error('Every tablet has a view.')
    view.add(one.acknowledged.values())
    await view.read(run, person)
    const entries = view.prefix()
    expectWhole(entries, head.headHash)
    expect(foldProofTest(run.id, entries), `what ${one.name} shows`).toEqual(server)
    expectOnce(entries, one.written)
    expectInOrder(entries, [one.deviceId])
  }
}

let staff: Awaited<ReturnType<typeof openStaffedShop>> | undefined

/** One test, four tablets of two people, everything that can happen on the way, and then a calm network. */
async function play(orders: readonly Command[], weather: Weather): Promise<void> {
  staff ??= await openStaffedShop()
  const { lead, witness } = staff
  const run = await ApiRun.open({ staff })
  const people = [lead, witness, lead, witness]
  const links = people.map((person, index) => new Link(weather, index, person))
  const tablets = people.map((person, index) => {
    const link = links[index]
    if (!link) throw new Error('Every tablet has a link.')
    return new Tablet({
      name: `${person.name}, tablet ${index + 1}`,
      userId: person.userId,
      deliver: link.deliver,
      whoIsSignedIn: () => Promise.resolve(person.userId),
      again: () => 5,
    })
  })
  const site: Site = { run, tablets, links, people, views: people.map(() => new View()) }
  try {
    for (const order of orders) await obey(site, order)
    for (const link of links) {
      link.isCut = false
      link.isCalm = true
    }
    for (const one of tablets) one.sendNow()
    await vi.waitFor(() => expect(tablets.filter((one) => !one.isSent(run.id)).map((one) => one.name)).toEqual([]), {
      timeout: 20_000,
      interval: 20,
    })
    await Promise.all(links.map((link) => link.strays()))
    await expectOneState(site)
  } finally {
    for (const one of tablets) one.close()
  }
}

afterAll(() => {
  leaveTotals('clients', tally.totals())
  process.stdout.write(`clients: ${runs} runs of ${TABLETS} tablets, ${tally.line()} (SEED=${seed})\n`)
})

describe(`several clients of one test on a bad network, seed ${seed}`, () => {
  it('always end in one identical state, with every entry there once, in its device’s order', async () => {
    await fc.assert(fc.asyncProperty(fc.array(command, { minLength: 15, maxLength: 60 }), weather, play), {
      seed,
      numRuns: runs,
      endOnFailure: true,
    })
    expect(tally.totals()).toMatchObject({ lost: 0, duplicated: 0 })
    expect(tally.totals().acknowledged).toBeGreaterThan(runs * 8)
  })
})
