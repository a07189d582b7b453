import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, idColumn, optionalTimeColumn, textColumn, timeColumn } from './columns'

export class Protocol extends Model<InferAttributes<Protocol>, InferCreationAttributes<Protocol>> {
  declare id: string
  declare shopId: string
  declare name: string
  declare currentVersion: number
  declare archivedAt: CreationOptional<Date | null>
  declare createdAt: Date
}

export function initProtocol(sequelize: Sequelize): void {
  Protocol.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      name: textColumn(),
      currentVersion: countColumn(),
      archivedAt: optionalTimeColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'protocols' },
  )
}
