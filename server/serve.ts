import { readFileSync } from 'node:fs'
import { createServer } from 'node:http'
import type { Server } from 'node:http'
import { createServer as createTlsServer } from 'node:https'
import type { Express } from 'express'
import { pino } from 'pino'
import { createApp } from './app'
import { readConfig } from './config'
import type { Config } from './config'
import type { AppContext } from './context'
import { migrateUp } from './database/migrator'
import { openDatabase } from './database/open-database'
import type { OpenDatabase } from './database/open-database'
import { runWorkers } from './jobs/start-workers'
import { initModels } from './models'
import { loadOrCreateSecret } from './secrets'
import { openStorage } from './storage/open-storage'

/** Requests under way get this long to finish after the server was asked to stop. */
const drainMilliseconds = 10_000

export interface Pages {
  add(app: Express): void
  close?(): Promise<void>
}

function readPem(variable: string, file: string): Buffer {
  try {
    return readFileSync(file)
  } catch {
    throw new Error(`${variable} names ${file}, which can't be read.`)
  }
}

/** Speaks https itself where a certificate is given, else http. */
function makeServer({ tls }: Config): Server {
  if (tls === undefined) return createServer()
  const [cert, key] = [readPem('TLS_CERT', tls.certificateFile), readPem('TLS_KEY', tls.keyFile)]
  try {
    return createTlsServer({ cert, key, minVersion: 'TLSv1.2' })
  } catch (error) {
    throw new Error('TLS_CERT and TLS_KEY are not a certificate and its key, in PEM.', { cause: error })
  }
}

function listen(server: Server, { port, host, tls }: Config): Promise<string> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      reject(error.code === 'EADDRINUSE' ? new Error(`Port ${port} is taken. Set PORT to another one.`) : error)
    })
    server.listen(port, host, () => {
      const address = server.address()
      const bound = address === null || typeof address === 'string' ? port : address.port
      resolve(`${tls === undefined ? 'http' : 'https'}://${host.includes(':') ? `[${host}]` : host}:${bound}`)
    })
  })
}

async function drain(server: Server): Promise<void> {
  const closed = new Promise<void>((resolve) => {
    server.close(() => resolve())
  })
  server.closeIdleConnections()
  const timer = setTimeout(() => server.closeAllConnections(), drainMilliseconds)
  await closed
  clearTimeout(timer)
}

export interface Running {
  context: AppContext
  database: OpenDatabase
  address: string
}

export interface ServeOptions {
  /** Makes the pages, once there is a server that their tools may hook into. */
  pages?(server: Server, config: Config): Promise<Pages | undefined>
  /** Runs after the migrations and before the first request. */
  prepare?(context: AppContext, database: OpenDatabase): Promise<void>
  announce(running: Running): void
}

/** What has been opened so far, to be closed the other way round. */
type Closers = (() => Promise<void>)[]

async function open(options: ServeOptions, closing: AbortSignal, closers: Closers): Promise<Running> {
  const config = readConfig(process.env)
  const server = makeServer(config)
  const logger = pino({ level: config.logLevel }, pino.destination({ dest: 2, sync: true }))
  const database = await openDatabase(config, { logger })
  closers.push(() => database.close())
  const context: AppContext = {
    config,
    database: database.sequelize,
    storage: await openStorage(config, new Date()),
    sessionSecret: loadOrCreateSecret(config.secretsDirectory, 'session-secret'),
    logger,
    now: () => new Date(),
    closing,
  }
  initModels(database.sequelize)
  await migrateUp(database.sequelize)
  await options.prepare?.(context, database)
  const pages = await options.pages?.(server, config)
  if (pages?.close !== undefined) closers.push(() => pages.close?.() ?? Promise.resolve())
  server.on(
    'request',
    createApp(context, (app) => pages?.add(app)),
  )
  const address = await listen(server, config)
  closers.push(() => drain(server))
  const workers = runWorkers(context, address)
  closers.push(() => workers)
  return { context, database, address }
}

/**
 * Runs until SIGTERM or SIGINT: then takes no new requests, finishes those under way, and stops the database in order.
 * A signal during the start waits for the start, because a MariaDB that is told to stop while it starts can hang.
 */
export async function serve(options: ServeOptions): Promise<void> {
  const closing = new AbortController()
  const closers: Closers = []
  const stopRequested = new Promise<void>((resolve) => {
    const stop = () => resolve()
    process.on('SIGTERM', stop)
    process.on('SIGINT', stop)
  })
  try {
    const running = await open(options, closing.signal, closers)
    options.announce(running)
    await stopRequested
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
    process.exitCode = 1
  }
  closing.abort()
  for (const close of closers.reverse()) {
    try {
      await close()
    } catch (error) {
      process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
      process.exitCode = 1
    }
  }
  // Nothing is left that could be waited for; what still holds the process open must not hold up a restart.
  process.exit()
}
