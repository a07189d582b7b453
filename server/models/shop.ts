import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, idColumn, textColumn, timeColumn } from './columns'

export class Shop extends Model<InferAttributes<Shop>, InferCreationAttributes<Shop>> {
  declare id: string
  declare name: string
  declare forceUnit: string
  declare pressureUnit: string
  declare lengthUnit: string
  declare buildPauseDays: number
  declare walkDownHours: number
  declare createdAt: Date
}

export function initShop(sequelize: Sequelize): void {
  Shop.init(
    {
      id: { ...idColumn(), primaryKey: true },
      name: textColumn(),
      forceUnit: textColumn(),
      pressureUnit: textColumn(),
      lengthUnit: textColumn(),
      buildPauseDays: countColumn(),
      walkDownHours: countColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'shops' },
  )
}
