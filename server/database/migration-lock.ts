import { randomUUID } from 'node:crypto'
import { QueryTypes } from 'sequelize'
import type { Sequelize } from 'sequelize'
import { runTransaction } from '../transaction'

const name = 'quarterload-migrate'
const patienceMilliseconds = 60_000
const leaseSeconds = 20
const renewMilliseconds = 5_000

const beingMigrated = () => new Error('Another server has been migrating this database for over a minute.')

function delay(milliseconds: number): Promise<void> {
  return new Promise((resolve) => {
    setTimeout(resolve, milliseconds)
  })
}

/** A named lock ends with its connection, so that a server killed while it migrates holds up nobody. */
async function withNamedLock<T>(database: Sequelize, work: () => Promise<T>): Promise<T> {
  return database.transaction(async (transaction) => {
    const rows = await database.query<{ taken: number | null }>('SELECT GET_LOCK(CONCAT(DATABASE(), ?), ?) AS taken', {
      replacements: [`-${name}`, patienceMilliseconds / 1000],
      type: QueryTypes.SELECT,
      transaction,
    })
    if (rows[0]?.taken !== 1) throw beingMigrated()
    try {
      return await work()
    } finally {
      await database.query('SELECT RELEASE_LOCK(CONCAT(DATABASE(), ?))', {
        replacements: [`-${name}`],
        type: QueryTypes.SELECT,
        transaction,
      })
    }
  })
}

/** Takes the row, or takes it over when its lease ran out; the cluster lets one of two that try at once through. */
async function takeLease(database: Sequelize, holder: string): Promise<boolean> {
  return runTransaction(database, { idempotent: true }, async (transaction) => {
    await database.query(
      `UPDATE migration_lock SET holder = ?, held_until = UTC_TIMESTAMP(3) + INTERVAL ? SECOND
        WHERE name = ? AND (holder = '' OR holder = ? OR held_until < UTC_TIMESTAMP(3))`,
      { replacements: [holder, leaseSeconds, name, holder], type: QueryTypes.UPDATE, transaction },
    )
    const [row] = await database.query<{ holder: string }>('SELECT holder FROM migration_lock WHERE name = ? FOR UPDATE', {
      replacements: [name],
      type: QueryTypes.SELECT,
      transaction,
    })
    return row?.holder === holder
  })
}

/** Galera's named locks are each node's own: there a row is the lock, with a lease that its holder renews. */
async function withLockRow<T>(database: Sequelize, work: () => Promise<T>): Promise<T> {
  await database.query(
    `CREATE TABLE IF NOT EXISTS migration_lock (
      name VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      holder VARCHAR(36) CHARACTER SET ascii COLLATE ascii_bin NOT NULL,
      held_until DATETIME(3) NOT NULL,
      PRIMARY KEY (name)
    ) ENGINE=InnoDB`,
  )
  await runTransaction(database, { idempotent: true }, (transaction) =>
    database.query("INSERT IGNORE INTO migration_lock (name, holder, held_until) VALUES (?, '', UTC_TIMESTAMP(3))", {
      replacements: [name],
      type: QueryTypes.INSERT,
      transaction,
    }),
  )
  const holder = randomUUID()
  const until = performance.now() + patienceMilliseconds
  while (!(await takeLease(database, holder))) {
    if (performance.now() > until) throw beingMigrated()
    await delay(200)
  }
  let renewing: Promise<unknown> = Promise.resolve()
  const renewal = setInterval(() => {
    // A lease that could not be renewed runs out; the work that it guards fails by the same lost database.
    renewing = takeLease(database, holder).catch(() => undefined)
  }, renewMilliseconds)
  try {
    return await work()
  } finally {
    clearInterval(renewal)
    await renewing
    await database.query("UPDATE migration_lock SET holder = '' WHERE name = ? AND holder = ?", {
      replacements: [name, holder],
      type: QueryTypes.UPDATE,
    })
  }
}

async function isCluster(database: Sequelize): Promise<boolean> {
  const rows = await database.query<{ Value: string }>("SHOW GLOBAL VARIABLES LIKE 'wsrep_on'", { type: QueryTypes.SELECT })
  return rows[0]?.Value === 'ON'
}

/** Several app servers may start at once on one database: one migrates, the others wait and then find nothing to do. */
export async function withMigrationLock<T>(database: Sequelize, work: () => Promise<T>): Promise<T> {
  return (await isCluster(database)) ? withLockRow(database, work) : withNamedLock(database, work)
}
