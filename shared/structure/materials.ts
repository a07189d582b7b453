import { z } from 'zod'
import { toSI, typedPositivePressureSchema } from '../units'

/** Grades that the program knows a yield strength of; anything else is `custom`, with its own paper. */
export const GRADES = ['S235JR', 'S275JR', 'S355JR', 'A36', 'A500 Gr B', 'A500 Gr C', 'A572-50', '4140 annealed', 'C45'] as const
export type Grade = (typeof GRADES)[number]

export const materialSchema = z.discriminatedUnion('grade', [
  z.strictObject({ grade: z.enum(GRADES) }),
  z.strictObject({
    grade: z.literal('custom'),
    name: z.string().trim().min(1, 'Give the material a name.').max(80),
    yield: typedPositivePressureSchema,
    /** The certificate or standard that the yield is read from. */
    source: z.string().trim().min(3, 'Say where the yield comes from: a certificate, a standard, a measurement.').max(200),
  }),
])
export type Material = z.infer<typeof materialSchema>

/** What the checks need of a material, in Pa, with where it comes from. */
export interface MaterialStrength {
  name: string
  yield: number
  elasticModulus: number
  shearModulus: number
  source: string
}

interface GradeFacts {
  /** Lowest yield (Pa) up to a thickness (m), thinnest first. */
  yields: readonly (readonly [upTo: number, yieldStrength: number])[]
  /** Lowest yield of a round tube where the standard has another for it. */
  roundYield?: number
  elasticModulus: number
  source: string
}

/** 29 000 ksi, rounded; AISC 360, from memory. */
const ASTM_MODULUS = 200e9
/** EN 1993-1-1, 3.2.6, from memory. */
const EN_MODULUS = 210e9
/** Poisson's ratio of steel; EN 1993-1-1, 3.2.6, from memory. */
const POISSON = 0.3

const MPa = 1e6
/** One ksi in Pa. */
const KSI = toSI({ text: '1000', unit: 'psi' })

const steps = (...yields: [upToMillimetres: number, megapascals: number][]) =>
  yields.map(([upTo, value]) => [upTo / 1000, value * MPa] as const)

const EN_10025 = 'EN 10025-2, table 7'
const FACTS: Record<Grade, GradeFacts> = {
  S235JR: {
    yields: steps([16, 235], [40, 225], [100, 215], [150, 195], [200, 185], [250, 175]),
    elasticModulus: EN_MODULUS,
    source: EN_10025,
  },
  S275JR: {
    yields: steps([16, 275], [40, 265], [63, 255], [80, 245], [100, 235], [150, 225], [200, 215], [250, 205]),
    elasticModulus: EN_MODULUS,
    source: EN_10025,
  },
  S355JR: {
    yields: steps([16, 355], [40, 345], [63, 335], [80, 325], [100, 315], [150, 295], [200, 285], [250, 275]),
    elasticModulus: EN_MODULUS,
    source: EN_10025,
  },
  A36: { yields: [[0.2032, 36 * KSI]], elasticModulus: ASTM_MODULUS, source: 'ASTM A36, 36 ksi up to 8 in; the thickness from memory' },
  'A500 Gr B': {
    yields: [[0.0254, 46 * KSI]],
    roundYield: 42 * KSI,
    elasticModulus: ASTM_MODULUS,
    source: 'ASTM A500, grade B: 46 ksi shaped, 42 ksi round (later editions 46 ksi)',
  },
  'A500 Gr C': {
    yields: [[0.0254, 50 * KSI]],
    roundYield: 46 * KSI,
    elasticModulus: ASTM_MODULUS,
    source: 'ASTM A500, grade C: 50 ksi shaped, 46 ksi round (later editions 50 ksi)',
  },
  'A572-50': { yields: [[0.1016, 50 * KSI]], elasticModulus: ASTM_MODULUS, source: 'ASTM A572, grade 50: 50 ksi; up to 4 in from memory' },
  '4140 annealed': {
    yields: [[0.25, 415 * MPa]],
    elasticModulus: 205e9,
    source: 'SAE 4140 annealed, 415 MPa: typical and no minimum, from memory, no source',
  },
  C45: { yields: steps([16, 340], [100, 305], [250, 275]), elasticModulus: EN_MODULUS, source: 'EN 10083-2, C45+N, from memory' },
}

/**
 * Yield strength and moduli of a material, Pa. `thickness` (m) is that of the part's thickest piece, because a
 * thick plate yields earlier than a thin one of the same grade; `roundTube` picks the yield of round tube.
 * Sources: per grade, in the result. A custom material takes the moduli of steel, 200 GPa and Poisson's ratio 0.3.
 * @throws RangeError when the grade's table ends below that thickness.
 */
export function strengthOf(material: Material, thickness: number, roundTube = false): MaterialStrength {
  if (material.grade === 'custom') {
    return {
      name: material.name,
      yield: toSI(material.yield),
      elasticModulus: ASTM_MODULUS,
      shearModulus: ASTM_MODULUS / (2 * (1 + POISSON)),
      source: material.source,
    }
  }
  const { yields, roundYield, elasticModulus, source } = FACTS[material.grade]
  // A thickness typed in inches can come out a hair above the step it is meant to be on.
  const step = yields.find(([upTo]) => thickness <= upTo * (1 + 1e-9))
  if (!step) {
    throw new RangeError(`No yield of ${material.grade} is known for ${(thickness * 1000).toFixed(0)} mm. Enter it from its certificate.`)
  }
  return {
    name: material.grade,
    yield: roundTube ? (roundYield ?? step[1]) : step[1],
    elasticModulus,
    shearModulus: elasticModulus / (2 * (1 + POISSON)),
    source,
  }
}
