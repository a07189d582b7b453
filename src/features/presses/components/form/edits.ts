import type { PressDraft } from '#shared/press/entries'
import type { Joint, PressDescription } from '#shared/press/model'
import type { PressJoint, PressState } from '#shared/press/state'
import type { Typed, Unit } from '#shared/units'
import { draftOfMemberStrength } from './strength/draft'
import { draftOfJoint, newRam, newTrainPart, type Asked, type FormUnits, type PressFormDraft } from './draft'

const asked = <U extends Unit>(typed: Typed<U> | null, otherwise: Asked<U>): Asked<U> => (typed ? { ...typed } : otherwise)

function ramDraft(ram: PressDescription['rams'][number], units: FormUnits): PressFormDraft['description']['rams'][number] {
  const blank = newRam(ram.id, ram.name, units)
  return {
    ...blank,
    areaBy: ram.bore ? 'bore' : 'effectiveArea',
    bore: asked(ram.bore, blank.bore),
    boreTolerance: asked(ram.boreTolerance, blank.boreTolerance),
    effectiveArea: asked(ram.effectiveArea, blank.effectiveArea),
    stroke: { ...ram.stroke },
    ratedCapacity: { ...ram.ratedCapacity },
    ratedPressure: { ...ram.ratedPressure },
    acting: ram.acting,
    rodDiameter: asked(ram.rodDiameter, blank.rodDiameter),
    springReturn: asked(ram.springReturn, blank.springReturn),
    carriedMass: asked(ram.carriedMass, blank.carriedMass),
    carriedComesDown: ram.carriedComesDown ? 'down' : 'up',
  }
}

/** A joint as it was described, without what happened to it since. */
function described(joint: PressJoint): Joint {
  const { id, number, name, kind, detail, between, makeUp, madeBy, filler, madeOn, place, strength } = joint
  return { id, number, name, kind, detail, between, makeUp, madeBy, filler, madeOn, place, strength }
}

const inUse = (state: PressState): Joint[] =>
  state.joints
    .filter((joint) => !joint.retired)
    .sort((a, b) => a.number - b.number)
    .map(described)

/** The form filled with the press as it is written down now. */
export function draftOfPress(state: PressState, description: PressDescription, units: FormUnits): PressFormDraft {
  const { dimensions } = description
  const length: Asked<FormUnits['length']> = { text: '', unit: units.length }
  return {
    pressId: state.id,
    description: {
      name: description.name,
      whatFor: description.whatFor,
      kind: description.kind,
      dimensions: {
        height: asked(dimensions.height, length),
        opening: asked(dimensions.opening, length),
        throat: asked(dimensions.throat, length),
        holePitch: asked(dimensions.holePitch, length),
        holes: dimensions.holes === 0 ? '' : String(dimensions.holes),
      },
      ratedLoad: { ...description.ratedLoad },
      members: description.members.map(({ strength, ...member }) => ({
        ...member,
        strength: strength ? draftOfMemberStrength(strength, member.kind, units) : null,
      })),
      rams: description.rams.map((ram) => ramDraft(ram, units)),
      train: description.train.map((part) => {
        const blank = newTrainPart(part.id, part.kind, part.name, units)
        return {
          ...blank,
          ratedForce: asked(part.ratedForce, blank.ratedForce),
          ratedPressure: asked(part.ratedPressure, blank.ratedPressure),
        }
      }),
    },
    joints: inUse(state).map((joint) => draftOfJoint(joint, units)),
    lastWorkedOn: state.lastWorkedOn ?? '',
  }
}

/** The same thing, whatever the order its properties were written in; what is null may as well be left out. */
function same(a: unknown, b: unknown): boolean {
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return (a ?? null) === (b ?? null)
  const keys = new Set([...Object.keys(a), ...Object.keys(b)])
  return [...keys].every((key) => same((a as Record<string, unknown>)[key], (b as Record<string, unknown>)[key]))
}

/**
 * The entries that turn the press as it is written down into what the form says: joints that hold a new member
 * come after the description that names it, and joints that are gone before the one that forgets theirs.
 */
export function editsOf(state: PressState, now: { description: PressDescription; joints: Joint[] }, why: string): PressDraft[] {
  const before = inUse(state)
  const retired = before.filter((joint) => !now.joints.some((one) => one.id === joint.id))
  const added = now.joints.filter((joint) => !before.some((one) => one.id === joint.id))
  const changed = now.joints.filter((joint) => {
    const earlier = before.find((one) => one.id === joint.id)
    return earlier !== undefined && !same(earlier, joint)
  })
  return [
    ...retired.map((joint): PressDraft => ({ kind: 'joint-retired', payload: { jointId: joint.id, why } })),
    ...(same(state.description, now.description) ? [] : [{ kind: 'described', payload: { description: now.description, why } } as const]),
    ...changed.map((joint): PressDraft => ({ kind: 'joint-described', payload: { joint, why } })),
    ...added.map((joint): PressDraft => ({ kind: 'joint-added', payload: { joint } })),
  ]
}
