import type { Sequelize } from 'sequelize'
import type { Logger } from 'pino'
import type { Config } from '../config'
import { connect } from './connection'
import { requireDurable } from './durability'
import { startEmbeddedMariaDb } from './embedded-mariadb'

export interface OpenDatabase {
  sequelize: Sequelize
  isEmbedded: boolean
  close(): Promise<void>
}

export interface OpenOptions {
  logger?: Logger
  /** For commands that may run beside a running server. */
  shareRunning?: boolean
}

/** The outside database that DATABASE_URL names, else the private one, started here and stopped by `close`. */
export async function openDatabase(config: Config, options: OpenOptions = {}): Promise<OpenDatabase> {
  const { databaseUrl } = config
  const embedded =
    databaseUrl === undefined
      ? await startEmbeddedMariaDb({
          directory: config.dataDirectory,
          secretsDirectory: config.secretsDirectory,
          shareRunning: options.shareRunning,
          report: (sentence, cause) => options.logger?.warn({ err: cause }, sentence),
        })
      : undefined
  const sequelize = connect(embedded?.url ?? databaseUrl ?? '', { logger: options.logger })
  const close = async () => {
    await sequelize.close()
    await embedded?.stop()
  }
  try {
    await sequelize.authenticate()
  } catch (error) {
    await close()
    throw new Error('The database does not answer. Is DATABASE_URL right, and is the server up?', { cause: error })
  }
  try {
    await requireDurable(sequelize, { isRelaxed: config.relaxedDurability })
  } catch (error) {
    await close()
    throw error
  }
  return { sequelize, isEmbedded: embedded !== undefined, close }
}
