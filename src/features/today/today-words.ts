import type { Due, TodayPress, UnderWay as UnderWayData } from '#shared/api/today'
import { typedWords } from '#shared/instruments/words'
import { answerOfRow } from '#shared/press/may-it-be-used'
import { formatNumber, FORCE_DECIMALS, toSI, toUnit, unitLabel, type TypedForce } from '#shared/units'
import type { LadderStage } from '../../components/instruments/load-ladder'
import { clockTime, shortDate } from '../../lib/dates'
import { paths } from '../../paths'
import type { CalendarEvent } from './components/calendar'
import type { PressUse } from './components/today-view'
import type { UnderWay } from './components/under-way-plate'

/** The load of a stage as short as it can be written exactly: "5 long tons", "7.5 short tons". */
function stageLoad(rated: TypedForce, percent: number): string {
  const value = toUnit((toSI(rated) * percent) / 100, rated.unit)
  const decimals = [0, 1, 2].find((count) => Math.abs(value - Number(value.toFixed(count))) < 1e-9) ?? FORCE_DECIMALS[rated.unit]
  return `${formatNumber(value, decimals)} ${unitLabel(rated.unit, { plural: value !== 1 })}`
}

function heldFor(seconds: number): string {
  return seconds % 60 === 0 ? `holding ${seconds / 60} min` : `holding ${seconds} s`
}

const MINUTE = 60_000

function minutesSince(at: string | null, now: Date): string {
  if (at === null) return ''
  const minutes = Math.max(0, Math.round((now.getTime() - Date.parse(at)) / MINUTE))
  if (minutes > 60) return 'over an hour'
  return minutes === 0 ? 'less than a minute' : `${minutes} min`
}

type Rung = UnderWayData['climb']['rungs'][number]

function note(rung: Rung): string {
  switch (rung.state) {
    case 'to-come':
      return 'to come'
    case 'now':
      return rung.at === null ? 'pumping up' : heldFor(rung.holdSeconds)
    case 'waiting':
      return 'wait'
    case 'went-on':
      return rung.at === null ? 'went on' : `went on ${clockTime(rung.at)}`
    case 'stopped':
      return 'stopped'
  }
}

function ladder({ test, climb }: UnderWayData): LadderStage[] {
  const datum: LadderStage = {
    percent: 0,
    label: '0',
    load: 'datum',
    note: climb.datumAt === null ? 'to come' : clockTime(climb.datumAt),
    state: climb.datumAt === null ? 'to-come' : 'datum',
  }
  const rungs = climb.rungs.map((rung): LadderStage => ({
    percent: rung.percent,
    label: `${rung.percent} %`,
    load: stageLoad(test.ratedLoad, rung.percent),
    note: note(rung),
    state: rung.state,
  }))
  return [datum, ...rungs]
}

/** "Press 1": a test keeps the press's name with what it is for, as they were when it opened. */
function nameOnly({ test, whatFor }: UnderWayData): string {
  const tail = `, ${whatFor}`
  return whatFor !== '' && test.pressName.endsWith(tail) ? test.pressName.slice(0, -tail.length) : test.pressName
}

/** What the title says on one line, for the phone. */
function inShort(one: UnderWayData, now: Date): string {
  const { climb } = one
  const name = nameOnly(one)
  const live = climb.rungs.find((rung) => rung.state === 'now' || rung.state === 'waiting' || rung.state === 'stopped')
  if (live === undefined) return climb.loaded ? `${name}, under load` : `${name}, not loaded`
  if (live.state === 'stopped') return `${name}, stopped at ${live.percent}\u202f%`
  const since = minutesSince(live.at, now)
  return `${name}, at ${live.percent}\u202f%${since === '' ? '' : ` for ${since}`}`
}

/** A test under way, as its plate shows it to this person: lead and pump hand go on, the witness attends, others look. */
export function underWayWords(one: UnderWayData, userId: string, now: Date): UnderWay {
  const { test, whatFor } = one
  const action =
    test.leadId === userId || one.pumpHandId === userId
      ? { label: 'Go on with the test', to: paths.runProofTest.href(test.id) }
      : test.witnessId === userId
        ? { label: 'Attend the test', to: paths.attendProofTest.href(test.id) }
        : { label: 'Watch the test', to: paths.proofTest.href(test.id) }
  return {
    id: test.id,
    press: [nameOnly(one), whatFor].filter(Boolean).join(', '),
    short: inShort(one, now),
    test: `${test.protocolName}, ${test.number}`,
    people: `${test.leadName} leads, ${test.witnessName} witnesses`,
    stages: ladder(one),
    levelPercent: one.climb.levelPercent,
    action,
  }
}

const reasons = {
  overdue: 'overdue',
  'being built': 'being built',
  'not tested': 'never tested',
  suspended: 'suspended',
  withdrawn: 'withdrawn',
} as const

function usability({ press, test }: TodayPress, today: string): Pick<PressUse, 'mark' | 'use' | 'note'> {
  if (test && test.status !== 'under way') {
    const missing = test.status === 'concluded' ? 'signature missing' : 'countersignature missing'
    return { mark: 'stop', use: 'do not use', note: missing }
  }
  const answer = answerOfRow(press, today)
  switch (answer.answer) {
    case 'cleared':
      return {
        mark: 'within',
        use: press.clearedTo ? `Cleared up to ${typedWords(press.clearedTo).replaceAll(' ', '\u00a0')}` : 'Cleared',
        note: press.clearedUntil === null ? '' : `until ${shortDate(press.clearedUntil)}`,
      }
    case 'under test':
      return { mark: 'under-way', use: 'under test', note: `${typedWords(press.ratedLoad)} planned` }
    case 'do not use':
      return { mark: 'stop', use: 'do not use', note: reasons[answer.why] }
  }
}

export function pressWords(one: TodayPress, today: string): PressUse {
  const { press } = one
  return { id: press.id, name: press.name, kind: press.whatFor, to: paths.press.href(press.id), ...usability(one, today) }
}

const plural = { gauge: 'Gauges', 'load-cell': 'Load cells', indicator: 'Indicators' } as const
const singular = { gauge: 'Gauge', 'load-cell': 'Load cell', indicator: 'Indicator' } as const

type CalibrationDue = Extract<Due, { kind: 'calibration' }>

/** Instruments of one kind that fall due on one day are one event: "Indicators I-04 to I-06". */
function calibrations(due: readonly CalibrationDue[], shopId: string): CalendarEvent {
  const codes = due.map(({ code }) => code).sort((a, b) => a.localeCompare(b, 'en', { numeric: true }))
  const [one] = due
  const [first, last] = [codes[0] ?? '', codes.at(-1) ?? '']
  const kind = one?.instrumentKind ?? 'gauge'
  const date = one?.on ?? ''
  if (one && due.length === 1)
    return { date, label: `${singular[kind]} ${first}, calibration`, to: paths.instrument.href(one.instrumentId) }
  const label = `${plural[kind]} ${due.length === 2 ? `${first} and ${last}` : `${first} to ${last}`}`
  return { date, label, to: paths.instruments.href({ shop: shopId, sort: 'due' }) }
}

/** What falls due, as the scale of the next weeks shows it. */
export function eventsOf(due: readonly Due[], shopId: string): CalendarEvent[] {
  const groups = new Map<string, CalibrationDue[]>()
  const events: CalendarEvent[] = []
  for (const one of due) {
    if (one.kind === 'clearance') {
      events.push({ date: one.on, label: `${one.pressName}, examination`, to: paths.press.href(one.pressId) })
      continue
    }
    const key = `${one.on} ${one.instrumentKind}`
    groups.set(key, [...(groups.get(key) ?? []), one])
  }
  return [...events, ...[...groups.values()].map((group) => calibrations(group, shopId))]
}
