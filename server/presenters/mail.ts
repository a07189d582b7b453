import type { MailList, MailResponse, MailRow } from '#shared/api/mail'
import { fillIn } from '../mail/letter'
import type { KeysetPage } from '../services/keyset'
import type { MailRecord, WholeMail } from '../services/mail'

interface Where {
  /** Letters stay here, so that their links must be read here. */
  isTray: boolean
  origin: string
}

function presentRow({ id, kind, recipient, subject, state, attempts, lastError, createdAt, sentAt, nextAt }: MailRecord): MailRow {
  return {
    id,
    kind,
    to: recipient,
    subject,
    state,
    attempts,
    lastError,
    createdAt: createdAt.toISOString(),
    sentAt: sentAt?.toISOString() ?? null,
    nextAt: state === 'queued' ? nextAt.toISOString() : null,
  }
}

export function presentMailList({ rows, older }: KeysetPage<MailRecord>, isTray: boolean): MailList {
  return { isTray, mail: rows.map(presentRow), older }
}

/** With a mail server the link is only in the letter that was sent: an owner can't open somebody else's account by it. */
export function presentMail(mail: WholeMail, { isTray, origin }: Where): MailResponse {
  const filling = { origin, secret: isTray ? mail.secret : null }
  return {
    shopId: mail.shopId ?? '',
    isTray,
    mail: { ...presentRow(mail), messageId: mail.messageId, text: fillIn(mail.text, filling), html: fillIn(mail.html, filling) },
  }
}
