import type { PressRow } from '#shared/api/presses'
import { answerOfRow, type RowAnswer } from '#shared/press/may-it-be-used'
import { typedWords } from '#shared/instruments/words'
import type { MarkName } from '../../../components/marks'
import { shortDate } from '../../../lib/dates'

const reasons: Record<Extract<RowAnswer, { answer: 'do not use' }>['why'], string> = {
  overdue: 'overdue',
  'being built': 'being built',
  'not tested': 'never tested',
  suspended: 'suspended',
  withdrawn: 'withdrawn',
}

/** "11.7 short tons" on one line. */
const unbroken = (text: string): string => text.replaceAll(' ', '\u00a0')

export interface PressUse {
  mark: MarkName
  use: string
  note: string
}

/** May it be used, to what, until when: a shape, a word and a reason. */
export function pressUse(row: PressRow, today: string): PressUse {
  const answer = answerOfRow(row, today)
  switch (answer.answer) {
    case 'cleared':
      return {
        mark: 'within',
        use: row.clearedTo ? `Cleared up to ${unbroken(typedWords(row.clearedTo))}` : 'Cleared',
        note: row.clearedUntil ? `until ${shortDate(row.clearedUntil)}` : '',
      }
    case 'under test':
      return { mark: 'under-way', use: 'under test', note: `${typedWords(row.ratedLoad)} planned` }
    case 'do not use':
      return {
        mark: 'stop',
        use: 'do not use',
        note: answer.why === 'overdue' && row.clearedUntil ? `ran until ${shortDate(row.clearedUntil)}` : reasons[answer.why],
      }
  }
}
