import { ICalCalendar, ICalCalendarMethod } from 'ical-generator'
import type { CalendarItem } from '#shared/api/calendar'
import type { FollowedCalendar } from '../services/calendar'

const instrumentWords = { gauge: 'Gauge', 'load-cell': 'Load cell', indicator: 'Indicator' } as const
const CAUTION = 'A reminder, not a clearance: what a press may carry stands on its page and its tag.'

interface Said {
  /** The same for the same thing, so that a calendar moves an event instead of adding one. */
  subject: string
  summary: string
  path: string
}

function wordsOf(item: CalendarItem): Said {
  switch (item.kind) {
    case 'calibration':
      return {
        subject: `calibration-${item.instrumentId}`,
        summary: `${instrumentWords[item.instrumentKind]} ${item.code}: calibration due`,
        path: `/instruments/${item.instrumentId}`,
      }
    case 'clearance':
      return {
        subject: `clearance-${item.pressId}`,
        summary: `${item.pressName}: clearance ends, examination due`,
        path: `/presses/${item.pressId}`,
      }
    case 'examination':
      return {
        subject: `examination-${item.pressId}`,
        summary: `${item.pressName}: examine ${item.joints}`,
        path: `/presses/${item.pressId}`,
      }
    case 'retest':
      return { subject: `retest-${item.pressId}`, summary: `${item.pressName}: repeat ${item.number}`, path: `/presses/${item.pressId}` }
  }
}

/** A shop's due dates as an iCalendar file (RFC 5545): all-day events, each with an address of its own. */
export function calendarFile({ items, shopId, shopName }: FollowedCalendar, origin: string, now: Date): string {
  const calendar = new ICalCalendar({ name: `${shopName}, presses and instruments`, method: ICalCalendarMethod.PUBLISH, ttl: 3600 })
  calendar.prodId({ company: 'Quarterload', product: 'Quarterload', language: 'EN' })
  for (const item of items) {
    const { subject, summary, path } = wordsOf(item)
    const start = new Date(`${item.on}T00:00:00Z`)
    const end = new Date(start.getTime() + 86_400_000)
    const url = `${origin}${path}`
    const event = calendar.createEvent({ id: `${subject}@${shopId}`, start, end, allDay: true, summary, stamp: now, timezone: null })
    event.url(url)
    event.description(`${url}\n${CAUTION}`)
  }
  return calendar.toString()
}
