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
  /** Least width, m, at any level of it; null for a round one, which is no wider than a point at its top. */
  leastWidth: number | null
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
    leastWidth: Math.min(2 * wall, width - 2 * radius),
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
    leastWidth: web,
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
  // The upright leg above the neutral axis or, where that runs in the other leg, above the corner: there it is narrow.
  // Its toe is taken as square: a little more Q, a little less shear area.
  const from = Math.max(level, thickness)
  const above = thickness * (height - from) * ((height + from) / 2 - level)
  return {
    moments,
    height,
    shearArea: peakShearArea(secondMoment, thickness, above),
    shearStiffnessArea: (5 / 6) * height * thickness,
    thickness,
    leastWidth: thickness,
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
    leastWidth: width,
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
    leastWidth: null,
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

/** What is `width` wide from one level to another, m. */
interface Block {
  width: number
  from: number
  to: number
}

/** Where a plate sits on what spans `from` to `to`: flat above or below it, or beside it, centred on its height. */
function plateOn(plate: SectionPlate, { from, to }: Pick<Block, 'from' | 'to'>): Block {
  const width = toSI(plate.width)
  const thickness = toSI(plate.thickness)
  if (plate.place === 'beside') {
    const middle = (from + to) / 2
    return { width: thickness, from: middle - width / 2, to: middle + width / 2 }
  }
  return plate.place === 'on top' ? { width, from: to, to: to + thickness } : { width, from: from - thickness, to: from }
}

/** The least total width at any level of a section built of blocks. */
function leastWidthOf(blocks: readonly Block[]): number {
  const levels = [...new Set(blocks.flatMap(({ from, to }) => [from, to]))].sort((a, b) => a - b)
  const widths = levels.slice(1).map((to, index) => {
    const middle = ((levels[index] ?? to) + to) / 2
    return blocks.reduce((sum, block) => (block.from <= middle && middle <= block.to ? sum + block.width : sum), 0)
  })
  return Math.min(...widths)
}

/**
 * A shear area that I·b/Q is nowhere below, whatever the section is built of: Q is half the sum of |y|·dA, which is
 * at most half of √(A·I) (Cauchy and Schwarz), so I·b/Q is at least 2·b·√(I/A) with the least width b.
 */
const leastShearArea = (area: number, secondMoment: number, leastWidth: number) => 2 * leastWidth * Math.sqrt(secondMoment / area)

function builtUp(section: Exclude<MemberSection, { shape: 'custom' }>): SectionProperties {
  const piece = pieceOf(section)
  const n = section.sideBySide
  // Plates beside stand against the bare piece; those on top and underneath lie on whatever is there already.
  const beside = section.plates.filter(({ place }) => place === 'beside').map((plate) => plateOn(plate, { from: 0, to: piece.height }))
  const blocks = [...beside]
  const reach = () => ({
    from: Math.min(0, ...blocks.map(({ from }) => from)),
    to: Math.max(piece.height, ...blocks.map(({ to }) => to)),
  })
  for (const plate of section.plates) if (plate.place !== 'beside') blocks.push(plateOn(plate, reach()))
  const moments = blocks.reduce(
    (sum, { width, from, to }) => withMoments(sum, outlineMoments(rectangle(width, to - from, from))),
    withMoments(NO_MOMENTS, piece.moments, n),
  )
  const { level, secondMoment } = aboutNeutralAxis(moments)
  const { from, to } = reach()
  const c = Math.max(to - level, level - from)
  const plated = blocks.length > 0
  const cautions = [...(piece.cautions ?? [])]
  if (plated)
    cautions.push('Plates count only where they run on past the load and are welded to carry their share: those welds are not checked.')
  return {
    area: moments.area,
    secondMoment,
    sectionModulus: secondMoment / c,
    shearArea: plated ? platedShearArea(piece, n, blocks, moments.area, secondMoment) : n * piece.shearArea,
    shearStiffnessArea:
      n * piece.shearStiffnessArea + beside.reduce((sum, block) => sum + (5 / 6) * block.width * (block.to - block.from), 0),
    c,
    thickness: Math.max(piece.thickness, ...section.plates.map((plate) => Math.min(toSI(plate.thickness), toSI(plate.width)))),
    round: piece.round === true && !plated,
    cautions,
  }
}

/** Null where a plate touches a round piece in a line: all the shear between them goes through that weld. */
function platedShearArea(piece: Piece, n: number, plates: readonly Block[], area: number, secondMoment: number): number | null {
  if (piece.leastWidth === null || piece.leastWidth <= 0) return null
  return leastShearArea(area, secondMoment, leastWidthOf([{ width: n * piece.leastWidth, from: 0, to: piece.height }, ...plates]))
}

/**
 * Properties of a cross-section from its dimensions, SI: doubled by multiplying, reinforced by the parallel-axis
 * theorem. Corners nobody measured are taken as sharp on rolled shapes, which counts too little steel, and as
 * twice the wall on tube. Shear stiffness takes the webs of tube and channel, half of a round tube, 5/6 of a
 * rectangle and 9/10 of a round bar (common practice, no source). The shear area of a reinforced section is one that
 * I·b/Q can't be below.
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
