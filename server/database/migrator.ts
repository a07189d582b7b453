import { QueryTypes } from 'sequelize'
import type { Sequelize } from 'sequelize'
import { SequelizeStorage, Umzug } from 'umzug'
import { migrations } from './migrations'

const migrationLock = 'quarterload-migrate'

function migratorFor(database: Sequelize) {
  return new Umzug({
    migrations: migrations.map(({ name, up, down }) => ({ name, up: () => up(database), down: () => down(database) })),
    storage: new SequelizeStorage({ sequelize: database, tableName: 'migrations' }),
    logger: undefined,
  })
}

/** Several app servers may start at once on one database: one migrates, the others wait and then find nothing to do. */
async function withMigrationLock<T>(database: Sequelize, work: () => Promise<T>): Promise<T> {
  return database.transaction(async (transaction) => {
    const rows = await database.query<{ taken: number | null }>('SELECT GET_LOCK(CONCAT(DATABASE(), ?), 60) AS taken', {
      replacements: [`-${migrationLock}`],
      type: QueryTypes.SELECT,
      transaction,
    })
    if (rows[0]?.taken !== 1) throw new Error('Another server has been migrating this database for over a minute.')
    try {
      return await work()
    } finally {
      await database.query('SELECT RELEASE_LOCK(CONCAT(DATABASE(), ?))', {
        replacements: [`-${migrationLock}`],
        type: QueryTypes.SELECT,
        transaction,
      })
    }
  })
}

/** Runs what has not run yet; returns the names. */
export function migrateUp(database: Sequelize): Promise<string[]> {
  return withMigrationLock(database, async () => (await migratorFor(database).up()).map((one) => one.name))
}

/** Takes back the last migration, or all. Their tables go, with what is in them. */
export function migrateDown(database: Sequelize, howMany: 'one' | 'all'): Promise<string[]> {
  return withMigrationLock(database, async () => {
    const migrator = migratorFor(database)
    const undone = howMany === 'all' ? await migrator.down({ to: 0 }) : await migrator.down()
    return undone.map((one) => one.name)
  })
}
