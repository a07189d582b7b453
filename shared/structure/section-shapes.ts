import { z } from 'zod'
import { decimalTextSchema, parseDecimal, toSI, typedLengthSchema, typedPositiveAreaSchema, typedPositiveLengthSchema } from '../units'

/**
 * The cross-sections that shop-built presses are made of, as people measure them. "Height" is always in the
 * direction of the force on a beam, "width" across it.
 */

/** Second moments of area and section moduli have units of their own; only a custom section is typed in them. */
export const SECOND_MOMENT_UNITS = ['mm4', 'cm4', 'in4'] as const
export const SECTION_MODULUS_UNITS = ['mm3', 'cm3', 'in3'] as const

const MILLIMETRE = toSI({ text: '1', unit: 'mm' })
const CENTIMETRE = 10 * MILLIMETRE
const INCH = toSI({ text: '1', unit: 'in' })
const SIDES = { mm4: MILLIMETRE, cm4: CENTIMETRE, in4: INCH, mm3: MILLIMETRE, cm3: CENTIMETRE, in3: INCH } as const

/** The words for those units: "mm⁴", "in³". */
export const SECTION_UNIT_LABELS = { mm4: 'mm⁴', cm4: 'cm⁴', in4: 'in⁴', mm3: 'mm³', cm3: 'cm³', in3: 'in³' } as const

const secondMomentSchema = z.strictObject({ text: decimalTextSchema({ positive: true }), unit: z.enum(SECOND_MOMENT_UNITS) })
const sectionModulusSchema = z.strictObject({ text: decimalTextSchema({ positive: true }), unit: z.enum(SECTION_MODULUS_UNITS) })

/**
 * A second moment of area (m⁴) or section modulus (m³) as typed.
 * @throws RangeError when the text isn't a number as `parseDecimal` takes it.
 */
export function sectionUnitToSI(typed: z.infer<typeof secondMomentSchema> | z.infer<typeof sectionModulusSchema>): number {
  const parsed = parseDecimal(typed.text)
  if (!parsed.ok) throw new RangeError(`“${typed.text}” is not a number. ${parsed.message}`)
  return parsed.value * SIDES[typed.unit] ** (typed.unit.endsWith('4') ? 4 : 3)
}

export const PLATE_PLACES = ['on top', 'underneath', 'beside'] as const

/** A plate added along the whole member: flat on top or underneath, or standing beside it, centred on its height. */
const plateSchema = z.strictObject({
  place: z.enum(PLATE_PLACES),
  width: typedPositiveLengthSchema,
  thickness: typedPositiveLengthSchema,
})

const sideBySide = z.number().int().min(1, 'At least one piece.').max(6, 'Enter more than six pieces as a custom section.')
const built = { sideBySide, plates: z.array(plateSchema).max(8) }

/** Outside radius of the corners; null when nobody measured it. */
const cornerRadius = typedLengthSchema.nullable()
const rolledRadii = { rootRadius: typedLengthSchema.nullable(), toeRadius: typedLengthSchema.nullable() }

export const SECTION_SHAPES = ['rectangular tube', 'square tube', 'channel', 'angle', 'flat', 'round bar', 'round tube', 'custom'] as const
export type SectionShape = (typeof SECTION_SHAPES)[number]

/** How far the inside of a channel's flange leans: not at all, one in six (American), eight percent (UPN). */
export const FLANGE_SLOPES = ['parallel', 'one in six', '8 percent'] as const

export const sectionDimensionsSchema = z.discriminatedUnion('shape', [
  z.strictObject({
    shape: z.literal('rectangular tube'),
    height: typedPositiveLengthSchema,
    width: typedPositiveLengthSchema,
    wall: typedPositiveLengthSchema,
    cornerRadius,
    ...built,
  }),
  z.strictObject({
    shape: z.literal('square tube'),
    side: typedPositiveLengthSchema,
    wall: typedPositiveLengthSchema,
    cornerRadius,
    ...built,
  }),
  z.strictObject({
    shape: z.literal('channel'),
    height: typedPositiveLengthSchema,
    flangeWidth: typedPositiveLengthSchema,
    web: typedPositiveLengthSchema,
    /** Mean thickness, half-way out from the web, as tables print it. */
    flange: typedPositiveLengthSchema,
    slope: z.enum(FLANGE_SLOPES),
    ...rolledRadii,
    ...built,
  }),
  z.strictObject({
    shape: z.literal('angle'),
    /** The leg in the direction of the force, and the one across it. */
    height: typedPositiveLengthSchema,
    width: typedPositiveLengthSchema,
    thickness: typedPositiveLengthSchema,
    ...rolledRadii,
    ...built,
  }),
  z.strictObject({ shape: z.literal('flat'), height: typedPositiveLengthSchema, width: typedPositiveLengthSchema, ...built }),
  z.strictObject({ shape: z.literal('round bar'), diameter: typedPositiveLengthSchema, ...built }),
  z.strictObject({ shape: z.literal('round tube'), diameter: typedPositiveLengthSchema, wall: typedPositiveLengthSchema, ...built }),
  z.strictObject({
    shape: z.literal('custom'),
    name: z.string().trim().min(1, 'Name the section and where its figures come from.').max(120),
    area: typedPositiveAreaSchema,
    secondMoment: secondMomentSchema,
    sectionModulus: sectionModulusSchema,
    /** The area that carries shear; null leaves shear unchecked. */
    shearArea: typedPositiveAreaSchema.nullable(),
    /** The thickest piece, on which the yield of the grade depends. */
    thickness: typedPositiveLengthSchema,
    sideBySide,
  }),
])
export type MemberSection = z.infer<typeof sectionDimensionsSchema>
export type SectionPlate = z.infer<typeof plateSchema>
