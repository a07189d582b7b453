import type { Sequelize } from 'sequelize'

export interface Migration {
  /** NNN-what-it-does, as the file is named; never changed once it has run anywhere. */
  name: string
  /** Must bear being run again after it was cut off at any statement. */
  up(database: Sequelize): Promise<void>
  down(database: Sequelize): Promise<void>
}

/**
 * MariaDB commits after each DDL statement, so a migration is a list of statements and its way back the list of tables.
 * One that was cut off half-way, or not noted, runs again from its beginning: what is there already stays.
 */
export function tables(name: string, statements: string[], tableNames: string[]): Migration {
  return {
    name,
    async up(database) {
      for (const statement of statements) await database.query(statement.replace(/^CREATE TABLE /, 'CREATE TABLE IF NOT EXISTS '))
    },
    async down(database) {
      for (const table of [...tableNames].reverse()) await database.query(`DROP TABLE IF EXISTS ${table}`)
    },
  }
}

export const id = 'CHAR(36) CHARACTER SET ascii COLLATE ascii_bin'
export const hash = 'CHAR(64) CHARACTER SET ascii COLLATE ascii_bin'
/** Text that only the program writes and compares: statuses, kinds, units. */
export const word = (length: number) => `VARCHAR(${length}) CHARACTER SET ascii COLLATE ascii_bin`
export const tableOptions = 'ENGINE=InnoDB DEFAULT CHARSET=utf8mb4 COLLATE=utf8mb4_unicode_ci ROW_FORMAT=DYNAMIC'
