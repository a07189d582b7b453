import { Model } from 'sequelize'
import type { CreationOptional, InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import type { Role } from '#shared/policy'
import { hashColumn, idColumn, optionalIdColumn, optionalTextColumn, optionalTimeColumn, textColumn, timeColumn } from './columns'

export class Invitation extends Model<InferAttributes<Invitation>, InferCreationAttributes<Invitation>> {
  declare id: string
  declare shopId: string
  declare kind: 'member' | 'witness'
  declare email: string
  /** Of a member. */
  declare role: Role | null
  /** Whose next proof test an outside witness is invited to. */
  declare pressId: string | null
  declare tokenHash: string
  declare invitedBy: string
  declare createdAt: Date
  declare expiresAt: Date
  declare acceptedAt: CreationOptional<Date | null>
  declare acceptedBy: CreationOptional<string | null>
  declare revokedAt: CreationOptional<Date | null>
}

export function initInvitation(sequelize: Sequelize): void {
  Invitation.init(
    {
      id: { ...idColumn(), primaryKey: true },
      shopId: idColumn(),
      kind: textColumn(),
      email: textColumn(),
      role: optionalTextColumn(),
      pressId: optionalIdColumn(),
      tokenHash: hashColumn(),
      invitedBy: idColumn(),
      createdAt: timeColumn(),
      expiresAt: timeColumn(),
      acceptedAt: optionalTimeColumn(),
      acceptedBy: optionalIdColumn(),
      revokedAt: optionalTimeColumn(),
    },
    { sequelize, tableName: 'invitations' },
  )
}
