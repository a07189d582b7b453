import { describe, expect, it } from 'vitest'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { foldProofTest } from '#shared/proof-test/apply'
import { ids } from '../../../tests/factories/test-press'
import { recordedTest } from '../../../tests/factories/recorded-test'
import { mergeEntries, wholeUpTo } from '../../lib/known-ledger'
import { irregularUnderLoad, LedgerFold } from './ledger-view'

const { entries } = recordedTest()
const draftOf = ({ seq: _seq, receivedAt: _at, irregular: _irregular, prevHash: _prev, hash: _hash, ...draft }: LedgerEntry): EntryDraft =>
  draft
const underLoad = entries.slice(
  0,
  entries.findLastIndex((entry) => entry.kind === 'stage-begun' && entry.observedAt < '2026-09-15T10:41') + 1,
)

describe('a test’s ledger as a device sees it', () => {
  it('takes each entry once, in order, and asks on from the first gap', () => {
    const some = [entries[0], entries[1], entries[4]].filter((entry) => entry !== undefined)
    const merged = mergeEntries(some, entries.slice(1, 3))
    expect(merged.map(({ seq }) => seq)).toEqual([1, 2, 3, 5])
    expect(wholeUpTo(merged)).toBe(3)
    expect(mergeEntries(merged, entries.slice(0, 2))).toBe(merged)
  })

  it('folds the server’s entries and its own behind them to the same state as the whole ledger', () => {
    const fold = new LedgerFold(ids.test)
    const [known, mine] = [entries.slice(0, 20), entries.slice(20, 27)]
    const folded = fold.fold(known, mine.map(draftOf))
    const wanted = foldProofTest(ids.test, entries.slice(0, 27))
    expect(folded.pending).toBe(7)
    expect(folded.state.position).toEqual(wanted.position)
    expect(folded.state.headSeq).toBe(27)
    expect(folded.server.headSeq).toBe(20)
  })

  it('counts an entry once that the server has and the outbox still holds', () => {
    const fold = new LedgerFold(ids.test)
    const folded = fold.fold(entries.slice(0, 21), entries.slice(20, 21).map(draftOf))
    expect(folded.pending).toBe(0)
    expect(folded.state.entryCount).toBe(21)
  })

  it('gives the same state whether the entries came at once or one by one', () => {
    const fold = new LedgerFold(ids.test)
    for (let count = 1; count <= entries.length; count += 1) fold.fold(entries.slice(0, count), [])
    expect(fold.fold(entries, []).state).toEqual(foldProofTest(ids.test, entries))
  })

  it('sees that an own entry goes against an interlock once somebody else’s stop is in', () => {
    const fold = new LedgerFold(ids.test)
    const [last] = underLoad.slice(-1)
    const row = entries[underLoad.length]
    if (!last || !row) throw new Error('The recorded test has a row after its stage.')
    expect(row.kind).toBe('row-read')
    const stopped: LedgerEntry = {
      ...last,
      id: '01994a00-00ff-7000-8000-000000000001',
      seq: last.seq + 1,
      kind: 'stopped',
      payload: { cause: 'called', why: 'Called by the witness' },
      hash: 'f'.repeat(64),
    }
    const before = fold.fold(underLoad, [draftOf(row)])
    expect(irregularUnderLoad(before.state, before.entries)).toEqual([])
    const after = fold.fold([...underLoad, stopped], [draftOf(row)])
    expect(irregularUnderLoad(after.state, after.entries)).toEqual(['R20'])
  })
})
