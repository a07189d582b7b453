import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, idColumn, optionalDayColumn, optionalNumberColumn, optionalTextColumn, textColumn, timeColumn } from './columns'

export class Press extends Model<InferAttributes<Press>, InferCreationAttributes<Press>> {
  declare id: string
  declare shopId: string
  declare name: string
  declare whatFor: string
  declare kind: string
  declare status: string
  declare ratedLoadNewton: CreationOptional<number | null>
  declare ratedLoadText: CreationOptional<string | null>
  declare ratedLoadUnit: CreationOptional<string | null>
  declare clearedToNewton: CreationOptional<number | null>
  declare clearedToText: CreationOptional<string | null>
  declare clearedToUnit: CreationOptional<string | null>
  declare clearedUntil: CreationOptional<string | null>
  declare jointCount: number
  declare jointsAccepted: number
  declare lastChangedAt: Date
  declare headSeq: number
}

export function initPress(sequelize: Sequelize): void {
  Press.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      name: textColumn(),
      whatFor: textColumn(),
      kind: textColumn(),
      status: textColumn(),
      ratedLoadNewton: optionalNumberColumn(),
      ratedLoadText: optionalTextColumn(),
      ratedLoadUnit: optionalTextColumn(),
      clearedToNewton: optionalNumberColumn(),
      clearedToText: optionalTextColumn(),
      clearedToUnit: optionalTextColumn(),
      clearedUntil: optionalDayColumn(),
      jointCount: countColumn(),
      jointsAccepted: countColumn(),
      lastChangedAt: timeColumn(),
      headSeq: countColumn(),
    },
    { sequelize, tableName: 'presses' },
  )
}
