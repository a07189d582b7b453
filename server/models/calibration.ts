import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { dayColumn, idColumn, jsonColumn, textColumn, timeColumn } from './columns'

export class Calibration extends Model<InferAttributes<Calibration>, InferCreationAttributes<Calibration>> {
  declare id: string
  declare shopId: string
  declare instrumentId: string
  declare calibratedOn: string
  declare dueOn: string
  declare certificate: string
  declare comparedWith: string
  declare result: string
  declare details: unknown
  declare createdBy: string
  declare createdAt: Date
}

export function initCalibration(sequelize: Sequelize): void {
  Calibration.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      instrumentId: idColumn(),
      calibratedOn: dayColumn(),
      dueOn: dayColumn(),
      certificate: textColumn(),
      comparedWith: textColumn(),
      result: textColumn(),
      details: jsonColumn(),
      createdBy: idColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'calibrations' },
  )
}
