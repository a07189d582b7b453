/** How moments and days are written on a record: the reader's own zone on a screen, UTC on paper. */
export interface PrintDates {
  /** "21 Sep 2026". */
  shortDate(value: string): string
  /** "21 September 2026". */
  longDate(value: string): string
  /** "14:27". */
  clockTime(value: string): string
  /** "21 Sep 2026, 14:27". */
  dateAndTime(value: string): string
}

const utc = (options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat => new Intl.DateTimeFormat('en-GB', { ...options, timeZone: 'UTC' })
const SHORT = utc({ day: 'numeric', month: 'short', year: 'numeric' })
const LONG = utc({ day: 'numeric', month: 'long', year: 'numeric' })
const CLOCK = utc({ hour: '2-digit', minute: '2-digit', hour12: false })

// British English writes September with four letters; three keep columns even.
const shortDate = (value: string): string => SHORT.format(new Date(value)).replace('Sept', 'Sep')
const clockTime = (value: string): string => CLOCK.format(new Date(value))

/** Days and moments in UTC, the same wherever and whenever they are printed. Takes ISO days or moments. */
export const UTC_DATES: PrintDates = {
  shortDate,
  longDate: (value) => LONG.format(new Date(value)),
  clockTime,
  dateAndTime: (value) => `${shortDate(value)}, ${clockTime(value)}`,
}
