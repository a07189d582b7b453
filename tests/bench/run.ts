import { mkdtempSync, rmSync } from 'node:fs'
import { availableParallelism, loadavg, tmpdir } from 'node:os'
import path from 'node:path'
import { startEmbeddedMariaDb } from '#server/database/embedded-mariadb'
import { closeTestServer } from '../support/api-server'
import { clientLines } from './client'
import { SAMPLES, tableOf } from './measure'
import { pureLines } from './pure'
import { serverLines } from './server'

/** `npm run bench`: what takes time, against what the machine can do in the same run. Ends with 1 when something is over its budget. */
async function main(): Promise<number> {
  const directory = mkdtempSync(path.join(tmpdir(), 'quarterload-bench-'))
  // As people run it: nothing about durability is relaxed.
  const database = await startEmbeddedMariaDb({ directory, secretsDirectory: path.join(directory, 'secrets') })
  try {
    const lines = [...(await serverLines(database.url)), ...(await pureLines()), ...clientLines()]
    await closeTestServer()
    const { text, isWithin } = tableOf(lines)
    const [load = 0] = loadavg()
    process.stdout.write(text)
    process.stdout.write(
      `${SAMPLES} of each in turn, on ${availableParallelism()} processors with a load of ${load.toFixed(1)} over the last minute.\n`,
    )
    return isWithin ? 0 : 1
  } finally {
    await database.stop()
    rmSync(directory, { recursive: true, force: true })
  }
}

process.exitCode = await main()
