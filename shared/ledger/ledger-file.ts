import { z } from 'zod'
import { canonicalText } from './canonical'
import { kidOf } from './check-ledger'
import { idSchema } from './envelope'
import { signText } from './seal'

/*
 * A ledger as a file. Every byte of it counts: the file is the RFC 8785 text of one JSON object and nothing else, so
 * that a blank more or a member given twice shows; entries are chained and sealed; and whatever stands beside them
 * (names, title, keys, the seals themselves) is under the signature of the server that wrote the file.
 */

export const LEDGER_FILE_FORMAT = 'quarterload ledger'
export const LEDGER_FILE_VERSION = 1

const hash = z.string().regex(/^[0-9a-f]{64}$/)
const kid = z.string().regex(/^[0-9a-f]{16}$/)
const signature = z.string().regex(/^[0-9a-f]{128}$/)
const moment = z.iso.datetime()

const storedEntrySchema = z.strictObject({ seq: z.int().positive(), canonical: z.string(), hash })

const bodySchema = z.strictObject({
  format: z.literal(LEDGER_FILE_FORMAT),
  formatVersion: z.literal(LEDGER_FILE_VERSION),
  subject: z.enum(['proof-test', 'press']),
  ledgerId: idSchema,
  shop: z.string(),
  /** "PT-0043", or the press's name. */
  title: z.string(),
  exportedAt: moment,
  /** As stored: the very text that was hashed. */
  entries: z.array(storedEntrySchema),
  seals: z.array(z.strictObject({ kid, ledgerId: idSchema, seq: z.int().positive(), headHash: hash, sealedAt: moment, signature })),
  /** The public half of every key that signed anything here. */
  keys: z.array(z.strictObject({ kid, publicKey: hash, retired: z.boolean() })),
  people: z.record(z.string(), z.string()),
  /** Whose key signed the file. */
  writtenBy: kid,
})

export const ledgerFileSchema = bodySchema.extend({ signature })

export type LedgerFileBody = z.infer<typeof bodySchema>
export type LedgerFile = z.infer<typeof ledgerFileSchema>

/** The text that the file's own signature is over: all of it but the signature. */
export function ledgerFileBodyText(file: LedgerFile): string {
  const { signature: _signature, ...body } = file
  return canonicalText(body)
}

/**
 * Writes a ledger file and signs it. `secretKey` (32 bytes, hexadecimal) belongs to `publicKey`, which stands among
 * the file's keys. Returns the whole text; its UTF-8 bytes are the file.
 */
export function writeLedgerFile(
  ledger: Omit<LedgerFileBody, 'format' | 'formatVersion' | 'writtenBy'>,
  { secretKey, publicKey }: { secretKey: string; publicKey: string },
): string {
  const body: LedgerFileBody = { ...ledger, format: LEDGER_FILE_FORMAT, formatVersion: LEDGER_FILE_VERSION, writtenBy: kidOf(publicKey) }
  return canonicalText({ ...body, signature: signText(canonicalText(body), secretKey) })
}
