import type { Attachment, LedgerEntry } from '#shared/ledger/envelope'

/** A photo or document with the entry that names it. */
export interface Placed {
  attachment: Attachment
  seq: number
  kind: string
  /** The joint that its entry is about; null where it is about none. */
  jointId: string | null
  occasion: string | null
  at: string
  by: string
}

const text = (value: unknown): string | null => (typeof value === 'string' ? value : null)

/** Every photo and document that entries name, in their order. */
export function placedIn(entries: readonly LedgerEntry[]): Placed[] {
  return entries.flatMap(({ attachments, seq, kind, payload, observedAt, authorId }) =>
    attachments.map((attachment) => ({
      attachment,
      seq,
      kind,
      jointId: text(payload['jointId']),
      occasion: text(payload['occasion']),
      at: observedAt,
      by: authorId,
    })),
  )
}

/** Those of a draft that no entry names yet: what was entered is not entered again. */
export function notYetNamed(chosen: readonly Attachment[], placed: readonly Placed[]): Attachment[] {
  const named = new Set(placed.map(({ attachment }) => attachment.sha256))
  return chosen.filter(({ sha256 }) => !named.has(sha256))
}
