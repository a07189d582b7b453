import { loadPathOf } from './load-path'
import { nameJoints } from './joints'
import type { MayItBeUsed, PressJoint, PressState } from './state'

type Numbered = Pick<PressJoint, 'number' | 'name'>

/** "Joint 7 (Left bed stiffener) is" or "Joints 5 and 6 are". */
function said(joints: readonly Numbered[], one: string, many: string): string {
  const [first] = joints
  if (!first) return ''
  if (joints.length === 1) return `Joint ${first.number} (${first.name}) ${one}`
  const names = nameJoints(joints.map((joint) => joint.number))
  return `${names.charAt(0).toUpperCase()}${names.slice(1)} ${many}`
}

interface Lack {
  is: (joint: PressJoint) => boolean
  one: string
  many: string
}

/** What can stand against a joint, the worst first; each joint is named once. */
const LACKS: readonly Lack[] = [
  {
    is: (joint) => joint.examination?.result === 'rejected',
    one: 'was rejected. Repair it, then examine it again.',
    many: 'were rejected. Repair them, then examine them again.',
  },
  { is: (joint) => joint.makeUp === 'open', one: 'is open. Make it.', many: 'are open. Make them.' },
  {
    is: (joint) => joint.makeUp === 'tacked',
    one: 'is only tacked. Weld it out.',
    many: 'are only tacked. Weld them out.',
  },
  {
    is: (joint) => joint.examination === null && joint.fellBackBecause !== null,
    one: 'fell back to unexamined. Examine it again.',
    many: 'fell back to unexamined. Examine them again.',
  },
  { is: (joint) => joint.examination === null, one: 'is not examined.', many: 'are not examined.' },
]

/** Sentences about the joints that are not finished and accepted, and about a gap in the load path. */
export function missingOf(state: Pick<PressState, 'description' | 'joints'>): string[] {
  const joints = state.joints.filter((joint) => !joint.retired)
  const sentences: string[] = []
  const path = loadPathOf(state.description?.members ?? [], joints)
  if (!path.closed) sentences.push(path.gap)
  const left = new Set(joints)
  for (const lack of LACKS) {
    const these = [...left].filter(lack.is)
    for (const joint of these) left.delete(joint)
    if (these.length > 0) sentences.push(said(these, lack.one, lack.many))
  }
  return sentences
}

const PROOF_TEST = 'A proof test, concluded and countersigned.'

/** The proof test that is missing, named as the repeat of the one that went wrong. */
function proofTestMissing({ toRepeat }: PressState): string {
  return toRepeat ? `A proof test that repeats ${toRepeat.number}, concluded and countersigned.` : PROOF_TEST
}

const asSentence = (text: string): string => (/[.!?]$/.test(text) ? text : `${text}.`)

/** Repairs that stand open, in a sentence each. A joint that was rejected speaks for itself. */
function openRepairs(state: PressState): string[] {
  return state.repairs.flatMap((repair) =>
    repair.closed || repair.from === 'joint' ? [] : [`A repair is open: ${asSentence(repair.why)} Say what was done, and close it.`],
  )
}

/**
 * Whether a paper tag hangs on a press that may no longer be used by it on `today` (an ISO date): a withdrawal is over
 * only when somebody has taken it off. A test under way covers the tag; the press stands under its lead.
 */
export function tagToTakeOff(state: PressState, today: string): boolean {
  if (!state.tagHangs || (state.underTest && !state.underTest.stopped)) return false
  return mayItBeUsed(state, today).answer === 'do not use'
}

/** An accepted test whose witness hasn't signed leaves the press shut: the conclusion alone clears nothing. */
export function awaitsSignature(state: PressState): boolean {
  const { underTest } = state
  if (!underTest) return false
  return state.history.some((event) => event.kind === 'test-concluded' && event.proofTestId === underTest.proofTestId)
}

/**
 * May the press be used, on `today` (an ISO date)? Only a clearance that is in force says so; the day it runs
 * until is still within it. What is missing is said in sentences. Says what was done, never that it is harmless.
 */
export function mayItBeUsed(state: PressState, today: string): MayItBeUsed {
  if (state.unknownKinds > 0) {
    return {
      answer: 'do not use',
      why: 'Something happened to this press that this page is too old to read.',
      missing: ['Load this page again.'],
    }
  }
  if (state.underTest) {
    const { number, stopped } = state.underTest
    if (stopped) {
      const why = state.clearance.is === 'withdrawn' ? state.clearance.why : `${number} was stopped.`
      return {
        answer: 'do not use',
        why,
        missing: [`The conclusion of ${number}.`, ...openRepairs(state), ...missingOf(state), proofTestMissing(state)],
      }
    }
    return awaitsSignature(state)
      ? { answer: 'do not use', why: `${number} is concluded, and a signature is missing.`, missing: [`The signatures of ${number}.`] }
      : { answer: 'under test', why: `${number} is under way.` }
  }
  const { clearance } = state
  const joints = missingOf(state)
  const missing = [...openRepairs(state), ...joints, proofTestMissing(state)]
  switch (clearance.is) {
    case 'cleared':
      return clearance.clearance.until < today
        ? { answer: 'do not use', why: 'Its clearance has run out: it is overdue for a proof test.', missing }
        : { answer: 'cleared', clearance: clearance.clearance }
    case 'suspended':
      return clearance.until === 'the joints are accepted'
        ? { answer: 'do not use', why: `Its clearance waits for its joints. ${clearance.why}`, missing: joints }
        : { answer: 'do not use', why: `Its clearance is suspended. ${clearance.why}`, missing }
    case 'withdrawn':
      return { answer: 'do not use', why: clearance.why, missing }
    case 'none':
      return { answer: 'do not use', why: 'It was never cleared.', missing }
  }
}

/** What a row of the register says, for lists: the same answer without the ledger. */
export type RowAnswer =
  | { answer: 'cleared' }
  | { answer: 'under test' }
  | { answer: 'do not use'; why: 'overdue' | 'being built' | 'not tested' | 'suspended' | 'withdrawn' }

interface AnswerableRow {
  status: 'building' | 'ready' | 'under test' | 'cleared' | 'suspended' | 'withdrawn'
  clearedUntil: string | null
}

/** The answer for one row of the register of presses on `today` (an ISO date). */
export function answerOfRow(row: AnswerableRow, today: string): RowAnswer {
  switch (row.status) {
    case 'cleared':
      return row.clearedUntil !== null && row.clearedUntil >= today ? { answer: 'cleared' } : { answer: 'do not use', why: 'overdue' }
    case 'under test':
      return { answer: 'under test' }
    case 'building':
      return { answer: 'do not use', why: 'being built' }
    case 'ready':
      return { answer: 'do not use', why: 'not tested' }
    case 'suspended':
    case 'withdrawn':
      return { answer: 'do not use', why: row.status }
  }
}
