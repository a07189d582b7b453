import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { leastShearArea, roundedWidth, stripMoments } from '../../tests/support/strip-integration'
import type { MemberSection } from './section-shapes'
import { memberSectionSchema, sectionProperties } from './sections'

const mm = (value: number) => ({ text: value.toFixed(6), unit: 'mm' as const })
const single = { sideBySide: 1, plates: [] }
const SEED = 20260914

/** Lengths in mm with a few decimals, so that what is typed is exactly what is integrated. */
const length = (min: number, max: number) => fc.integer({ min: min * 100, max: max * 100 }).map((value) => value / 100)

interface Shape {
  section: MemberSection
  /** Width (m) at a level (m), and the levels where it jumps or bends. */
  width: (y: number) => number
  levels: number[]
}

const closeTo = (value: number | null, other: number, relative = 2e-6) =>
  expect(Math.abs((value ?? NaN) / other - 1)).toBeLessThan(relative)

/** The program's closed forms against strips, for whatever dimensions come up. */
function holds(shapes: fc.Arbitrary<Shape>, options: { shear?: boolean } = {}): void {
  fc.assert(
    fc.property(shapes, ({ section, width, levels }) => {
      const found = sectionProperties(section)
      const strips = stripMoments(width, levels)
      const [bottom, top] = [Math.min(...levels), Math.max(...levels)]
      const c = Math.max(top - strips.level, strips.level - bottom)
      closeTo(found.area, strips.area)
      closeTo(found.secondMoment, strips.secondMoment)
      closeTo(found.c, c)
      closeTo(found.sectionModulus, strips.secondMoment / c)
      if (options.shear !== false) closeTo(found.shearArea, leastShearArea(width, levels, 4000), 2e-4)
    }),
    { seed: SEED, numRuns: 40, verbose: 1 },
  )
}

const tubes = fc
  .record({ height: length(30, 300), width: length(30, 300), wall: length(2, 12), radius: fc.double({ min: 0, max: 1, noNaN: true }) })
  .map(({ height, width, wall, radius }): Shape => {
    const corner = Math.round(radius * Math.min(height, width) * 40) / 100
    const inner = Math.max(0, corner - wall)
    const outside = roundedWidth(width / 1000, 0, height / 1000, corner / 1000)
    const inside = roundedWidth((width - 2 * wall) / 1000, wall / 1000, (height - wall) / 1000, inner / 1000)
    return {
      section: { shape: 'rectangular tube', height: mm(height), width: mm(width), wall: mm(wall), cornerRadius: mm(corner), ...single },
      width: (y) => outside(y) - inside(y),
      levels: [0, wall, corner, wall + inner, height / 2, height - corner, height - wall - inner, height - wall, height].map(
        (y) => y / 1000,
      ),
    }
  })

const channels = fc
  .record({
    height: length(80, 300),
    flange: length(60, 100),
    web: length(4, 10),
    thickness: length(9, 16),
    root: length(0, 12),
    toe: length(0, 4),
  })
  .map(({ height, flange, web, thickness, root, toe }): Shape => {
    const [h, b, w, t, r1, r2] = [height, flange, web, thickness, root, toe].map((value) => value / 1000) as [
      number,
      number,
      number,
      number,
      number,
      number,
    ]
    return {
      section: {
        shape: 'channel',
        height: mm(height),
        flangeWidth: mm(flange),
        web: mm(web),
        flange: mm(thickness),
        slope: 'parallel',
        rootRadius: mm(root),
        toeRadius: mm(toe),
        ...single,
      },
      width: (y) => {
        const inFrom = Math.min(y, h - y)
        if (inFrom > t + r1) return w
        if (inFrom > t) return w + r1 - Math.sqrt(Math.max(0, r1 ** 2 - (t + r1 - inFrom) ** 2))
        const past = inFrom - (t - r2)
        return past > 0 ? b - r2 + Math.sqrt(Math.max(0, r2 ** 2 - past ** 2)) : b
      },
      levels: [0, t - r2, t, t + r1, h / 2, h - t - r1, h - t, h - t + r2, h],
    }
  })

const angles = fc
  .record({ height: length(40, 150), width: length(40, 150), thickness: length(4, 12) })
  .map(({ height, width, thickness }): Shape => ({
    section: {
      shape: 'angle',
      height: mm(height),
      width: mm(width),
      thickness: mm(thickness),
      rootRadius: null,
      toeRadius: null,
      ...single,
    },
    width: (y) => (y < thickness / 1000 ? width : thickness) / 1000,
    levels: [0, thickness / 1000, height / 1000],
  }))

const roundTubes = fc.record({ diameter: length(20, 200), share: length(0.1, 0.9) }).map(({ diameter, share }): Shape => {
  const wall = Math.round(diameter * share * 49) / 100
  const [outer, inner] = [diameter / 2000, diameter / 2000 - wall / 1000]
  const chord = (radius: number, y: number) => 2 * Math.sqrt(Math.max(0, radius ** 2 - (y - outer) ** 2))
  return {
    section: { shape: 'round tube', diameter: mm(diameter), wall: mm(wall), ...single },
    width: (y) => chord(outer, y) - chord(inner, y),
    levels: [0, outer - inner, outer, outer + inner, 2 * outer],
  }
})

const reinforced = fc
  .record({
    height: length(60, 200),
    width: length(10, 40),
    pieces: fc.integer({ min: 1, max: 3 }),
    top: length(5, 20),
    under: length(5, 20),
    beside: length(5, 20),
    besideHeight: length(30, 250),
    plateWidth: length(50, 200),
  })
  .map(({ height, width, pieces, top, under, beside, besideHeight, plateWidth }): Shape => {
    const low = Math.min(0, (height - besideHeight) / 2)
    const high = Math.max(height, (height + besideHeight) / 2)
    const within = (y: number, from: number, to: number) => (y >= from && y <= to ? 1 : 0)
    return {
      section: {
        shape: 'flat',
        height: mm(height),
        width: mm(width),
        sideBySide: pieces,
        plates: [
          { place: 'on top', width: mm(plateWidth), thickness: mm(top) },
          { place: 'underneath', width: mm(plateWidth), thickness: mm(under) },
          { place: 'beside', width: mm(besideHeight), thickness: mm(beside) },
        ],
      },
      width: (metres) => {
        const y = metres * 1000
        const total =
          pieces * width * within(y, 0, height) +
          beside * within(y, (height - besideHeight) / 2, (height + besideHeight) / 2) +
          plateWidth * (within(y, high, high + top) + within(y, low - under, low))
        return total / 1000
      },
      levels: [low - under, low, 0, (height - besideHeight) / 2, (height + besideHeight) / 2, height, high, high + top].map(
        (y) => y / 1000,
      ),
    }
  })

describe(`sections against integration by strips (fast-check, seed ${SEED})`, () => {
  it('rectangular tube with any corner radius', () => holds(tubes))
  it('channel with root and toe radii', () => holds(channels))
  it('angle with square legs', () => holds(angles))
  it('round tube', () => holds(roundTubes))
  it('several flats side by side with plates on top, underneath and beside: the parallel-axis theorem', () =>
    holds(reinforced, { shear: false }))

  it('a reinforced section never claims more shear area than the least I·b/Q', () => {
    fc.assert(
      fc.property(reinforced, ({ section, width, levels }) => {
        const claimed = sectionProperties(section).shearArea ?? NaN
        const exact = leastShearArea(width, levels, 400)
        expect(claimed).toBeLessThan(exact * 1.001)
      }),
      { seed: SEED, numRuns: 200 },
    )
  })
})

describe('sections', () => {
  const flat: MemberSection = { shape: 'flat', height: mm(100), width: mm(20), ...single }

  it('a flat is b·h³/12, two side by side twice that', () => {
    expect(sectionProperties(flat).secondMoment).toBeCloseTo((0.02 * 0.1 ** 3) / 12, 15)
    const doubled = sectionProperties({ ...flat, sideBySide: 2 })
    expect(doubled.secondMoment).toBeCloseTo((2 * 0.02 * 0.1 ** 3) / 12, 15)
    expect(doubled.c).toBeCloseTo(0.05, 12)
  })

  it('a beam with plates on top and underneath is credited with most of its web', () => {
    const plate = { width: mm(150), thickness: mm(12) }
    const { shearArea } = sectionProperties({
      ...flat,
      plates: [
        { place: 'on top', ...plate },
        { place: 'underneath', ...plate },
      ],
    })
    const width = (y: number) => (y > 0 && y < 0.1 ? 0.02 : 0.15)
    const exact = leastShearArea(width, [-0.012, 0, 0.1, 0.112], 2000)
    expect((shearArea ?? 0) / exact).toBeGreaterThan(0.9)
    expect((shearArea ?? 0) / exact).toBeLessThan(1)
  })

  it('the shear of a round bar with a plate goes through their weld, and isn’t known', () => {
    expect(
      sectionProperties({
        shape: 'round bar',
        diameter: mm(60),
        sideBySide: 1,
        plates: [{ place: 'on top', width: mm(50), thickness: mm(10) }],
      }).shearArea,
    ).toBeNull()
  })

  it('a round bar shears at 4/3 of the mean, a flat at 3/2', () => {
    expect((sectionProperties({ shape: 'round bar', diameter: mm(40), ...single }).shearArea ?? 0) / (Math.PI * 0.02 ** 2)).toBeCloseTo(
      3 / 4,
      12,
    )
    expect((sectionProperties(flat).shearArea ?? 0) / 0.002).toBeCloseTo(2 / 3, 12)
  })

  it('a tube whose corners nobody measured has those that cold-formed tube is listed with', () => {
    const tube = (cornerRadius: ReturnType<typeof mm> | null): MemberSection => ({
      shape: 'square tube',
      side: mm(100),
      wall: mm(6),
      cornerRadius,
      ...single,
    })
    expect(sectionProperties(tube(null))).toEqual(sectionProperties(tube(mm(12))))
  })

  it('a channel with leaning flanges has the area of its mean thickness', () => {
    const channel = (slope: 'parallel' | 'one in six'): MemberSection => ({
      shape: 'channel',
      height: mm(150),
      flangeWidth: mm(60),
      web: mm(6),
      flange: mm(10),
      slope,
      rootRadius: null,
      toeRadius: null,
      ...single,
    })
    expect(sectionProperties(channel('one in six')).area).toBeCloseTo(sectionProperties(channel('parallel')).area, 12)
    expect(sectionProperties(channel('one in six')).secondMoment).not.toBeCloseTo(sectionProperties(channel('parallel')).secondMoment, 12)
  })

  it('says what a lone channel, an angle and welded plates leave out', () => {
    expect(sectionProperties(flat).cautions).toEqual([])
    const plated: MemberSection = { ...flat, plates: [{ place: 'on top', width: mm(80), thickness: mm(10) }] }
    expect(sectionProperties(plated).cautions.join()).toMatch(/welds are not checked/)
  })

  it.each<[string, MemberSection, RegExp]>([
    ['a tube of nothing but wall', { shape: 'square tube', side: mm(50), wall: mm(25), cornerRadius: null, ...single }, /no room inside/],
    [
      'a corner wider than the tube',
      { shape: 'square tube', side: mm(50), wall: mm(5), cornerRadius: mm(30), ...single },
      /outside radius of one corner/,
    ],
    ['a round tube of nothing but wall', { shape: 'round tube', diameter: mm(50), wall: mm(25), ...single }, /no room inside/],
    [
      'an angle thicker than its leg',
      { shape: 'angle', height: mm(20), width: mm(60), thickness: mm(20), rootRadius: null, toeRadius: null, ...single },
      /thicker than its leg/,
    ],
    [
      'a channel whose radii don’t fit',
      {
        shape: 'channel',
        height: mm(100),
        flangeWidth: mm(50),
        web: mm(6),
        flange: mm(5),
        slope: 'one in six',
        rootRadius: mm(40),
        toeRadius: mm(9),
        ...single,
      },
      /don’t fit its flanges/,
    ],
  ])('%s is refused with a sentence', (_, section, sentence) => {
    expect(() => sectionProperties(section)).toThrow(sentence)
    const parsed = memberSectionSchema.safeParse(section)
    expect(parsed.success).toBe(false)
    expect(parsed.error?.issues[0]?.message).toMatch(sentence)
  })
})
