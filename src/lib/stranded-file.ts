import { z } from 'zod'
import { canonicalText } from '#shared/ledger/canonical'
import { sha256Hex } from '#shared/ledger/chain'
import { entryDraftSchema, idSchema } from '#shared/ledger/envelope'
import type { Waiting } from './outbox-database'

const FORMAT = 'quarterload-entries'
const VERSION = 1

/** Entries of one person that a device could not send, to be carried to another by hand. */
const fileSchema = z.object({
  format: z.literal(FORMAT),
  version: z.literal(VERSION),
  savedAt: z.iso.datetime(),
  /** Whose entries these are: only they can have them sent. The name is missing where the device did not know it. */
  author: z.object({ id: idSchema, name: z.string().nullable() }),
  entries: z.array(z.object({ testId: idSchema, entry: entryDraftSchema })).min(1),
})

export type StrandedFile = z.infer<typeof fileSchema>

export interface StrandedParts {
  author: StrandedFile['author']
  entries: readonly Waiting[]
  savedAt: Date
}

/**
 * The text of a file with one person's entries. It carries the SHA-256 (FIPS 180-4) of its own canonical text (RFC 8785),
 * so that a damaged copy is found out before any of it is taken in.
 */
export function strandedFile({ author, entries, savedAt }: StrandedParts): string {
  const content: StrandedFile = {
    format: FORMAT,
    version: VERSION,
    savedAt: savedAt.toISOString(),
    author,
    entries: entries.map(({ testId, entry }) => ({ testId, entry })),
  }
  return `${JSON.stringify({ ...content, sha256: sha256Hex(canonicalText(content)) }, null, 2)}\n`
}

/** A name that says what is inside and sorts by when it was saved. */
export const strandedFileName = (savedAt: Date): string =>
  `quarterload-entries-${savedAt.toISOString().slice(0, 19).replaceAll(':', '')}.json`

export type ReadStranded = { whole: true; file: StrandedFile } | { whole: false; says: string }

const refuse = (says: string): ReadStranded => ({ whole: false, says })
const DAMAGED =
  'This file is not as it was saved: it was damaged or changed on the way. Nothing of it was taken in. Copy it again from where it was saved.'

function parsed(text: string): Record<string, unknown> | null {
  try {
    const value: unknown = JSON.parse(text)
    return typeof value === 'object' && value !== null && !Array.isArray(value) ? { ...value } : null
  } catch {
    return null
  }
}

function hashOf(content: object): string | null {
  try {
    return sha256Hex(canonicalText(content))
  } catch {
    return null
  }
}

/** Reads such a file back. Refuses, with a sentence for the person, what is not whole to the last character. */
export function readStrandedFile(text: string): ReadStranded {
  const value = parsed(text)
  if (value === null) {
    return refuse(
      text.includes(FORMAT)
        ? DAMAGED
        : 'This is not a file of entries that Quarterload saved. Choose the one whose name begins with “quarterload-entries”.',
    )
  }
  const { sha256, ...content } = value
  if (content['format'] !== FORMAT) {
    return refuse('This is not a file of entries that Quarterload saved. Choose the one whose name begins with “quarterload-entries”.')
  }
  if (hashOf(content) !== sha256) return refuse(DAMAGED)
  if (typeof content['version'] === 'number' && content['version'] > VERSION) {
    return refuse('A newer Quarterload saved this file. Load this page again to update it, then take the file in.')
  }
  const file = fileSchema.safeParse(content)
  if (!file.success)
    return refuse(
      'This file holds something that is no entry. Nothing of it was taken in. Keep the file and tell whoever looks after the server.',
    )
  if (file.data.entries.some(({ entry }) => entry.authorId !== file.data.author.id)) {
    return refuse('This file holds entries of more than one person. Nothing of it was taken in.')
  }
  return { whole: true, file: file.data }
}
