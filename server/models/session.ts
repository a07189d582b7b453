import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn, optionalTimeColumn, textColumn, timeColumn } from './columns'

export class Session extends Model<InferAttributes<Session>, InferCreationAttributes<Session>> {
  declare id: string
  declare userId: string
  declare userAgent: string
  declare createdAt: Date
  declare lastSeenAt: Date
  declare expiresAt: Date
  declare endedAt: CreationOptional<Date | null>
}

export function initSession(sequelize: Sequelize): void {
  Session.init(
    {
      id: { ...idColumn(), primaryKey: true },
      userId: idColumn(),
      userAgent: textColumn(),
      createdAt: timeColumn(),
      lastSeenAt: timeColumn(),
      expiresAt: timeColumn(),
      endedAt: optionalTimeColumn(),
    },
    { sequelize, tableName: 'sessions' },
  )
}
