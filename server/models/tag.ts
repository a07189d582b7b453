import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn, textColumn, timeColumn } from './columns'

export class Tag extends Model<InferAttributes<Tag>, InferCreationAttributes<Tag>> {
  declare code: string
  declare shopId: string
  declare pressId: string
  declare createdAt: Date
}

export function initTag(sequelize: Sequelize): void {
  Tag.init(
    { code: { ...textColumn(), primaryKey: true }, shopId: idColumn(), pressId: idColumn(), createdAt: timeColumn() },
    { sequelize, tableName: 'tags' },
  )
}
