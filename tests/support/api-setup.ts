import { afterAll, afterEach, beforeAll, expect, inject } from 'vitest'
import { migrateUp } from '#server/database/migrator'
import { closeTestServer, openTestServer, testServer } from './api-server'
import { schemaFor } from './schema'

beforeAll(async () => {
  const url = await schemaFor(inject('databaseUrl'), `api_${process.env['VITEST_POOL_ID'] ?? '1'}`)
  const { context } = openTestServer(url)
  // A worker's schema is migrated by the first of its files; the others find nothing to do.
  await migrateUp(context.database)
})

afterEach(() => {
  testServer().resetClock()
  expect(testServer().loggedErrors.splice(0), 'the server logs no error').toEqual([])
})

afterAll(closeTestServer)
