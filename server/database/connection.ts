import mariadb from 'mariadb'
import type { Connection, ConnectionConfig } from 'mariadb'
import { Sequelize } from 'sequelize'
import type { Logger } from 'pino'
import { joinCluster } from './galera'
import { readDatabaseUrl } from './hosts'
import type { Host } from './hosts'

/** A Galera node that left the cluster answers every statement with this; the connection is of no more use. */
const NODE_LEFT_CLUSTER = 1047

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

function isNodeLost(error: unknown): boolean {
  return error instanceof Error && 'errno' in error && error.errno === NODE_LEFT_CLUSTER
}

/** One connection to one host that is fit for work; throws when it is not. */
async function connectTo(config: ConnectionConfig, { host, port }: Host): Promise<Connection> {
  const connection = await mariadb.createConnection({ ...config, host, port })
  try {
    await joinCluster(connection)
  } catch (error) {
    connection.destroy()
    throw error
  }
  return connection
}

function fitForSequelize(connection: Connection): Connection {
  const query = connection.query.bind(connection)
  Object.defineProperty(connection, 'query', {
    value: async (sql: string, values?: unknown) => {
      try {
        return withDeletableMeta(await query(sql, values))
      } catch (error) {
        // The pool gives out no connection that is closed: the next try looks for another node.
        if (isNodeLost(error)) connection.destroy()
        throw error
      }
    },
  })
  return connection
}

/**
 * Opens connections to the first host that is fit, beginning with the one that was last time: as long as it stands all
 * servers work on the same node, where row locks spare them failed certifications.
 */
function connector(hosts: readonly Host[], logger: Logger | undefined) {
  let good = 0
  return async (config: ConnectionConfig): Promise<Connection> => {
    let failure: unknown
    for (let offset = 0; offset < hosts.length; offset += 1) {
      const index = (good + offset) % hosts.length
      const host = hosts[index]
      if (host === undefined) continue
      try {
        const connection = await connectTo({ ...config, metaAsArray: true }, host)
        if (index !== good) logger?.warn({ host: `${host.host}:${host.port}` }, 'The database is used at another of its hosts now')
        good = index
        return fitForSequelize(connection)
      } catch (error) {
        failure = error
      }
    }
    throw failure
  }
}

export interface ConnectionOptions {
  poolSize?: number
  logger?: Logger
}

/**
 * DECIMAL comes back as a string, BIGINT and COUNT as numbers, times in UTC. Several hosts in the address are the
 * nodes of one cluster.
 */
export function connect(databaseUrl: string, options: ConnectionOptions = {}): Sequelize {
  const { logger } = options
  const { url, hosts } = readDatabaseUrl(databaseUrl)
  return new Sequelize(url, {
    dialect: 'mariadb',
    dialectModule: { ...mariadb, createConnection: connector(hosts, logger) },
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
