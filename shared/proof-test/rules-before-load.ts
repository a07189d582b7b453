import { calibrationState } from '../instruments/model'
import { nameJoints } from '../press/joints'
import { loadPathOf } from '../press/load-path'
import { carriesLess, lowestLimit, ratedLoadRefusal } from '../press/ratings'
import { parseDecimal, toSI } from '../units'
import { SET_UP_ITEMS, type Opened } from './entries'
import { checkOf } from './expected'
import { leadInstrument, stageTarget } from './force'
import { LOADING, rule, type ProofTestQuestion, type ProofTestRule } from './rule'
import type { JointState } from './state'

const HOUR = 3_600_000
/** Hours a weld cools and settles before it is examined. Common practice, no source. */
const HOURS_AFTER_WELDING = 12

const named = (joints: readonly JointState[]): string => nameJoints(joints.map((joint) => joint.joint.number))
const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)
const are = (joints: readonly unknown[]): string => (joints.length === 1 ? 'is' : 'are')

function ask(question: ProofTestQuestion, check: (opened: Opened) => string | null): string | null {
  return question.kind === 'opened' && !question.state.opened ? check(question.payload as unknown as Opened) : null
}

function opening(id: string, text: string, check: (opened: Opened, question: ProofTestQuestion) => string | null): ProofTestRule {
  return { id, text, severity: 'refuse', check: (question) => ask(question, (opened) => check(opened, question)) }
}

/** Rules of opening a test: R4 to R10. */
export const OPENING_RULES: readonly ProofTestRule[] = [
  {
    id: 'R4',
    text: 'A test is opened once, before anything else.',
    severity: 'refuse',
    check: ({ state, kind }) => {
      if (kind === 'opened') return state.opened ? 'This test is open already.' : null
      return state.opened ? null : 'This test has not been opened.'
    },
  },
  opening('R5', 'The witness is never the lead or the pump hand, and the opener is the lead.', (opened, question) => {
    const { lead, pumpHand, witness } = opened.people
    if (witness.id === lead.id) return 'The lead cannot witness the own test. Name another person as witness.'
    if (pumpHand.id !== null && witness.id === pumpHand.id)
      return 'The witness cannot work the pump. Name another pump hand or another witness.'
    return lead.id === question.authorId ? null : 'Whoever opens a test leads it.'
  }),
  opening('R6', 'The rated load never passes the lowest rating in the train, and no stage does.', (opened) => {
    const refusal = ratedLoadRefusal(opened.press)
    if (refusal) return refusal
    const highest = opened.protocol.content.stages.at(-1)?.percent ?? 100
    const lowest = lowestLimit(opened.press)
    const force = (highest / 100) * toSI(opened.press.ratedLoad)
    if (!lowest || !carriesLess(lowest.force, force)) return null
    return `The stage at ${highest} % is ${(force / 1000).toFixed(1)} kN, and ${lowest.name} carries no more than ${(lowest.force / 1000).toFixed(1)} kN. Choose a protocol that stays below it.`
  }),
  opening('R7', 'Every target lies on the scale of the gauge that reads it.', (opened) => {
    const details = leadInstrument(opened)?.details
    if (!details || details.kind === 'indicator') return 'Choose a gauge or a load cell that reads the force.'
    const gauges = opened.forceInstrumentIds.length
    if (gauges > 1 && details.kind === 'gauge' && gauges !== opened.press.rams.length)
      return 'Rams on one manifold are read by one gauge; isolated rams by one gauge each. Choose as many gauges as there are rams, or one.'
    const fullScale = toSI(details.fullScale)
    for (const { percent } of opened.protocol.content.stages) {
      const target = stageTarget(opened, percent)
      if (target && target.readable > fullScale)
        return `At ${percent} % gauge ${details.code} would read ${target.text} ${target.unit}, past its full scale of ${details.fullScale.text} ${details.fullScale.unit}. Choose a larger gauge.`
    }
    return null
  }),
  opening('R8', 'Instruments are in date; one that is not needs a reason, which prints and gives no clearance.', (opened, question) => {
    const day = question.mark.at.slice(0, 10)
    const late = opened.instruments.filter(({ calibration }) => calibrationState(calibration, day) !== 'in-date')
    if (late.length === 0 || opened.instrumentOverride !== null) return null
    const codes = late.map(({ details }) => details.code).join(', ')
    return `${codes} ${are(late)} not in calibration today. Have ${late.length === 1 ? 'it' : 'them'} calibrated, choose another, or write down why this test uses ${late.length === 1 ? 'it' : 'them'} (it then gives no clearance).`
  }),
  opening('R9', 'The load path is closed: members and joints lead from the ram round the frame to the bed.', (opened) => {
    const path = loadPathOf(opened.press.members, opened.joints)
    return path.closed ? null : `The load path does not close. ${path.gap}`
  }),
  opening('R52', 'A load path check over 100 % waits for a named engineer’s document.', (opened) => {
    const { weakest } = checkOf(opened)
    if (weakest?.verdict !== 'beyond' || opened.engineer) return null
    const much =
      weakest.utilisation === null ? 'carries nothing' : `comes to ${Math.round(weakest.utilisation * 100)} % of what it may carry`
    return `By the estimate ${weakest.name} ${much} (${weakest.check}). Lower the rated load, strengthen it, or name the engineer’s document that says otherwise.`
  }),
  opening('R10', 'Every point has an indicator of its own, and every leg of the protocol its bed hole.', (opened) => {
    const ids = new Set(opened.points.map((point) => point.instrumentId))
    if (ids.size !== opened.points.length) return 'Two measuring points name the same indicator. Give each its own.'
    const known = opened.points.every(
      (point) => opened.instruments.find((one) => one.id === point.instrumentId)?.details.kind === 'indicator',
    )
    if (!known) return 'A measuring point is read by an indicator. Choose one for each point.'
    return opened.legs.length === opened.protocol.content.legs.length ? null : 'Give a bed hole for every leg of the protocol.'
  }),
]

/** Rules of the walk-down and the set-up, and what they keep shut: R11 to R19. Nearly all are interlocks. */
export const BEFORE_LOAD_RULES: readonly ProofTestRule[] = [
  rule(
    'R11',
    'An open or tacked joint cannot be accepted.',
    ['joint-examined'],
    ({ payload }, state) => {
      const joint = state.joints.find((candidate) => candidate.joint.id === payload.jointId)
      if (!joint) return 'This joint is not in the load path of this test.'
      if (payload.result === 'rejected' || joint.makeUp === 'finished') return null
      return `Joint ${joint.joint.number} is ${joint.makeUp === 'tacked' ? 'only tacked' : 'open'}. ${joint.joint.kind === 'weld' ? 'Weld it out' : 'Make it up'}, then examine it.`
    },
    { interlock: true },
  ),
  rule(
    'R12',
    'A weld is examined cold, and 12 hours after welding unless a reason is given.',
    ['joint-examined'],
    ({ payload }, state, _opened, { mark }) => {
      const joint = state.joints.find((candidate) => candidate.joint.id === payload.jointId)
      if (!joint || joint.joint.kind !== 'weld' || payload.result === 'rejected' || payload.occasion === 'after load') return null
      const hours = joint.workedAt ? (Date.parse(mark.at) - Date.parse(joint.workedAt)) / HOUR : HOURS_AFTER_WELDING
      if (hours >= HOURS_AFTER_WELDING) return null
      return `Joint ${joint.joint.number} was welded ${Math.max(0, hours).toFixed(1)} hours ago. Cracks can open for 12 hours: wait, or write down why it is examined now.`
    },
    { severity: 'reason' },
  ),
  rule(
    'R13',
    'A weld is examined cold.',
    ['joint-examined'],
    ({ payload }, state) => {
      const joint = state.joints.find((candidate) => candidate.joint.id === payload.jointId)
      if (!joint || joint.joint.kind !== 'weld' || payload.result === 'rejected' || payload.cold || payload.occasion === 'after load')
        return null
      return `Joint ${joint.joint.number} is accepted only when it is cold enough to lay a bare hand on. Let it cool, then say so.`
    },
    { interlock: true },
  ),
  rule(
    'R14',
    'No load while a joint is open or only tacked.',
    LOADING,
    (_asked, state) => {
      const unfinished = state.joints.filter((joint) => joint.makeUp !== 'finished')
      if (unfinished.length === 0) return null
      const tacked = unfinished.every((joint) => joint.makeUp === 'tacked')
      return `${capital(named(unfinished))} ${are(unfinished)} ${tacked ? 'only tacked' : 'not finished'}. A tack counts as no weld. Finish ${unfinished.length === 1 ? 'it' : 'them'}, then examine what it touches.`
    },
    { interlock: true },
  ),
  rule(
    'R15',
    'No load until every joint is accepted in this walk-down.',
    LOADING,
    (_asked, state) => {
      const rejected = state.joints.filter((joint) => joint.before?.result === 'rejected')
      if (rejected.length > 0) return `${capital(named(rejected))} ${are(rejected)} rejected. Repair, then examine again.`
      const waiting = state.joints.filter((joint) => joint.makeUp === 'finished' && !joint.before)
      return waiting.length > 0
        ? `${capital(named(waiting))} ${are(waiting)} not examined. Look at ${waiting.length === 1 ? 'it' : 'each'} and accept or reject it.`
        : null
    },
    { interlock: true },
  ),
  rule(
    'R16',
    'A walk-down holds for its hours only.',
    LOADING,
    (_asked, state, opened, { mark }) => {
      const limit = opened.walkDownHours * HOUR
      const old = state.joints.filter((joint) => joint.before && Date.parse(mark.at) - Date.parse(joint.before.at) > limit)
      return old.length > 0
        ? `${capital(named(old))} ${are(old)} examined more than ${opened.walkDownHours} hours ago. Walk ${old.length === 1 ? 'it' : 'them'} down again.`
        : null
    },
    { interlock: true },
  ),
  rule(
    'R17',
    'The witness has confirmed that no joint is missing.',
    LOADING,
    (_asked, state) =>
      state.loadPathConfirmed
        ? null
        : 'The witness has not confirmed that no joint is missing. Walk the load path together, then have it confirmed.',
    { interlock: true },
  ),
  rule(
    'R18',
    'The witness confirms in person; as told to the lead it needs a reason.',
    ['load-path-confirmed'],
    ({ payload }, _state, opened, question) => {
      if (question.authorId === opened.people.witness.id && payload.by === 'witness') return null
      return 'The witness confirms on a device of the own. Write down why the lead enters it instead.'
    },
    { severity: 'reason' },
  ),
  rule(
    'R19',
    'Set-up: every point is confirmed, and the stroke stands between 10 and 80 %.',
    [...LOADING, 'set-up-confirmed'],
    (asked, state) => {
      if (asked.kind !== 'set-up-confirmed')
        return state.setUp ? null : 'The set-up has not been confirmed. Go through it behind the shield first.'
      const missing = SET_UP_ITEMS.filter((item) => !asked.payload.items.includes(item))
      if (missing.length > 0)
        return `${missing.length} of ${SET_UP_ITEMS.length} points of the set-up are not confirmed. Do them, then tick them.`
      const stroke = parseDecimal(asked.payload.strokePercent)
      if (stroke.ok && stroke.value >= 10 && stroke.value <= 80) return null
      return 'The ram’s stroke must stand between 10 and 80 % under load. Change the stack.'
    },
    { interlock: true },
  ),
]
