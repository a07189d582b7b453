import type { Override } from '../ledger/envelope'
import { decideByRules, type Decision, type Rule } from '../ledger/rules'
import { isAccepted } from './apply'
import { PRESS_CONSEQUENCES, type PressKind, type PressPayload } from './entries'
import { ratedLoadRefusal } from './ratings'
import { nameJoints } from './joints'
import type { Joint } from './model'
import type { PressState, Repair } from './state'

/** What is asked of the rules of a press's ledger. */
export interface PressQuestion {
  state: PressState
  kind: string
  payload: Record<string, unknown>
  overrides: readonly Override[]
  /** The moment on the device, ISO. */
  at: string
  /** True for entries that the server writes as the consequence of a proof test. */
  consequence?: boolean
}

export type PressRule = Rule<PressQuestion>

type Asked<K extends PressKind> = { [Kind in K]: { kind: Kind; payload: PressPayload<Kind> } }[K]

function rule<K extends PressKind>(
  id: string,
  text: string,
  kinds: readonly K[],
  check: (asked: Asked<K>, state: PressState, question: PressQuestion) => string | null,
  severity: 'refuse' | 'reason' = 'refuse',
): PressRule {
  const about = new Set<string>(kinds)
  return {
    id,
    text,
    severity,
    check: (question) =>
      about.has(question.kind) ? check({ kind: question.kind, payload: question.payload } as Asked<K>, question.state, question) : null,
  }
}

const SHAPE = ['described', 'joint-added', 'joint-described', 'joint-retired', 'joint-split', 'strength-described'] as const
const NAMES_JOINTS = ['registered', 'joint-added', 'joint-described', 'joint-split'] as const
const HOURS_AFTER_WELDING = 12

function jointsIn(asked: Asked<(typeof NAMES_JOINTS)[number]>): Joint[] {
  if (asked.kind === 'registered') return asked.payload.joints
  return asked.kind === 'joint-split' ? asked.payload.into : [asked.payload.joint]
}

/** A repair that a test or a person asked for, and that nobody has closed. */
const openRepair = (state: PressState): Repair | undefined => state.repairs.find((repair) => !repair.closed && repair.from !== 'joint')

/** Every numbered rule of a press's ledger. */
export const PRESS_RULES: readonly PressRule[] = [
  {
    id: 'P1',
    text: 'A press is entered once, before anything else.',
    severity: 'refuse',
    check: ({ state, kind }) => {
      if (kind === 'registered') return state.description ? 'This press is entered already.' : null
      return state.description ? null : 'This press has not been entered.'
    },
  },
  rule('P2', 'The rated load never passes the lowest rating in the train.', ['registered', 'described'], ({ payload }) =>
    ratedLoadRefusal(payload.description),
  ),
  rule('P3', 'Joint numbers are used once.', [...NAMES_JOINTS], (asked, state) => {
    const given = jointsIn(asked)
    const replaced = asked.kind === 'joint-split' ? [asked.payload.jointId] : given.map((joint) => joint.id)
    const known = asked.kind === 'registered' ? [] : state.joints.filter((joint) => !replaced.includes(joint.id))
    const numbers = [...known, ...given].map((joint) => joint.number)
    const twice = numbers.find((number, index) => numbers.indexOf(number) !== index)
    return twice === undefined ? null : `Joint number ${twice} is used twice. Give each joint its own.`
  }),
  rule('P4', 'A joint holds two members that are entered.', [...NAMES_JOINTS], (asked, state) => {
    const members = new Set(
      (asked.kind === 'registered' ? asked.payload.description : state.description)?.members.map((member) => member.id),
    )
    const loose = jointsIn(asked).find((joint) => !joint.between.every((member) => members.has(member)))
    return loose ? `Joint ${loose.number} names a member that is not entered. Choose both members from the list.` : null
  }),
  rule('P5', 'An open or tacked joint cannot be accepted.', ['joint-examined'], ({ payload }, state) => {
    const joint = state.joints.find((candidate) => candidate.id === payload.jointId)
    if (!joint || payload.result === 'rejected' || joint.makeUp === 'finished') return null
    return `Joint ${joint.number} is ${joint.makeUp === 'tacked' ? 'only tacked' : 'open'}. Finish it, then examine it.`
  }),
  rule(
    'P6',
    'While a proof test is under way, the press is worked on through the test.',
    [...SHAPE, 'joint-worked', 'joint-examined'],
    (_asked, state, { consequence }) =>
      state.underTest && !consequence
        ? `${state.underTest.number} is under way on this press. Conclude it first, or enter this in the test.`
        : null,
  ),
  rule(
    'P7',
    'Work and examinations name a joint that is there.',
    ['joint-worked', 'joint-examined', 'joint-described', 'joint-retired', 'joint-split', 'joint-placed'],
    (asked, state) => {
      const id = asked.kind === 'joint-described' ? asked.payload.joint.id : asked.payload.jointId
      return state.joints.some((joint) => joint.id === id && !joint.retired) ? null : 'There is no such joint on this press.'
    },
  ),
  rule(
    'P8',
    'A weld is examined 12 hours after welding unless a reason is given.',
    ['joint-examined'],
    ({ payload }, state, { at, consequence }) => {
      const joint = state.joints.find((candidate) => candidate.id === payload.jointId)
      if (!joint || consequence || joint.kind !== 'weld' || payload.result === 'rejected' || !joint.workedAt) return null
      const hours = (Date.parse(at) - Date.parse(joint.workedAt)) / 3_600_000
      return hours >= HOURS_AFTER_WELDING
        ? null
        : `Joint ${joint.number} was welded ${Math.max(0, hours).toFixed(1)} hours ago. Wait until 12 hours are over, or write down why it is examined now.`
    },
    'reason',
  ),
  rule('P9', 'Only a clearance that is in force or suspended is withdrawn by hand.', ['withdrawn'], (_asked, state) =>
    state.clearance.is === 'cleared' || state.clearance.is === 'suspended' ? null : 'This press has no clearance to withdraw.',
  ),
  {
    id: 'P10',
    text: 'What a proof test does to its press is written by the server alone.',
    severity: 'refuse',
    check: ({ kind, consequence }) =>
      PRESS_CONSEQUENCES.has(kind) && !consequence ? 'This follows from a proof test and is not entered by hand.' : null,
  },
  rule('P11', 'One proof test at a time is under way on a press.', ['test-opened'], ({ payload }, state) =>
    state.underTest && state.underTest.proofTestId !== payload.proofTestId
      ? `${state.underTest.number} is under way on this press. Conclude it before opening another.`
      : null,
  ),
  rule('P21', 'No proof test opens while a repair is open.', ['test-opened'], (_asked, state) => {
    const repair = openRepair(state)
    return repair
      ? `A repair is open: ${repair.why.replace(/[.!?]$/, '')}. Say what was done and close it, then examine the joints and test.`
      : null
  }),
  rule('P22', 'A test after one that went wrong names the one it repeats.', ['test-opened'], ({ payload }, state) =>
    state.toRepeat && payload.repeatsId !== state.toRepeat.proofTestId
      ? `${state.toRepeat.number} did not end well on this press. Plan this test as the one that repeats it.`
      : null,
  ),
  rule('P23', 'What is said of a repair is said of one that is open.', ['repair-noted', 'repair-closed'], ({ payload }, state) =>
    state.repairs.some((repair) => repair.id === payload.repairId && !repair.closed) ? null : 'This repair is not open.',
  ),
  rule('P24', 'A repair is closed after the test that called for it is concluded.', ['repair-closed'], ({ payload }, state) => {
    const repair = state.repairs.find((one) => one.id === payload.repairId)
    const number = state.underTest?.number ?? ''
    return repair?.test && repair.test.proofTestId === state.underTest?.proofTestId
      ? `${number} is not concluded yet. Conclude it, then close the repair.`
      : null
  }),
  rule('P25', 'A tag is taken off a press that has one and may no longer be used by it.', ['tag-taken-off'], (_asked, state) =>
    state.tagHangs ? null : 'No tag hangs on this press, as far as anybody has said.',
  ),
  rule('P26', 'Sizes are written down for members and joints that are there.', ['strength-described'], ({ payload }, state) => {
    const members = new Set(state.description?.members.map((member) => member.id))
    const joints = new Set(state.joints.filter((joint) => !joint.retired).map((joint) => joint.id))
    const known = payload.members.every((one) => members.has(one.memberId)) && payload.joints.every((one) => joints.has(one.jointId))
    return known ? null : 'One of these is not on this press any more. Load the page again.'
  }),
  rule('P27', 'A clearance never passes the rating of the tooling it was proven with.', ['clearance-given'], ({ payload }) =>
    payload.toolingLimitNewton && payload.loadNewton > payload.toolingLimitNewton * 1.0005
      ? 'The tooling of this test carries less than this clearance. Withdraw, and test with tooling that carries it.'
      : null,
  ),
  rule('P28', 'A repair, a change or a split names joints that are there.', ['changed', 'repair-opened'], ({ payload }, state) =>
    payload.jointIds.every((id) => state.joints.some((joint) => joint.id === id)) ? null : 'There is no such joint on this press.',
  ),
  rule('P29', 'A clearance is given while every joint of the press is accepted.', ['clearance-given'], (_asked, state) => {
    const fallen = state.joints.filter((joint) => !isAccepted(joint)).map((joint) => joint.number)
    return fallen.length > 0 ? `${nameJoints(fallen)} fell back after the press was loaded. Examine what happened, then test again.` : null
  }),
  rule('P12', 'A clearance comes from the test that is under way on the press.', ['clearance-given'], ({ payload }, state) =>
    state.underTest?.proofTestId === payload.proofTestId ? null : 'No such test is under way on this press.',
  ),
]

/** Whether an entry may follow in a press's ledger. */
export function decidePress(state: PressState, draft: Omit<PressQuestion, 'state'>): Decision {
  return decideByRules(PRESS_RULES, { ...draft, state }, draft.overrides)
}
