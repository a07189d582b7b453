import { sha256 } from '@noble/hashes/sha2.js'
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js'
import { canonicalText } from './canonical'
import type { EntryDraft, LedgerEntry } from './envelope'

/** The hash that the first entry of every ledger follows: SHA-256 of "quarterload ledger, entry 0". */
export const FIRST_PREV_HASH = bytesToHex(sha256(utf8ToBytes('quarterload ledger, entry 0')))

export type ChainedFields = Pick<LedgerEntry, 'seq' | 'receivedAt' | 'irregular' | 'prevHash'>

/** SHA-256 (FIPS 180-4) of a text's UTF-8 bytes, in lower-case hexadecimal. */
export function sha256Hex(text: string): string {
  return bytesToHex(sha256(utf8ToBytes(text)))
}

/** The text that is stored and hashed for an entry: RFC 8785, everything but the hash itself. */
export function entryText(draft: EntryDraft, fields: ChainedFields): string {
  return canonicalText({ ...draft, ...fields })
}

/** The text that says whether a resent entry is the same one: what the device made, nothing of the server's. */
export function draftText(draft: EntryDraft): string {
  const { id, ledgerId, kind, v, payload, authorId, deviceId, deviceSeq, basedOnSeq } = draft
  const { observedAt, bootId, monotonicMs, attachments, overrides } = draft
  return canonicalText({
    id,
    ledgerId,
    kind,
    v,
    payload,
    authorId,
    deviceId,
    deviceSeq,
    basedOnSeq,
    observedAt,
    bootId,
    monotonicMs,
    attachments,
    overrides,
  })
}

export interface StoredEntry {
  seq: number
  canonical: string
  hash: string
}

export type ChainCheck = { whole: true; entries: number; headHash: string } | { whole: false; brokenAt: number; why: string }

/**
 * Checks a ledger as stored, in order: each text hashes to its hash, names the hash before it and its own
 * number. Old versions are checked as they were stored, never as they would be written today.
 */
export function checkChain(entries: readonly StoredEntry[]): ChainCheck {
  let prevHash = FIRST_PREV_HASH
  let expected = 1
  for (const entry of entries) {
    const broken = (why: string): ChainCheck => ({ whole: false, brokenAt: expected, why })
    if (entry.seq !== expected) return broken(`Entry ${expected} is missing.`)
    if (sha256Hex(entry.canonical) !== entry.hash) return broken(`Entry ${expected} does not match its hash.`)
    let stored: { seq?: unknown; prevHash?: unknown } | null
    try {
      stored = JSON.parse(entry.canonical) as { seq?: unknown; prevHash?: unknown } | null
    } catch {
      return broken(`Entry ${expected} cannot be read.`)
    }
    if (typeof stored !== 'object' || stored === null) return broken(`Entry ${expected} cannot be read.`)
    if (stored.seq !== expected) return broken(`Entry ${expected} carries another number.`)
    if (stored.prevHash !== prevHash) return broken(`Entry ${expected} does not follow the one before it.`)
    prevHash = entry.hash
    expected += 1
  }
  return { whole: true, entries: expected - 1, headHash: prevHash }
}
