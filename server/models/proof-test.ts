import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import {
  countColumn,
  idColumn,
  numberColumn,
  optionalNumberColumn,
  optionalTextColumn,
  optionalTimeColumn,
  textColumn,
  timeColumn,
} from './columns'

export class ProofTest extends Model<InferAttributes<ProofTest>, InferCreationAttributes<ProofTest>> {
  declare id: string
  declare shopId: string
  declare number: string
  declare numberIndex: number
  declare pressId: string
  declare pressName: string
  declare protocolName: string
  declare status: string
  declare result: CreationOptional<string | null>
  declare ratedLoadNewton: number
  declare ratedLoadText: string
  declare ratedLoadUnit: string
  declare reachedPercent: number
  declare stoppedAtPercent: CreationOptional<number | null>
  declare leadId: string
  declare leadName: string
  declare witnessId: string
  declare witnessName: string
  declare openedAt: Date
  declare concludedAt: CreationOptional<Date | null>
  declare sealedAt: CreationOptional<Date | null>
  declare headSeq: number
}

export function initProofTest(sequelize: Sequelize): void {
  ProofTest.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      number: textColumn(),
      numberIndex: countColumn(),
      pressId: idColumn(),
      pressName: textColumn(),
      protocolName: textColumn(),
      status: textColumn(),
      result: optionalTextColumn(),
      ratedLoadNewton: numberColumn(),
      ratedLoadText: textColumn(),
      ratedLoadUnit: textColumn(),
      reachedPercent: numberColumn(),
      stoppedAtPercent: optionalNumberColumn(),
      leadId: idColumn(),
      leadName: textColumn(),
      witnessId: idColumn(),
      witnessName: textColumn(),
      openedAt: timeColumn(),
      concludedAt: optionalTimeColumn(),
      sealedAt: optionalTimeColumn(),
      headSeq: countColumn(),
    },
    { sequelize, tableName: 'proof_tests' },
  )
}
