import mariadb from 'mariadb'
import type { Connection, ConnectionConfig } from 'mariadb'
import { Sequelize } from 'sequelize'
import type { Logger } from 'pino'

/**
 * Sequelize 6 was written against mariadb 2.5, whose rows carried a deletable `meta`. The 3.5 driver defines it
 * read-only, or hands it over beside the rows; here it is put back the way Sequelize expects.
 */
function withDeletableMeta(answer: unknown): unknown {
  if (!Array.isArray(answer) || answer.length !== 2) return answer
  const [rows, meta]: unknown[] = answer
  if (typeof rows === 'object' && rows !== null) {
    Object.defineProperty(rows, 'meta', { value: meta, writable: true, configurable: true, enumerable: false })
  }
  return rows
}

async function createConnection(config: ConnectionConfig): Promise<Connection> {
  const connection = await mariadb.createConnection({ ...config, metaAsArray: true })
  const query = connection.query.bind(connection)
  Object.defineProperty(connection, 'query', {
    value: async (sql: string, values?: unknown) => withDeletableMeta(await query(sql, values)),
  })
  return connection
}

const dialectModule = { ...mariadb, createConnection }

export interface ConnectionOptions {
  poolSize?: number
  logger?: Logger
}

/** DECIMAL comes back as a string, BIGINT and COUNT as numbers, times in UTC. */
export function connect(url: string, options: ConnectionOptions = {}): Sequelize {
  const { logger } = options
  return new Sequelize(url.replace(/^mysql:/, 'mariadb:'), {
    dialect: 'mariadb',
    dialectModule,
    timezone: '+00:00',
    logging: logger === undefined ? false : (sql) => logger.debug(sql),
    define: { timestamps: false, underscored: true, freezeTableName: true },
    pool: { max: options.poolSize ?? 16, min: 0, acquire: 20_000, idle: 60_000 },
    dialectOptions: {
      supportBigNumbers: false,
      bigNumberStrings: false,
      decimalAsNumber: false,
      bigIntAsNumber: true,
      insertIdAsNumber: true,
      checkNumberRange: true,
      connectTimeout: 5_000,
      charset: 'utf8mb4',
      collation: 'utf8mb4_unicode_ci',
    },
  })
}
