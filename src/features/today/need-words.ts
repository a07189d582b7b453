import type { Need as NeedData } from '#shared/api/today'
import { calendarDate, daysBetween, longDate } from '../../lib/dates'
import { asSentence } from '../../lib/words'
import { paths } from '../../paths'
import type { Need } from './components/today-view'

const instrumentWords = { gauge: 'Gauge', 'load-cell': 'Load cell', indicator: 'Indicator' } as const
const days = (count: number): string => (count === 1 ? '1 day' : `${count} days`)
/** "30 September": the year is told only when it is another one. */
const dayAndMonth = (date: string, today: string): string => {
  const whole = longDate(date)
  return date.slice(0, 4) === today.slice(0, 4) ? whole.replace(/ \d{4}$/, '') : whole
}

function ahead(date: string, today: string): string {
  const count = daysBetween(today, date)
  return count === 0 ? 'today' : `in ${days(count)}`
}

function waiting(since: string, today: string): string {
  const count = daysBetween(calendarDate(new Date(since)), today)
  return count < 1 ? 'since today' : `waiting ${days(count)}`
}

type Words = Omit<Need, 'id'>

function testWords(need: Extract<NeedData, { proofTestId: string }>, today: string): Words {
  const of = `${need.pressName}, ${need.protocolName.charAt(0).toLowerCase()}${need.protocolName.slice(1)}.`
  const to = paths.proofTest.href(need.proofTestId)
  const due = waiting(need.since, today)
  switch (need.kind) {
    case 'countersign':
      return {
        mark: 'to-countersign',
        title: `Countersignature wanted on ${need.number}`,
        note: `${of} You were the witness.`,
        due,
        urgency: 'now',
        to,
      }
    case 'sign':
      return {
        mark: 'to-countersign',
        title: `Sign ${need.number}`,
        note: `${of} It is concluded and waits for you.`,
        due,
        urgency: 'now',
        to,
      }
    case 'declined':
      return {
        mark: 'undecided',
        title: `${need.number} was declined`,
        note: `${of} The witness did not countersign. Read why.`,
        due,
        urgency: 'now',
        to,
      }
    case 'conclude':
      return {
        mark: 'stop',
        title: `Conclude ${need.number}`,
        note: `${of} It was stopped: rejected or abandoned.`,
        due,
        urgency: 'now',
        to: paths.runProofTest.href(need.proofTestId),
      }
  }
}

function instrumentOut(need: Extract<NeedData, { kind: 'instrument-out' }>, today: string): Words {
  const name = `${instrumentWords[need.instrumentKind]} ${need.code}`
  const to = paths.instrument.href(need.instrumentId)
  const late = need.dueOn === null ? 0 : daysBetween(need.dueOn, today)
  switch (need.is) {
    case 'out-of-date':
      return {
        mark: 'clock-late',
        title: `${name} is out of date`,
        note: `Due ${need.dueOn === null ? '' : dayAndMonth(need.dueOn, today)}. It blocks any new test.`,
        due: `${days(late)} late`,
        urgency: 'late',
        to: `${to}#calibration`,
      }
    case 'out-of-tolerance':
      return {
        mark: 'beyond',
        title: `${name} was out of tolerance`,
        note: 'Nothing can rest on it. Have it put right.',
        due: 'Now',
        urgency: 'late',
        to,
      }
    case 'never':
      return {
        mark: 'clock-late',
        title: `${name} was never calibrated`,
        note: 'It blocks any new test. Enter its certificate.',
        due: 'Now',
        urgency: 'late',
        to: `${to}#calibration`,
      }
  }
}

type PressNeed = Extract<NeedData, { kind: 'tag-hangs' | 'repair-open' | 'joints-to-examine' | 'retest' | 'press-shut' }>

/** What a press that may not be used waits for. */
function shutWords(need: PressNeed, today: string): Words {
  const to = paths.press.href(need.pressId)
  const due = need.since === null ? 'Now' : waiting(need.since, today)
  switch (need.kind) {
    case 'tag-hangs':
      return {
        mark: 'stop',
        title: `Take the tag off ${need.pressName}`,
        note: `${asSentence(need.why)} Say so when it is off.`,
        due,
        urgency: 'now',
        to: `${to}#tag`,
      }
    case 'repair-open':
      return {
        mark: 'stop',
        title: `${need.pressName} waits for a repair`,
        note: `${asSentence(need.why)} Say what was done.`,
        due,
        urgency: 'now',
        to: `${to}#repairs`,
      }
    case 'joints-to-examine':
      return {
        mark: 'undecided',
        title: `Examine ${need.joints} of ${need.pressName}`,
        note: 'Its clearance holds again when they are accepted.',
        due,
        urgency: 'now',
        to: `${to}#joints`,
      }
    case 'retest':
      return {
        mark: 'stop',
        title: `${need.pressName} waits for its retest`,
        note: `${need.number} did not end well. Examine the joints, then plan the test that repeats it.`,
        due,
        urgency: 'now',
        to: paths.planProofTest.href({ press: need.pressId, repeats: need.repeatsId }),
      }
    case 'press-shut':
      return {
        mark: 'stop',
        title: `${need.pressName} may not be used`,
        note: `${asSentence(need.why)} Plan a proof test.`,
        due: 'Now',
        urgency: 'now',
        to: paths.planProofTest.href({ press: need.pressId }),
      }
  }
}

function words(need: NeedData, today: string): Words {
  switch (need.kind) {
    case 'tag-hangs':
    case 'repair-open':
    case 'joints-to-examine':
    case 'retest':
    case 'press-shut':
      return shutWords(need, today)
    case 'press-overdue':
      return {
        mark: 'clock-late',
        title: `${need.pressName} is overdue`,
        note: `Its clearance ran until ${dayAndMonth(need.until, today)}. Plan a proof test.`,
        due: `${days(daysBetween(need.until, today))} late`,
        urgency: 'late',
        to: paths.planProofTest.href({ press: need.pressId }),
      }
    case 'press-due':
      return {
        mark: 'clock',
        title: `${need.pressName} is due its examination`,
        note: `${dayAndMonth(need.until, today)}. Its clearance ends then.`,
        due: ahead(need.until, today),
        urgency: 'later',
        to: paths.press.href(need.pressId),
      }
    case 'instrument-out':
      return instrumentOut(need, today)
    case 'instrument-due':
      return {
        mark: 'clock',
        title: `${instrumentWords[need.instrumentKind]} ${need.code} falls due`,
        note: `${dayAndMonth(need.dueOn, today)}. Send it before the next test.`,
        due: ahead(need.dueOn, today),
        urgency: 'later',
        to: paths.instrument.href(need.instrumentId),
      }
    default:
      return testWords(need, today)
  }
}

/** What waits for somebody, as a row says it: what is so, then what to do. */
export function needWords(need: NeedData, today: string): Need {
  const subject = 'proofTestId' in need ? need.proofTestId : 'pressId' in need ? need.pressId : need.instrumentId
  return { id: `${need.kind} ${subject}`, ...words(need, today) }
}
