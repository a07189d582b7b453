import { neededHashes } from '../ledger/attachments'
import { decideByRules, type Decision } from '../ledger/rules'
import { allRows } from './apply'
import { ALWAYS_ALLOWED, type CriterionSnapshot } from './entries'
import { evaluateTest } from './evaluate'
import type { StageEvaluation } from './evaluate-climb'
import { rule, type ProofTestQuestion, type ProofTestRule } from './rule'
import { BEFORE_LOAD_RULES, OPENING_RULES } from './rules-before-load'
import { UNDER_LOAD_RULES } from './rules-under-load'
import type { ProofTestState } from './state'

const FIVE_MINUTES = 300_000

/** Interlocks: an irregular entry against one of them bars the conclusion "accepted". */
function irregularInterlocks(state: ProofTestState): number[] {
  const interlocks = new Set(PROOF_TEST_RULES.filter((one) => one.interlock).map((one) => one.id))
  return state.irregular.filter((entry) => entry.rules.some((id) => interlocks.has(id))).map((entry) => entry.seq)
}

/** Rules of people, order and signature: R2, R3, R40 and on. */
const WHOLE_RULES: readonly ProofTestRule[] = [
  {
    id: 'R2',
    text: 'Only the people named in a test add to it.',
    severity: 'refuse',
    check: ({ state, authorId, kind }) => {
      if (!state.opened || kind === 'opened') return null
      const { lead, pumpHand, witness } = state.opened.people
      return [lead.id, pumpHand.id, witness.id].includes(authorId) ? null : 'You are not named in this test. Ask the lead.'
    },
  },
  {
    id: 'R3',
    text: 'After the lead’s signature only the witness acts; after the countersignature nothing changes.',
    severity: 'refuse',
    check: ({ state, kind, authorId }) => {
      if (state.countersigned) return 'This record is sealed. Nothing is added to it any more.'
      // A file that was still to come when the lead signed would keep the witness from signing: the witness may give it up.
      const givesUpFile = kind === 'attachment-lost' && authorId === state.opened?.people.witness.id
      if (state.signed && kind !== 'countersigned' && kind !== 'declined' && !givesUpFile)
        return 'The lead has signed. Only the witness acts now: countersign, or decline with a reason.'
      return null
    },
  },
  {
    id: 'R40',
    text: 'The clock of a device stands within five minutes of the server’s.',
    severity: 'refuse',
    check: ({ clockOff }) =>
      clockOff !== undefined && Math.abs(clockOff) > FIVE_MINUTES
        ? `This device’s clock is ${Math.round(Math.abs(clockOff) / 60_000)} minutes off. Set it right.`
        : null,
  },
  rule('R41', 'A test is concluded with the load off.', ['concluded'], (_asked, state) =>
    state.loaded ? 'The press is still loaded. Release first, then conclude.' : null,
  ),
  rule(
    'R42',
    'Accepted only when every stage, set and joint is in and within, and nothing was stopped.',
    ['concluded'],
    ({ payload }, state) => {
      if (payload.conclusion !== 'accepted') return null
      if (state.conclusion && state.conclusion.conclusion !== 'accepted')
        return `This test was concluded as ${state.conclusion.conclusion}. That stands; plan a new test that repeats it.`
      return evaluateTest(state).against[0] ?? null
    },
  ),
  rule('R43', 'An irregular interlock bars “accepted”.', ['concluded'], ({ payload }, state) => {
    if (payload.conclusion !== 'accepted') return null
    const seqs = irregularInterlocks(state)
    return seqs.length > 0 ? `Entry ${seqs.join(', ')} went against an interlock. This test cannot be accepted.` : null
  }),
  rule(
    'R44',
    'Other irregular entries, and criteria that were not met or read, need a reason to accept.',
    ['concluded'],
    ({ payload }, state) => {
      if (payload.conclusion !== 'accepted') return null
      const seqs = state.irregular.map((entry) => entry.seq)
      if (seqs.length > 0) return `Entry ${seqs.join(', ')} is marked irregular. Write down why the test is accepted all the same.`
      const open = evaluateTest(state).criteria.find((one) => one.id === 'independent' && one.verdict !== 'within')
      return open ? `${open.label}: ${open.reading}. Write down why the test is accepted all the same.` : null
    },
    { severity: 'reason' },
  ),
  rule('R45', 'Rejected and abandoned say why.', ['concluded'], ({ payload }) =>
    payload.conclusion !== 'accepted' && payload.why.trim().length < 3 ? 'Write down why, in a few words.' : null,
  ),
  rule('R46', 'Only the lead concludes and signs as lead.', ['concluded', 'signed'], (_asked, _state, opened, { authorId }) =>
    authorId === opened.people.lead.id ? null : `Only the lead, ${opened.people.lead.name}, does this.`,
  ),
  rule('R47', 'A test is signed when it is concluded, and not twice.', ['signed'], (_asked, state) => {
    if (!state.conclusion) return 'Conclude the test before signing it.'
    if ((state.declined.at(-1)?.seq ?? 0) > state.conclusion.seq) return 'The witness declined. Answer it with a new conclusion, then sign.'
    return null
  }),
  rule(
    'R48',
    'Only the witness countersigns or declines, after the lead has signed.',
    ['countersigned', 'declined'],
    (_asked, state, opened, { authorId }) => {
      if (authorId !== opened.people.witness.id) return `Only the witness, ${opened.people.witness.name}, does this.`
      return state.signed ? null : 'The lead has not signed yet.'
    },
  ),
  rule('R49', 'A correction names a reading that was entered, and says something else.', ['corrected'], ({ payload }, state) => {
    const row = allRows(state).find((candidate) => candidate.entryId === payload.entryId)
    const reading = row?.readings.find((candidate) => candidate.sourceId === payload.sourceId)
    if (!reading) return 'There is no such reading to correct.'
    return reading.text === payload.text && reading.unit === payload.unit ? 'That is what stands there already.' : null
  }),
  rule('R50', 'Under load a correction lifts a wait only when lead and witness read it again.', ['corrected'], ({ payload }, state) => {
    if (!state.loaded || payload.readAgainByBoth) return null
    return 'The press is loaded: read it again together, lead and witness, then correct it.'
  }),
  rule(
    'R51',
    'After a stop and release, a correction does not lift the stop.',
    ['decided'],
    ({ payload }, state) => (state.stopped && payload.decision !== 'stop' ? 'This test was stopped. That stands.' : null),
    { interlock: true },
  ),
  rule(
    'R53',
    'A test is signed when every photo and document that it names is on the server or declared lost.',
    ['signed', 'countersigned'],
    (_asked, state, _opened, { absentFiles = [] }) => {
      const needed = neededHashes(state.attachments)
      const absent = needed.filter((sha256) => absentFiles.includes(sha256)).length
      if (absent === 0) return null
      const [are, them] = absent === 1 ? ['is', 'it'] : ['are', 'them']
      return `${absent} of ${needed.length} photos and documents ${are} not on the server yet. Open this test on the device that holds ${them}, with a connection, or declare ${them} lost with the reason.`
    },
  ),
  rule(
    'R54',
    'Only lead and witness declare a photo or document lost, and only one that this test names.',
    ['attachment-lost'],
    ({ payload }, state, opened, { authorId }) => {
      const { lead, witness } = opened.people
      if (authorId !== lead.id && authorId !== witness.id)
        return `Only the lead, ${lead.name}, or the witness, ${witness.name}, declares it lost.`
      return state.attachments.some((one) => one.sha256 === payload.sha256) ? null : 'No entry of this test names such a photo or document.'
    },
  ),
]

/** Every numbered rule of a proof test, in the order of the test. R1 is the one that nothing overrules. */
export const PROOF_TEST_RULES: readonly ProofTestRule[] = [...WHOLE_RULES, ...OPENING_RULES, ...BEFORE_LOAD_RULES, ...UNDER_LOAD_RULES]

/** What still marks a stop or a release that comes after the signatures, or from a clock that is off. */
const MARKS_ONLY: readonly ProofTestRule[] = PROOF_TEST_RULES.filter((one) => one.id === 'R3' || one.id === 'R40')

/** Whether an entry may follow: allowed, only with a reason, or refused; by which numbered rules. */
export function decideProofTest(state: ProofTestState, draft: Omit<ProofTestQuestion, 'state'>): Decision {
  const rules = ALWAYS_ALLOWED.has(draft.kind) && state.opened ? MARKS_ONLY : PROOF_TEST_RULES
  return decideByRules(rules, { ...draft, state }, draft.overrides)
}

/** Criteria as a decision keeps them: words, not figures, so that the record reads as the lead read it. */
export function snapshotsOf(stage: Pick<StageEvaluation, 'criteria'>): CriterionSnapshot[] {
  return stage.criteria.map(({ id, label, verdict, reading, limitText, stops }) => ({
    id,
    label,
    verdict,
    reading,
    limit: limitText,
    stops,
  }))
}
