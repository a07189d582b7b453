import type { Override } from '../ledger/envelope'
import { decideByRules, type Decision, type Rule } from '../ledger/rules'
import { PRESS_CONSEQUENCES, type PressKind, type PressPayload } from './entries'
import { ratedLoadRefusal } from './ratings'
import type { PressState } from './state'

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

const SHAPE = ['described', 'joint-added', 'joint-described', 'joint-retired'] as const
const HOURS_AFTER_WELDING = 12

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
  rule('P3', 'Joint numbers are used once.', ['registered', 'joint-added', 'joint-described'], (asked, state) => {
    const given = asked.kind === 'registered' ? asked.payload.joints : [asked.payload.joint]
    const known = asked.kind === 'registered' ? [] : state.joints.filter((joint) => joint.id !== given[0]?.id)
    const numbers = [...known, ...given].map((joint) => joint.number)
    const twice = numbers.find((number, index) => numbers.indexOf(number) !== index)
    return twice === undefined ? null : `Joint number ${twice} is used twice. Give each joint its own.`
  }),
  rule('P4', 'A joint holds two members that are entered.', ['registered', 'joint-added', 'joint-described'], (asked, state) => {
    const members = new Set(
      (asked.kind === 'registered' ? asked.payload.description : state.description)?.members.map((member) => member.id),
    )
    const joints = asked.kind === 'registered' ? asked.payload.joints : [asked.payload.joint]
    const loose = joints.find((joint) => !joint.between.every((member) => members.has(member)))
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
    ['joint-worked', 'joint-examined', 'joint-described', 'joint-retired'],
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
  rule('P12', 'A clearance comes from the test that is under way on the press.', ['clearance-given'], ({ payload }, state) =>
    state.underTest?.proofTestId === payload.proofTestId ? null : 'No such test is under way on this press.',
  ),
]

/** Whether an entry may follow in a press's ledger. */
export function decidePress(state: PressState, draft: Omit<PressQuestion, 'state'>): Decision {
  return decideByRules(PRESS_RULES, { ...draft, state }, draft.overrides)
}
