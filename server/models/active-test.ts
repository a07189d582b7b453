import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn } from './columns'

export class ActiveTest extends Model<InferAttributes<ActiveTest>, InferCreationAttributes<ActiveTest>> {
  declare pressId: string
  declare shopId: string
  declare proofTestId: string
}

export function initActiveTest(sequelize: Sequelize): void {
  ActiveTest.init(
    {
      pressId: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      proofTestId: idColumn(),
    },
    { sequelize, tableName: 'active_tests' },
  )
}
