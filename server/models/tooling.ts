import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn, jsonColumn, optionalTimeColumn, textColumn, timeColumn } from './columns'

export class Tooling extends Model<InferAttributes<Tooling>, InferCreationAttributes<Tooling>> {
  declare id: string
  declare shopId: string
  declare code: string
  declare name: string
  declare details: unknown
  declare retiredAt: CreationOptional<Date | null>
  declare createdAt: Date
}

export function initTooling(sequelize: Sequelize): void {
  Tooling.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      code: textColumn(),
      name: textColumn(),
      details: jsonColumn(),
      retiredAt: optionalTimeColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'tooling' },
  )
}
