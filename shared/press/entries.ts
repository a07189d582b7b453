import { z } from 'zod'
import { idSchema } from '../ledger/envelope'
import { typedForceSchema, typedPressureSchema } from '../units'
import { EXAMINATION_METHODS, jointSchema, MAKE_UPS, pressDescriptionSchema } from './model'

const remark = z.string().trim().max(500)
const why = z.string().trim().min(3, 'Say why in a few words.').max(500)
const day = z.iso.date()
const testRef = z.object({ proofTestId: idSchema, number: z.string() })

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
})

/** Payload of every kind of entry of a press's ledger, by kind. */
export const PRESS_PAYLOADS = {
  registered: z.object({ description: pressDescriptionSchema, joints: z.array(jointSchema).max(199), lastWorkedOn: day.nullable() }),
  described: z.object({ description: pressDescriptionSchema, why: remark }),
  'joint-added': z.object({ joint: jointSchema }),
  'joint-described': z.object({ joint: jointSchema, why: remark }),
  'joint-retired': z.object({ jointId: idSchema, why }),
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
  'test-opened': testRef,
  'test-stopped': z.object({ ...testRef.shape, why: z.string(), jointIds: z.array(idSchema) }),
  'test-concluded': z.object({ ...testRef.shape, conclusion: z.enum(['accepted', 'rejected', 'abandoned']), jointIds: z.array(idSchema) }),
  'test-late-fact': z.object({ ...testRef.shape, why: z.string() }),
  'test-ended': z.object({ ...testRef.shape, why: z.string() }),
  'instrument-recalled': z.object({ instrumentId: idSchema, code: z.string(), calibratedOn: day }),
  'clearance-given': clearanceSchema,
  withdrawn: z.object({ why }),
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
  'withdrawn',
] satisfies PressKind[])
/** Written by the server as the consequence of what a proof test did, never posted. */
export const PRESS_CONSEQUENCES: ReadonlySet<string> = new Set([
  'test-opened',
  'test-stopped',
  'test-concluded',
  'test-late-fact',
  'clearance-given',
] satisfies PressKind[])
export const PRESS_VERSION = 1
