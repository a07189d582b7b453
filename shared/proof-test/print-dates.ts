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

function utc(value: string, options: Intl.DateTimeFormatOptions): string {
  return new Intl.DateTimeFormat('en-GB', { ...options, timeZone: 'UTC' }).format(new Date(value))
}

// British English writes September with four letters; three keep columns even.
const shortDate = (value: string): string => utc(value, { day: 'numeric', month: 'short', year: 'numeric' }).replace('Sept', 'Sep')
const clockTime = (value: string): string => utc(value, { hour: '2-digit', minute: '2-digit', hour12: false })

/** Days and moments in UTC, the same wherever and whenever they are printed. Takes ISO days or moments. */
export const UTC_DATES: PrintDates = {
  shortDate,
  longDate: (value) => utc(value, { day: 'numeric', month: 'long', year: 'numeric' }),
  clockTime,
  dateAndTime: (value) => `${shortDate(value)}, ${clockTime(value)}`,
}
