import { QueryTypes } from 'sequelize'
import type { Sequelize, Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { MailKind } from '#shared/api/mail'
import { writeLetter, type Letter } from './letter'

export interface Queueing {
  database: Sequelize
  transaction: Transaction
  now: Date
}

export interface Recipient {
  /** null for somebody who has no account yet. */
  userId: string | null
  email: string
}

export interface Outgoing {
  kind: MailKind
  /** null for letters about an account that no single shop may read. */
  shopId: string | null
  /** What happened, named so that it makes one letter to each person however often it is looked at. */
  key: string
  to: Recipient
  letter: Letter
  /** Put into the letter's link when it is sent; forgotten once a mail server has it. */
  secret?: string
}

/** Queues a letter in the transaction of what caused it. One with the same key to the same person is queued already. */
export async function queueMail({ database, transaction, now }: Queueing, mail: Outgoing): Promise<void> {
  const { subject, text, html } = writeLetter(mail.letter)
  await database.query(
    `INSERT IGNORE INTO mail_messages
       (id, shop_id, business_key, kind, user_id, recipient, subject, text, html, secret, state, attempts, next_at, created_at)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, 'queued', 0, ?, ?)`,
    {
      replacements: [
        newId(),
        mail.shopId,
        `${mail.kind}:${mail.key}:${mail.to.userId ?? 'new'}`,
        mail.kind,
        mail.to.userId,
        mail.to.email,
        subject,
        text,
        html,
        mail.secret ?? null,
        now,
        now,
      ],
      type: QueryTypes.INSERT,
      transaction,
    },
  )
}
