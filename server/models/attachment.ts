import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, hashColumn, idColumn, textColumn, timeColumn } from './columns'

/** A file of a shop whose bytes are in the storage: a row says that they are durable there. */
export class Attachment extends Model<InferAttributes<Attachment>, InferCreationAttributes<Attachment>> {
  declare shopId: string
  declare sha256: string
  declare type: string
  declare size: number
  declare storedAt: Date
}

export function initAttachment(sequelize: Sequelize): void {
  Attachment.init(
    {
      shopId: { ...idColumn(), primaryKey: true },
      sha256: { ...hashColumn(), primaryKey: true },
      type: textColumn(),
      size: countColumn(),
      storedAt: timeColumn(),
    },
    { sequelize, tableName: 'attachments' },
  )
}
