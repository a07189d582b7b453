import { describe, expect, it } from 'vitest'
import { ledgerFileBytes, ledgerFileOf, PUBLIC_KEY, SECRET_KEY } from '../../tests/factories/ledger-file'
import { recordedTest, stoppedTest, storedEntries, twoLegTest } from '../../tests/factories/recorded-test'
import { seededRandom } from '../../tests/reference/seeded-random'
import { SIGNATURE_KINDS } from '../proof-test/entries'
import { canonicalText } from './canonical'
import { sha256Hex } from './chain'
import { fingerprintOf, kidOf, SEALED_KINDS } from './check-ledger'
import type { LedgerFile } from './ledger-file'
import { publicKeyOf, signText } from './seal'
import { bytesToUtf8, utf8ToBytes } from './utf8'
import { verifyLedgerFile } from './verify-ledger-file'

const bytes = ledgerFileBytes()
const text = bytesToUtf8(bytes)
const fingerprint = fingerprintOf(PUBLIC_KEY)
const ANOTHER_SECRET = 'a7'.repeat(32)

/** The file with something else in it; its own signature stays. */
function changed(change: (file: LedgerFile) => void): Uint8Array {
  const file = JSON.parse(text) as LedgerFile
  change(file)
  return utf8ToBytes(canonicalText(file))
}

/** The file written anew by somebody who holds the key. */
function rewritten(change: (file: LedgerFile) => void, secretKey = SECRET_KEY): Uint8Array {
  const { signature: _signature, ...body } = JSON.parse(bytesToUtf8(changed(change))) as LedgerFile
  return utf8ToBytes(canonicalText({ ...body, signature: signText(canonicalText(body), secretKey) }))
}

/** Chains entries anew from a number on, as a forger with the database would. */
function rechained(file: LedgerFile, from: number): void {
  for (let index = from - 1; index < file.entries.length; index += 1) {
    const entry = file.entries[index]
    if (!entry) continue
    const before = file.entries[index - 1]?.hash
    const canonical =
      before === undefined ? entry.canonical : canonicalText({ ...(JSON.parse(entry.canonical) as object), prevHash: before })
    file.entries[index] = { ...entry, canonical, hash: sha256Hex(canonical) }
  }
}

describe('a ledger file', () => {
  it('is whole as it was written, and says who signed, what it meant and when', () => {
    const check = verifyLedgerFile(bytes, { trustedKeys: [fingerprint] })
    expect(check).toMatchObject({ verdict: 'whole', entries: recordedTest().entries.length, keysKnown: true, afterSeal: [] })
    expect(check.verdict === 'whole' && check.seals.map(({ kind, printedName, meaning }) => [kind, printedName, meaning])).toEqual([
      ['signed', 'Marit Sandoval', 'I ran this test and these are its readings.'],
      ['countersigned', expect.any(String), 'I was present and read the gauge myself.'],
    ])
  })

  it('compares its keys with those known from elsewhere, however they are written', () => {
    const groups = fingerprint.toUpperCase().match(/.{4}/g)?.join(' ') ?? ''
    for (const trusted of [fingerprint, groups, kidOf(PUBLIC_KEY)]) {
      expect(verifyLedgerFile(bytes, { trustedKeys: [trusted] })).toMatchObject({ verdict: 'whole' })
    }
    for (const trusted of ['', fingerprint.slice(0, 12), fingerprintOf(publicKeyOf(ANOTHER_SECRET))]) {
      expect(verifyLedgerFile(bytes, { trustedKeys: [trusted] })).toMatchObject({ verdict: 'wrong key', fingerprints: [fingerprint] })
    }
    expect(verifyLedgerFile(bytes)).toMatchObject({ verdict: 'whole', keysKnown: false })
  })

  it('that somebody else wrote and signed throughout is whole in itself, and of the wrong key', () => {
    const forged = ledgerFileBytes(ledgerFileOf(twoLegTest(), ANOTHER_SECRET), ANOTHER_SECRET)
    expect(verifyLedgerFile(forged)).toMatchObject({ verdict: 'whole', keysKnown: false })
    expect(verifyLedgerFile(forged, { trustedKeys: [fingerprint] })).toMatchObject({ verdict: 'wrong key' })
  })

  it('names the entry that was altered', () => {
    const at = (change: (file: LedgerFile) => void) => verifyLedgerFile(changed(change))
    expect(
      at((file) => {
        const entry = file.entries[30]
        if (entry) entry.canonical = entry.canonical.replace(/\d(?=")/, (digit) => String((Number(digit) + 1) % 10))
      }),
    ).toMatchObject({ verdict: 'altered', at: 31 })
    expect(at((file) => void file.entries.splice(11, 1))).toMatchObject({ verdict: 'altered', at: 12 })
    expect(at((file) => void file.entries.pop())).toMatchObject({ verdict: 'altered', at: recordedTest().entries.length })
  })

  it('whose entries were chained anew no longer fits its seal, even written by the key', () => {
    const forged = rewritten((file) => {
      const entry = file.entries[20]
      if (entry)
        file.entries[20] = { ...entry, canonical: entry.canonical.replace('"overrides":[]', '"overrides":[{"reason":"none","rule":"R1"}]') }
      rechained(file, 21)
    })
    const signed = recordedTest().entries.find(({ kind }) => kind === 'signed')?.seq
    expect(verifyLedgerFile(forged)).toMatchObject({ verdict: 'altered', at: signed })
  })

  it('whose seal was taken away is not whole, even written by the key', () => {
    const signed = recordedTest().entries.find(({ kind }) => kind === 'signed')?.seq
    expect(verifyLedgerFile(rewritten((file) => void file.seals.shift()))).toMatchObject({ verdict: 'altered', at: signed })
  })

  it('shows a change of what stands beside the entries', () => {
    const changes: ((file: LedgerFile) => void)[] = [
      (file) => (file.title = 'PT-0044'),
      (file) => (file.shop = 'Another shop'),
      (file) => Object.keys(file.people).forEach((id) => (file.people[id] = 'Somebody Else')),
      (file) => (file.exportedAt = '2026-09-17T07:00:00.000Z'),
      (file) => file.keys.forEach((key) => (key.retired = true)),
      (file) => file.seals.forEach((seal) => (seal.sealedAt = '2026-09-17T07:00:00.000Z')),
      (file) => (file.signature = file.signature.toUpperCase()),
      (file) => Object.assign(file, { more: 1 }),
    ]
    for (const change of changes) expect(verifyLedgerFile(changed(change)), String(change)).toMatchObject({ verdict: 'altered outside' })
  })

  it('shows another layout of the same words: a blank, a member given twice, a mark at the front, another order', () => {
    const layouts = [
      `${text}\n`,
      text.replace('{"entries"', '{ "entries"'),
      text.replace('"format":', '"format":"quarterload ledger","format":'),
      `\uFEFF${text}`,
      JSON.stringify(JSON.parse(text), Object.keys(JSON.parse(text) as object).reverse()),
      text.replace('"formatVersion":1,', '"formatVersion":1.0,'),
      text.replace('Ziegler', '\\u005aiegler'),
      text.replace('Ziegler', '\\ud800'),
    ]
    for (const layout of layouts) expect(verifyLedgerFile(utf8ToBytes(layout)).verdict).toMatch(/^altered/)
  })

  it('says which seal belongs to another key', () => {
    const { seals } = ledgerFileOf(recordedTest(), ANOTHER_SECRET)
    const mixed = rewritten((file) => (file.seals = seals.map((seal) => ({ ...seal, kid: kidOf(PUBLIC_KEY) }))))
    expect(verifyLedgerFile(mixed)).toMatchObject({ verdict: 'wrong key', why: expect.stringContaining('was not made by key') })
    const unknown = rewritten((file) => (file.seals = seals))
    expect(verifyLedgerFile(unknown)).toMatchObject({ verdict: 'wrong key', why: expect.stringContaining('none of the keys') })
  })

  it('holds seals of a retired key beside those of today’s', () => {
    const old = publicKeyOf(ANOTHER_SECRET)
    const body = ledgerFileOf()
    const [lead] = ledgerFileOf(recordedTest(), ANOTHER_SECRET).seals
    const file = {
      ...body,
      seals: [lead, body.seals[1]].filter((seal) => seal !== undefined),
      keys: [...body.keys, { kid: kidOf(old), publicKey: old, retired: true }],
    }
    expect(verifyLedgerFile(ledgerFileBytes(file), { trustedKeys: [fingerprint, fingerprintOf(old)] })).toMatchObject({ verdict: 'whole' })
  })

  it('names what was added after the seal', () => {
    const signed = recordedTest()
    const late = recordedTest({ until: 'countersigned' })
    const last = signed.entries.at(-1)
    if (!last) throw new Error('There are entries.')
    const { hash, seq, receivedAt, irregular, prevHash, ...draft } = last
    const added = { ...draft, id: draft.deviceId, kind: 'observed', payload: { at: null, what: 'noise', note: 'A crack in the dark.' } }
    const canonical = canonicalText({ ...added, seq: seq + 1, receivedAt, irregular, prevHash: hash })
    const body = ledgerFileOf(late)
    const file = { ...body, entries: [...storedEntries(late.entries), { seq: seq + 1, canonical, hash: sha256Hex(canonical) }] }
    expect(prevHash).not.toBe(hash)
    expect(verifyLedgerFile(ledgerFileBytes(file))).toMatchObject({ verdict: 'whole', afterSeal: [{ seq: seq + 1, kind: 'observed' }] })
  })

  it('of a test under way is not sealed yet, and whole so far', () => {
    const file = ledgerFileBytes(ledgerFileOf(recordedTest({ until: 'row-read' })))
    expect(verifyLedgerFile(file)).toMatchObject({ verdict: 'not sealed yet', seals: [] })
  })

  it('is told from other files, and from one of a later version', () => {
    for (const other of ['', 'hello', '{}', 'null', '[1]', '{"format":"another"}', '%PDF-1.7']) {
      expect(verifyLedgerFile(utf8ToBytes(other))).toEqual({ verdict: 'not a ledger file' })
    }
    expect(verifyLedgerFile(Uint8Array.of(0xff, 0xd8, 0xff, 0xe0))).toEqual({ verdict: 'not a ledger file' })
    const later = rewritten((file) => Object.assign(file, { formatVersion: 2, somethingNew: [] }))
    expect(verifyLedgerFile(later)).toEqual({ verdict: 'newer version' })
  })

  it('is not whole after any of a seeded choice of one-byte changes, cuts and insertions', () => {
    const { rectangular } = seededRandom(20_260_915)
    const random = () => rectangular(0.5) + 0.5
    const small = ledgerFileBytes(ledgerFileOf(stoppedTest()))
    const kept = ['whole', 'not sealed yet']
    for (let at = Math.floor(random() * 37); at < small.length; at += 200 + Math.floor(random() * 900)) {
      const flipped = small.slice()
      flipped[at] = (flipped[at] ?? 0) ^ (1 << Math.floor(random() * 8))
      const cut = Uint8Array.from(small.filter((_byte, index) => index !== at))
      const added = new Uint8Array(small.length + 1)
      added.set(small.subarray(0, at))
      added.set(small.subarray(at), at + 1)
      added[at] = Math.floor(random() * 256)
      for (const [how, other] of Object.entries({ flipped, cut, added })) {
        expect(kept, `byte ${at} ${how}`).not.toContain(verifyLedgerFile(other).verdict)
      }
    }
  }, 60_000)

  it('knows the same kinds of signatures as the test’s own ledger', () => {
    expect([...SEALED_KINDS].sort()).toEqual([...SIGNATURE_KINDS].sort())
  })
})
