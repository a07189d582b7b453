import type { Sequelize } from 'sequelize'
import type { Connection } from 'mariadb'
import { migrateUp } from '../database/migrator'
import type { CheckedSet } from './check'
import { publicKeysIn } from './keys'
import { headOf, LedgerStreamCheck, namesOf, sealOf } from './ledger-check'
import { DamagedSet } from './manifest'
import type { Manifest, SetTable } from './manifest'
import { beginSnapshot, withRawConnection } from './raw-connection'
import { contentOf, readTable, rowsInSet } from './rows'
import type { Row } from './rows'
import { describeTables, insertOf } from './tables'
import type { Table } from './tables'

/** Rows a commit: a cluster takes large transactions badly, and each row is compared afterwards anyway. */
const rowsAtOnce = 500

async function insertRows(connection: Connection, table: SetTable, rows: Row[]): Promise<void> {
  if (rows.length === 0) return
  await connection.beginTransaction()
  await connection.batch(insertOf(table), rows)
  await connection.commit()
}

async function loadTable(connection: Connection, folder: string, table: SetTable): Promise<void> {
  let rows: Row[] = []
  for await (const row of rowsInSet(folder, table)) {
    rows.push(row)
    if (rows.length < rowsAtOnce) continue
    await insertRows(connection, table, rows)
    rows = []
  }
  await insertRows(connection, table, rows)
}

/** The tables as the set's own migrations make them must be those that it was read from. */
function checkColumns(manifest: Manifest, made: readonly Table[]): void {
  const shape = ({ name, columns }: Pick<Table, 'name' | 'columns'>) =>
    `${name}: ${columns.map((column) => `${column.name} ${column.type}`).join(', ')}`
  const expected = new Set(made.map(shape))
  const other = manifest.tables.find((table) => !expected.has(shape(table)))
  if (other !== undefined || expected.size !== manifest.tables.length) {
    throw new DamagedSet(
      `The manifest is damaged: its tables are not those of its version${other === undefined ? '' : ` (${other.name})`}.`,
    )
  }
}

/** Reads back every table: each must be, byte for byte, what the set holds. */
async function compare(connection: Connection, manifest: Manifest, made: readonly Table[]): Promise<void> {
  for (const expected of manifest.tables) {
    const table = made.find(({ name }) => name === expected.name)
    const found = table === undefined ? undefined : await contentOf(connection, table)
    if (found?.rows !== expected.rows || found.content !== expected.content) {
      throw new Error(`The table ${expected.name} did not come back as it was in the backup.`)
    }
  }
}

/** Checks every chain and every seal of a database as it stands. */
async function checkDatabase(database: Sequelize, keysFolder: string): Promise<number> {
  return withRawConnection(database, async (connection) => {
    await beginSnapshot(connection)
    const tables = await describeTables(connection)
    const rowsOf = async function* (name: string) {
      const table = tables.find((one) => one.name === name)
      if (table === undefined) return
      const named = namesOf(table.columns)
      for await (const row of readTable(connection, table)) yield named(row)
    }
    const heads = []
    for await (const row of rowsOf('ledgers')) heads.push(headOf(row))
    const seals = []
    for await (const row of rowsOf('seals')) seals.push(sealOf(row))
    const check = new LedgerStreamCheck(heads, seals, publicKeysIn(keysFolder))
    for await (const row of rowsOf('ledger_entries')) check.take(row)
    const { problems, ledgers } = check.finish()
    if (problems.length > 0) throw new Error(problems.join('\n'))
    return ledgers
  })
}

/**
 * Loads a checked set into an empty database: the schema as it was, the rows, a comparison of every table, then the
 * migrations since. Nobody stays signed in, because sessions that were ended after the backup would live again.
 * Answers how many ledgers were found whole afterwards.
 */
export async function loadSet(database: Sequelize, set: CheckedSet, now: Date): Promise<number> {
  const { folder, manifest, keysFolder } = set
  await migrateUp(database, manifest.migrations.at(-1))
  await withRawConnection(database, async (connection) => {
    const made = await describeTables(connection)
    checkColumns(manifest, made)
    for (const table of manifest.tables) await loadTable(connection, folder, table)
    await compare(connection, manifest, made)
    await connection.query('UPDATE sessions SET ended_at = ? WHERE ended_at IS NULL', [now])
  })
  await migrateUp(database)
  return checkDatabase(database, keysFolder)
}
