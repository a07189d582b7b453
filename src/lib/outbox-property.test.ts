// @vitest-environment jsdom
import 'fake-indexeddb/auto'
import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { LedgerDouble, type Link } from '../../tests/support/ledger-double'
import { Outbox } from './outbox'

const testId = '01990000-0000-7000-8000-000000000001'
const lead = '01990000-0000-7000-8000-000000000003'
const other = '01990000-0000-7000-8000-000000000004'

const SEED = Number(process.env['SEED'] ?? 20_261_201)

type Act =
  | { do: 'enqueue'; tab: number; by: string }
  | { do: 'link'; link: Link }
  | { do: 'sign'; as: string | null }
  | { do: 'reload'; tab: number }
  | { do: 'wait' }
  | { do: 'server goes back'; by: number }

const tab = fc.integer({ min: 0, max: 1 })
const act: fc.Arbitrary<Act> = fc.oneof(
  { weight: 6, arbitrary: fc.record({ do: fc.constant('enqueue' as const), tab, by: fc.constantFrom(lead, lead, other) }) },
  {
    weight: 3,
    arbitrary: fc.record({ do: fc.constant('link' as const), link: fc.constantFrom<Link>('loses-request', 'loses-answer', 'duplicates') }),
  },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('sign' as const), as: fc.constantFrom(lead, other, null) }) },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('reload' as const), tab }) },
  { weight: 2, arbitrary: fc.constant({ do: 'wait' as const }) },
  { weight: 1, arbitrary: fc.record({ do: fc.constant('server goes back' as const), by: fc.integer({ min: 1, max: 4 }) }) },
)

let names = 0

/** Two tabs of one browser, with no locks to keep them apart, before a server with a bad link. */
class Browser {
  private readonly name = `property-${(names += 1)}`
  private tabs: Outbox[]
  constructor(private readonly server: LedgerDouble) {
    this.tabs = [this.open(), this.open()]
  }

  private open(): Outbox {
    const { post, read, whoIsSignedIn } = this.server
    const box = new Outbox({ databaseName: this.name, post, read, whoIsSignedIn, delay: () => 1 })
    box.sendAs(this.server.signedIn)
    return box
  }

  tab(index: number): Outbox {
    const box = this.tabs[index]
    if (!box) throw new Error('There are two tabs.')
    return box
  }

  reload(index: number): void {
    this.tab(index).close()
    this.tabs[index] = this.open()
  }

  async settle(): Promise<void> {
    for (const person of [lead, other, lead]) {
      this.server.signedIn = person
      for (const index of [0, 1]) this.reload(index)
      for (let round = 0; round < 400; round += 1) {
        await Promise.all(this.tabs.map((box) => box.settled()))
        const { waiting } = await this.tab(0).contents()
        if (!waiting.some(({ entry }) => entry.authorId === person)) break
        await new Promise((resolve) => setTimeout(resolve, 2))
      }
    }
  }

  close(): void {
    for (const box of this.tabs) box.close()
  }
}

describe('the outbox, whatever happens to it', () => {
  it(`has every entry on the server once, in the order of its device (seed ${SEED})`, { timeout: 120_000 }, async () => {
    await fc.assert(
      fc.asyncProperty(fc.array(act, { minLength: 5, maxLength: 40 }), async (acts) => {
        const server = new LedgerDouble(lead)
        const browser = new Browser(server)
        const made: { id: string; deviceSeq: number }[] = []
        let wentBack = false
        for (const [index, one] of acts.entries()) {
          if (one.do === 'enqueue') {
            const draft = { ledgerId: testId, kind: 'observed', payload: { note: String(index) }, authorId: one.by, basedOnSeq: 0 }
            const { id, deviceSeq } = await browser.tab(one.tab).enqueue(testId, draft)
            made.push({ id, deviceSeq })
          } else if (one.do === 'link') server.link.push(one.link)
          else if (one.do === 'sign') server.signedIn = one.as
          else if (one.do === 'reload') browser.reload(one.tab)
          else if (one.do === 'wait') await new Promise((resolve) => setTimeout(resolve, 3))
          else if (server.kept.length > 0) {
            server.backTo(Math.max(0, server.kept.length - one.by))
            wentBack = true
          }
        }
        server.link = []
        await browser.settle()
        browser.close()
        expect(server.ids.toSorted()).toEqual(made.map(({ id }) => id).toSorted())
        expect(made.map(({ deviceSeq }) => deviceSeq)).toEqual(made.map((_one, index) => index + 1))
        // What a person made stands in the order it was made, unless the server itself forgot and was told again.
        for (const person of wentBack ? [] : [lead, other]) {
          const numbers = server.kept.filter((entry) => entry.authorId === person).map((entry) => entry.deviceSeq)
          expect(numbers).toEqual(numbers.toSorted((a, b) => a - b))
        }
      }),
      { seed: SEED, numRuns: Number(process.env['RUNS'] ?? 60) },
    )
  })
})
