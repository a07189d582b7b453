import { toSI, type TypedLength } from '../units'
import { NO_MOMENTS, outlineMoments, rectangle, withMoments, type Corner, type Moments } from './outline'
import { sectionDimensionsSchema, sectionUnitToSI, type MemberSection, type SectionPlate } from './section-shapes'

/** A cross-section in SI, bending about its own horizontal axis. */
export interface SectionProperties {
  /** Area, m². */
  area: number
  /** Second moment of area about the neutral axis, m⁴. */
  secondMoment: number
  /** Section modulus to the fibre farthest from the neutral axis, m³. */
  sectionModulus: number
  /** The area, m², by which a shear force gives the greatest shear stress: I·b/Q; null when it isn't known. */
  shearArea: number | null
  /** The area, m², by which a shear force gives the mean shear strain; null when it isn't known. */
  shearStiffnessArea: number | null
  /** Distance from the neutral axis to the farthest fibre, m. */
  c: number
  /** The thickest piece, m, on which the yield of a grade depends. */
  thickness: number
  round: boolean
  /** What these figures leave out of account, as sentences. */
  cautions: string[]
}

/** One piece before it is doubled or reinforced, standing on y = 0. */
interface Piece {
  moments: Moments
  height: number
  shearArea: number
  shearStiffnessArea: number
  thickness: number
  round?: boolean
  cautions?: string[]
}

const SLOPES = { parallel: 0, 'one in six': 1 / 6, '8 percent': 0.08 } as const

/** Unmeasured corners of a tube: twice the wall outside, as cold-formed tube is listed (AISC Shapes Database). */
const USUAL_CORNER = 2

const lengthOf = (typed: TypedLength | null) => (typed ? toSI(typed) : 0)

/** Level of the neutral axis, and the second moment about it. */
function aboutNeutralAxis({ area, first, second }: Moments): { level: number; secondMoment: number } {
  const level = first / area
  return { level, secondMoment: second - area * level * level }
}

/** Shear area I·b/Q for a wall of total width b at the neutral axis and Q, the first moment of what lies above it. */
const peakShearArea = (secondMoment: number, width: number, firstMomentAbove: number) => (secondMoment * width) / firstMomentAbove

/** Part of an outline that lies above its own middle, as moments about that middle. */
const lessInside = (outside: Corner[], inside: Corner[]): Moments => withMoments(outlineMoments(outside), outlineMoments(inside), -1)

function tube(height: number, width: number, wall: number, typedRadius: TypedLength | null): Piece {
  if (2 * wall >= Math.min(height, width)) throw new RangeError('The walls of the tube leave no room inside. Measure them again.')
  const most = Math.min(height, width) / 2
  const radius = typedRadius ? toSI(typedRadius) : Math.min(USUAL_CORNER * wall, most)
  if (radius > most) throw new RangeError('The corner radius of the tube is more than half a side. It is the outside radius of one corner.')
  const inner = Math.max(0, radius - wall)
  const moments = lessInside(rectangle(width, height, 0, radius), rectangle(width - 2 * wall, height - 2 * wall, wall, inner))
  const above = lessInside(rectangle(width, height / 2, 0, radius, 'top'), rectangle(width - 2 * wall, height / 2 - wall, 0, inner, 'top'))
  const { secondMoment } = aboutNeutralAxis(moments)
  return {
    moments,
    height,
    shearArea: peakShearArea(secondMoment, 2 * wall, above.first),
    shearStiffnessArea: 2 * wall * height,
    thickness: wall,
  }
}

function channel(section: Extract<MemberSection, { shape: 'channel' }>): Piece {
  const height = toSI(section.height)
  const width = toSI(section.flangeWidth)
  const web = toSI(section.web)
  const flange = toSI(section.flange)
  if (web >= width || 2 * flange >= height)
    throw new RangeError('The channel’s web or flanges are thicker than the channel. Measure them again.')
  const lean = (SLOPES[section.slope] * (width - web)) / 2
  const root = lengthOf(section.rootRadius)
  const toe = lengthOf(section.toeRadius)
  if (flange <= lean || root + toe > width - web || toe > flange - lean || flange + lean + root > height / 2) {
    throw new RangeError('The channel’s radii and slope don’t fit its flanges. Leave the radii out, or measure them again.')
  }
  const upperHalf = (middle: number, bottom: number): Corner[] => [
    { x: 0, y: bottom },
    { x: web, y: bottom },
    { x: web, y: middle - flange - lean, radius: root },
    { x: width, y: middle - flange + lean, radius: toe },
    { x: width, y: middle },
    { x: 0, y: middle },
  ]
  const half = outlineMoments(upperHalf(height / 2, 0))
  // Both halves mirror each other about mid-height: lift the sum so that the piece stands on y = 0.
  const area = 2 * half.area
  const moments = { area, first: (area * height) / 2, second: 2 * half.second + area * (height / 2) ** 2 }
  return {
    moments,
    height,
    shearArea: peakShearArea(2 * half.second, web, half.first),
    shearStiffnessArea: height * web,
    thickness: Math.max(web, flange),
    cautions:
      section.sideBySide > 1
        ? []
        : ['A channel loaded in the line of its web also twists, unless the force is held over its shear centre: twist is not checked.'],
  }
}

function angle(section: Extract<MemberSection, { shape: 'angle' }>): Piece {
  const height = toSI(section.height)
  const width = toSI(section.width)
  const thickness = toSI(section.thickness)
  if (thickness >= Math.min(height, width)) throw new RangeError('The angle is thicker than its leg is long. Measure it again.')
  const root = lengthOf(section.rootRadius)
  const toe = lengthOf(section.toeRadius)
  if (root + toe > Math.min(height, width) - thickness || toe > thickness) {
    throw new RangeError('The angle’s radii don’t fit its legs. Leave the radii out, or measure them again.')
  }
  const moments = outlineMoments([
    { x: 0, y: 0 },
    { x: width, y: 0 },
    { x: width, y: thickness, radius: toe },
    { x: thickness, y: thickness, radius: root },
    { x: thickness, y: height, radius: toe },
    { x: 0, y: height },
  ])
  const { level, secondMoment } = aboutNeutralAxis(moments)
  // The leg above the neutral axis, its toe taken as square: a little more Q, a little less shear area.
  const above = (thickness * (height - level) ** 2) / 2
  return {
    moments,
    height,
    shearArea: level > thickness ? peakShearArea(secondMoment, thickness, above) : (2 / 3) * height * thickness,
    shearStiffnessArea: (5 / 6) * height * thickness,
    thickness,
    cautions: ['An angle also bends sideways and twists: only bending about the axis along its other leg is checked.'],
  }
}

function solidRectangle(width: number, height: number): Piece {
  const area = width * height
  return {
    moments: outlineMoments(rectangle(width, height, 0)),
    height,
    shearArea: (2 / 3) * area,
    shearStiffnessArea: (5 / 6) * area,
    thickness: Math.min(width, height),
  }
}

/** A round bar, or a round tube when the bore is above zero. */
function round(diameter: number, bore: number): Piece {
  const area = (Math.PI * (diameter ** 2 - bore ** 2)) / 4
  const own = (Math.PI * (diameter ** 4 - bore ** 4)) / 64
  const above = (diameter ** 3 - bore ** 3) / 12
  const level = diameter / 2
  return {
    moments: { area, first: area * level, second: own + area * level * level },
    height: diameter,
    shearArea: peakShearArea(own, diameter - bore, above),
    shearStiffnessArea: bore > 0 ? area / 2 : 0.9 * area,
    thickness: bore > 0 ? (diameter - bore) / 2 : diameter,
    round: bore > 0,
  }
}

function pieceOf(section: Exclude<MemberSection, { shape: 'custom' }>): Piece {
  switch (section.shape) {
    case 'rectangular tube':
      return tube(toSI(section.height), toSI(section.width), toSI(section.wall), section.cornerRadius)
    case 'square tube':
      return tube(toSI(section.side), toSI(section.side), toSI(section.wall), section.cornerRadius)
    case 'channel':
      return channel(section)
    case 'angle':
      return angle(section)
    case 'flat':
      return solidRectangle(toSI(section.width), toSI(section.height))
    case 'round bar':
      return round(toSI(section.diameter), 0)
    case 'round tube': {
      const diameter = toSI(section.diameter)
      const wall = toSI(section.wall)
      if (2 * wall >= diameter) throw new RangeError('The wall of the tube leaves no room inside. Measure it again.')
      return round(diameter, diameter - 2 * wall)
    }
  }
}

/** A plate's moments where it sits on the piece, and the area of it that carries shear: only beside. */
function plateOn(plate: SectionPlate, top: number, bottom: number): { moments: Moments; top: number; bottom: number; upright: number } {
  const width = toSI(plate.width)
  const thickness = toSI(plate.thickness)
  if (plate.place === 'beside') {
    const middle = (top + bottom) / 2
    const from = middle - width / 2
    return { moments: outlineMoments(rectangle(thickness, width, from)), top: from + width, bottom: from, upright: width * thickness }
  }
  const from = plate.place === 'on top' ? top : bottom - thickness
  return { moments: outlineMoments(rectangle(width, thickness, from)), top: from + thickness, bottom: from, upright: 0 }
}

function builtUp(section: Exclude<MemberSection, { shape: 'custom' }>): SectionProperties {
  const piece = pieceOf(section)
  const n = section.sideBySide
  let moments = withMoments(NO_MOMENTS, piece.moments, n)
  let [top, bottom] = [piece.height, 0]
  let upright = 0
  // Plates beside stand against the bare piece; those on top and underneath lie on whatever is there already.
  const inOrder = [...section.plates.filter(({ place }) => place === 'beside'), ...section.plates.filter(({ place }) => place !== 'beside')]
  for (const plate of inOrder) {
    const [flatTop, flatBottom] = plate.place === 'beside' ? [piece.height, 0] : [top, bottom]
    const added = plateOn(plate, flatTop, flatBottom)
    moments = withMoments(moments, added.moments)
    top = Math.max(top, added.top)
    bottom = Math.min(bottom, added.bottom)
    upright += added.upright
  }
  const { level, secondMoment } = aboutNeutralAxis(moments)
  const c = Math.max(top - level, level - bottom)
  return {
    area: moments.area,
    secondMoment,
    sectionModulus: secondMoment / c,
    shearArea: n * piece.shearArea + (2 / 3) * upright,
    shearStiffnessArea: n * piece.shearStiffnessArea + (5 / 6) * upright,
    c,
    thickness: Math.max(piece.thickness, ...section.plates.map((plate) => Math.min(toSI(plate.thickness), toSI(plate.width)))),
    round: piece.round === true && section.plates.length === 0,
    cautions: [
      ...(piece.cautions ?? []),
      ...(section.plates.length > 0
        ? ['Plates count only where they run on past the load and are welded to carry their share: those welds are not checked.']
        : []),
    ],
  }
}

/**
 * Properties of a cross-section from its dimensions, SI: doubled by multiplying, reinforced by the parallel-axis
 * theorem. Corners nobody measured are taken as sharp on rolled shapes, which counts too little steel, and as
 * twice the wall on tube. Shear stiffness takes the webs of tube and channel, half of a round tube, 5/6 of a
 * rectangle and 9/10 of a round bar (common practice, no source).
 * Source: Green's theorem, I·b/Q for shear (elementary mechanics); checked against the AISC Shapes Database.
 * @throws RangeError with a sentence when the dimensions can't be those of one section.
 */
export function sectionProperties(section: MemberSection): SectionProperties {
  if (section.shape !== 'custom') return builtUp(section)
  const n = section.sideBySide
  const secondMoment = n * sectionUnitToSI(section.secondMoment)
  const sectionModulus = n * sectionUnitToSI(section.sectionModulus)
  const shearArea = section.shearArea ? n * toSI(section.shearArea) : null
  return {
    area: n * toSI(section.area),
    secondMoment,
    sectionModulus,
    shearArea,
    shearStiffnessArea: shearArea,
    c: secondMoment / sectionModulus,
    thickness: toSI(section.thickness),
    round: false,
    cautions: ['The figures of this section were typed in, not worked out.'],
  }
}

/** A section as typed, refused with a sentence when its dimensions don't fit together. */
export const memberSectionSchema = sectionDimensionsSchema.superRefine((section, context) => {
  try {
    sectionProperties(section)
  } catch (error) {
    if (!(error instanceof RangeError)) throw error
    context.addIssue({ code: 'custom', message: error.message })
  }
})
