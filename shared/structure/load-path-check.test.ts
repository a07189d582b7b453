import { describe, expect, it } from 'vitest'
import { openedPayload } from '../../tests/factories/test-press'
import { jointSchema, memberSchema, type Joint, type Member, type PressDescription } from '../press/model'
import { toSI } from '../units'
import { DEFLECTION_SPREAD, expectedDeflection, expectedOpening } from './expected-deflection'
import { checkLoadPath, type CheckResult, type LoadPathCheck } from './load-path-check'
import type { BeamStrength, JointStrength, TieStrength } from './member-data'

const mm = (value: number) => ({ text: String(value), unit: 'mm' as const })
const s355 = { grade: 'S355JR' } as const
const bare = openedPayload()

const beam: BeamStrength = {
  role: 'beam',
  section: { shape: 'flat', height: mm(150), width: mm(20), sideBySide: 2, plates: [] },
  material: s355,
  support: 'both ends',
  span: mm(600),
  ramOffset: mm(120),
  hole: null,
  loadShare: null,
}
const tie: TieStrength = {
  role: 'tie',
  section: { shape: 'square tube', side: mm(100), wall: mm(6), cornerRadius: null, sideBySide: 1, plates: [] },
  material: s355,
  length: mm(1000),
  eccentricity: null,
  hole: { diameter: mm(33), metal: mm(12) },
  loadShare: null,
}
const joints: Record<'weld' | 'pin', JointStrength> = {
  weld: {
    kind: 'weld',
    size: { by: 'leg', value: mm(8) },
    length: mm(600),
    electrode: { grade: 'E70' },
    base: { material: s355, thickness: mm(12) },
    loadShare: null,
  },
  pin: {
    kind: 'pin',
    diameter: mm(40),
    material: { grade: 'C45' },
    shearPlanes: 2,
    gap: mm(2),
    outer: { material: s355, thickness: mm(20) },
    inner: { material: s355, thickness: mm(12) },
    outerEdge: mm(75),
    innerEdge: mm(75),
    loadShare: null,
  },
}

const strengthOfMember = (member: Member): Member['strength'] =>
  member.kind === 'head-beam' || member.kind === 'bed-beam' ? beam : member.kind === 'upright' ? tie : null
const strengthOfJoint = (joint: Joint): Joint['strength'] => (joint.kind === 'weld' || joint.kind === 'pin' ? joints[joint.kind] : null)

/** The H-frame of the other tests with its dimensions entered, and what a test changes of it. */
function frame(
  changes: {
    member?: (member: Member) => Partial<Member>
    joint?: (joint: Joint) => Partial<Joint>
    press?: Partial<PressDescription>
  } = {},
) {
  const members = bare.press.members.map((member) => ({ ...member, strength: strengthOfMember(member), ...changes.member?.(member) }))
  return {
    description: { ...bare.press, members, ...changes.press },
    joints: bare.joints.map((joint) => ({ ...joint, strength: strengthOfJoint(joint), ...changes.joint?.(joint) })),
  }
}

function result(check: LoadPathCheck, name: string | RegExp, what: string): CheckResult {
  const found = check.results.find((each) => (typeof name === 'string' ? each.name === name : name.test(each.name)) && each.check === what)
  if (!found) throw new Error(`No ${what} of ${String(name)}`)
  return found
}

const TWELVE = toSI(bare.press.ratedLoad)

describe('the load path check', () => {
  it('checks every member and joint under its share of the rated load, on one basis', () => {
    const check = checkLoadPath(frame())
    expect(check.load).toBeCloseTo(TWELVE, 6)
    expect(check.path.closed).toBe(true)
    const bending = result(check, 'Bed', 'bending')
    expect(bending.demand).toBeCloseTo((TWELVE * 0.6) / 4, 6)
    expect(bending.utilisation).toBeCloseTo((bending.demand ?? 0) / (0.5 * 345e6 * 2 * ((0.02 * 0.15 ** 2) / 6)), 9)
    expect(bending).toMatchObject({ verdict: 'within', unit: 'N·m', notChecked: null, carries: 'all of the force' })
    // The ram can stand 120 mm off the middle of 600 mm: the nearer side then carries 70 %.
    expect(result(check, 'Left upright', 'tension, on the net section').demand).toBeCloseTo(0.7 * TWELVE, 6)
    expect(result(check, /joint 5/, 'double shear').demand).toBeCloseTo(0.7 * TWELVE, 6)
    expect(result(check, /joint 1,/, 'weld throat').demand).toBeCloseTo(0.7 * TWELVE, 6)
    expect(result(check, /joint 3,/, 'weld throat').demand).toBeCloseTo(TWELVE, 6)
  })

  it('names the weakest and says it is an estimate', () => {
    const check = checkLoadPath(frame())
    const highest = Math.max(...check.results.map(({ utilisation }) => utilisation ?? 0))
    expect(check.weakest?.utilisation).toBe(highest)
    expect(check.blocks).toBe(false)
    expect(check.sentence).toContain(`${check.weakest?.name ?? ''}, ${check.weakest?.check ?? ''}: ${Math.round(highest * 100)} %`)
    expect(check.sentence).toMatch(/12\.00\u00a0short tons.*An estimate, not a design approval\.$/)
    expect(check.sentence).not.toMatch(/safe|approved/i)
  })

  it('everything it leaves out is NOT CHECKED with the reason', () => {
    const check = checkLoadPath(frame())
    const left = check.results.filter(({ verdict }) => verdict === 'not checked')
    expect(left).toHaveLength(check.notChecked)
    for (const each of left) {
      expect(each.notChecked).not.toBe('')
      expect(each).toMatchObject({ demand: null, capacity: null, utilisation: null })
    }
    expect(result(check, 'Ram seat', 'strength').notChecked).toBe('No section, material and length are entered.')
    expect(result(check, 'Left pin', 'strength').notChecked).toBe('A pin is checked at its joint: see joint 5.')
    expect(check.sentence).toContain(`NOT CHECKED: ${check.notChecked}`)
  })

  it('a press of which nothing is known checks nothing, and blocks nothing by it', () => {
    const check = checkLoadPath({ description: bare.press, joints: bare.joints })
    expect(check.weakest).toBeNull()
    expect(check.notChecked).toBe(bare.press.members.length + bare.joints.length)
    expect(check.blocks).toBe(false)
    expect(check.sentence).toMatch(/^Nothing in the load path could be checked/)
    expect(check.expected).toEqual({ band: null, missing: 'No section and span are entered for Head beam.' })
  })

  it('over 100 % blocks and names the member', () => {
    const check = checkLoadPath({ ...frame(), load: 4 * TWELVE })
    expect(check.blocks).toBe(true)
    expect(check.weakest?.verdict).toBe('beyond')
    expect(check.sentence).toContain(check.weakest?.name)
    expect(check.sentence).toMatch(/No load until it is made stronger, the rated load is lowered, or a named engineer’s document/)
  })

  it('a hair over is never printed as 100 %', () => {
    const once = checkLoadPath(frame()).weakest?.utilisation ?? NaN
    const check = checkLoadPath({ ...frame(), load: (TWELVE / once) * 1.001 })
    expect(check.blocks).toBe(true)
    expect(check.sentence).toContain('101 %')
    expect(checkLoadPath({ ...frame(), load: (TWELVE / once) * 0.9999999 }).blocks).toBe(false)
  })

  it.each(['open', 'tacked'] as const)('a joint that is %s may carry nothing, whatever was entered of it', (makeUp) => {
    const check = checkLoadPath(frame({ joint: (joint) => (joint.number === 7 ? { makeUp } : {}) }))
    expect(check.weakest).toMatchObject({ name: 'joint 7, Bed on left pin', capacity: 0, utilisation: null, verdict: 'beyond' })
    expect(check.blocks).toBe(true)
    expect(check.sentence).toMatch(new RegExp(`^joint 7, Bed on left pin: ${makeUp}, not finished\\. It may carry nothing`))
  })

  it('an open load path blocks and says where', () => {
    const whole = frame()
    const check = checkLoadPath({ ...whole, joints: whole.joints.filter(({ number }) => number !== 7 && number !== 8) })
    expect(check.blocks).toBe(true)
    expect(check.sentence).toMatch(/^The load path is not closed\. Bed hangs on no joint/)
  })

  it('a share entered with a member or joint goes before the one worked out', () => {
    const check = checkLoadPath(
      frame({
        member: (member) => (member.kind === 'bed-beam' ? { strength: { ...beam, loadShare: '50' } } : {}),
        joint: (joint) => (joint.number === 1 ? { strength: { ...joints.weld, loadShare: '0' } } : {}),
      }),
    )
    expect(result(check, 'Bed', 'bending').demand).toBeCloseTo((TWELVE * 0.6) / 8, 6)
    expect(result(check, 'Bed', 'bending').carries).toBe('50 % of the force, as entered')
    expect(result(check, /joint 1,/, 'strength').notChecked).toBe('It carries none of the force, as entered.')
  })

  it('figures of another kind of joint are not used', () => {
    const check = checkLoadPath(frame({ joint: (joint) => (joint.number === 1 ? { strength: joints.pin } : {}) }))
    expect(result(check, /joint 1,/, 'strength').notChecked).toBe('What is entered is a pin, and the joint is a weld.')
  })

  it('a part held to a stiffener, and a stiffener, need their share entered', () => {
    const check = checkLoadPath(frame({ member: (member) => (member.name === 'Ram seat' ? { kind: 'stiffener', strength: tie } : {}) }))
    expect(result(check, 'Ram seat', 'strength').notChecked).toMatch(/was not entered/)
    expect(result(check, /joint 3,/, 'strength').notChecked).toMatch(/It holds Ram seat/)
  })

  it('the upright of a C-frame is not checked as a plain tie, nor its beams as held at both ends', () => {
    const check = checkLoadPath(frame({ press: { kind: 'c-frame' } }))
    expect(result(check, 'Left upright', 'strength').notChecked).toMatch(/C-frame also bends/)
    expect(result(check, 'Bed', 'strength').notChecked).toMatch(/held at one end/)
    expect(check.expected.missing).toMatch(/throat/)
  })

  it('the four posts of a four-post frame share their side; two uprights a side of another frame are each given all of it', () => {
    const posts = (kind: PressDescription['kind']) => {
      const base = frame()
      const more = [31, 32].map((n): Member => ({
        id: `00000000-0000-7000-8000-0000000000${n}`,
        kind: 'upright',
        name: `Upright ${n}`,
        strength: tie,
      }))
      return checkLoadPath({ ...base, description: { ...base.description, kind, members: [...base.description.members, ...more] } })
    }
    expect(result(posts('four-post'), 'Left upright', 'tension, on the net section').demand).toBeCloseTo(0.35 * TWELVE, 6)
    expect(result(posts('h-frame'), 'Left upright', 'tension, on the net section').demand).toBeCloseTo(0.7 * TWELVE, 6)
  })

  it('is stored without a figure that JSON has no number for', () => {
    const check = checkLoadPath(frame({ joint: () => ({ makeUp: 'open' }) }))
    expect(JSON.parse(JSON.stringify(check.results))).toEqual(check.results)
  })
})

describe('descriptions with and without strengths', () => {
  it('those written before there were any still parse, and come out as they were', () => {
    for (const member of bare.press.members) expect(memberSchema.parse(member)).toEqual(member)
    for (const joint of bare.joints) expect(jointSchema.parse(joint)).toEqual(joint)
  })

  it('new ones keep every number as typed', () => {
    const { description, joints: all } = frame()
    for (const member of description.members) expect(memberSchema.parse(member)).toEqual(member)
    for (const joint of all) expect(jointSchema.parse(joint)).toEqual(joint)
  })

  it('a section that can’t be is refused where it is entered', () => {
    const [member] = frame({
      member: () => ({ strength: { ...tie, section: { ...tie.section, wall: mm(60) } as TieStrength['section'] } }),
    }).description.members
    expect(memberSchema.safeParse(member).error?.issues[0]?.message).toMatch(/no room inside/)
  })
})

describe('the expected deflection', () => {
  const EI = 210e9 * 2 * ((0.02 * 0.15 ** 3) / 12)
  const GA = (210e9 / 2.6) * 2 * (5 / 6) * 0.02 * 0.15
  const bending = (TWELVE * 0.6 ** 3) / (48 * EI)
  const shear = (TWELVE * 0.6) / (4 * GA)
  const whole = frame()
  const points = bare.points.map(({ id, memberId }) => ({ id, memberId }))
  const net = bare.net

  it('of the bed’s middle less its pins is the bed’s own: P·L³/48EI and shear, a quarter each way', () => {
    const { net: found } = expectedDeflection(whole, TWELVE, points, { net })
    expect(found?.band?.deflection).toBeCloseTo(bending + shear, 12)
    expect(found?.band?.low).toBeCloseTo((bending + shear) * (1 - DEFLECTION_SPREAD), 12)
    expect(found?.band?.high).toBeCloseTo((bending + shear) * (1 + DEFLECTION_SPREAD), 12)
  })

  it('is less in the middle with the ram aside', () => {
    const aside = expectedDeflection(whole, TWELVE, points, { net, position: 'far left' }).net?.band
    expect(aside?.deflection).toBeLessThan(bending + shear)
    expect(aside?.deflection).toBeGreaterThan(0.6 * (bending + shear))
  })

  it('grows with the force', () => {
    const half = expectedDeflection(whole, TWELVE / 2, points, { net }).net?.band
    expect(half?.high).toBeCloseTo(((bending + shear) * (1 + DEFLECTION_SPREAD)) / 2, 12)
  })

  it('of a raw point on the bed has the pins’ give on top, of a point on a pin anything up to that', () => {
    const { points: found } = expectedDeflection(whole, TWELVE, points)
    const [middle, left] = [bare.points[0], bare.points[1]].map((point) => found.get(point?.id ?? '')?.band)
    expect(left?.low).toBe(0)
    expect(middle?.deflection).toBeCloseTo(bending + shear + (left?.deflection ?? NaN), 12)
    expect(middle?.low).toBeCloseTo((bending + shear) * (1 - DEFLECTION_SPREAD), 12)
  })

  it('of the opening adds head, bed, uprights and pins, and reaches lower where welds hold the head beam', () => {
    const welded = expectedOpening(whole, TWELVE).band
    const loose = expectedOpening({ ...whole, joints: whole.joints.filter(({ kind }) => kind !== 'weld') }, TWELVE).band
    expect(welded?.deflection).toBeGreaterThan(2 * (bending + shear))
    expect(welded?.deflection).toBe(loose?.deflection)
    expect((loose?.low ?? 0) - (welded?.low ?? 0)).toBeCloseTo((1 - DEFLECTION_SPREAD) * 0.75 * bending, 12)
    expect(checkLoadPath(whole).expected.band).toEqual(expectedOpening(whole, TWELVE).band)
  })

  it('says what is missing rather than leave it out', () => {
    const noPins = frame({ joint: (joint) => (joint.kind === 'pin' ? { strength: null } : {}) })
    expect(expectedOpening(noPins, TWELVE)).toEqual({ band: null, missing: 'No pin is entered for joint 5, Left pin in upright.' })
    expect(expectedDeflection(noPins, TWELVE, points, { net }).net?.band?.deflection).toBeCloseTo(bending + shear, 12)
    const noTies = frame({ member: (member) => (member.kind === 'upright' ? { strength: null } : {}) })
    expect(expectedOpening(noTies, TWELVE).missing).toBe('No section and length are entered for Left upright.')
  })

  it('of a point on no member, or on a C-frame, is not estimated', () => {
    const { points: found } = expectedDeflection(whole, TWELVE, [{ id: 'x', memberId: null }])
    expect(found.get('x')).toEqual({ band: null, missing: 'The point is on no member of the load path.' })
    expect(expectedDeflection(frame({ press: { kind: 'c-frame' } }), TWELVE, points).points.get(points[0]?.id ?? '')?.missing).toMatch(
      /throat/,
    )
  })
})
