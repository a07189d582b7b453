import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import type { Role } from '#shared/policy'
import { idColumn, optionalTimeColumn, textColumn, timeColumn } from './columns'

export class Membership extends Model<InferAttributes<Membership>, InferCreationAttributes<Membership>> {
  declare shopId: string
  declare userId: string
  declare role: Role
  declare createdAt: Date
  declare endedAt: CreationOptional<Date | null>
}

export function initMembership(sequelize: Sequelize): void {
  Membership.init(
    {
      shopId: { ...idColumn(), primaryKey: true },
      userId: { ...idColumn(), primaryKey: true },
      role: textColumn(),
      createdAt: timeColumn(),
      endedAt: optionalTimeColumn(),
    },
    { sequelize, tableName: 'memberships' },
  )
}
