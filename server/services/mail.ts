import type { Transaction } from 'sequelize'
import type { MailListQuery } from '#shared/api/mail'
import type { Work } from '../context'
import { MailMessage } from '../models'
import { conflict, notFound } from '../problem'
import { equals, keysetPage, type KeysetPage } from './keyset'
import { authorize } from './membership'

export type MailRecord = Pick<
  MailMessage,
  'id' | 'shopId' | 'kind' | 'recipient' | 'subject' | 'state' | 'attempts' | 'lastError' | 'createdAt' | 'sentAt' | 'nextAt'
>
export type WholeMail = MailRecord & Pick<MailMessage, 'messageId' | 'text' | 'html' | 'secret'>

const columns: Record<keyof MailRecord, string> = {
  id: 'id',
  shopId: 'shop_id',
  kind: 'kind',
  recipient: 'recipient',
  subject: 'subject',
  state: 'state',
  attempts: 'attempts',
  lastError: 'last_error',
  createdAt: 'created_at',
  sentAt: 'sent_at',
  nextAt: 'next_at',
}

/** The shop's letters, the newest first. */
export async function listMail({ transaction, actor }: Work, query: MailListQuery): Promise<KeysetPage<MailRecord>> {
  authorize(actor, 'mail:read', { shopId: actor.shopId })
  return keysetPage<MailRecord>({
    model: MailMessage,
    transaction,
    shopId: actor.shopId,
    columns,
    conditions: equals('state', query.state),
    sort: { column: 'created_at', descending: true },
    cursor: query.cursor,
    limit: 25,
  })
}

export async function shopOfMail(id: string, transaction: Transaction): Promise<string | undefined> {
  const mail = await MailMessage.findOne({ where: { id }, attributes: ['shopId'], raw: true, transaction })
  return mail?.shopId ?? undefined
}

export async function readMail({ transaction, actor }: Work, id: string): Promise<WholeMail> {
  const { shopId } = actor
  authorize(actor, 'mail:read', { shopId })
  const mail = await MailMessage.findOne({ where: { id, shopId }, raw: true, transaction })
  if (mail === null) throw notFound('This letter')
  return mail
}

/** Queues a letter again that was given up, with all its tries. */
export async function retryMail(work: Work, id: string): Promise<WholeMail> {
  const { transaction, actor, now } = work
  await readMail(work, id)
  const [changed] = await MailMessage.update(
    { state: 'queued', attempts: 0, nextAt: now },
    { where: { id, shopId: actor.shopId, state: 'dead' }, transaction },
  )
  if (changed === 0) throw conflict('not-dead', 'This letter was not given up: it is sent, or waits to be tried.')
  return readMail(work, id)
}
