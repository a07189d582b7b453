import { Model } from 'sequelize'
import type { InferAttributes, InferCreationAttributes, Sequelize } from 'sequelize'
import { idColumn, textColumn, timeColumn } from './columns'

export class CalendarFeed extends Model<InferAttributes<CalendarFeed>, InferCreationAttributes<CalendarFeed>> {
  declare shopId: string
  declare userId: string
  declare tokenHash: string
  declare createdAt: Date
}

export function initCalendarFeed(sequelize: Sequelize): void {
  CalendarFeed.init(
    {
      shopId: { ...idColumn(), primaryKey: true },
      userId: { ...idColumn(), primaryKey: true },
      tokenHash: textColumn(),
      createdAt: timeColumn(),
    },
    { sequelize, tableName: 'calendar_feeds' },
  )
}
