import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn, optionalIdColumn, optionalTimeColumn, timeColumn } from './columns'

/** Somebody from outside who accepted to witness one test: the next of a press, and that one only once it is open. */
export class TestGuest extends Model<InferAttributes<TestGuest>, InferCreationAttributes<TestGuest>> {
  declare id: string
  declare shopId: string
  declare invitationId: string
  declare userId: string
  declare pressId: string
  declare proofTestId: CreationOptional<string | null>
  declare createdAt: Date
  declare endedAt: CreationOptional<Date | null>
}

export function initTestGuest(sequelize: Sequelize): void {
  TestGuest.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      invitationId: idColumn(),
      userId: idColumn(),
      pressId: idColumn(),
      proofTestId: optionalIdColumn(),
      createdAt: timeColumn(),
      endedAt: optionalTimeColumn(),
    },
    { sequelize, tableName: 'test_guests' },
  )
}
