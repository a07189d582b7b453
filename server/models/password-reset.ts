import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { hashColumn, idColumn, optionalTimeColumn, timeColumn } from './columns'

export class PasswordReset extends Model<InferAttributes<PasswordReset>, InferCreationAttributes<PasswordReset>> {
  declare id: string
  declare userId: string
  declare tokenHash: string
  declare createdAt: Date
  declare expiresAt: Date
  declare usedAt: CreationOptional<Date | null>
}

export function initPasswordReset(sequelize: Sequelize): void {
  PasswordReset.init(
    {
      id: { ...idColumn(), primaryKey: true },
      userId: idColumn(),
      tokenHash: hashColumn(),
      createdAt: timeColumn(),
      expiresAt: timeColumn(),
      usedAt: optionalTimeColumn(),
    },
    { sequelize, tableName: 'password_resets' },
  )
}
