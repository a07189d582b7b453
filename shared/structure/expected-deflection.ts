import type { Joint, Member, PressDescription, RamPosition } from '../press/model'
import { toSI } from '../units'
import { beamStiffness, deflectionOf, offsetShare, tipDeflection } from './beams'
import { shareOfJoint, shareOfMember } from './load-shares'
import type { BeamStrength } from './member-data'
import { pinGive } from './pins'
import { tieElongation } from './ties'

/** Share of the worked-out deflection by which the real one may be less or more. Common practice, no source. */
export const DEFLECTION_SPREAD = 0.25

/** What a held end can take off the bending of a beam: P·L³/192·E·I against P·L³/48·E·I (Roark, table 8.1, from memory). */
const FULLY_HELD = 1 / 4

/** A deflection, m, and the band it is expected in. Proportional to the force it was worked out for. */
export interface DeflectionBand {
  deflection: number
  low: number
  high: number
}

/** A band, or why there is none. */
export type Expected = { band: DeflectionBand; missing: null } | { band: null; missing: string }

/** The frame as described, with its joints. */
export interface FrameAndJoints {
  description: Pick<PressDescription, 'kind' | 'members'>
  joints: readonly Joint[]
}

interface MeasuredPoint {
  id: string
  memberId: string | null
}

/** What one part gives, m: as worked out, and the least it can be. */
interface Give {
  nominal: number
  least: number
}

type Given = Give | { missing: string }

const isMissing = (given: Given): given is { missing: string } => 'missing' in given

const NOTHING: Give = { nominal: 0, least: 0 }

/** In series: one part gives on top of the other. */
function together(...parts: Given[]): Given {
  let sum = NOTHING
  for (const part of parts) {
    if (isMissing(part)) return part
    sum = { nominal: sum.nominal + part.nominal, least: sum.least + part.least }
  }
  return sum
}

/** Side by side: the mean of all, for an opening read in the middle. */
function mean(parts: Given[]): Given {
  const sum = together(...parts)
  return isMissing(sum) || parts.length === 0 ? sum : { nominal: sum.nominal / parts.length, least: sum.least / parts.length }
}

function asExpected(given: Given): Expected {
  if (isMissing(given)) return { band: null, missing: given.missing }
  return {
    band: {
      deflection: given.nominal,
      low: given.least * (1 - DEFLECTION_SPREAD),
      high: given.nominal * (1 + DEFLECTION_SPREAD),
    },
    missing: null,
  }
}

/** Dimensions that don't fit together leave a part without a figure; its check says the same. */
function work(name: string, calculate: () => Give): Given {
  try {
    return calculate()
  } catch (error) {
    if (!(error instanceof RangeError)) throw error
    return { missing: `${name}: ${error.message}` }
  }
}

/** Whether a weld or bolts hold a beam to an upright, so that its ends can't turn freely. */
function isHeld({ description, joints }: FrameAndJoints, beam: Member): boolean {
  const uprights = new Set(description.members.filter(({ kind }) => kind === 'upright').map(({ id }) => id))
  return joints.some(
    ({ kind, between }) => (kind === 'weld' || kind === 'bolt') && between.includes(beam.id) && between.some((id) => uprights.has(id)),
  )
}

/** Middle of a beam on two supports, or the free end of one; least where welded ends may hold it straight. */
function beamGive(frame: FrameAndJoints, member: Member, beam: BeamStrength, force: number, position: RamPosition): Given {
  const { share } = shareOfMember(frame.description, member)
  if (share === null) return { missing: `What ${member.name} carries isn’t known.` }
  return work(member.name, () => {
    const stiffness = beamStiffness(beam)
    const span = toSI(beam.span)
    const own = force * share
    if (beam.support === 'one end') {
      const { bending, shear } = tipDeflection(own, span, stiffness)
      return { nominal: bending + shear, least: bending + shear }
    }
    const offset = position === 'central' ? 0 : offsetShare(beam)
    const { bending, shear } = deflectionOf({ force: own, span, at: span * (0.5 - offset) }, stiffness, span / 2)
    return { nominal: bending + shear, least: bending * (isHeld(frame, member) ? FULLY_HELD : 1) + shear }
  })
}

/** The beams of a kind: the one that bends most, where several are entered. */
function beamsGive(frame: FrameAndJoints, kind: 'head-beam' | 'bed-beam', force: number, position: RamPosition): Given {
  const what = kind === 'head-beam' ? 'head beam' : 'bed'
  const beams = frame.description.members.filter((member) => member.kind === kind)
  if (beams.length === 0) return { missing: `No ${what} is entered.` }
  let most: Give = NOTHING
  for (const member of beams) {
    if (member.strength?.role !== 'beam') return { missing: `No section and span are entered for ${member.name}.` }
    const give = beamGive(frame, member, member.strength, force, position)
    if (isMissing(give)) return give
    if (give.nominal > most.nominal) most = give
  }
  return most
}

/** Stretch of the uprights, each under an equal part of the force. */
function tiesGive({ description }: FrameAndJoints, force: number): Given {
  const ties = description.members.filter(({ kind }) => kind === 'upright')
  if (ties.length === 0) return { missing: 'No upright is entered.' }
  return mean(
    ties.map((member): Given => {
      const tie = member.strength
      if (tie?.role !== 'tie') return { missing: `No section and length are entered for ${member.name}.` }
      return work(member.name, () => {
        const nominal = tieElongation(tie, force / ties.length)
        return { nominal, least: nominal }
      })
    }),
  )
}

/** Give of the pins that carry the bed, as a mean of both sides with the ram in the middle; none, where there are none. */
function pinsGive({ description, joints }: FrameAndJoints, force: number): Given {
  const pins = joints.filter(({ kind }) => kind === 'pin')
  return mean(
    pins.map((joint): Given => {
      const pin = joint.strength
      if (pin?.kind !== 'pin') return { missing: `No pin is entered for joint ${joint.number}, ${joint.name}.` }
      const central = { ...description, members: description.members.map(withRamCentral) }
      const { share } = shareOfJoint(central, joint)
      if (share === null) return { missing: `What joint ${joint.number}, ${joint.name}, carries isn’t known.` }
      return work(joint.name, () => {
        const nominal = pinGive(pin, force * share)
        return { nominal, least: nominal }
      })
    }),
  )
}

const withRamCentral = (member: Member): Member =>
  member.strength?.role === 'beam' ? { ...member, strength: { ...member.strength, ramOffset: null } } : member

/** The part of a band that a reading may or may not see, such as a pin's give at its end: from nothing up. */
function upTo(given: Given): Given {
  return isMissing(given) ? given : { nominal: given.nominal, least: 0 }
}

/**
 * How much further head and bed stand apart under `force` (N), the ram in the middle, m: head beam, bed, uprights
 * and pins in series. The band is a quarter each way (common practice, no source), and reaches lower where welds
 * may hold the ends of a beam.
 * Source: elementary beam theory with shear, Hooke's law. An estimate: slack, seats and hose are not in it.
 */
export function expectedOpening(frame: FrameAndJoints, force: number): Expected {
  if (frame.description.kind === 'c-frame') {
    return { band: null, missing: 'A C-frame opens mostly by its throat bending: there is no estimate of that.' }
  }
  return asExpected(
    together(
      beamsGive(frame, 'head-beam', force, 'central'),
      beamsGive(frame, 'bed-beam', force, 'central'),
      tiesGive(frame, force),
      pinsGive(frame, force),
    ),
  )
}

/** What one point reads from a stand on the floor; the uprights below the bed carry nothing. */
function pointGive(frame: FrameAndJoints, point: MeasuredPoint, force: number, position: RamPosition): Given {
  const member = frame.description.members.find(({ id }) => id === point.memberId)
  if (!member) return { missing: 'The point is on no member of the load path.' }
  switch (member.kind) {
    case 'bed-beam':
      return together(beamsGive(frame, 'bed-beam', force, position), upTo(pinsGive(frame, force)))
    case 'head-beam':
      return together(beamsGive(frame, 'head-beam', force, position), upTo(tiesGive(frame, force)))
    case 'upright':
      return upTo(tiesGive(frame, force))
    case 'pin':
      return position === 'central' ? upTo(pinsGive(frame, force)) : { missing: 'With the ram aside the pins carry unlike parts.' }
    case 'ram-seat':
    case 'tooling-adaptor':
    case 'stiffener':
    case 'base':
    case 'other':
      return { missing: `There is no estimate of what ${member.name} gives.` }
  }
}

/**
 * The bands (m) in which the measuring points of a test are expected under `force` (N), each read from a stand on
 * the floor: a point on a beam is taken as at its middle, one on a pin or upright may read anything from nothing to
 * all that it gives. `net` is a point less the mean of others: only the beam's own bending is left when they sit
 * where it is carried. A C-frame's head moves with its throat, of which there is no estimate.
 * Source: as `expectedOpening`.
 */
export function expectedDeflection(
  frame: FrameAndJoints,
  force: number,
  points: readonly MeasuredPoint[],
  options: { position?: RamPosition; net?: { plus: string; minus: readonly string[] } | null } = {},
): { points: Map<string, Expected>; net: Expected | null } {
  const position = options.position ?? 'central'
  const onCFrame = frame.description.kind === 'c-frame'
  const give = (point: MeasuredPoint): Given =>
    onCFrame
      ? { missing: 'A C-frame’s points move with its throat: there is no estimate of that.' }
      : pointGive(frame, point, force, position)
  return {
    points: new Map(points.map((point) => [point.id, asExpected(give(point))])),
    net: options.net ? asExpected(netGive(frame, options.net, points, force, position)) : null,
  }
}

function netGive(
  frame: FrameAndJoints,
  net: { plus: string; minus: readonly string[] },
  points: readonly MeasuredPoint[],
  force: number,
  position: RamPosition,
): Given {
  const memberOf = (id: string) => {
    const memberId = points.find((point) => point.id === id)?.memberId
    return frame.description.members.find((member) => member.id === memberId)
  }
  const beam = memberOf(net.plus)
  if (beam?.kind !== 'bed-beam' && beam?.kind !== 'head-beam') return { missing: 'The figure is not taken from the middle of a beam.' }
  const carriedAt = net.minus.map(memberOf)
  const atItsEnds =
    carriedAt.length > 0 &&
    carriedAt.every((member) => member && (member.kind === 'pin' || member.kind === 'upright' || member.id === beam.id))
  if (!atItsEnds) return { missing: `The figure is not taken against what carries ${beam.name}.` }
  return beamsGive(frame, beam.kind, force, position)
}
