import { applyPress } from '#shared/press/apply'
import { PRESS_VERSION, type PressDraft } from '#shared/press/entries'
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

type StrengthOf<Kind extends 'memberId' | 'jointId', Part extends { strength?: unknown }> = Record<Kind, string> & {
  strength: NonNullable<Part['strength']> | null
}

const withoutStrengths = (description: PressDescription | null) =>
  description && { ...description, members: description.members.map(({ strength: _strength, ...member }) => member) }

/** Members of which other sizes or another material are known now. */
function strengthsOfMembers(state: PressState, now: PressDescription): StrengthOf<'memberId', PressDescription['members'][number]>[] {
  return now.members.flatMap((member) => {
    const earlier = state.description?.members.find((one) => one.id === member.id)
    const changed = earlier !== undefined && !same(earlier.strength, member.strength)
    return changed ? [{ memberId: member.id, strength: member.strength ?? null }] : []
  })
}

const sameButStrength = ({ strength: _before, ...before }: Joint, { strength: _after, ...after }: Joint): boolean => same(before, after)

/**
 * The entries that turn the press as it is written down into what the form says: joints that hold a new member
 * come after the description that names it, and joints that are gone before the one that forgets theirs. Sizes and
 * materials that somebody looked up are written down by themselves: the press is what it was, and so is its clearance.
 */
export function editsOf(state: PressState, now: { description: PressDescription; joints: Joint[] }, why: string): PressDraft[] {
  const before = inUse(state)
  const retired = before.filter((joint) => !now.joints.some((one) => one.id === joint.id))
  const added = now.joints.filter((joint) => !before.some((one) => one.id === joint.id))
  const pairs = now.joints.flatMap((joint) => {
    const earlier = before.find((one) => one.id === joint.id)
    return earlier && !same(earlier, joint) ? [{ earlier, joint }] : []
  })
  const changed = pairs.filter(({ earlier, joint }) => !sameButStrength(earlier, joint))
  const sized = pairs.filter(({ earlier, joint }) => sameButStrength(earlier, joint))
  const another = !same(withoutStrengths(state.description), withoutStrengths(now.description))
  const strengths = {
    // A description that is written anew says the sizes of its members along with it.
    members: another ? [] : strengthsOfMembers(state, now.description),
    joints: sized.map(({ joint }) => ({ jointId: joint.id, strength: joint.strength ?? null })),
  }
  const sizes = strengths.members.length + strengths.joints.length > 0
  return [
    ...retired.map((joint): PressDraft => ({ kind: 'joint-retired', payload: { jointId: joint.id, why } })),
    ...(another ? [{ kind: 'described', payload: { description: now.description, why } } as const] : []),
    ...(sizes ? [{ kind: 'strength-described', payload: { ...strengths, why } } as const] : []),
    ...changed.map(({ joint }): PressDraft => ({ kind: 'joint-described', payload: { joint, why } })),
    ...added.map((joint): PressDraft => ({ kind: 'joint-added', payload: { joint } })),
  ]
}

/** The press as it would be after entries that nobody has made yet, by the same fold that the ledger uses. */
function afterEdits(state: PressState, edits: readonly PressDraft[]): PressState {
  const at = new Date().toISOString()
  return edits.reduce((before, { kind, payload }, index): PressState => {
    const seq = before.headSeq + 1
    const envelope = { id: `edit-${index}`, ledgerId: state.id, v: PRESS_VERSION, authorId: '', deviceId: '', deviceSeq: seq }
    const moment = { basedOnSeq: before.headSeq, observedAt: at, bootId: '', monotonicMs: 0, receivedAt: at }
    const rest = { attachments: [], overrides: [], irregular: [], prevHash: before.headHash, hash: before.headHash, seq }
    return applyPress(before, { ...envelope, ...moment, ...rest, kind, payload })
  }, state)
}

export interface EditsEffect {
  clearance: 'ends' | 'stands' | 'none in force'
  /** Numbers of joints that are examined and would not be any more, or that are new. */
  toExamine: number[]
}

/** What edits do to clearance and joints, said before they are saved. */
export function effectOf(state: PressState, edits: readonly PressDraft[]): EditsEffect {
  const after = afterEdits(state, edits)
  const wasExamined = new Set(state.joints.filter((joint) => joint.examination !== null).map((joint) => joint.id))
  const known = new Set(state.joints.map((joint) => joint.id))
  const toExamine = after.joints
    .filter((joint) => !joint.retired && joint.examination === null && (wasExamined.has(joint.id) || !known.has(joint.id)))
    .map((joint) => joint.number)
  const inForce = state.clearance.is === 'cleared' || (state.clearance.is === 'suspended' && state.clearance.clearance !== null)
  const clearance = !inForce ? 'none in force' : after.clearance.is === 'withdrawn' ? 'ends' : 'stands'
  return { clearance, toExamine }
}
