import { z } from 'zod'
import { idSchema } from '../ledger/envelope'
import { jointStrengthSchema, memberStrengthSchema } from '../structure/member-data'
import {
  typedForceSchema,
  typedLengthSchema,
  typedMassSchema,
  typedPositiveAreaSchema,
  typedPositiveForceSchema,
  typedPositiveLengthSchema,
  typedPositivePressureSchema,
} from '../units'

const name = (what: string) => z.string().trim().min(1, `Give the ${what} a name.`).max(80, 'Keep it under 80 characters.')

export const FRAME_KINDS = ['h-frame', 'c-frame', 'four-post', 'bench'] as const
export const MEMBER_KINDS = [
  'head-beam',
  'bed-beam',
  'upright',
  'ram-seat',
  'pin',
  'tooling-adaptor',
  'stiffener',
  'base',
  'other',
] as const
export const JOINT_KINDS = ['weld', 'pin', 'bolt', 'thread', 'bearing'] as const
export const MAKE_UPS = ['open', 'tacked', 'finished'] as const
export const EXAMINATION_METHODS = ['visual', 'dye penetrant', 'magnetic particle', 'measured'] as const
export const TRAIN_PART_KINDS = ['hose', 'coupler', 'pump', 'valve', 'relief', 'frame', 'tooling', 'stack', 'other'] as const
export const RAM_POSITIONS = ['central', 'far left', 'far right'] as const

export type FrameKind = (typeof FRAME_KINDS)[number]
export type MakeUp = (typeof MAKE_UPS)[number]
export type ExaminationMethod = (typeof EXAMINATION_METHODS)[number]
export type RamPosition = (typeof RAM_POSITIONS)[number]

/** A hydraulic cylinder or jack. The area comes from the maker's effective area, else from the bore. */
export const ramSchema = z
  .object({
    id: idSchema,
    name: name('ram'),
    bore: typedPositiveLengthSchema.nullable(),
    boreTolerance: typedLengthSchema.nullable(),
    effectiveArea: typedPositiveAreaSchema.nullable(),
    stroke: typedPositiveLengthSchema,
    ratedCapacity: typedPositiveForceSchema,
    ratedPressure: typedPositivePressureSchema,
    acting: z.enum(['single', 'double']),
    rodDiameter: typedPositiveLengthSchema.nullable(),
    springReturn: typedForceSchema.nullable(),
    carriedMass: typedMassSchema.nullable(),
    carriedComesDown: z.boolean(),
  })
  .refine((ram) => ram.bore !== null || ram.effectiveArea !== null, {
    path: ['bore'],
    message: 'Give the bore, or the effective area from the maker.',
  })

/** A part the force or its pressure passes through, with the rating marked on it or in its papers. */
export const trainPartSchema = z
  .object({
    id: idSchema,
    kind: z.enum(TRAIN_PART_KINDS),
    name: name('part'),
    ratedForce: typedPositiveForceSchema.nullable(),
    ratedPressure: typedPositivePressureSchema.nullable(),
  })
  .refine((part) => part.ratedForce !== null || part.ratedPressure !== null, {
    path: ['ratedPressure'],
    message: 'Give its rating. A part without a rating cannot be in the train.',
  })

/** `strength` is for the load path check; descriptions written before there was one lack it. */
export const memberSchema = z.object({
  id: idSchema,
  kind: z.enum(MEMBER_KINDS),
  name: name('member'),
  strength: memberStrengthSchema.nullable().optional(),
})

/** Where two members are held together. `place` names a spot of the elevation; null is listed beside it. */
export const jointSchema = z.object({
  id: idSchema,
  number: z.number().int().positive().max(199),
  name: name('joint'),
  kind: z.enum(JOINT_KINDS),
  detail: z.string().trim().max(80),
  between: z.tuple([idSchema, idSchema]).refine(([a, b]) => a !== b, 'A joint holds two different members together.'),
  makeUp: z.enum(MAKE_UPS),
  madeBy: z.string().trim().max(80),
  filler: z.string().trim().max(80),
  madeOn: z.iso.date('Write the day like 2026-09-14.').nullable(),
  place: z.string().max(40).nullable(),
  strength: jointStrengthSchema.nullable().optional(),
})

export const dimensionsSchema = z.object({
  height: typedLengthSchema.nullable(),
  opening: typedLengthSchema.nullable(),
  throat: typedLengthSchema.nullable(),
  holePitch: typedLengthSchema.nullable(),
  holes: z.number().int().min(0).max(40),
})

export const pressDescriptionSchema = z.object({
  name: name('press'),
  whatFor: z.string().trim().max(80),
  kind: z.enum(FRAME_KINDS),
  dimensions: dimensionsSchema,
  ratedLoad: typedPositiveForceSchema,
  members: z.array(memberSchema).max(60),
  rams: z.array(ramSchema).min(1, 'A press needs at least one ram.').max(6),
  train: z.array(trainPartSchema).max(40),
})

/** What limits of any one press somebody may have written down: everything but the joints' own history. */
export type Ram = z.infer<typeof ramSchema>
export type TrainPart = z.infer<typeof trainPartSchema>
export type Member = z.infer<typeof memberSchema>
export type Joint = z.infer<typeof jointSchema>
export type PressDescription = z.infer<typeof pressDescriptionSchema>
