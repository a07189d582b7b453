import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, hashColumn, idColumn, textColumn, timeColumn } from './columns'

export class Ledger extends Model<InferAttributes<Ledger>, InferCreationAttributes<Ledger>> {
  declare id: string
  declare shopId: string
  declare subject: 'proof-test' | 'press'
  declare headSeq: number
  declare headHash: string
  declare createdAt: Date
}

export function initLedger(sequelize: Sequelize): void {
  Ledger.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      subject: textColumn(),
      headSeq: countColumn(),
      headHash: hashColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'ledgers' },
  )
}
