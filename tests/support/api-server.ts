import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import type { Express } from 'express'
import { pino } from 'pino'
import { createApp } from '#server/app'
import { readConfig } from '#server/config'
import type { AppContext } from '#server/context'
import { connect } from '#server/database/connection'
import { initModels } from '#server/models/index'
import { DiskStorage } from '#server/storage/disk'

export interface TestServer {
  app: Express
  context: AppContext
  /** What the server logged as an error; a test that means to cause one empties it. */
  loggedErrors: string[]
  /** Moves the server's clock, until the end of the test. */
  moveClock(milliseconds: number): void
  resetClock(): void
}

let open: { server: TestServer; directory: string } | undefined

export function openTestServer(databaseUrl: string): TestServer {
  const directory = mkdtempSync(path.join(tmpdir(), 'quarterload-api-'))
  const loggedErrors: string[] = []
  let offset = 0
  const context: AppContext = {
    config: readConfig({
      NODE_ENV: 'test',
      DATABASE_URL: databaseUrl,
      DATA_DIR: directory,
      BCRYPT_COST: '4',
      // Each client in a test has an address of its own, else they would share the limits of one.
      TRUST_PROXY: '1',
    }),
    database: connect(databaseUrl, { poolSize: 8 }),
    storage: new DiskStorage(path.join(directory, 'attachments')),
    sessionSecret: 'for tests only',
    logger: pino({ level: 'error' }, { write: (line) => void loggedErrors.push(line) }),
    now: () => new Date(Date.now() + offset),
    closing: new AbortController().signal,
  }
  initModels(context.database)
  const server: TestServer = {
    app: createApp(context),
    context,
    loggedErrors,
    moveClock: (milliseconds) => {
      offset += milliseconds
    },
    resetClock: () => {
      offset = 0
    },
  }
  open = { server, directory }
  return server
}

/** The server of this worker, in-process: there is no socket between it and the test. */
export function testServer(): TestServer {
  if (open === undefined) throw new Error('The test server is opened by tests/support/api-setup.ts, for tests under tests/api.')
  return open.server
}

export async function closeTestServer(): Promise<void> {
  if (open === undefined) return
  await open.server.context.database.close()
  rmSync(open.directory, { recursive: true, force: true })
  open = undefined
}
