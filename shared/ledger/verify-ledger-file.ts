import { bytesToUtf8, utf8ToBytes } from './utf8'
import { canonicalText } from './canonical'
import { checkChain, type StoredEntry } from './chain'
import { checkLedger, fingerprintOf, kidOf, type LedgerCheck } from './check-ledger'
import { LEDGER_FILE_FORMAT, LEDGER_FILE_VERSION, ledgerFileBodyText, ledgerFileSchema, type LedgerFile } from './ledger-file'
import { checkText } from './seal'

type Whole = Extract<LedgerCheck, { verdict: 'whole' }>

/** What a file came to. `keysKnown` is false while its keys were compared with nothing but themselves. */
export type FileCheck =
  | (Omit<Whole, 'verdict'> & { verdict: 'whole' | 'not sealed yet'; file: LedgerFile; keysKnown: boolean; fingerprints: string[] })
  | { verdict: 'altered'; at: number; why: string }
  | { verdict: 'altered outside'; why: string }
  | { verdict: 'wrong key'; why: string; fingerprints: string[] }
  | { verdict: 'not a ledger file' }
  | { verdict: 'newer version' }

export interface VerifyOptions {
  /** Keys known from elsewhere: public keys' fingerprints, whole or at least their first 16 digits. */
  trustedKeys?: readonly string[]
}

const outside = (why: string): FileCheck => ({ verdict: 'altered outside', why })

/** As people write a fingerprint down: groups, capitals. */
function plain(fingerprint: string): string {
  return fingerprint.replace(/[\s:.-]/g, '').toLowerCase()
}

/** True when a key's fingerprint is, or begins with, one of those that are trusted. Fewer than 16 digits match nothing. */
export function isTrusted(publicKey: string, trustedKeys: readonly string[]): boolean {
  const fingerprint = fingerprintOf(publicKey)
  return trustedKeys.map(plain).some((trusted) => trusted.length >= 16 && fingerprint.startsWith(trusted))
}

const ENTRY = /\{"canonical":("(?:[^"\\]|\\[^])*"),"hash":"([0-9a-f]{64})","seq":([1-9]\d{0,8})\}/g

/** What can still be told from a file that is no longer JSON: which entry broke it. */
function checkFragments(text: string): FileCheck {
  const entries: StoredEntry[] = []
  for (const [, canonical = '', hash = '', seq = ''] of text.matchAll(ENTRY)) {
    let stored = ''
    try {
      stored = JSON.parse(canonical) as string
    } catch {
      // A text that can't be read hashes to nothing it claims to be.
    }
    entries.push({ canonical: stored, hash, seq: Number(seq) })
  }
  const chain = checkChain(entries)
  if (!chain.whole) return { verdict: 'altered', at: chain.brokenAt, why: chain.why }
  const begun = text.split(',"hash":"').length - 1
  if (begun > chain.entries) {
    return { verdict: 'altered', at: chain.entries + 1, why: `Entry ${chain.entries + 1} can no longer be read.` }
  }
  return outside('It can no longer be read as a whole: something beside the entries was changed or cut off.')
}

const looksLikeOurs = (text: string): boolean => text.includes('{"canonical":"') && text.includes('"prevHash')

function readFile(bytes: Uint8Array): { file: LedgerFile } | { answer: FileCheck } {
  const text = bytesToUtf8(bytes)
  let parsed: unknown
  try {
    parsed = JSON.parse(text)
  } catch {
    return { answer: looksLikeOurs(text) ? checkFragments(text) : { verdict: 'not a ledger file' } }
  }
  const file = ledgerFileSchema.safeParse(parsed)
  if (file.success) return { file: file.data }
  const { format, formatVersion } = (parsed ?? {}) as { format?: unknown; formatVersion?: unknown }
  if (format !== LEDGER_FILE_FORMAT) return { answer: looksLikeOurs(text) ? checkFragments(text) : { verdict: 'not a ledger file' } }
  if (typeof formatVersion === 'number' && formatVersion > LEDGER_FILE_VERSION) return { answer: { verdict: 'newer version' } }
  const [issue] = file.error.issues
  const [part, index] = issue?.path ?? []
  if (part === 'entries' && typeof index === 'number') {
    return { answer: { verdict: 'altered', at: index + 1, why: `Entry ${index + 1} is not written as entries are.` } }
  }
  return {
    answer: outside(
      part === undefined ? 'It holds something that a ledger file does not.' : `Its part “${String(part)}” is not as it is written.`,
    ),
  }
}

/** The first byte that differs, counted from 1. */
function firstDifference(a: Uint8Array, b: Uint8Array): number {
  const end = Math.min(a.length, b.length)
  for (let at = 0; at < end; at += 1) if (a[at] !== b[at]) return at + 1
  return end + 1
}

/** Why the bytes are not the canonical text of what they hold, or null when they are. */
function layoutFault(bytes: Uint8Array, file: LedgerFile): string | null {
  let layout: Uint8Array
  try {
    layout = utf8ToBytes(canonicalText(file))
  } catch {
    return 'It holds half a character, which is never written.'
  }
  const differs = firstDifference(bytes, layout)
  if (differs > bytes.length && bytes.length === layout.length) return null
  return `Its text is not laid out as it was written: byte ${differs} differs.`
}

/**
 * Checks a ledger file, without a server: layout, chain, seals, and the signature over all of it. `bytes` are the
 * file as it lies on the disk. Without `trustedKeys` the keys are taken from the file itself, which shows that nothing
 * was changed by whoever lacks the key, but not whose key it is. Total: any bytes get an answer.
 */
export function verifyLedgerFile(bytes: Uint8Array, { trustedKeys }: VerifyOptions = {}): FileCheck {
  const read = readFile(bytes)
  if ('answer' in read) return read.answer
  const { file } = read
  const chain = checkChain(file.entries)
  if (!chain.whole) return { verdict: 'altered', at: chain.brokenAt, why: chain.why }
  const fault = layoutFault(bytes, file)
  if (fault !== null) return outside(fault)
  const misnamed = file.keys.find(({ kid, publicKey }) => kidOf(publicKey) !== kid)
  if (misnamed) return outside(`Key ${misnamed.kid} is not the key that bears this name.`)
  const writer = file.keys.find(({ kid }) => kid === file.writtenBy)
  if (!writer) return outside('The key that signed the file is not in it.')
  const isSigned = checkText(ledgerFileBodyText(file), file.signature, writer.publicKey)
  const ledger = checkLedger(file.ledgerId, file.entries, file.seals, file.keys)
  if (ledger.verdict === 'altered' || ledger.verdict === 'altered outside') return ledger
  const fingerprints = file.keys.map(({ publicKey }) => fingerprintOf(publicKey))
  // A seal that fails in a file whose signature fails as well was changed with it; in a signed file it had another key.
  if (ledger.verdict === 'wrong key') return isSigned ? { verdict: 'wrong key', why: ledger.why, fingerprints } : outside(ledger.why)
  if (!isSigned) return outside('What stands beside the entries is not what the server signed: names, title, seals or keys were changed.')
  const stranger = trustedKeys && file.keys.find(({ publicKey }) => !isTrusted(publicKey, trustedKeys))
  if (stranger) {
    return {
      verdict: 'wrong key',
      why: `It was signed with key ${stranger.kid}, which is none of the keys it was compared with.`,
      fingerprints,
    }
  }
  const unsigned = file.subject === 'proof-test' && ledger.seals.length === 0
  return { ...ledger, verdict: unsigned ? 'not sealed yet' : 'whole', file, keysKnown: trustedKeys !== undefined, fingerprints }
}
