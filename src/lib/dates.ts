import type { PrintDates } from '#shared/proof-test/print-dates'

/**
 * Dates as they are read on every screen: "21 Sep 2026", "21 September 2026", "14:27". A calendar date
 * ("2026-09-21") is a day, not a moment, and never shifts with the reader's time zone.
 */
const CALENDAR_DATE = /^(\d{4})-(\d{2})-(\d{2})$/

function partsOf(value: string | Date): { date: Date; timeZone: string | undefined } {
  if (typeof value === 'string') {
    const match = CALENDAR_DATE.exec(value)
    if (match) return { date: new Date(Date.UTC(Number(match[1]), Number(match[2]) - 1, Number(match[3]))), timeZone: 'UTC' }
    return { date: new Date(value), timeZone: undefined }
  }
  return { date: value, timeZone: undefined }
}

function format(value: string | Date, options: Intl.DateTimeFormatOptions): string {
  const { date, timeZone } = partsOf(value)
  return new Intl.DateTimeFormat('en-GB', { ...options, timeZone }).format(date)
}

const short: Intl.DateTimeFormatOptions = { day: 'numeric', month: 'short', year: 'numeric' }

/** "21 Sep 2026". */
export function shortDate(value: string | Date): string {
  // British English writes September with four letters; three keep columns even.
  return format(value, short).replace('Sept', 'Sep')
}

/** "21 September 2026". */
export function longDate(value: string | Date): string {
  return format(value, { day: 'numeric', month: 'long', year: 'numeric' })
}

/** "Mon 21 September". */
export function weekday(value: string | Date): string {
  return format(value, { weekday: 'short', day: 'numeric', month: 'long' }).replace(',', '')
}

/** "14:27", or "14:27:36". */
export function clockTime(value: string | Date, options: { seconds?: boolean } = {}): string {
  return format(value, { hour: '2-digit', minute: '2-digit', second: options.seconds ? '2-digit' : undefined, hour12: false })
}

/** "21 Sep 2026, 14:27". */
export function dateAndTime(value: string | Date): string {
  return `${shortDate(value)}, ${clockTime(value)}`
}

/** The calendar date of a moment where the reader is: "2026-09-21". */
export function calendarDate(moment: Date): string {
  const two = (part: number) => String(part).padStart(2, '0')
  return `${moment.getFullYear()}-${two(moment.getMonth() + 1)}-${two(moment.getDate())}`
}

/** Whole days from one calendar date to another; negative when the second lies before. */
export function daysBetween(from: string, to: string): number {
  return Math.round((partsOf(to).date.getTime() - partsOf(from).date.getTime()) / 86_400_000)
}

/** The same for words that a record makes: days and moments where the reader is. */
export const LOCAL_DATES: PrintDates = { shortDate, longDate, clockTime, dateAndTime }
