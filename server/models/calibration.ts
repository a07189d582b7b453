import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import {
  dayColumn,
  idColumn,
  jsonColumn,
  optionalCountColumn,
  optionalHashColumn,
  optionalTextColumn,
  textColumn,
  timeColumn,
} from './columns'

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
  /** The certificate's file, when there is one: all four together. */
  declare fileSha256: CreationOptional<string | null>
  declare fileType: CreationOptional<string | null>
  declare fileSize: CreationOptional<number | null>
  declare fileName: CreationOptional<string | null>
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
      fileSha256: optionalHashColumn(),
      fileType: optionalTextColumn(),
      fileSize: optionalCountColumn(),
      fileName: optionalTextColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'calibrations' },
  )
}
