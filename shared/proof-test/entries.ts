import { z } from 'zod'
import { frozenInstrumentSchema } from '../instruments/model'
import { idSchema } from '../ledger/envelope'
import { EXAMINATION_METHODS, MAKE_UPS, jointSchema, pressDescriptionSchema, RAM_POSITIONS } from '../press/model'
import { FORCE_UNITS, LENGTH_UNITS, parseDecimal, PRESSURE_UNITS, typedPressureSchema, typedTemperatureSchema } from '../units'
import { protocolContentSchema } from './protocol'

const isoInstant = z.iso.datetime()
const remark = z.string().trim().max(500)
const why = z.string().trim().min(3, 'Say why in a few words.').max(500)

/** A measuring point: a named place on the frame, the indicator that reads it, and which way counts as load. */
export const measuringPointSchema = z.object({
  id: idSchema,
  letter: z.string().min(1).max(2),
  label: z.string().trim().min(1).max(40),
  place: z.string().max(40),
  instrumentId: idSchema,
  risesWithLoad: z.boolean(),
  memberId: idSchema.nullable(),
})

/** Points combined into one figure: `plus` less the mean of `minus`. */
export const netSchema = z.object({ label: z.string().max(80), plus: idSchema, minus: z.array(idSchema).max(4) })

const personSchema = z.object({ id: idSchema.nullable(), name: z.string().trim().min(1).max(80), relation: z.string().max(80) })

export const legSetupSchema = z.object({
  label: z.string().max(60),
  ramPosition: z.enum(RAM_POSITIONS),
  bedHole: z.string().trim().min(1, 'Name the bed hole.').max(20),
})

export const engineerSchema = z.object({
  name: z.string().trim().min(2, 'Name the engineer.').max(80, 'Keep it to 80 characters.'),
  document: z.string().trim().min(3, 'Say which document, with its number.').max(120, 'Keep it to 120 characters.'),
  on: z.iso.date('Write the day like 2026-09-14.'),
})

export const openedSchema = z.object({
  number: z.string().regex(/^PT-\d{4,}$/),
  shop: z.object({ id: idSchema, name: z.string() }),
  pressId: idSchema,
  pressHeadSeq: z.number().int().positive(),
  press: pressDescriptionSchema,
  joints: z.array(jointSchema),
  stoodStillDays: z.number().int().nonnegative().nullable(),
  instruments: z.array(frozenInstrumentSchema),
  forceInstrumentIds: z.array(idSchema).min(1),
  points: z.array(measuringPointSchema).min(1),
  net: netSchema.nullable(),
  protocol: z.object({ id: idSchema, name: z.string(), version: z.number().int().positive(), content: protocolContentSchema }),
  legs: z.array(legSetupSchema).min(1),
  people: z.object({ lead: personSchema, pumpHand: personSchema, witness: personSchema }),
  forceUnit: z.enum(FORCE_UNITS),
  pressureUnit: z.enum(PRESSURE_UNITS),
  lengthUnit: z.enum(LENGTH_UNITS),
  notMeasured: z.array(z.string()),
  repeats: z.object({ id: idSchema, number: z.string() }).nullable(),
  walkDownHours: z.number().positive(),
  instrumentOverride: why.nullable(),
  /** The document of a named engineer that stands against a load path check over 100 %. */
  engineer: engineerSchema.nullish(),
})

/** Where in the test a load entry belongs; counted from 0. */
export const positionSchema = z.object({
  leg: z.number().int().nonnegative(),
  climb: z.number().int().nonnegative(),
  stage: z.number().int().nonnegative(),
  attempt: z.number().int().nonnegative(),
})

const readingText = z.string().superRefine((text, context) => {
  const parsed = parseDecimal(text, { signed: true })
  if (!parsed.ok) context.addIssue({ code: 'custom', message: parsed.message })
})

/** One reading as typed. `sourceId` is a gauge, a load cell, or a measuring point. */
export const readingSchema = z.object({
  sourceId: idSchema,
  text: readingText,
  unit: z.enum([...PRESSURE_UNITS, ...FORCE_UNITS, ...LENGTH_UNITS]),
})

/** The moment a row belongs to; its hold runs from here. */
export const markSchema = z.object({ at: isoInstant, bootId: idSchema, monotonicMs: z.number().int().nonnegative() })

const row = { mark: markSchema, readings: z.array(readingSchema).min(1), typedAgain: z.array(idSchema) }
const temperature = typedTemperatureSchema.nullable()

export const SET_UP_ITEMS = [
  'behind-shield',
  'stack',
  'adaptor',
  'train-rated',
  'relief',
  'stroke',
  'coupler',
  'pump-kind',
  'people-out',
  'injection',
  'stands',
  'gauge-vented',
] as const

export const criterionSnapshotSchema = z.object({
  id: z.string(),
  label: z.string(),
  verdict: z.enum(['within', 'beyond', 'undecided', 'wait', 'not-read']),
  reading: z.string(),
  limit: z.string(),
  stops: z.boolean(),
})

export const CONCLUSIONS = ['accepted', 'rejected', 'abandoned'] as const

export const signatureSchema = z.object({
  personId: idSchema,
  printedName: z.string().min(1),
  meaning: z.string().min(3).max(200),
  signedAt: isoInstant,
  headHash: z.string().regex(/^[0-9a-f]{64}$/),
  relation: z.string().max(80),
})

/** Payload of every kind of entry of a proof test, by kind. */
export const PROOF_TEST_PAYLOADS = {
  opened: openedSchema,
  'joint-worked': z.object({ jointId: idSchema, makeUp: z.enum(MAKE_UPS), how: remark, workedAt: isoInstant }),
  'joint-examined': z.object({
    occasion: z.enum(['before load', 'after load']),
    jointId: idSchema,
    method: z.enum(EXAMINATION_METHODS),
    result: z.enum(['accepted', 'rejected']),
    remark,
    cold: z.boolean(),
  }),
  'load-path-confirmed': z.object({ by: z.enum(['witness', 'witness, as told to the lead']), joints: z.number().int() }),
  'set-up-confirmed': z.object({
    items: z.array(z.enum(SET_UP_ITEMS)),
    reliefSet: typedPressureSchema.nullable(),
    strokePercent: readingText,
    note: remark,
  }),
  'leg-begun': z.object({ leg: z.number().int().nonnegative(), bedHoleConfirmed: z.string().max(20) }),
  seated: z.object({ leg: z.number().int().nonnegative(), ...row }),
  'datum-read': z.object({ leg: z.number().int().nonnegative(), climb: z.number().int().nonnegative(), ...row, temperature }),
  'stage-begun': z.object({ at: positionSchema }),
  'row-read': z.object({ at: positionSchema, occasion: z.enum(['hold start', 'hold end', 'again']), ...row }),
  'independent-read': z.object({
    at: positionSchema,
    readings: z.array(readingSchema),
    notTaken: why.nullable(),
    where: z.enum(['covered keypad of the lead', 'own device']),
  }),
  'topped-up': z.object({ at: positionSchema, ...row }),
  observed: z.object({ at: positionSchema.nullable(), what: z.enum(['noise', 'leak', 'movement', 'other']), note: why }),
  paused: z.object({ why: remark }),
  resumed: z.object({}),
  stopped: z.object({ cause: z.enum(['called', 'criterion', 'overload', 'pause too long']), why }),
  released: z.object({ gaugeZero: z.literal(true), ramClear: z.literal(true) }),
  'set-read': z.object({ leg: z.number().int().nonnegative(), climb: z.number().int().nonnegative(), ...row, temperature }),
  decided: z.object({
    at: positionSchema,
    decision: z.enum(['go-on', 'wait', 'stop']),
    criteria: z.array(criterionSnapshotSchema),
  }),
  corrected: z.object({
    entryId: idSchema,
    sourceId: idSchema,
    text: readingText,
    unit: readingSchema.shape.unit,
    why,
    readAgainByBoth: z.boolean(),
  }),
  concluded: z.object({
    conclusion: z.enum(CONCLUSIONS),
    why: remark,
    evaluation: z.record(z.string(), z.unknown()),
    coreVersion: z.string(),
  }),
  signed: signatureSchema,
  countersigned: signatureSchema,
  declined: z.object({ personId: idSchema, printedName: z.string(), why }),
  reviewed: z.object({ why }),
  /** The bytes of a photo or document that an entry names will not come any more. */
  'attachment-lost': z.object({ sha256: z.string().regex(/^[0-9a-f]{64}$/), why }),
} as const

export type ProofTestKind = keyof typeof PROOF_TEST_PAYLOADS
export type ProofTestPayload<K extends ProofTestKind> = z.infer<(typeof PROOF_TEST_PAYLOADS)[K]>
export type ProofTestDraft = { [K in ProofTestKind]: { kind: K; payload: ProofTestPayload<K> } }[ProofTestKind]

/** R1: stop and release are always allowed; no rule may wait for a device while the press is loaded. */
export const ALWAYS_ALLOWED: ReadonlySet<string> = new Set(['stopped', 'released'])

/** Acts can be refused; everything else is a fact, which has happened and always lands. */
export const PROOF_TEST_ACTS: ReadonlySet<string> = new Set([
  'opened',
  'concluded',
  'signed',
  'countersigned',
  'declined',
  'reviewed',
] satisfies ProofTestKind[])
/** Written by the signatures route only. */
export const SIGNATURE_KINDS: ReadonlySet<string> = new Set(['signed', 'countersigned', 'declined'] satisfies ProofTestKind[])
/** Today's version of every kind's payload. */
export const PROOF_TEST_VERSION = 1

export type Opened = ProofTestPayload<'opened'>
export type Position = z.infer<typeof positionSchema>
export type Reading = z.infer<typeof readingSchema>
export type Mark = z.infer<typeof markSchema>
export type MeasuringPoint = z.infer<typeof measuringPointSchema>
export type CriterionSnapshot = z.infer<typeof criterionSnapshotSchema>
export type Conclusion = (typeof CONCLUSIONS)[number]
export type SetUpItem = (typeof SET_UP_ITEMS)[number]
export type Signature = z.infer<typeof signatureSchema>
