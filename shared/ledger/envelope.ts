import { z } from 'zod'

/** An id made by the client: UUID version 7 (RFC 9562), lower case. */
export const idSchema = z.uuid({ message: 'This id is not a UUID.' })

const isoInstant = z.iso.datetime({ message: 'A moment is written like 2026-09-15T12:05:00.000Z.' })

/** A reason given for going on although a numbered rule speaks against it. */
export const overrideSchema = z.object({
  rule: z.string().regex(/^[RP]\d+$/),
  reason: z.string().trim().min(3, 'Say why in a few words.').max(500),
})

/** What a photo or a document may be. */
export const ATTACHMENT_TYPES = ['image/jpeg', 'image/png', 'image/webp', 'application/pdf'] as const

/** The largest photo or document, in bytes: a photo is made smaller on the device, a scanned certificate may be long. */
export const LARGEST_ATTACHMENT = 12 * 1024 * 1024

/**
 * A photo or document of an entry: the entry names its bytes by their SHA-256 (FIPS 180-4), and so does everything that
 * is hashed over the entry. The bytes follow by themselves.
 */
export const attachmentSchema = z.object({
  sha256: z.string().regex(/^[0-9a-f]{64}$/),
  type: z.enum(ATTACHMENT_TYPES, 'A photo is a JPEG, PNG or WebP, a document a PDF.'),
  size: z.number().int().positive('This file is empty.').max(LARGEST_ATTACHMENT, 'This file is larger than 12 MB.'),
  /** The file's name as its owner sees it. */
  name: z.string().trim().min(1).max(120).optional(),
})

/**
 * What a device makes for one thing that happened. `deviceSeq` counts this device's entries in this
 * ledger from 1, so that a gap shows; `monotonicMs` counts from the boot named by `bootId`, so that a
 * hold can be timed although somebody sets the clock.
 */
export const entryDraftSchema = z.object({
  id: idSchema,
  ledgerId: idSchema,
  kind: z.string().min(1).max(40),
  v: z.number().int().positive(),
  payload: z.record(z.string(), z.unknown()),
  authorId: idSchema,
  deviceId: idSchema,
  deviceSeq: z.number().int().positive(),
  basedOnSeq: z.number().int().nonnegative(),
  observedAt: isoInstant,
  bootId: idSchema,
  monotonicMs: z.number().int().nonnegative(),
  attachments: z.array(attachmentSchema).max(20),
  overrides: z.array(overrideSchema).max(20),
})

/** A draft as the server keeps it: numbered, dated, judged and chained to the entry before it. */
export const ledgerEntrySchema = entryDraftSchema.extend({
  seq: z.number().int().positive(),
  receivedAt: isoInstant,
  irregular: z.array(z.string()),
  prevHash: z.string().regex(/^[0-9a-f]{64}$/),
  hash: z.string().regex(/^[0-9a-f]{64}$/),
})

export type Override = z.infer<typeof overrideSchema>
export type Attachment = z.infer<typeof attachmentSchema>
export type EntryDraft = z.infer<typeof entryDraftSchema>
export type LedgerEntry = z.infer<typeof ledgerEntrySchema>
export type LedgerSubject = 'proof-test' | 'press'
