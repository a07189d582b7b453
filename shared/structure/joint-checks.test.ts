import { describe, expect, it } from 'vitest'
import { checkBearing, checkThread, proofStrength, strippingArea } from './bolts'
import { DEFAULT_FACTORS, type Finding } from './factors'
import { strengthOf } from './materials'
import { jointStrengthSchema, type PinStrength, type ThreadStrength, type TieStrength, type WeldStrength } from './member-data'
import { checkPin, pinArm, pinGive, pinMoment } from './pins'
import { checkTie, elongation } from './ties'
import { checkWeld } from './welds'

const mm = (value: number) => ({ text: String(value), unit: 'mm' as const })
const s355 = { grade: 'S355JR' } as const

function capacityOf(found: Finding[], check: string): number {
  const each = found.find((finding) => finding.check === check)
  if (!each || !('capacity' in each)) throw new Error(`No ${check} in ${JSON.stringify(found)}`)
  return each.capacity
}
const demandOf = (found: Finding[], check: string) => {
  const each = found.find((finding) => finding.check === check)
  return each && 'demand' in each ? each.demand : null
}
const reasons = (found: Finding[]) =>
  found.flatMap((finding) => ('notChecked' in finding ? [`${finding.check}: ${finding.notChecked}`] : []))

const pin: PinStrength = {
  kind: 'pin',
  diameter: mm(32),
  material: { grade: 'C45' },
  shearPlanes: 2,
  gap: mm(3),
  outer: { material: s355, thickness: mm(10) },
  inner: { material: s355, thickness: mm(16) },
  outerEdge: mm(60),
  innerEdge: null,
  loadShare: null,
}

describe('a pin', () => {
  it('in double shear carries 0.4 of its yield on two sections', () => {
    expect(capacityOf(checkPin(pin, 50_000, DEFAULT_FACTORS), 'double shear')).toBeCloseTo((0.4 * 305e6 * 2 * Math.PI * 0.032 ** 2) / 4, 3)
  })

  it('bends across its gaps by P/2·(t₁/2 + g + t₂/4), and a wide gap soon governs', () => {
    expect(pinArm(pin)).toBeCloseTo(0.012, 12)
    expect(pinMoment(pin, 50_000)).toBeCloseTo(25_000 * 0.012, 9)
    expect(pinMoment({ ...pin, gap: mm(30) }, 50_000)).toBeCloseTo(25_000 * 0.039, 9)
    expect(capacityOf(checkPin(pin, 1, DEFAULT_FACTORS), 'bending across the gaps')).toBeCloseTo(
      (0.5 * 305e6 * Math.PI * 0.032 ** 3) / 32,
      6,
    )
  })

  it('in single shear has half the section and a longer arm', () => {
    const single: PinStrength = { ...pin, shearPlanes: 1 }
    expect(capacityOf(checkPin(single, 1, DEFAULT_FACTORS), 'single shear')).toBeCloseTo((0.4 * 305e6 * Math.PI * 0.032 ** 2) / 4, 3)
    expect(pinMoment(single, 50_000)).toBeCloseTo(50_000 * 0.016, 9)
    expect(pinGive(single, 50_000)).toBeGreaterThan(pinGive(pin, 50_000))
  })

  it('bears on d·t and tears out on two planes short of the hole’s wall; half the force on each outer part', () => {
    const found = checkPin(pin, 50_000, DEFAULT_FACTORS)
    expect(capacityOf(found, 'bearing on the middle part')).toBeCloseTo(0.9 * 355e6 * 0.032 * 0.016, 3)
    expect(demandOf(found, 'bearing on the outer part')).toBe(25_000)
    expect(capacityOf(found, 'tear-out of the outer part')).toBeCloseTo(0.4 * 355e6 * 2 * 0.044 * 0.01, 3)
    expect(reasons(found)).toEqual(['tear-out of the middle part: No distance from the hole to the edge was entered.'])
  })

  it('gives as a short beam across its gaps', () => {
    const [E, G] = [210e9, 210e9 / 2.6]
    const area = (Math.PI * 0.032 ** 2) / 4
    const span = 0.024
    const expected = (50_000 * span ** 3) / (48 * E * ((Math.PI * 0.032 ** 4) / 64)) + (50_000 * span) / (4 * 0.9 * G * area)
    expect(pinGive(pin, 50_000)).toBeCloseTo(expected, 15)
  })

  it('an edge inside the hole is no edge', () => {
    expect(reasons(checkPin({ ...pin, outerEdge: mm(15) }, 1, DEFAULT_FACTORS))).toEqual([
      expect.stringMatching(/from the middle of the hole/),
    ])
  })
})

const stud: ThreadStrength = {
  kind: 'thread',
  thread: { series: 'metric', diameter: mm(20), pitch: mm(2.5) },
  strength: { class: '8.8' },
  count: 4,
  loaded: 'along',
  shearPlanes: 1,
  carriedBy: 'thread',
  tapped: { material: { grade: 'S235JR' }, thickness: mm(40), engagement: mm(25) },
  shoulder: null,
  loadShare: null,
}
/** π/4·(20 − 0.9382·2.5)², mm². */
const M20 = 244.79

describe('a bolt or threaded adaptor', () => {
  it('carries its proof load over the factor, as many times as there are', () => {
    expect(capacityOf(checkThread(stud, 1, DEFAULT_FACTORS), 'tension') / (4 * M20 * 600 * 0.5)).toBeCloseTo(1, 4)
    expect(capacityOf(checkThread(stud, 1, { ...DEFAULT_FACTORS, boltProof: 3 }), 'tension') / (4 * M20 * 200)).toBeCloseTo(1, 4)
  })

  it('strips at the weaker of bolt and tapped part', () => {
    expect(strippingArea(stud.thread, 0.025)).toBeCloseTo(0.5 * Math.PI * (0.02 - 0.6495 * 0.0025) * 0.025, 12)
    expect(capacityOf(checkThread(stud, 1, DEFAULT_FACTORS), 'thread engagement')).toBeCloseTo(
      4 * 0.4 * 225e6 * strippingArea(stud.thread, 0.025),
      3,
    )
    expect(reasons(checkThread({ ...stud, tapped: null }, 1, DEFAULT_FACTORS)).join()).toMatch(/full nut/)
  })

  it('across the thread shears at proof/√3 over the factor', () => {
    const found = checkThread({ ...stud, loaded: 'across', shearPlanes: 2 }, 1, DEFAULT_FACTORS)
    expect(capacityOf(found, 'double shear through the thread') / ((4 * 2 * M20 * 600) / Math.sqrt(3) / 2)).toBeCloseTo(1, 4)
  })

  it('a shank that bottoms carries the force past the thread: only its shoulder is checked', () => {
    const bottomed = checkThread({ ...stud, carriedBy: 'shank' }, 1, DEFAULT_FACTORS)
    expect(reasons(bottomed)).toEqual([
      expect.stringMatching(/thread carries none/),
      expect.stringMatching(/face on which it bottoms was not entered/),
    ])
    const shoulder = { area: { text: '500', unit: 'mm2' as const }, part: { material: s355, thickness: mm(20) } }
    expect(capacityOf(checkThread({ ...stud, carriedBy: 'shank', shoulder }, 1, DEFAULT_FACTORS), 'bearing of the shoulder')).toBeCloseTo(
      0.9 * 345e6 * 5e-4,
      3,
    )
  })

  it('a pitch that can’t go with its diameter is not checked', () => {
    expect(reasons(checkThread({ ...stud, thread: { series: 'metric', diameter: mm(2.5), pitch: mm(20) } }, 1, DEFAULT_FACTORS))).toEqual([
      expect.stringMatching(/Read the thread again/),
    ])
  })

  it('a bolt of one’s own takes the proof strength typed in', () => {
    expect(proofStrength({ class: 'custom', name: 'old stud', proof: { text: '300', unit: 'MPa' } }, 0.02)).toMatchObject({
      proof: 3e8,
      name: 'old stud',
    })
  })
})

const weld: WeldStrength = {
  kind: 'weld',
  size: { by: 'leg', value: mm(8) },
  length: mm(200),
  electrode: { grade: 'E42' },
  base: { material: s355, thickness: mm(12) },
  loadShare: null,
}

describe('a weld', () => {
  it('carries 0.30 of the filler’s strength on its throat, and 0.4 of the yield beside it', () => {
    const found = checkWeld(weld, 1, DEFAULT_FACTORS)
    expect(capacityOf(found, 'weld throat')).toBeCloseTo((0.3 * 500e6 * 0.008 * 0.2) / Math.SQRT2, 3)
    expect(capacityOf(found, 'metal beside the weld')).toBeCloseTo(0.4 * 355e6 * 0.008 * 0.2, 3)
  })

  it('measured across its throat it carries that throat', () => {
    expect(capacityOf(checkWeld({ ...weld, size: { by: 'throat', value: mm(8) } }, 1, DEFAULT_FACTORS), 'weld throat')).toBeCloseTo(
      0.3 * 500e6 * 0.008 * 0.2,
      3,
    )
  })

  it('says what isn’t checked of it', () => {
    expect(reasons(checkWeld({ ...weld, base: null }, 1, DEFAULT_FACTORS))).toEqual([
      expect.stringMatching(/parts that it holds were not entered/),
      expect.stringMatching(/through the middle of the weld/),
    ])
  })
})

const tie: TieStrength = {
  role: 'tie',
  section: { shape: 'flat', height: mm(100), width: mm(12), sideBySide: 2, plates: [] },
  material: s355,
  length: mm(1200),
  eccentricity: null,
  hole: { diameter: mm(33), metal: mm(24) },
  loadShare: null,
}

describe('a tie', () => {
  it('carries half of its yield on what the hole leaves', () => {
    expect(capacityOf(checkTie(tie, 1, DEFAULT_FACTORS), 'tension, on the net section')).toBeCloseTo(
      0.5 * 355e6 * (0.0024 - 0.033 * 0.024),
      3,
    )
    expect(capacityOf(checkTie({ ...tie, hole: null }, 1, DEFAULT_FACTORS), 'tension, on the whole section')).toBeCloseTo(
      0.5 * 355e6 * 0.0024,
      3,
    )
  })

  it('pulled beside its middle bends as well: P/A + P·e/S', () => {
    const found = checkTie({ ...tie, hole: null, eccentricity: mm(40) }, 10_000, DEFAULT_FACTORS)
    expect(demandOf(found, 'tension and bending, on the whole section')).toBeCloseTo(
      10_000 / 0.0024 + (10_000 * 0.04) / ((0.024 * 0.1 ** 2) / 6),
      3,
    )
  })

  it('bends on what the hole leaves as well', () => {
    const found = checkTie({ ...tie, eccentricity: mm(40) }, 10_000, DEFAULT_FACTORS)
    const modulus = (0.024 * (0.1 ** 3 - 0.033 ** 3)) / 12 / 0.05
    expect(demandOf(found, 'tension and bending, on the net section')).toBeCloseTo(
      10_000 / (0.0024 - 0.033 * 0.024) + (10_000 * 0.04) / modulus,
      3,
    )
  })

  it('a hole as wide as the tie leaves nothing to check', () => {
    expect(reasons(checkTie({ ...tie, hole: { diameter: mm(100), metal: mm(24) } }, 1, DEFAULT_FACTORS))).toEqual([
      expect.stringMatching(/whole section/),
    ])
  })

  it('stretches P·L/EA over each of its lengths', () => {
    expect(
      elongation(10_000, 200e9, [
        { length: 1, area: 1e-4 },
        { length: 2, area: 2e-4 },
      ]),
    ).toBeCloseTo(1e-3, 15)
  })
})

describe('materials', () => {
  it('a thick plate yields earlier, a round tube of A500 earlier than a shaped one', () => {
    expect([0.016, 0.0161, 0.05].map((thickness) => strengthOf(s355, thickness).yield)).toEqual([355e6, 345e6, 335e6])
    expect(strengthOf({ grade: 'A500 Gr B' }, 0.006, true).yield).toBeLessThan(strengthOf({ grade: 'A500 Gr B' }, 0.006).yield)
  })

  it('beyond its table a grade has no yield', () => {
    expect(() => strengthOf(s355, 0.3)).toThrow(/certificate/)
    const thick = checkBearing(
      { kind: 'bearing', area: { text: '1', unit: 'in2' }, part: { material: s355, thickness: mm(300) }, loadShare: null },
      1,
      DEFAULT_FACTORS,
    )
    expect(reasons(thick)).toEqual([expect.stringMatching(/No yield of S355JR/)])
  })

  it('one of one’s own comes with its yield and where that is from', () => {
    const own = {
      grade: 'custom',
      name: 'plate off the rack',
      yield: { text: '235', unit: 'MPa' },
      source: 'mill certificate 114',
    } as const
    expect(strengthOf(own, 0.5)).toMatchObject({ yield: 235e6, source: 'mill certificate 114' })
  })
})

describe('the share of the force entered with a joint', () => {
  it.each(['0', '50', '33.3', '100'])('%s %% is read', (loadShare) => {
    expect(jointStrengthSchema.safeParse({ ...weld, loadShare }).success).toBe(true)
  })
  it.each(['101', '-5', 'half', ''])('“%s” is refused', (loadShare) => {
    expect(jointStrengthSchema.safeParse({ ...weld, loadShare }).success).toBe(false)
  })
})
