import { describe, expect, it } from 'vitest'
import { recordedTest } from '../../tests/factories/recorded-test'
import { checkChain, draftText, entryText, type StoredEntry } from './chain'
import type { LedgerEntry } from './envelope'

function storedAs(entry: LedgerEntry): StoredEntry {
  const { seq, receivedAt, irregular, prevHash, hash, ...draft } = entry
  return { seq, canonical: entryText(draft, { seq, receivedAt, irregular, prevHash }), hash }
}

const entries = recordedTest({ until: 'stage-begun' }).entries
const stored = entries.map(storedAs)

describe('the chain of a ledger', () => {
  it('is whole as it was written', () => {
    expect(checkChain(stored)).toEqual({ whole: true, entries: stored.length, headHash: entries.at(-1)?.hash })
  })

  it('shows a change of any single character of an entry, by its number', () => {
    const victim = stored[4]
    if (!victim) throw new Error('There are more entries.')
    for (let at = 0; at < victim.canonical.length; at += 1) {
      const other = victim.canonical[at] === 'x' ? 'y' : 'x'
      const canonical = victim.canonical.slice(0, at) + other + victim.canonical.slice(at + 1)
      expect(checkChain(stored.map((entry) => (entry === victim ? { ...entry, canonical } : entry)))).toMatchObject({
        whole: false,
        brokenAt: 5,
      })
    }
  })

  it('shows an entry left out, swapped, put in twice or rehashed', () => {
    const [first, second, ...rest] = stored
    if (!first || !second) throw new Error('There are more entries.')
    expect(checkChain([first, ...rest])).toMatchObject({ whole: false, brokenAt: 2 })
    expect(checkChain([second, first, ...rest])).toMatchObject({ whole: false, brokenAt: 1 })
    expect(checkChain([first, first, second, ...rest])).toMatchObject({ whole: false, brokenAt: 2 })
    const forged = entries.map((entry, index) => storedAs(index === 1 ? { ...entry, authorId: entry.id } : entry))
    expect(checkChain(forged)).toMatchObject({ whole: false, brokenAt: 2 })
  })
})

describe('the text of a draft', () => {
  it('leaves out what the server added, so that a resend is told from another entry', () => {
    const [entry] = entries
    if (!entry) throw new Error('There is an entry.')
    expect(draftText({ ...entry, seq: 99, hash: 'x', irregular: ['R1'] } as LedgerEntry)).toBe(draftText(entry))
    expect(draftText({ ...entry, deviceSeq: 99 })).not.toBe(draftText(entry))
  })
})
