import type { MailKind, MailRow, MailState } from '#shared/api/mail'
import type { MarkName } from '../../components/marks'
import { clockTime, shortDate } from '../../lib/dates'

export const kindWords: Record<MailKind, string> = {
  invitation: 'Invitation',
  'countersignature-wanted': 'Countersignature wanted',
  'record-sealed': 'Record and its seal',
  declined: 'Countersignature declined',
  'clearance-given': 'Clearance given',
  'clearance-ended': 'Clearance ended',
  'due-soon': 'Due soon',
  overdue: 'Overdue',
  'password-changed': 'Password changed',
  'password-reset': 'Forgotten password',
}

export const stateMarks: Record<MailState, MarkName> = { queued: 'clock', sending: 'now', sent: 'within', dead: 'stop' }

/** "sent", or "kept here" where there is no mail server to send by. */
export function stateWord({ state, attempts }: Pick<MailRow, 'state' | 'attempts'>, isTray: boolean): string {
  switch (state) {
    case 'queued':
      return attempts === 0 ? 'waits' : `not taken, ${attempts} ${attempts === 1 ? 'try' : 'tries'}`
    case 'sending':
      return 'being sent'
    case 'sent':
      return isTray ? 'kept here' : 'sent'
    case 'dead':
      return 'given up'
  }
}

export const whenWords = (moment: string): string => `${shortDate(moment)}, ${clockTime(moment)}`
