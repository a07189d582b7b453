import type { Sequelize } from 'sequelize'
import { rowsFrom, withRawConnection } from './raw-connection'

/** What was moved out of the way, and the way back for when the restore fails after all. */
export interface Aside {
  place: string
  putBack(): Promise<void>
}

export async function tablesIn(database: Sequelize): Promise<string[]> {
  return withRawConnection(database, async (connection) => {
    const rows = await rowsFrom<{ name: string }>(
      connection,
      "SELECT TABLE_NAME AS name FROM information_schema.TABLES WHERE TABLE_SCHEMA = DATABASE() AND TABLE_TYPE = 'BASE TABLE' ORDER BY TABLE_NAME",
    )
    return rows.map(({ name }) => name)
  })
}

function renames(tables: readonly string[], from: string, to: string): string {
  return `RENAME TABLE ${tables.map((table) => `\`${from}\`.\`${table}\` TO \`${to}\`.\`${table}\``).join(', ')}`
}

/** Drops what a failed restore made in a database that was empty, or had been emptied into another, before it. */
export async function dropTables(database: Sequelize): Promise<void> {
  const tables = await tablesIn(database)
  if (tables.length === 0) return
  await withRawConnection(database, async (connection) => {
    await connection.query('SET SESSION foreign_key_checks = 0')
    await connection.query(`DROP TABLE ${tables.map((table) => `\`${table}\``).join(', ')}`)
    await connection.query('SET SESSION foreign_key_checks = 1')
  })
}

/** Moves every table into a new schema of the same server; the rows stay where they are on disk. */
export async function moveTablesAside(database: Sequelize, tables: readonly string[], stamp: string): Promise<Aside> {
  const schema = database.config.database
  const place = `${schema}_before_restore_${stamp.replaceAll('-', '_')}`
  const run = (sql: string) => withRawConnection(database, (connection) => connection.query(sql))
  try {
    await run(`CREATE DATABASE \`${place}\` CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci`)
  } catch (error) {
    throw new Error(
      `What is in the database could not be moved aside: the account of DATABASE_URL may not make a schema ${place}. Nothing was changed. Let it, or name an empty schema.`,
      { cause: error },
    )
  }
  await run(renames(tables, schema, place))
  return {
    place: `the schema ${place}`,
    async putBack() {
      await dropTables(database)
      await run(renames(tables, place, schema))
      await run(`DROP DATABASE \`${place}\``)
    },
  }
}
