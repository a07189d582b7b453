import { z } from 'zod'
import {
  decimalTextSchema,
  parseDecimal,
  typedLengthSchema,
  typedPositiveAreaSchema,
  typedPositiveLengthSchema,
  typedPositivePressureSchema,
} from '../units'
import { materialSchema } from './materials'
import { memberSectionSchema } from './sections'

/** What the load path check needs to know of a member or joint; without it, the check says NOT CHECKED. */

/** Percent of the press's force that this part carries, when it isn't what the check would work out. */
const loadShareSchema = decimalTextSchema()
  .refine((text) => {
    const parsed = parseDecimal(text)
    return !parsed.ok || parsed.value <= 100
  }, 'A part carries no more than 100 % of the force.')
  .nullable()

/** A hole through the member: its diameter, and the metal it goes through, both walls of a tube together. */
const holeSchema = z.strictObject({ diameter: typedPositiveLengthSchema, metal: typedPositiveLengthSchema })

/** A piece of plate or wall, with the thickness that bears. */
const partSchema = z.strictObject({ material: materialSchema, thickness: typedPositiveLengthSchema })

export const BEAM_SUPPORTS = ['both ends', 'one end'] as const

export const memberStrengthSchema = z.discriminatedUnion('role', [
  z.strictObject({
    role: z.literal('beam'),
    section: memberSectionSchema,
    material: materialSchema,
    support: z.enum(BEAM_SUPPORTS),
    /** Between supports; for a beam held at one end, from its root to the ram's line. */
    span: typedPositiveLengthSchema,
    /** The farthest that the ram can stand from the middle of the span; null when it can't be moved. */
    ramOffset: typedLengthSchema.nullable(),
    hole: holeSchema.nullable(),
    loadShare: loadShareSchema,
  }),
  z.strictObject({
    role: z.literal('tie'),
    section: memberSectionSchema,
    material: materialSchema,
    /** The length that the force stretches. */
    length: typedPositiveLengthSchema,
    /** From the line of the force to the middle of the section, where the force pulls beside it. */
    eccentricity: typedLengthSchema.nullable(),
    hole: holeSchema.nullable(),
    loadShare: loadShareSchema,
  }),
])

export const ELECTRODES = ['E60', 'E70', 'E80', 'E38', 'E42', 'E46'] as const

const electrodeSchema = z.discriminatedUnion('grade', [
  z.strictObject({ grade: z.enum(ELECTRODES) }),
  z.strictObject({
    grade: z.literal('custom'),
    name: z.string().trim().min(1, 'Name the filler.').max(80),
    tensile: typedPositivePressureSchema,
  }),
])

export const BOLT_CLASSES = ['4.6', '8.8', '10.9', '12.9', 'grade 2', 'grade 5', 'grade 8'] as const

const boltStrengthSchema = z.discriminatedUnion('class', [
  z.strictObject({ class: z.enum(BOLT_CLASSES) }),
  z.strictObject({
    class: z.literal('custom'),
    name: z.string().trim().min(1, 'Name the bolt.').max(80),
    proof: typedPositivePressureSchema,
  }),
])

const threadSchema = z.discriminatedUnion('series', [
  z.strictObject({ series: z.literal('metric'), diameter: typedPositiveLengthSchema, pitch: typedPositiveLengthSchema }),
  z.strictObject({ series: z.literal('inch'), diameter: typedPositiveLengthSchema, threadsPerInch: decimalTextSchema({ positive: true }) }),
])

const planes = z.union([z.literal(1), z.literal(2)])

export const jointStrengthSchema = z.discriminatedUnion('kind', [
  z.strictObject({
    kind: z.literal('weld'),
    size: z.strictObject({ by: z.enum(['leg', 'throat']), value: typedPositiveLengthSchema }),
    /** All the runs that carry this joint's share of the force, together. */
    length: typedPositiveLengthSchema,
    electrode: electrodeSchema,
    /** The weaker of the parts that it holds; null leaves the metal beside the weld unchecked. */
    base: partSchema.nullable(),
    loadShare: loadShareSchema,
  }),
  z.strictObject({
    kind: z.literal('pin'),
    diameter: typedPositiveLengthSchema,
    material: materialSchema,
    shearPlanes: planes,
    /** Clear space between an outer and the middle part, on the wider side. */
    gap: typedLengthSchema,
    /** Each outer part; in single shear, the one part. */
    outer: partSchema,
    /** All metal of the middle part that bears on the pin: both walls of a tube together. */
    inner: partSchema,
    /** From the middle of the hole to the edge or the next hole, the way the pin pushes. */
    outerEdge: typedPositiveLengthSchema.nullable(),
    innerEdge: typedPositiveLengthSchema.nullable(),
    loadShare: loadShareSchema,
  }),
  z.strictObject({
    kind: z.literal('thread'),
    thread: threadSchema,
    strength: boltStrengthSchema,
    count: z.number().int().min(1).max(60),
    loaded: z.enum(['along', 'across']),
    shearPlanes: planes,
    /** Whether the thread carries the force, or a shank or shoulder bottoms and carries it past the thread. */
    carriedBy: z.enum(['thread', 'shank']),
    /** Length of thread that is screwed in, and what it is screwed into; null for a nut of the bolt's class. */
    tapped: z
      .strictObject({ material: materialSchema, thickness: typedPositiveLengthSchema, engagement: typedPositiveLengthSchema })
      .nullable(),
    /** The face on which the shank bottoms. */
    shoulder: z.strictObject({ area: typedPositiveAreaSchema, part: partSchema }).nullable(),
    loadShare: loadShareSchema,
  }),
  z.strictObject({
    kind: z.literal('bearing'),
    area: typedPositiveAreaSchema,
    /** The softer of the two faces. */
    part: partSchema,
    loadShare: loadShareSchema,
  }),
])

export type MemberStrength = z.infer<typeof memberStrengthSchema>
export type BeamStrength = Extract<MemberStrength, { role: 'beam' }>
export type TieStrength = Extract<MemberStrength, { role: 'tie' }>
export type JointStrength = z.infer<typeof jointStrengthSchema>
export type WeldStrength = Extract<JointStrength, { kind: 'weld' }>
export type PinStrength = Extract<JointStrength, { kind: 'pin' }>
export type ThreadStrength = Extract<JointStrength, { kind: 'thread' }>
export type BearingStrength = Extract<JointStrength, { kind: 'bearing' }>
export type Part = z.infer<typeof partSchema>
export type Hole = z.infer<typeof holeSchema>
export type Thread = z.infer<typeof threadSchema>
export type BoltStrength = z.infer<typeof boltStrengthSchema>
export type Electrode = z.infer<typeof electrodeSchema>
