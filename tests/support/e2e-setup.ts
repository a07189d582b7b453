import { mkdtempSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterAll, afterEach, beforeAll, inject } from 'vitest'
import { closeBrowser, closePages, openE2e, photograph } from './browser'
import { schemaFor } from './schema'
import { startServer } from './server-process'
import type { ServerProcess } from './server-process'

let server: ServerProcess
let directory: string

beforeAll(async () => {
  directory = mkdtempSync(path.join(tmpdir(), 'quarterload-e2e-'))
  const databaseUrl = await schemaFor(inject('databaseUrl'), `e2e_${process.env['VITEST_POOL_ID'] ?? '1'}`)
  server = await startServer({ DATABASE_URL: databaseUrl, DATA_DIR: directory, TRUST_PROXY: '1' })
  await openE2e(server.address)
})

afterEach(async ({ task }) => {
  if (task.result?.state === 'fail') await photograph(task.name)
  await closePages()
})

afterAll(async () => {
  await closeBrowser()
  await server.end()
  rmSync(directory, { recursive: true, force: true })
})
