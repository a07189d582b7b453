import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, idColumn, jsonColumn, timeColumn } from './columns'

export class ProtocolVersion extends Model<InferAttributes<ProtocolVersion>, InferCreationAttributes<ProtocolVersion>> {
  declare shopId: string
  declare protocolId: string
  declare version: number
  declare content: unknown
  declare createdBy: string
  declare createdAt: Date
}

export function initProtocolVersion(sequelize: Sequelize): void {
  ProtocolVersion.init(
    {
      shopId: idColumn(),
      protocolId: { ...idColumn(), primaryKey: true },
      version: { ...countColumn(), primaryKey: true },
      content: jsonColumn(),
      createdBy: idColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'protocol_versions' },
  )
}
