import { z } from 'zod'
import { idSchema } from '../ledger/envelope'
import { typedForceSchema, typedPressureSchema } from '../units'
import { jointStrengthSchema, memberStrengthSchema } from '../structure/member-data'
import { EXAMINATION_METHODS, jointSchema, MAKE_UPS, pressDescriptionSchema } from './model'

const remark = z.string().trim().max(500)
const why = z.string().trim().min(3, 'Say why in a few words.').max(500)
const day = z.iso.date()
const testRef = z.object({ proofTestId: idSchema, number: z.string() })
const ids = z.array(idSchema).max(199)
const doneBy = z.string().trim().min(1, 'Say who did it.').max(80)
/** What a stop or a rejection concerns: joints, and the members whose points went beyond a limit. */
const concerned = { jointIds: ids, memberIds: ids.optional() }

export const CHANGE_KINDS = [
  'repair',
  'modification',
  'overload',
  'knock',
  'moved',
  'long stop',
  'painted',
  'ram or gauge changed',
] as const

/** What a press may carry, until when, and what it was proven with (DOMAIN 3.12). */
export const clearanceSchema = z.object({
  load: typedForceSchema,
  loadNewton: z.number().positive(),
  gaugePressure: typedPressureSchema.nullable(),
  gaugeCode: z.string(),
  /** Every instrument the test rested on: one found out of tolerance suspends the clearance. */
  instrumentIds: z.array(idSchema),
  bedHoles: z.array(z.string()),
  ramPositions: z.array(z.string()),
  tooling: z.array(z.string()),
  until: day,
  clearedOn: day,
  clearedBy: z.string(),
  proofTestId: idSchema,
  number: z.string(),
  staticLoads: z.number().int().positive(),
  notMeasured: z.array(z.string()),
  /** What the clearance holds under; clearances given before they were written down lack them. */
  conditions: z.array(z.string()).optional(),
  /** The protocol behind it, as "First load by quarters, version 1". */
  protocol: z.string().optional(),
  /** The lowest rating among the tooling of the test (N); null when none was rated by force. */
  toolingLimitNewton: z.number().positive().nullish(),
})

/** Payload of every kind of entry of a press's ledger, by kind. */
export const PRESS_PAYLOADS = {
  registered: z.object({ description: pressDescriptionSchema, joints: z.array(jointSchema).max(199), lastWorkedOn: day.nullable() }),
  described: z.object({ description: pressDescriptionSchema, why: remark }),
  'joint-added': z.object({ joint: jointSchema }),
  'joint-described': z.object({ joint: jointSchema, why: remark }),
  'joint-retired': z.object({ jointId: idSchema, why }),
  /** One joint turns out to be several, each made and examined by itself. */
  'joint-split': z.object({ jointId: idSchema, into: z.array(jointSchema).min(2, 'A joint is split into two at least.').max(8), why }),
  /** Where a joint stands on the drawing: nothing about the press itself. */
  'joint-placed': z.object({ jointId: idSchema, place: z.string().max(40).nullable() }),
  /** Sizes and materials that somebody looked up or measured; the press is what it was. */
  'strength-described': z.object({
    members: z.array(z.object({ memberId: idSchema, strength: memberStrengthSchema.nullable() })).max(60),
    joints: z.array(z.object({ jointId: idSchema, strength: jointStrengthSchema.nullable() })).max(199),
    why: remark,
  }),
  'joint-worked': z.object({
    jointId: idSchema,
    makeUp: z.enum(MAKE_UPS),
    how: remark,
    workedAt: z.iso.datetime(),
    test: testRef.nullable(),
  }),
  'joint-examined': z.object({
    jointId: idSchema,
    method: z.enum(EXAMINATION_METHODS),
    result: z.enum(['accepted', 'rejected']),
    remark,
    test: testRef.nullable(),
  }),
  changed: z.object({ change: z.enum(CHANGE_KINDS), jointIds: z.array(idSchema), why }),
  'repair-opened': z.object({ ...concerned, why }),
  'repair-noted': z.object({ repairId: idSchema, note: why, doneBy }),
  'repair-closed': z.object({ repairId: idSchema, done: why, doneBy }),
  'test-opened': testRef.extend({ repeatsId: idSchema.nullish() }),
  'test-stopped': testRef.extend({ why: z.string(), ...concerned }),
  'test-concluded': testRef.extend({ conclusion: z.enum(['accepted', 'rejected', 'abandoned']), ...concerned }),
  'test-late-fact': z.object({ ...testRef.shape, why: z.string() }),
  'test-ended': z.object({ ...testRef.shape, why: z.string() }),
  'instrument-recalled': z.object({ instrumentId: idSchema, code: z.string(), calibratedOn: day }),
  'clearance-given': clearanceSchema,
  withdrawn: z.object({ why }),
  /** Somebody saw to it that the paper tag is off the press. */
  'tag-taken-off': z.object({ remark }),
} as const

export type PressKind = keyof typeof PRESS_PAYLOADS
export type PressPayload<K extends PressKind> = z.infer<(typeof PRESS_PAYLOADS)[K]>
export type PressDraft = { [K in PressKind]: { kind: K; payload: PressPayload<K> } }[PressKind]
export type Clearance = z.infer<typeof clearanceSchema>
export type PressChange = PressPayload<'changed'>

/** Acts can be refused; the rest has happened. */
export const PRESS_ACTS: ReadonlySet<string> = new Set([
  'registered',
  'described',
  'joint-added',
  'joint-described',
  'joint-retired',
  'joint-split',
  'joint-placed',
  'strength-described',
  'repair-closed',
  'withdrawn',
] satisfies PressKind[])
/** Written by the server as the consequence of what a proof test did, never posted. */
export const PRESS_CONSEQUENCES: ReadonlySet<string> = new Set([
  'test-opened',
  'test-stopped',
  'test-concluded',
  'test-late-fact',
  'test-ended',
  'instrument-recalled',
  'clearance-given',
] satisfies PressKind[])
export const PRESS_VERSION = 1
