import { groupDigits, unitLabel } from '../units'
import { allRows } from './apply'
import type { Opened } from './entries'
import type { TestEvaluation } from './evaluate'
import type { CriterionVerdict } from './evaluate-climb'
import type { PrintDates } from './print-dates'
import {
  capital,
  clearedLoad,
  countInWords,
  inPrint,
  joinWords,
  standingOf,
  staticLoadsText,
  type FrozenDifference,
  type RecordStanding,
} from './record'
import type { Correction, ProofTestState } from './state'

/** What the words of a record are made of; the record page and the record on paper both have it. */
export interface RecordParts {
  state: ProofTestState
  opened: Opened
  evaluation: TestEvaluation
  /** Between the evaluation frozen at the conclusion and today's arithmetic. */
  differences: readonly FrozenDifference[]
  nameOf(personId: string): string
}

/** The lines under a record's headline: what it rests on, or what is still wanting. */
export function resultLines({ state, opened, evaluation }: RecordParts, dates: PrintDates): string[] {
  const cleared = clearedLoad(state, evaluation)
  switch (standingOf(state)) {
    case 'accepted':
      if (cleared === null) return ['The readings leave nothing to clear the press to.']
      return [
        `${cleared.newton}, rated ${cleared.rated}. ${cleared.gauge === null ? '' : `${cleared.gauge}. `}${cleared.where}. Until ${dates.longDate(cleared.until)}.`,
        `Cleared by ${cleared.by} on ${dates.longDate(cleared.on)} after ${staticLoadsText(cleared.staticLoads)}. No other bed hole was tested.`,
      ]
    case 'rejected':
    case 'abandoned':
      return [state.conclusion?.why ?? '', state.stopped ? `Stopped: ${state.stopped.why}` : '', 'This test clears the press to no load.']
    case 'stopped':
      return [state.stopped?.why ?? '', 'A stopped test can’t go back under load. The lead concludes it as rejected or abandoned.']
    case 'to sign': {
      const declined = state.declined.at(-1)
      return [
        ...(declined ? [`${declined.printedName} declined to countersign: ${declined.why}`] : []),
        `Waits for ${opened.people.lead.name} to sign. Until it is countersigned it clears nothing.`,
      ]
    }
    case 'to countersign':
      return [
        `Signed by ${state.signed?.printedName ?? ''}. Waits for ${opened.people.witness.name} to countersign; until then it clears nothing.`,
      ]
    default:
      return [`Rated ${inPrint(opened.press.ratedLoad)}. What follows is as far as the ledger has come.`]
  }
}

/** Under which plan, in how many legs, and when: one sentence each. */
export function courseText({ opened, state }: RecordParts, dates: PrintDates): string {
  const legs = opened.legs.length === 1 ? 'One leg' : `${opened.legs.length} legs`
  const walked = state.joints
    .map((joint) => joint.before?.at ?? '')
    .sort()
    .at(-1)
  const released = state.legs
    .flatMap((leg) => leg.climbs.flatMap((climb) => climb.released?.at ?? []))
    .sort()
    .at(-1)
  const parts = [
    state.openedAt && `Opened ${dates.longDate(state.openedAt)}`,
    walked && `walk-down closed ${dates.clockTime(walked)}`,
    released && `released ${dates.clockTime(released)}`,
    state.conclusion && `concluded ${dates.clockTime(state.conclusion.at)}`,
  ].filter(Boolean)
  return `${opened.protocol.name}, version ${opened.protocol.version}. ${legs}. ${parts.join(', ')}.`
}

/** The shape beside a record's headline. */
export type StandingMark = 'to-come' | 'under-way' | 'stop' | 'to-countersign' | 'within' | 'abandoned'

const STANDING_MARKS: Record<RecordStanding, StandingMark> = {
  'not opened': 'to-come',
  'under way': 'under-way',
  stopped: 'stop',
  'to sign': 'to-countersign',
  'to countersign': 'to-countersign',
  accepted: 'within',
  rejected: 'stop',
  abandoned: 'abandoned',
}

/** Which shape a standing bears; every state has a shape beside its word. */
export function standingMark(standing: RecordStanding): StandingMark {
  return STANDING_MARKS[standing]
}

export type VerdictMark = 'within' | 'beyond' | 'undecided' | 'wait' | 'not-read'

const VERDICT_MARKS: Record<CriterionVerdict, VerdictMark> = {
  within: 'within',
  beyond: 'beyond',
  undecided: 'undecided',
  wait: 'wait',
  'not-read': 'not-read',
}

/** Which shape a verdict bears. */
export function verdictMark(verdict: CriterionVerdict): VerdictMark {
  return VERDICT_MARKS[verdict]
}

/** "Head beam, left upright and right upright not measured"; empty when every member has a point. */
export function notMeasuredText({ notMeasured }: Pick<Opened, 'notMeasured'>): string {
  if (notMeasured.length === 0) return ''
  return `${joinWords(notMeasured.map((name, index) => (index === 0 ? name : name.toLowerCase())))} not measured`
}

/** Something a reader must not miss beside the figures. */
export interface Notice {
  title: string
  mark: 'wait' | 'stop' | 'undecided' | 'beyond' | 'now'
  lines: string[]
}

/** Everything a reader must not miss: what was irregular, seen, given a reason for, declined, or came late. */
export function noticesOf(record: RecordParts, dates: PrintDates): Notice[] {
  const { state, evaluation, differences, nameOf } = record
  const { stopped } = state
  const notices: Notice[] = [
    {
      title: 'Entries of a kind this page does not know',
      mark: 'wait',
      lines:
        state.unknownKinds > 0 ? [`${state.unknownKinds} in all. Load the page again to update it before you rely on this record.`] : [],
    },
    {
      title: 'After the seal',
      mark: 'stop',
      lines:
        state.lateFacts > 0
          ? [
              `${state.lateFacts} ${state.lateFacts === 1 ? 'entry' : 'entries'} arrived after the countersignature. The clearance is suspended until somebody has looked.`,
            ]
          : [],
    },
    {
      title: 'Today’s arithmetic differs from what was frozen at the conclusion',
      mark: 'undecided',
      lines: differences.map(({ what, frozen, today }) => `${what}: frozen ${frozen}; today ${today}.`),
    },
    {
      title: 'Stopped',
      mark: 'stop',
      lines: stopped
        ? [
            `${stopped.why.replace(/\.$/, '')}. Called by ${nameOf(stopped.by)}, ${dates.dateAndTime(stopped.at)}${stopped.atPercent === null ? '' : `, at ${stopped.atPercent}\u202f%`}.`,
          ]
        : [],
    },
    { title: 'Against “accepted”', mark: 'beyond', lines: standingOf(state) === 'under way' ? [] : evaluation.against },
    {
      title: 'Irregular entries',
      mark: 'undecided',
      lines: state.irregular.map(
        ({ seq, kind, rules }) => `Entry ${seq}, ${kind.replaceAll('-', ' ')}: against ${rules.join(', ')}. It happened, so it stands.`,
      ),
    },
    {
      title: 'Reasons given',
      mark: 'wait',
      lines: state.reasons.map(({ seq, rule, reason, by }) => `Entry ${seq}, ${rule}: ${reason} ${nameOf(by)}.`),
    },
    {
      title: 'Observed',
      mark: 'now',
      lines: state.observations.map(
        ({ seq, what, note, by, at }) => `Entry ${seq}, ${what}: ${note} ${nameOf(by)}, ${dates.dateAndTime(at)}.`,
      ),
    },
    {
      title: 'Declined to countersign',
      mark: 'stop',
      lines: state.declined.map(({ printedName, why, at }) => `${printedName}, ${dates.dateAndTime(at)}: ${why}`),
    },
  ]
  return notices.filter(({ lines }) => lines.length > 0)
}

/** "Right pin, hold start, 50 %", "G-02, set": which reading of which row a correction names. */
export function whichReading({ opened, state, evaluation }: RecordParts, correction: Correction, dates: PrintDates): string {
  const point = opened.points.find(({ id }) => id === correction.sourceId)
  const instrument = opened.instruments.find(({ id }) => id === correction.sourceId)
  const what = point?.label ?? instrument?.details.code ?? 'A reading'
  for (const climb of evaluation.climbs) {
    for (const stage of climb.stages) {
      const row = stage.attempt.rows.find((candidate) => candidate.entryId === correction.correctsEntryId)
      if (row) return `${what}, ${row.occasion}, ${stage.percent}\u202f%`
    }
    if (climb.set?.row.row.entryId === correction.correctsEntryId) return `${what}, set`
  }
  const row = allRows(state).find((candidate) => candidate.entryId === correction.correctsEntryId)
  return row ? `${what}, read ${dates.clockTime(row.mark.at)}` : what
}

/** "Two corrections, both kept". */
export function correctionsHeading(count: number): string {
  if (count === 1) return 'One correction, both readings kept'
  return `${capital(countInWords(count))} corrections, ${count === 2 ? 'both' : 'all'} kept`
}

/** A correction's two readings and their unit: what was typed first, and what counts. */
export function correctedReadings({ from, to }: Pick<Correction, 'from' | 'to'>): { first: string; counts: string; unit: string } {
  const other = from.unit === to.unit ? '' : ` (first in ${unitLabel(from.unit)})`
  return { first: groupDigits(from.text), counts: groupDigits(to.text), unit: `${unitLabel(to.unit)}${other}` }
}

const DAY = 24 * 3_600_000

/** "30 hours after the lead" where the countersignature came more than a day late, else null (DOMAIN 4). */
export function lateness({ signed, countersigned }: Pick<ProofTestState, 'signed' | 'countersigned'>): string | null {
  const behind = signed && countersigned ? Date.parse(countersigned.signedAt) - Date.parse(signed.signedAt) : 0
  return behind > DAY ? `${Math.round(behind / 3_600_000)} hours after the lead` : null
}

/** The first half of a hash in groups of four, two lines: enough to compare by eye. */
export function hashLines(hash: string): string[] {
  const groups = hash.slice(0, 32).match(/.{4}/g) ?? []
  return [groups.slice(0, 4).join(' '), groups.slice(4).join(' ')]
}
