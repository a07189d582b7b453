import type { CalendarItem } from '#shared/api/calendar'
import type { Letter } from './letter'
import { dayInWords } from './words'

export interface DueThing {
  /** Of the letter’s business key: one letter for a thing and its day. */
  key: string
  kind: 'due-soon' | 'overdue'
  letter: Letter
}

const why = 'It came to you because you own the shop or lead tests there. It comes once for each date.'

/** What an item of the calendar has somebody told on a day (calendar dates); null when it is not the time. */
export function dueThing(item: CalendarItem, today: string): DueThing | null {
  const late = item.on < today
  const on = dayInWords(item.on)
  const kind = late ? 'overdue' : 'due-soon'
  switch (item.kind) {
    case 'calibration':
      return {
        key: `calibration:${item.instrumentId}:${item.on}`,
        kind,
        letter: {
          subject: late ? `${item.code}: calibration is overdue` : `${item.code}: calibration is due on ${on}`,
          blocks: [
            {
              say: late
                ? `The calibration of ${item.instrumentKind.replace('-', ' ')} ${item.code} ran out on ${on}. A proof test read on it from now on gives no clearance.`
                : `The calibration of ${item.instrumentKind.replace('-', ' ')} ${item.code} is due on ${on}. Have it calibrated before then, and enter the certificate.`,
            },
            { go: 'Open the instrument', to: `/instruments/${item.instrumentId}` },
          ],
          why,
        },
      }
    case 'clearance':
      return {
        key: `clearance:${item.pressId}:${item.on}`,
        kind,
        letter: {
          subject: late ? `${item.pressName}: clearance has run out` : `${item.pressName}: clearance ends on ${on}`,
          blocks: [
            {
              say: late
                ? `The clearance of ${item.pressName} ran out on ${on}. Do not use the press until it was examined and tested again. If a tag hangs on it, take it off.`
                : `The clearance of ${item.pressName} ends on ${on}. Plan its examination and proof test before then.`,
            },
            { go: 'Open the press’s page', to: `/presses/${item.pressId}` },
          ],
          why,
        },
      }
    case 'examination':
    case 'retest': {
      // Shut since that day: whoever shut it knows; the letter is for the morning after.
      if (!late) return null
      const wanted = item.kind === 'examination' ? `an examination of ${item.joints}` : `a proof test that repeats ${item.number}`
      return {
        key: `${item.kind}:${item.pressId}:${item.on}`,
        kind,
        letter: {
          subject: `${item.pressName}: waits for ${item.kind === 'examination' ? 'an examination' : 'a repeated test'}`,
          blocks: [
            { say: `${item.pressName} may not be used since ${on}. It waits for ${wanted}.` },
            { go: 'Open the press’s page', to: `/presses/${item.pressId}` },
          ],
          why,
        },
      }
    }
  }
}
