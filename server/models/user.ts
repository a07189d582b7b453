import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn, textColumn, timeColumn } from './columns'

export class User extends Model<InferAttributes<User>, InferCreationAttributes<User>> {
  declare id: string
  declare email: string
  declare name: string
  declare passwordHash: string
  declare createdAt: Date
}

export function initUser(sequelize: Sequelize): void {
  User.init(
    {
      id: { ...idColumn(), primaryKey: true },
      email: textColumn(),
      name: textColumn(),
      passwordHash: textColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'users' },
  )
}
