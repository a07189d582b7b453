import type { z } from 'zod'
import type { EntryDraft } from '#shared/ledger/envelope'
import { PRESS_PAYLOADS, PRESS_VERSION } from '#shared/press/entries'
import { PROOF_TEST_PAYLOADS, PROOF_TEST_VERSION } from '#shared/proof-test/entries'
import { invalid, Problem } from '../problem'

/** Checks a draft's payload at the edge, by its kind and version; what is kept is what was sent, not a coerced copy. */
function parseDraft(payloads: Readonly<Record<string, z.ZodType>>, version: number, draft: EntryDraft): EntryDraft {
  const schema = Object.hasOwn(payloads, draft.kind) ? payloads[draft.kind] : undefined
  if (!schema || draft.v > version) {
    throw new Problem(
      422,
      'unknown-kind',
      'This server does not know this kind of entry yet. Update it, then send again: the entry is kept on the device.',
    )
  }
  const parsed = schema.safeParse(draft.payload)
  if (!parsed.success) {
    const fields: Record<string, string> = {}
    for (const issue of parsed.error.issues) fields[issue.path.join('.') || 'payload'] ??= issue.message
    throw invalid(fields, Object.values(fields)[0])
  }
  return draft
}

export function parseProofTestDraft(draft: EntryDraft): EntryDraft {
  return parseDraft(PROOF_TEST_PAYLOADS, PROOF_TEST_VERSION, draft)
}

export function parsePressDraft(draft: EntryDraft): EntryDraft {
  return parseDraft(PRESS_PAYLOADS, PRESS_VERSION, draft)
}
