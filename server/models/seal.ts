import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, hashColumn, idColumn, textColumn, timeColumn } from './columns'

export class Seal extends Model<InferAttributes<Seal>, InferCreationAttributes<Seal>> {
  declare id: string
  declare shopId: string
  declare ledgerId: string
  declare seq: number
  declare headHash: string
  declare kid: string
  declare signature: string
  declare entryId: string
  declare sealedAt: Date
}

export function initSeal(sequelize: Sequelize): void {
  Seal.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      ledgerId: idColumn(),
      seq: countColumn(),
      headHash: hashColumn(),
      kid: textColumn(),
      signature: textColumn(),
      entryId: idColumn(),
      sealedAt: timeColumn(),
    },
    { sequelize, tableName: 'seals' },
  )
}
