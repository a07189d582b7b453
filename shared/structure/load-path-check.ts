import { loadPathOf, type LoadPath } from '../press/load-path'
import type { Joint, Member, PressDescription } from '../press/model'
import { formatForce, toSI, type ForceUnit } from '../units'
import { checkBeam } from './beams'
import { checkBearing, checkThread } from './bolts'
import { expectedOpening, type Expected } from './expected-deflection'
import { DEFAULT_FACTORS, type Finding, type StrengthFactors } from './factors'
import { shareOfJoint, shareOfMember, type LoadShare } from './load-shares'
import type { JointStrength, MemberStrength } from './member-data'
import { checkPin } from './pins'
import { checkTie } from './ties'
import { checkWeld } from './welds'

/** One check of one member or joint. */
export interface CheckResult {
  about: { kind: 'member' | 'joint'; id: string }
  /** "Bed beam", "joint 5, Left pin in upright". */
  name: string
  check: string
  /** Null when not checked; `unit` is that of both. */
  demand: number | null
  capacity: number | null
  unit: 'N' | 'N·m' | 'Pa' | null
  /** Demand ÷ capacity: 1 is all that the stated factors allow. Null when not checked, and when the capacity is zero. */
  utilisation: number | null
  verdict: 'within' | 'beyond' | 'not checked'
  /** Why there is no figure. */
  notChecked: string | null
  /** What part of the press's force this was checked under. */
  carries: string
  /** Formula, factor, material, and where each comes from. */
  source: string
}

export interface LoadPathCheck {
  /** The press's force that everything was checked under, N. */
  load: number
  path: LoadPath
  results: CheckResult[]
  /** The check that comes nearest to what it may carry, or passes it farthest; null when nothing was checked. */
  weakest: CheckResult | null
  /** How many of the results are NOT CHECKED. */
  notChecked: number
  /** How much further apart head and bed are expected to stand at this load. */
  expected: Expected
  /** Whether a load must wait: something passes what it may carry, or the load path is not closed. */
  blocks: boolean
  /** What to tell the reader, an estimate and no approval. */
  sentence: string
}

/** What one member or joint is, before anything is known of its strength. */
type About = Pick<CheckResult, 'about' | 'name'>

function resultOf(about: About, carries: string, finding: Finding): CheckResult {
  if ('notChecked' in finding) {
    return {
      ...about,
      check: finding.check,
      demand: null,
      capacity: null,
      unit: null,
      utilisation: null,
      verdict: 'not checked',
      notChecked: finding.notChecked,
      carries,
      source: '',
    }
  }
  const { check, demand, capacity, unit, source } = finding
  const utilisation = capacity > 0 ? demand / capacity : null
  const verdict = utilisation !== null && utilisation <= 1 ? 'within' : 'beyond'
  return { ...about, check, demand, capacity, unit, utilisation, verdict, notChecked: null, carries, source }
}

function memberFindings(strength: MemberStrength, force: number, factors: StrengthFactors): Finding[] {
  return strength.role === 'beam' ? checkBeam(strength, force, factors) : checkTie(strength, force, factors)
}

/** Why a member that nobody entered figures for isn't checked. */
function noFigures(member: Member, joints: readonly Joint[]): string {
  const pinned = joints.find(({ kind, between }) => kind === 'pin' && between.includes(member.id))
  if (member.kind === 'pin' && pinned) return `A pin is checked at its joint: see joint ${pinned.number}.`
  return 'No section, material and length are entered.'
}

function checkMember(
  press: PressDescription,
  joints: readonly Joint[],
  member: Member,
  load: number,
  factors: StrengthFactors,
): CheckResult[] {
  const about: About = { about: { kind: 'member', id: member.id }, name: member.name }
  const share = shareOfMember(press, member)
  const unchecked = (notChecked: string) => [resultOf(about, share.how, { check: 'strength', notChecked })]
  const { strength } = member
  if (!strength) return unchecked(noFigures(member, joints))
  if (share.share === null) return unchecked(share.how)
  if (share.share === 0) return unchecked('It carries none of the force, as entered.')
  if (press.kind === 'c-frame') {
    if (strength.role === 'tie' && member.kind === 'upright' && !strength.eccentricity) {
      return unchecked('The upright of a C-frame also bends. Enter how far its middle is from the line of the ram.')
    }
    if (strength.role === 'beam' && strength.support === 'both ends') {
      return unchecked('A beam of a C-frame is held at one end. Enter it so, with the distance from its root to the ram.')
    }
  }
  return memberFindings(strength, load * share.share, factors).map((finding) => resultOf(about, share.how, finding))
}

const KIND_OF_STRENGTH: Record<Joint['kind'], JointStrength['kind']> = {
  weld: 'weld',
  pin: 'pin',
  bolt: 'thread',
  thread: 'thread',
  bearing: 'bearing',
}

function jointFindings(strength: JointStrength, force: number, factors: StrengthFactors): Finding[] {
  switch (strength.kind) {
    case 'weld':
      return checkWeld(strength, force, factors)
    case 'pin':
      return checkPin(strength, force, factors)
    case 'thread':
      return checkThread(strength, force, factors)
    case 'bearing':
      return checkBearing(strength, force, factors)
  }
}

/** A joint that isn't finished holds nothing, whatever was entered of it. */
function unfinished(joint: Joint, share: LoadShare, load: number): Finding {
  return {
    check: `${joint.makeUp}, not finished`,
    demand: load * (share.share ?? 1),
    capacity: 0,
    unit: 'N',
    source: 'an open or tacked joint counts for nothing',
  }
}

function checkJoint(press: PressDescription, joint: Joint, load: number, factors: StrengthFactors): CheckResult[] {
  const about: About = { about: { kind: 'joint', id: joint.id }, name: `joint ${joint.number}, ${joint.name}` }
  const share = shareOfJoint(press, joint)
  const unchecked = (notChecked: string) => [resultOf(about, share.how, { check: 'strength', notChecked })]
  if (joint.makeUp !== 'finished') return [resultOf(about, share.how, unfinished(joint, share, load))]
  const { strength } = joint
  if (!strength) return unchecked('No dimensions of it are entered.')
  if (strength.kind !== KIND_OF_STRENGTH[joint.kind])
    return unchecked(`What is entered is a ${strength.kind}, and the joint is a ${joint.kind}.`)
  if (share.share === null) return unchecked(share.how)
  if (share.share === 0) return unchecked('It carries none of the force, as entered.')
  return jointFindings(strength, load * share.share, factors).map((finding) => resultOf(about, share.how, finding))
}

/** Of two results the one nearer to, or farther past, what it may carry; nothing is worse than no capacity at all. */
function weaker(a: CheckResult | null, b: CheckResult): CheckResult | null {
  if (b.verdict === 'not checked') return a
  const rank = ({ utilisation }: CheckResult) => utilisation ?? Infinity
  return a === null || rank(b) > rank(a) ? b : a
}

/** A utilisation (1 is all that is allowed) in print: "132 %", never rounded down to 100 % when it is past it. */
export function percentUsed(utilisation: number): string {
  const rounded = Math.round(utilisation * 100)
  return `${utilisation > 1 ? Math.max(101, rounded) : rounded} %`
}

const NOT_A_DESIGN = 'An estimate, not a design approval.'

function sentenceOf(check: Pick<LoadPathCheck, 'load' | 'path' | 'weakest' | 'notChecked'>, unit: ForceUnit): string {
  const { path, weakest, notChecked } = check
  if (!path.closed) return `The load path is not closed. ${path.gap}`
  const load = formatForce(check.load, unit)
  const left = notChecked === 0 ? '' : ` NOT CHECKED: ${notChecked} of the things that carry this force.`
  if (!weakest) return `Nothing in the load path could be checked at ${load}.${left} ${NOT_A_DESIGN}`
  if (weakest.utilisation === null) {
    return `${weakest.name}: ${weakest.check}. It may carry nothing, and ${load} would go through it. Finish and examine it before any load.${left} ${NOT_A_DESIGN}`
  }
  const figure = `${weakest.name}, ${weakest.check}: ${percentUsed(weakest.utilisation)} of what the stated factor allows at ${load}.`
  if (weakest.verdict === 'beyond') {
    return `${figure} No load until it is made stronger, the rated load is lowered, or a named engineer’s document for it is attached.${left} ${NOT_A_DESIGN}`
  }
  return `Of what was checked the weakest is ${figure}${left} ${NOT_A_DESIGN}`
}

/**
 * Estimates, for every member and joint of a load path, how much of what it may carry is used under `load` (N, the
 * rated load unless given), all on one basis: capacity ÷ stated factor, at the ram's worst place. What has no
 * figures, or no such check, is in the result as NOT CHECKED with the reason; an open or tacked joint may carry
 * nothing. Fatigue, cold, shock, buckling and faces nobody examined are in none of it.
 * Sources: in each result. An estimate, never a design and never an approval.
 */
export function checkLoadPath(input: {
  description: PressDescription
  joints: readonly Joint[]
  load?: number | undefined
  forceUnit?: ForceUnit | undefined
  factors?: StrengthFactors | undefined
}): LoadPathCheck {
  const { description, joints, factors = DEFAULT_FACTORS } = input
  const load = input.load ?? toSI(description.ratedLoad)
  const path = loadPathOf(description.members, joints)
  const results = [
    ...description.members.flatMap((member) => checkMember(description, joints, member, load, factors)),
    ...joints.flatMap((joint) => checkJoint(description, joint, load, factors)),
  ]
  const weakest = results.reduce(weaker, null)
  const notChecked = results.filter(({ verdict }) => verdict === 'not checked').length
  return {
    load,
    path,
    results,
    weakest,
    notChecked,
    expected: expectedOpening({ description, joints }, load),
    blocks: !path.closed || results.some(({ verdict }) => verdict === 'beyond'),
    sentence: sentenceOf({ load, path, weakest, notChecked }, input.forceUnit ?? description.ratedLoad.unit),
  }
}
