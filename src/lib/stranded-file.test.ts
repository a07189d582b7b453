import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { canonicalText } from '#shared/ledger/canonical'
import { sha256Hex } from '#shared/ledger/chain'
import type { EntryDraft } from '#shared/ledger/envelope'
import { readStrandedFile, strandedFile, strandedFileName } from './stranded-file'

const id = (end: string) => `01990000-0000-7000-8000-0000000000${end}`
const draft = (deviceSeq: number, more: Partial<EntryDraft> = {}): EntryDraft => ({
  id: id(String(10 + deviceSeq)),
  ledgerId: id('01'),
  kind: 'observed',
  v: 1,
  payload: { at: null, what: 'noise', note: `Number ${deviceSeq}, “left” pin.` },
  authorId: id('03'),
  deviceId: id('05'),
  deviceSeq,
  basedOnSeq: 4,
  observedAt: '2026-09-15T12:05:00.000Z',
  bootId: id('06'),
  monotonicMs: 900,
  attachments: [],
  overrides: [],
  ...more,
})
const author = { id: id('03'), name: 'Rosa Lindqvist' }
const savedAt = new Date('2026-09-15T13:00:00.000Z')
const entries = [draft(1), draft(2)].map((entry) => ({ testId: id('01'), entry }))
const text = strandedFile({ author, entries, savedAt })
const said = (of: string) => {
  const read = readStrandedFile(of)
  return read.whole ? 'whole' : read.says
}

describe('a file of stranded entries', () => {
  it('gives back exactly what was saved, and whose it is', () => {
    const read = readStrandedFile(text)
    expect(read.whole && read.file.entries).toEqual(entries)
    expect(read.whole && read.file.author).toEqual(author)
    expect(strandedFileName(savedAt)).toBe('quarterload-entries-2026-09-15T130000.json')
  })

  it('may be written with other spaces and line ends: they say nothing', () => {
    expect(said(JSON.stringify(JSON.parse(text)))).toBe('whole')
    expect(said(text.replaceAll('\n', '\r\n'))).toBe('whole')
  })

  it('is refused when any one character that says something was changed', () => {
    const telling = [...text].flatMap((character, index) => (/\s/.test(character) ? [] : [index]))
    fc.assert(
      fc.property(fc.constantFrom(...telling), fc.constantFrom(...'09afxZ"{,'), (index, character) => {
        fc.pre(text[index] !== character)
        const changed = text.slice(0, index) + character + text.slice(index + 1)
        expect(readStrandedFile(changed).whole).toBe(false)
      }),
      { seed: 20_261_201, numRuns: 400 },
    )
  })

  it('is refused when it was cut short, at every length', () => {
    for (let length = 0; length < text.trimEnd().length; length += 1) expect(readStrandedFile(text.slice(0, length)).whole).toBe(false)
    expect(said(text.slice(0, 900))).toMatch(/damaged or changed on the way/)
  })

  it('says what else is wrong: another file, a newer one, one that mixes people', () => {
    const signed = (content: object) => JSON.stringify({ ...content, sha256: sha256Hex(canonicalText(content)) })
    const { sha256: _hash, ...content } = JSON.parse(text) as Record<string, unknown>
    expect(said('{"a":1}')).toMatch(/not a file of entries that Quarterload saved/)
    expect(said('%PDF-1.7')).toMatch(/not a file of entries that Quarterload saved/)
    expect(said(signed({ ...content, version: 2 }))).toMatch(/newer Quarterload/)
    expect(said(signed({ ...content, entries: [{ testId: id('01'), entry: { kind: 'observed' } }] }))).toMatch(/no entry/)
    const mixed = [...entries, { testId: id('01'), entry: draft(3, { authorId: id('04') }) }]
    expect(said(strandedFile({ author, entries: mixed, savedAt }))).toMatch(/more than one person/)
  })
})
