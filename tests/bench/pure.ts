import { foldProofTest } from '#shared/proof-test/apply'
import type { LedgerEntry } from '#shared/ledger/envelope'
import { recordPdf } from '#server/records/pdf/record-pdf'
import { recordWorkbook } from '#server/records/record-workbook'
import { recordedTest, storedEntries } from '../factories/recorded-test'
import { inTurn, medianLine } from './measure'
import type { Line } from './measure'

/** What a test that goes on and on is made of; each of these may come any number of times. */
const repeated = new Set(['row-read', 'independent-read', 'decided', 'observed', 'joint-examined', 'paused', 'resumed'])

/** A recorded test, on and on until it has so many entries: the first of a climb, then its own facts over again. */
function longLedger(length: number): { id: string; entries: LedgerEntry[] } {
  const { id, entries } = recordedTest({ until: 'set-read' })
  const again = entries.filter((entry) => repeated.has(entry.kind))
  const long = [...entries]
  while (long.length < length) {
    const next = again[long.length % again.length]
    if (next === undefined) throw new Error('A recorded test has readings.')
    long.push({ ...next, seq: long.length + 1 })
  }
  return { id, entries: long.slice(0, length) }
}

export async function pureLines(): Promise<Line[]> {
  const { id, entries } = longLedger(10_000)
  const [folded = []] = await inTurn([() => Promise.resolve(foldProofTest(id, entries))], 30)

  const recorded = recordedTest({})
  const source = {
    id: recorded.id,
    stored: storedEntries(recorded.entries),
    people: recorded.people,
    seals: [],
    writtenAt: '2026-09-21T08:00:00.000Z',
  }
  const [written = []] = await inTurn([() => recordWorkbook(source)], 15)
  const printed = async (): Promise<void> => {
    for await (const _part of recordPdf(source, { paper: 'a4', checkAddress: 'https://press.example/check' })) continue
  }
  const [set = []] = await inTurn([printed], 15)
  return [
    medianLine('apply over 10,000 entries', folded, 20),
    medianLine('one record.xlsx', written, 300),
    medianLine('one record.pdf', set, 1000),
  ]
}
