import type { Connection } from 'mariadb'
import type { SetTable } from './manifest'

/** Where the tool that migrates keeps its own list. */
export const MIGRATIONS_TABLE = 'migrations'
/** A restore makes these anew by migrating. */
const ofMigrating = new Set([MIGRATIONS_TABLE, 'migration_lock'])

export interface Column {
  name: string
  type: string
}

export interface Table {
  name: string
  columns: Column[]
  /** What the rows are read in order of, so that the same rows are always the same lines. */
  key: string[]
}

/** MariaDB writes these as text that reads back as the same value; any other type needs a thought first. */
const asText = new Set([
  ...['char', 'varchar', 'tinytext', 'text', 'mediumtext', 'longtext', 'enum'],
  ...['tinyint', 'smallint', 'mediumint', 'int', 'bigint', 'decimal', 'double'],
  ...['date', 'time', 'datetime', 'timestamp'],
])
const asBytes = new Set(['binary', 'varbinary', 'tinyblob', 'blob', 'mediumblob', 'longblob'])

interface ColumnRow {
  tableName: string
  name: string
  type: string
  extra: string
}

async function rowsOf<Row>(connection: Connection, sql: string): Promise<Row[]> {
  return (await connection.query<Row[]>({ sql, rowsAsArray: false })).map((row) => ({ ...row }))
}

/** Parents first, so that every row finds what it refers to. */
function inOrder(tables: Table[], references: { child: string; parent: string }[]): Table[] {
  const left = new Map(tables.map((table) => [table.name, table]))
  const ordered: Table[] = []
  while (left.size > 0) {
    const ready = [...left.values()].filter(
      ({ name }) => !references.some(({ child, parent }) => child === name && parent !== name && left.has(parent)),
    )
    if (ready.length === 0) throw new Error(`Tables refer to each other in a circle: ${[...left.keys()].join(', ')}.`)
    for (const table of ready) {
      ordered.push(table)
      left.delete(table.name)
    }
  }
  return ordered
}

/** Every table of the schema, as it is now. */
export async function describeTables(connection: Connection): Promise<Table[]> {
  const columns = await rowsOf<ColumnRow>(
    connection,
    `SELECT c.TABLE_NAME AS tableName, c.COLUMN_NAME AS name, c.DATA_TYPE AS type, c.EXTRA AS extra
       FROM information_schema.COLUMNS c
       JOIN information_schema.TABLES t ON t.TABLE_SCHEMA = c.TABLE_SCHEMA AND t.TABLE_NAME = c.TABLE_NAME
      WHERE c.TABLE_SCHEMA = DATABASE() AND t.TABLE_TYPE = 'BASE TABLE'
      ORDER BY c.TABLE_NAME, c.ORDINAL_POSITION`,
  )
  const keys = await rowsOf<{ tableName: string; name: string }>(
    connection,
    `SELECT TABLE_NAME AS tableName, COLUMN_NAME AS name FROM information_schema.STATISTICS
      WHERE TABLE_SCHEMA = DATABASE() AND INDEX_NAME = 'PRIMARY' ORDER BY TABLE_NAME, SEQ_IN_INDEX`,
  )
  const references = await rowsOf<{ child: string; parent: string }>(
    connection,
    `SELECT DISTINCT TABLE_NAME AS child, REFERENCED_TABLE_NAME AS parent FROM information_schema.REFERENTIAL_CONSTRAINTS
      WHERE CONSTRAINT_SCHEMA = DATABASE()`,
  )
  const names = [...new Set(columns.map(({ tableName }) => tableName))].filter((name) => !ofMigrating.has(name))
  const tables = names.map((name): Table => {
    const own = columns.filter(({ tableName, extra }) => tableName === name && !extra.includes('GENERATED'))
    const strange = own.find(({ type }) => !asText.has(type) && !asBytes.has(type))
    if (strange) throw new Error(`Column ${strange.name} of ${name} is a ${strange.type}, which a backup does not know how to keep.`)
    const key = keys.filter(({ tableName }) => tableName === name).map((column) => column.name)
    if (key.length === 0) throw new Error(`Table ${name} has no primary key, so its rows have no order to be read in.`)
    return { name, columns: own.map((column) => ({ name: column.name, type: column.type })), key }
  })
  return inOrder(tables, references)
}

export function selectOf({ name, columns, key }: Table): string {
  const values = columns.map((column) => (asBytes.has(column.type) ? `HEX(\`${column.name}\`)` : `\`${column.name}\``))
  return `SELECT ${values.join(', ')} FROM \`${name}\` ORDER BY ${key.map((column) => `\`${column}\``).join(', ')}`
}

export function insertOf({ name, columns }: Pick<SetTable, 'name' | 'columns'>): string {
  const places = columns.map((column) => (asBytes.has(column.type) ? 'UNHEX(?)' : '?'))
  return `INSERT INTO \`${name}\` (${columns.map((column) => `\`${column.name}\``).join(', ')}) VALUES (${places.join(', ')})`
}
