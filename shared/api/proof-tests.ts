import { z } from 'zod'
import { attachmentSchema, idSchema as envelopeId } from '../ledger/envelope'
import { engineerSchema, legSetupSchema, measuringPointSchema, netSchema, CONCLUSIONS } from '../proof-test/entries'
import { FORCE_UNITS } from '../units'
import { idSchema, timeSchema } from './common'
import { ledgerEntrySchema } from '../ledger/envelope'

export const TEST_SORTS = ['opened', '-opened', 'number', '-number', 'press', '-press'] as const
export const TEST_STATUSES = ['under way', 'stopped', 'concluded', 'to countersign', 'signed', 'declined'] as const

/** GET /api/proof-tests?shop=&search=&press=&result=&status=&lead=&from=&to=&zone=&sort=&cursor=&limit= */
export const testListQuerySchema = z.object({
  shop: idSchema,
  search: z.string().trim().max(80).optional(),
  press: idSchema.optional(),
  result: z.enum(CONCLUSIONS).optional(),
  status: z.enum(TEST_STATUSES).optional(),
  lead: idSchema.optional(),
  from: z.iso.date().optional(),
  to: z.iso.date().optional(),
  /** What the reader's clock is behind UTC, in minutes: `from` and `to` are days where the reader is. */
  zone: z.coerce.number().int().min(-840).max(840).default(0),
  sort: z.enum(TEST_SORTS).default('-opened'),
  cursor: z.string().max(400).optional(),
  limit: z.coerce.number().int().min(1).max(100).default(25),
})

export const testRowSchema = z.object({
  id: idSchema,
  number: z.string(),
  pressId: idSchema,
  pressName: z.string(),
  protocolName: z.string(),
  status: z.enum(TEST_STATUSES),
  result: z.enum(CONCLUSIONS).nullable(),
  ratedLoad: z.object({ text: z.string(), unit: z.enum(FORCE_UNITS) }),
  reachedPercent: z.number(),
  stoppedAtPercent: z.number().nullable(),
  leadId: idSchema,
  leadName: z.string(),
  witnessId: idSchema,
  witnessName: z.string(),
  openedAt: timeSchema,
  concludedAt: timeSchema.nullable(),
  sealedAt: timeSchema.nullable(),
})

export const testListSchema = z.object({
  proofTests: z.array(testRowSchema),
  older: z.string().nullable(),
  newer: z.string().nullable(),
})

/**
 * POST /api/proof-tests?shop=: opens a test. The server composes the `opened` entry from its own registers
 * at that moment: press, joints, train, instruments with calibration and protocol are frozen into it.
 * Sending the same `id` again answers the same test and writes nothing.
 */
export const openTestRequestSchema = z.object({
  id: envelopeId,
  entryId: envelopeId,
  deviceId: envelopeId,
  bootId: envelopeId,
  monotonicMs: z.number().int().nonnegative(),
  observedAt: timeSchema,
  pressId: idSchema,
  protocolId: idSchema,
  forceInstrumentIds: z.array(idSchema).min(1, 'Choose what reads the force.').max(6),
  points: z.array(measuringPointSchema).min(1, 'Choose at least one measuring point.').max(12),
  net: netSchema.nullable(),
  legs: z.array(legSetupSchema).min(1).max(6),
  pumpHand: z.object({ id: idSchema.nullable(), name: z.string().trim().min(1, 'Name who works the pump.').max(80) }),
  witness: z.object({ id: idSchema, relation: z.string().trim().min(2, 'Say how the witness stands to the shop.').max(80) }),
  /** Asked where the protocol goes above the rated load: how far, and by which rule. */
  aboveRating: z
    .object({
      percent: z.number('Enter a percentage.').gt(100, 'Above the rated load means more than 100 %.').max(150, 'At most 150 %.'),
      rule: z.string().trim().min(3, 'Name the rule that asks for it.').max(200, 'Keep it to 200 characters.'),
    })
    .nullish(),
  /** Asked where the load path check comes out over 100 %: the document that stands against it. */
  engineer: engineerSchema.nullish(),
  /** The document itself: named by the opening entry, its bytes are put afterwards. */
  attachments: z.array(attachmentSchema).max(4, 'At most four files go with the opening.').optional(),
  repeatsId: idSchema.nullable(),
  /** Loose tooling of the shop's register that the force passes through in this test; each joins the train with its rating. */
  toolingIds: z.array(idSchema).max(6, 'At most six pieces.').optional(),
  instrumentOverride: z.string().trim().min(3, 'Say why in a few words.').max(500).nullable(),
})

export const openTestResponseSchema = z.object({ id: idSchema, number: z.string() })

/** GET /api/proof-tests/:id */
export const testResponseSchema = z.object({ shopId: idSchema, proofTest: testRowSchema })

/** POST /api/proof-tests/:id/signatures */
export const signatureRequestSchema = z.discriminatedUnion('as', [
  z.object({
    as: z.enum(['lead', 'witness']),
    entryId: envelopeId,
    password: z.string().min(1, 'Enter your password.'),
    headHash: z.string(),
    meaning: z.string().trim().min(3, 'Say what your signature means.').max(200),
  }),
  z.object({
    as: z.literal('decline'),
    entryId: envelopeId,
    password: z.string().min(1, 'Enter your password.'),
    headHash: z.string(),
    why: z.string().trim().min(3, 'Say why in a few words.').max(500),
  }),
])
export const signatureResponseSchema = z.object({ entry: ledgerEntrySchema })

export type TestListQuery = z.infer<typeof testListQuerySchema>
export type TestRow = z.infer<typeof testRowSchema>
export type TestList = z.infer<typeof testListSchema>
export type OpenTestRequest = z.infer<typeof openTestRequestSchema>
export type SignatureRequest = z.infer<typeof signatureRequestSchema>
