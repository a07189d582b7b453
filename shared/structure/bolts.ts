import { parseDecimal, toSI } from '../units'
import { findings, type Finding, type StrengthFactors } from './factors'
import { strengthOf } from './materials'
import type { BearingStrength, BoltStrength, Part, Thread, ThreadStrength } from './member-data'

const MPa = 1e6
const INCH = toSI({ text: '1', unit: 'in' })
const KSI = toSI({ text: '1000', unit: 'psi' })

/** Proof strength (Pa) up to a diameter (m), smallest first. */
const PROOF: Record<Exclude<BoltStrength['class'], 'custom'>, { upTo: readonly (readonly [number, number])[]; source: string }> = {
  '4.6': { upTo: [[0.039, 225 * MPa]], source: 'EN ISO 898-1, from memory' },
  '8.8': {
    upTo: [
      [0.016, 580 * MPa],
      [0.039, 600 * MPa],
    ],
    source: 'EN ISO 898-1',
  },
  '10.9': { upTo: [[0.039, 830 * MPa]], source: 'EN ISO 898-1' },
  '12.9': { upTo: [[0.039, 970 * MPa]], source: 'EN ISO 898-1' },
  'grade 2': {
    upTo: [
      [0.75 * INCH, 55 * KSI],
      [1.5 * INCH, 33 * KSI],
    ],
    source: 'SAE J429',
  },
  'grade 5': {
    upTo: [
      [INCH, 85 * KSI],
      [1.5 * INCH, 74 * KSI],
    ],
    source: 'SAE J429',
  },
  'grade 8': { upTo: [[1.5 * INCH, 120 * KSI]], source: 'SAE J429' },
}

/**
 * Proof strength of a bolt, Pa, by its class and nominal diameter, m.
 * Source: EN ISO 898-1 (8.8: 580 MPa up to M16, 600 MPa above) and SAE J429, mechanical properties.
 * @throws RangeError when the class has no bolt of that diameter.
 */
export function proofStrength(strength: BoltStrength, diameter: number): { proof: number; name: string; source: string } {
  if (strength.class === 'custom') return { proof: toSI(strength.proof), name: strength.name, source: 'as entered' }
  const { upTo, source } = PROOF[strength.class]
  const step = upTo.find(([most]) => diameter <= most * (1 + 1e-9))
  if (!step)
    throw new RangeError(`No bolt of class ${strength.class} is listed in that diameter. Enter its proof strength from its certificate.`)
  return { proof: step[1], name: strength.class, source }
}

function pitchOf(thread: Thread): number {
  if (thread.series === 'metric') return toSI(thread.pitch)
  const parsed = parseDecimal(thread.threadsPerInch)
  if (!parsed.ok || parsed.value <= 0) throw new RangeError('Enter the threads per inch as a number above zero.')
  return INCH / parsed.value
}

/** The pitch may not be coarser than half the diameter: then one of the two was mistyped. */
function threadOf(thread: Thread): { diameter: number; pitch: number } {
  const diameter = toSI(thread.diameter)
  const pitch = pitchOf(thread)
  if (!(pitch < diameter / 2)) throw new RangeError('The pitch doesn’t go with that diameter. Read the thread again.')
  return { diameter, pitch }
}

/**
 * Tensile stress area of a thread, m²: π/4·(d − 0.9382·P)² metric, π/4·(d − 0.9743/n)² inch.
 * Source: EN ISO 898-1 (9.1.6 in the 2013 edition, number from memory); ASME B1.1.
 * @throws RangeError when pitch and diameter can't belong together.
 */
export function stressArea(thread: Thread): number {
  const { diameter, pitch } = threadOf(thread)
  const depth = thread.series === 'metric' ? 0.9382 : 0.9743
  return (Math.PI / 4) * (diameter - depth * pitch) ** 2
}

/**
 * The area (m²) that strips when a thread is pulled out over `engagement` m: half of the cylinder at the pitch
 * diameter, d − 0.6495·P.
 * Source: common practice; the pitch diameter from ISO 724, from memory.
 */
export function strippingArea(thread: Thread, engagement: number): number {
  const { diameter, pitch } = threadOf(thread)
  return 0.5 * Math.PI * (diameter - 0.6495 * pitch) * engagement
}

/** A face pressed on a face, N against the share of its yield. */
function faceBearing(check: string, area: number, part: Part, force: number, factors: StrengthFactors): Finding {
  const steel = strengthOf(part.material, toSI(part.thickness))
  return {
    check,
    demand: force,
    capacity: factors.bearingOfYield * steel.yield * area,
    unit: 'N',
    source: `σ = P/A; ${factors.bearingOfYield} of yield ${(steel.yield / MPa).toFixed(0)} MPa (${steel.name}, ${steel.source}); AISC 360, J7`,
  }
}

/** Contact pressure of a bearing face under its share of the force, N. */
export function checkBearing(face: BearingStrength, force: number, factors: StrengthFactors): Finding[] {
  return findings('bearing', () => [faceBearing('bearing', toSI(face.area), face.part, force, factors)])
}

function engaged(joint: ThreadStrength, force: number, proof: number, factors: StrengthFactors): Finding {
  const check = 'thread engagement'
  if (!joint.tapped)
    return { check, notChecked: 'No tapped part was entered; a full nut of the bolt’s class is taken to hold what the bolt does.' }
  const steel = strengthOf(joint.tapped.material, toSI(joint.tapped.thickness))
  const weaker = Math.min(steel.yield, proof)
  return {
    check,
    demand: force,
    capacity: joint.count * factors.shearOfYield * weaker * strippingArea(joint.thread, toSI(joint.tapped.engagement)),
    unit: 'N',
    source: `half the pitch cylinder; ${factors.shearOfYield} of the weaker yield ${(weaker / MPa).toFixed(0)} MPa (${steel.name}, ${steel.source}); common practice, no source`,
  }
}

/**
 * A bolted joint or a threaded adaptor under its share of the force, N: proof load and thread engagement where the
 * thread carries the force, or the shoulder where a shank bottoms and carries it past the thread.
 */
export function checkThread(joint: ThreadStrength, force: number, factors: StrengthFactors): Finding[] {
  return findings('thread', () => {
    if (joint.carriedBy === 'shank') {
      return [
        {
          check: 'thread',
          notChecked: 'A shank that bottoms carries the force past the thread, so the thread carries none. Look that it does bottom.',
        },
        joint.shoulder
          ? faceBearing('bearing of the shoulder', toSI(joint.shoulder.area), joint.shoulder.part, force, factors)
          : { check: 'bearing of the shoulder', notChecked: 'The face on which it bottoms was not entered.' },
      ]
    }
    const { diameter } = threadOf(joint.thread)
    const { proof, name, source } = proofStrength(joint.strength, diameter)
    const area = stressArea(joint.thread)
    const by = `${name}, proof ${(proof / MPa).toFixed(0)} MPa (${source})`
    if (joint.loaded === 'across') {
      return [
        {
          check: joint.shearPlanes === 2 ? 'double shear through the thread' : 'shear through the thread',
          demand: force,
          capacity: (joint.count * joint.shearPlanes * area * proof) / Math.sqrt(3) / factors.boltProof,
          unit: 'N',
          source: `n·A_s·S_p/√3 ÷ ${factors.boltProof}; ${by}; common practice, no source`,
        },
        { check: 'bearing of the bolts in their holes', notChecked: 'There is no check of it.' },
      ]
    }
    return [
      {
        check: 'tension',
        demand: force,
        capacity: (joint.count * area * proof) / factors.boltProof,
        unit: 'N',
        source: `S_p·A_s ÷ ${factors.boltProof}; ${by}; common practice, no source`,
      },
      engaged(joint, force, proof, factors),
      { check: 'prying and preload', notChecked: 'There is no check of them.' },
    ]
  })
}
