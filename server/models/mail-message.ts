import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import type { MailKind, MailState } from '#shared/api/mail'
import { countColumn, idColumn, optionalIdColumn, optionalTextColumn, optionalTimeColumn, textColumn, timeColumn } from './columns'

export class MailMessage extends Model<InferAttributes<MailMessage>, InferCreationAttributes<MailMessage>> {
  declare id: string
  declare shopId: string | null
  declare businessKey: string
  declare kind: MailKind
  declare userId: string | null
  declare recipient: string
  declare subject: string
  declare text: string
  declare html: string
  declare secret: string | null
  declare messageId: string | null
  declare state: MailState
  declare attempts: number
  /** The server that is sending it, and until when it is believed to be. */
  declare leaseHolder: CreationOptional<string | null>
  declare leaseUntil: CreationOptional<Date | null>
  declare nextAt: Date
  declare lastError: string | null
  declare createdAt: Date
  declare sentAt: Date | null
}

export function initMailMessage(sequelize: Sequelize): void {
  MailMessage.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: optionalIdColumn(),
      businessKey: textColumn(),
      kind: textColumn(),
      userId: optionalIdColumn(),
      recipient: textColumn(),
      subject: textColumn(),
      text: textColumn(),
      html: textColumn(),
      secret: optionalTextColumn(),
      messageId: optionalTextColumn(),
      state: textColumn(),
      attempts: countColumn(),
      leaseHolder: optionalIdColumn(),
      leaseUntil: optionalTimeColumn(),
      nextAt: timeColumn(),
      lastError: optionalTextColumn(),
      createdAt: timeColumn(),
      sentAt: optionalTimeColumn(),
    },
    { sequelize, tableName: 'mail_messages' },
  )
}
