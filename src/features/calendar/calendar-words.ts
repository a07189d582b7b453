import type { CalendarItem } from '#shared/api/calendar'
import type { MarkName } from '../../components/marks'
import { daysBetween, longDate } from '../../lib/dates'
import { paths } from '../../paths'

export interface DueRow {
  id: string
  on: string
  mark: MarkName
  title: string
  note: string
  /** "12 days late", "in 3 days"; for what has no day of its own, since when it waits. */
  due: string
  late: boolean
  to: string
}

export interface Month {
  /** "2027-03". */
  id: string
  /** "March 2027". */
  name: string
  rows: DueRow[]
}

const instrumentWords = { gauge: 'Gauge', 'load-cell': 'Load cell', indicator: 'Indicator' } as const
const days = (count: number): string => (count === 1 ? '1 day' : `${count} days`)

/** What falls due by its day; the other two wait for somebody from their day on. */
function dueWords(item: CalendarItem, today: string): { due: string; late: boolean } {
  const ahead = daysBetween(today, item.on)
  if (item.kind === 'examination' || item.kind === 'retest')
    return { due: ahead === 0 ? 'since today' : `waiting ${days(-ahead)}`, late: true }
  if (ahead < 0) return { due: `${days(-ahead)} late`, late: true }
  return { due: ahead === 0 ? 'today' : `in ${days(ahead)}`, late: false }
}

function subjectWords(item: CalendarItem, late: boolean): Pick<DueRow, 'id' | 'mark' | 'title' | 'note' | 'to'> {
  const clock: MarkName = late ? 'clock-late' : 'clock'
  switch (item.kind) {
    case 'calibration':
      return {
        id: `calibration ${item.instrumentId}`,
        mark: clock,
        title: `${instrumentWords[item.instrumentKind]} ${item.code}, calibration`,
        note: late ? 'It blocks any new test.' : 'From the day after it blocks any new test.',
        to: paths.instrument.href(item.instrumentId),
      }
    case 'clearance':
      return {
        id: `clearance ${item.pressId}`,
        mark: clock,
        title: `${item.pressName}, examination`,
        note: late ? 'Its clearance has run out: it may not be used.' : 'Its clearance runs until that day, and ends with it.',
        to: paths.press.href(item.pressId),
      }
    case 'examination':
      return {
        id: `examination ${item.pressId}`,
        mark: 'undecided',
        title: `${item.pressName}, examine ${item.joints}`,
        note: 'Its clearance waits for them.',
        to: `${paths.press.href(item.pressId)}#joints`,
      }
    case 'retest':
      return {
        id: `retest ${item.pressId}`,
        mark: 'stop',
        title: `${item.pressName}, repeat ${item.number}`,
        note: 'It may not be used before.',
        to: paths.press.href(item.pressId),
      }
  }
}

const monthName = (id: string): string => longDate(`${id}-01`).replace(/^1 /, '')

/** The month so many after another: "2026-12" and 1 are "2027-01". */
export function monthAfter(id: string, count: number): string {
  const [year = 0, month = 1] = id.split('-').map(Number)
  return new Date(Date.UTC(year, month - 1 + count, 1)).toISOString().slice(0, 7)
}

/** What is late and still open, the longest first, and then every month ahead with what falls due in it, empty ones too. */
export function monthsOf(items: readonly CalendarItem[], today: string, count: number): { late: DueRow[]; months: Month[] } {
  const rows = [...items]
    .sort((a, b) => a.on.localeCompare(b.on))
    .map((item): DueRow => {
      const { due, late } = dueWords(item, today)
      return { ...subjectWords(item, late), on: item.on, due, late }
    })
  const months = Array.from({ length: count }, (_, ahead): Month => {
    const id = monthAfter(today.slice(0, 7), ahead)
    return { id, name: monthName(id), rows: rows.filter((row) => !row.late && row.on.startsWith(id)) }
  })
  return { late: rows.filter((row) => row.late), months }
}
