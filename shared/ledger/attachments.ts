import type { Attachment, LedgerEntry } from './envelope'

/** A photo or document as a ledger names it. Its bytes are somewhere else; a ledger says only what they are. */
export interface NamedAttachment extends Attachment {
  /** The entry that names it, by number and kind. */
  seq: number
  kind: string
  /** Somebody said that the bytes will not come any more. */
  lost: { why: string; by: string; at: string } | null
}

/** The attachments known so far and those that one more entry names, oldest first. */
export function withAttachmentsOf(known: readonly NamedAttachment[], entry: LedgerEntry): readonly NamedAttachment[] {
  if (entry.attachments.length === 0) return known
  const named = new Map(entry.attachments.map((one) => [one.sha256, one]))
  return [...known, ...[...named.values()].map((one) => ({ ...one, seq: entry.seq, kind: entry.kind, lost: null }))]
}

/** The same with one of them declared lost, wherever it was named so far; who said so first stands. */
export function withLost(
  known: readonly NamedAttachment[],
  sha256: string,
  lost: NonNullable<NamedAttachment['lost']>,
): readonly NamedAttachment[] {
  return known.map((one) => (one.sha256 === sha256 && one.lost === null ? { ...one, lost } : one))
}

/** The hashes whose bytes a ledger still needs: named and not declared lost. */
export function neededHashes(known: readonly NamedAttachment[]): string[] {
  return [...new Set(known.flatMap((one) => (one.lost === null ? [one.sha256] : [])))]
}
