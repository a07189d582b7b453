import type { Sequelize } from 'sequelize'
import { SequelizeStorage, Umzug } from 'umzug'
import { withMigrationLock } from './migration-lock'
import { migrations } from './migrations'

function migratorFor(database: Sequelize) {
  return new Umzug({
    migrations: migrations.map(({ name, up, down }) => ({ name, up: () => up(database), down: () => down(database) })),
    storage: new SequelizeStorage({ sequelize: database, tableName: 'migrations' }),
    logger: undefined,
  })
}

/** Runs what has not run yet, as far as `to` where that is given; returns the names. */
export function migrateUp(database: Sequelize, to?: string): Promise<string[]> {
  return withMigrationLock(database, async () => (await migratorFor(database).up({ to })).map((one) => one.name))
}

/** Takes back the last migration, or all. Their tables go, with what is in them. */
export function migrateDown(database: Sequelize, howMany: 'one' | 'all'): Promise<string[]> {
  return withMigrationLock(database, async () => {
    const migrator = migratorFor(database)
    const undone = howMany === 'all' ? await migrator.down({ to: 0 }) : await migrator.down()
    return undone.map((one) => one.name)
  })
}
