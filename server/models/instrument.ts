import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn, jsonColumn, optionalDayColumn, optionalTimeColumn, textColumn, timeColumn } from './columns'

export class Instrument extends Model<InferAttributes<Instrument>, InferCreationAttributes<Instrument>> {
  declare id: string
  declare shopId: string
  declare code: string
  declare kind: 'gauge' | 'load-cell' | 'indicator'
  declare description: string
  declare details: unknown
  /** When the calibration in force falls due; null when it never had one. */
  declare dueOn: CreationOptional<string | null>
  declare retiredAt: CreationOptional<Date | null>
  declare createdAt: Date
}

export function initInstrument(sequelize: Sequelize): void {
  Instrument.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      code: textColumn(),
      kind: textColumn(),
      description: textColumn(),
      details: jsonColumn(),
      dueOn: optionalDayColumn(),
      retiredAt: optionalTimeColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'instruments' },
  )
}
