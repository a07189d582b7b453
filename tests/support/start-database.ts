import { mkdtemp, rm } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import type { TestProject } from 'vitest/node'
import { startEmbeddedMariaDb } from '#server/database/embedded-mariadb'

declare module 'vitest' {
  interface ProvidedContext {
    /** Of the account that may make schemas whose names begin with `quarterload_`. */
    databaseUrl: string
  }
}

/** One MariaDB for all files of a project, in a folder of its own; gone afterwards. */
export async function setup(project: TestProject): Promise<() => Promise<void>> {
  const directory = await mkdtemp(path.join(tmpdir(), 'quarterload-test-'))
  const database = await startEmbeddedMariaDb({
    directory,
    secretsDirectory: path.join(directory, 'secrets'),
    relaxedDurability: true,
  })
  project.provide('databaseUrl', database.url)
  return async () => {
    await database.stop()
    await rm(directory, { recursive: true, force: true })
  }
}
