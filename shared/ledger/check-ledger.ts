import { checkChain, sha256Hex, type StoredEntry } from './chain'
import { checkSeal, type Seal } from './seal'

/** The public half of a key that seals: what anybody may have. */
export interface PublicSealKey {
  /** The first 16 digits of the key's fingerprint. */
  kid: string
  /** Ed25519 (RFC 8032), 32 bytes in lower-case hexadecimal. */
  publicKey: string
}

/** Kinds of entries that are sealed when they are written: a seal missing beside one was taken away. */
export const SEALED_KINDS: ReadonlySet<string> = new Set(['signed', 'countersigned', 'declined'])

/** Somebody's signature, and the seal over the ledger up to it. */
export interface CheckedSeal {
  seq: number
  kid: string
  sealedAt: string
  kind: string
  printedName: string
  meaning: string
}

/** An entry that stands after the last seal: no signature covers it. */
export interface UnsealedEntry {
  seq: number
  kind: string
  receivedAt: string
}

export type LedgerCheck =
  | { verdict: 'whole'; entries: number; headHash: string; seals: CheckedSeal[]; afterSeal: UnsealedEntry[] }
  | { verdict: 'altered'; at: number; why: string }
  | { verdict: 'altered outside'; why: string }
  | { verdict: 'wrong key'; kid: string; why: string }

/** SHA-256 of a public key's hexadecimal text; what people compare. Throws nothing. */
export function fingerprintOf(publicKey: string): string {
  return sha256Hex(publicKey)
}

/** The short name of a key: the start of its fingerprint. */
export function kidOf(publicKey: string): string {
  return fingerprintOf(publicKey).slice(0, 16)
}

/** Answers whether a key made a seal; for whoever remembers the answers. */
export type SealTest = (seal: Seal, publicKey: string) => boolean

interface Told {
  ledgerId?: unknown
  kind?: unknown
  receivedAt?: unknown
  payload?: { printedName?: unknown; meaning?: unknown; why?: unknown }
}

const text = (value: unknown): string => (typeof value === 'string' ? value : '')

function told(entry: StoredEntry): Told {
  return JSON.parse(entry.canonical) as Told
}

function checkOneSeal(seal: Seal, entries: readonly StoredEntry[], keys: readonly PublicSealKey[], test: SealTest): LedgerCheck | null {
  const key = keys.find(({ kid, publicKey }) => kid === seal.kid && kidOf(publicKey) === kid)
  if (!key) {
    return {
      verdict: 'wrong key',
      kid: seal.kid,
      why: `The seal over entry ${seal.seq} names key ${seal.kid}, which is none of the keys it may have.`,
    }
  }
  if (!test(seal, key.publicKey)) {
    return {
      verdict: 'wrong key',
      kid: seal.kid,
      why: `The seal over entry ${seal.seq} was not made by key ${seal.kid}, or was changed since.`,
    }
  }
  const sealed = entries[seal.seq - 1]
  if (!sealed)
    return { verdict: 'altered', at: entries.length + 1, why: `Entry ${entries.length + 1} is missing: ${seal.seq} were sealed.` }
  if (sealed.hash !== seal.headHash) {
    return {
      verdict: 'altered',
      at: seal.seq,
      why: `Entry ${seal.seq} is not the one that was sealed: it, or one before it, was written anew.`,
    }
  }
  return null
}

/**
 * Checks a ledger as stored: its chain, that every entry belongs to it, that every signature has its seal, and
 * each seal against the key that it names. `keys` are the public keys that may have sealed it, retired ones too.
 * Says the first thing that is wrong. It throws nothing, whatever the texts hold.
 */
export function checkLedger(
  ledgerId: string,
  entries: readonly StoredEntry[],
  seals: readonly Seal[],
  keys: readonly PublicSealKey[],
  test: SealTest = checkSeal,
): LedgerCheck {
  const chain = checkChain(entries)
  if (!chain.whole) return { verdict: 'altered', at: chain.brokenAt, why: chain.why }
  const says = entries.map(told)
  const stranger = says.findIndex((entry) => entry.ledgerId !== ledgerId)
  if (stranger >= 0) return { verdict: 'altered', at: stranger + 1, why: `Entry ${stranger + 1} belongs to another ledger.` }
  for (const seal of seals) {
    if (seal.ledgerId !== ledgerId) return { verdict: 'altered outside', why: `The seal over entry ${seal.seq} belongs to another ledger.` }
    const wrong = checkOneSeal(seal, entries, keys, test)
    if (wrong) return wrong
  }
  const sealedSeqs = new Set(seals.map(({ seq }) => seq))
  const bare = says.findIndex((entry, index) => SEALED_KINDS.has(text(entry.kind)) && !sealedSeqs.has(index + 1))
  if (bare >= 0) return { verdict: 'altered', at: bare + 1, why: `Entry ${bare + 1} is a signature, and its seal is missing.` }
  const sealedTo = Math.max(0, ...sealedSeqs)
  return {
    verdict: 'whole',
    entries: chain.entries,
    headHash: chain.headHash,
    seals: seals.map(({ seq, kid, sealedAt }) => {
      const entry = says[seq - 1]
      const { printedName, meaning, why } = entry?.payload ?? {}
      return { seq, kid, sealedAt, kind: text(entry?.kind), printedName: text(printedName), meaning: text(meaning ?? why) }
    }),
    afterSeal:
      sealedTo === 0
        ? []
        : says
            .slice(sealedTo)
            .map((entry, index) => ({ seq: sealedTo + index + 1, kind: text(entry.kind), receivedAt: text(entry.receivedAt) })),
  }
}
