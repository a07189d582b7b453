import { DataTypes, Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { countColumn, hashColumn, idColumn, textColumn, timeColumn } from './columns'

export class LedgerEntry extends Model<InferAttributes<LedgerEntry>, InferCreationAttributes<LedgerEntry>> {
  declare ledgerId: string
  declare seq: number
  declare shopId: string
  declare id: string
  declare kind: string
  declare canonical: string
  declare prevHash: string
  declare hash: string
  declare authorId: string
  declare observedAt: Date
  declare receivedAt: Date
  declare irregular: boolean
}

export function initLedgerEntry(sequelize: Sequelize): void {
  LedgerEntry.init(
    {
      ledgerId: { ...idColumn(), primaryKey: true },
      seq: { ...countColumn(), primaryKey: true },
      shopId: idColumn(),
      id: idColumn(),
      kind: textColumn(),
      canonical: textColumn(),
      prevHash: hashColumn(),
      hash: hashColumn(),
      authorId: idColumn(),
      observedAt: timeColumn(),
      receivedAt: timeColumn(),
      irregular: { type: DataTypes.BOOLEAN, allowNull: false },
    },
    { sequelize, tableName: 'ledger_entries' },
  )
}
