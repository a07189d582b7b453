import type { z } from 'zod'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import type { FrameKind, Joint, Member, PressDescription, Ram, TrainPart } from '#shared/press/model'
import { ratedLoadRefusal } from '#shared/press/ratings'
import { startingFrame } from '#shared/press/starting-joints'
import type { AreaUnit, ForceUnit, LengthUnit, MassUnit, PressureUnit, Unit } from '#shared/units'
import { optionalTyped } from '../../../../lib/draft-resolver'
import { draftOfJointStrength, type JointStrengthDraft, type MemberStrengthDraft } from './strength/draft'
import { jointStrengthOf, memberStrengthOf } from './strength/payload'

/** A quantity in a form: nothing may be typed yet, and no unit chosen. */
export type Asked<U extends Unit> = { text: string; unit: U | '' }

export interface RamDraft {
  id: string
  name: string
  areaBy: 'bore' | 'effectiveArea'
  bore: Asked<LengthUnit>
  boreTolerance: Asked<LengthUnit>
  effectiveArea: Asked<AreaUnit>
  stroke: Asked<LengthUnit>
  ratedCapacity: Asked<ForceUnit>
  ratedPressure: Asked<PressureUnit>
  acting: Ram['acting']
  rodDiameter: Asked<LengthUnit>
  springReturn: Asked<ForceUnit>
  carriedMass: Asked<MassUnit>
  carriedComesDown: 'down' | 'up'
}

export interface TrainPartDraft {
  id: string
  kind: TrainPart['kind']
  name: string
  ratedForce: Asked<ForceUnit>
  ratedPressure: Asked<PressureUnit>
}

export type MemberDraft = Omit<Member, 'strength'> & { strength?: MemberStrengthDraft | null }

export type JointDraft = Omit<Joint, 'between' | 'madeOn' | 'place' | 'number' | 'strength'> & {
  number: number
  between: [string, string]
  madeOn: string
  place: string
  strength?: JointStrengthDraft | null
}

/** The form as it is typed; the names are those of the entry, so that every message finds its field. */
export interface PressFormDraft {
  pressId: string
  description: {
    name: string
    whatFor: string
    kind: FrameKind | ''
    dimensions: {
      height: Asked<LengthUnit>
      opening: Asked<LengthUnit>
      throat: Asked<LengthUnit>
      holePitch: Asked<LengthUnit>
      holes: string
    }
    ratedLoad: Asked<ForceUnit>
    members: MemberDraft[]
    rams: RamDraft[]
    train: TrainPartDraft[]
  }
  joints: JointDraft[]
  lastWorkedOn: string
}

export interface FormUnits {
  length: LengthUnit
  pressure: PressureUnit
}

const empty = <U extends Unit>(unit: U | ''): Asked<U> => ({ text: '', unit })

export function newRam(id: string, name: string, units: FormUnits): RamDraft {
  return {
    id,
    name,
    areaBy: 'bore',
    bore: empty(units.length),
    boreTolerance: empty(units.length),
    effectiveArea: empty(units.length === 'in' ? 'in2' : 'mm2'),
    stroke: empty(units.length),
    // Which ton is the question that is never answered for somebody.
    ratedCapacity: empty<ForceUnit>(''),
    ratedPressure: empty(units.pressure),
    acting: 'single',
    rodDiameter: empty(units.length),
    springReturn: empty('N'),
    carriedMass: empty('kg'),
    carriedComesDown: 'down',
  }
}

export function newTrainPart(id: string, kind: TrainPart['kind'], name: string, units: FormUnits): TrainPartDraft {
  return { id, kind, name, ratedForce: empty<ForceUnit>(''), ratedPressure: empty(units.pressure) }
}

export function newPress(nextId: () => string, units: FormUnits): PressFormDraft {
  const length = () => empty(units.length)
  return {
    pressId: nextId(),
    description: {
      name: '',
      whatFor: '',
      kind: '',
      dimensions: { height: length(), opening: length(), throat: length(), holePitch: length(), holes: '' },
      ratedLoad: empty<ForceUnit>(''),
      members: [],
      rams: [newRam(nextId(), 'Jack', units)],
      train: [
        newTrainPart(nextId(), 'pump', 'Hand pump', units),
        newTrainPart(nextId(), 'hose', 'Hose', units),
        newTrainPart(nextId(), 'frame', 'Frame', units),
      ],
    },
    joints: [],
    lastWorkedOn: '',
  }
}

export function draftOfJoint(joint: Joint, units: Pick<FormUnits, 'length'> = { length: 'mm' }): JointDraft {
  const { id, number, name, kind, detail, makeUp, madeBy, filler } = joint
  const [from, to] = joint.between
  return {
    id,
    number,
    name,
    kind,
    detail,
    between: [from, to],
    makeUp,
    madeBy,
    filler,
    madeOn: joint.madeOn ?? '',
    place: joint.place ?? '',
    strength: joint.strength ? draftOfJointStrength(joint.strength, units) : null,
  }
}

/** The members and joints that frames of this kind have at the least. */
export function proposal(kind: FrameKind, nextId: () => string): { members: MemberDraft[]; joints: JointDraft[] } {
  const { members, joints } = startingFrame(kind, nextId)
  return { members: members.map((member) => ({ ...member, strength: null })), joints: joints.map((joint) => draftOfJoint(joint)) }
}

/** Whether members and joints are still what was proposed for one kind of frame, so that another kind may replace them. */
export function isProposal(kind: FrameKind | '', draft: Pick<PressFormDraft, 'joints'> & { members: readonly MemberDraft[] }): boolean {
  if (draft.members.length === 0 && draft.joints.length === 0) return true
  if (kind === '') return false
  const proposed = proposal(kind, () => '')
  const plain = (joint: JointDraft) => JSON.stringify({ ...joint, id: '', between: null })
  return (
    JSON.stringify(draft.members.map(({ kind: memberKind, name }) => [memberKind, name])) ===
      JSON.stringify(proposed.members.map(({ kind: memberKind, name }) => [memberKind, name])) &&
    draft.members.every(({ strength }) => !strength) &&
    draft.joints.length === proposed.joints.length &&
    draft.joints.every((joint, index) => plain(joint) === plain(proposed.joints[index] ?? joint))
  )
}

export function newJoint(id: string, joints: readonly JointDraft[]): JointDraft {
  const number = Math.max(0, ...joints.map((joint) => joint.number)) + 1
  return {
    id,
    number,
    name: '',
    kind: 'weld',
    detail: '',
    between: ['', ''],
    makeUp: 'open',
    madeBy: '',
    filler: '',
    madeOn: '',
    place: '',
    strength: null,
  }
}

export function ramOf(ram: RamDraft) {
  const { areaBy, ...rest } = ram
  const double = ram.acting === 'double'
  return {
    ...rest,
    bore: areaBy === 'bore' ? ram.bore : null,
    boreTolerance: areaBy === 'bore' ? optionalTyped(ram.boreTolerance) : null,
    effectiveArea: areaBy === 'effectiveArea' ? ram.effectiveArea : null,
    rodDiameter: double ? ram.rodDiameter : null,
    springReturn: optionalTyped(ram.springReturn),
    carriedMass: optionalTyped(ram.carriedMass),
    carriedComesDown: ram.carriedComesDown === 'down',
  }
}

const trainPartOf = (part: TrainPartDraft) => ({
  ...part,
  ratedForce: optionalTyped(part.ratedForce),
  ratedPressure: optionalTyped(part.ratedPressure),
})

const memberOf = ({ strength, ...member }: MemberDraft) => (strength ? { ...member, strength: memberStrengthOf(strength) } : member)

function jointOf({ strength, ...joint }: JointDraft) {
  // Null is written out: a joint that is described anew keeps what it isn't told of.
  return { ...joint, madeOn: joint.madeOn || null, place: joint.place || null, strength: jointStrengthOf(strength, joint.kind) }
}

const countOf = (text: string): number | undefined => (text.trim() === '' ? 0 : /^\d{1,3}$/.test(text.trim()) ? Number(text) : undefined)

/** The description and joints that the form stands for, unchecked. */
export function toPayload({ description, joints, lastWorkedOn }: PressFormDraft) {
  const { dimensions, members, rams, train, ...rest } = description
  return {
    description: {
      ...rest,
      dimensions: {
        height: optionalTyped(dimensions.height),
        opening: optionalTyped(dimensions.opening),
        throat: optionalTyped(dimensions.throat),
        holePitch: optionalTyped(dimensions.holePitch),
        holes: countOf(dimensions.holes),
      },
      members: members.map(memberOf),
      rams: rams.map(ramOf),
      train: train.map(trainPartOf),
    },
    joints: joints.map(jointOf),
    lastWorkedOn: lastWorkedOn || null,
  }
}

function checkNumbers(joints: readonly Joint[], context: z.RefinementCtx): void {
  joints.forEach((joint, index) => {
    if (joints.findIndex((other) => other.number === joint.number) < index) {
      context.addIssue({ code: 'custom', path: ['joints', index, 'number'], message: `Joint ${joint.number} is there already.` })
    }
  })
}

function checkRating(description: PressDescription, context: z.RefinementCtx): void {
  const refusal = ratedLoadRefusal(description)
  if (refusal) context.addIssue({ code: 'custom', path: ['description', 'ratedLoad', 'text'], message: refusal })
}

/** What the server's schema asks, and the two things that only a whole form can be asked. */
export const pressFormSchema = PRESS_PAYLOADS.registered.superRefine((payload, context) => {
  // A measure that is no number yet is said at its field; nothing is worked out from it.
  if (context.issues.length === 0) checkRating(payload.description, context)
  checkNumbers(payload.joints, context)
})
