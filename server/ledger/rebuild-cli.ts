import { readConfig } from '../config'
import { openDatabase } from '../database/open-database'
import { initModels } from '../models/index'
import { rebuildProjections } from './rebuild'

async function main(): Promise<void> {
  const database = await openDatabase(readConfig(process.env), { shareRunning: true })
  try {
    initModels(database.sequelize)
    const count = await rebuildProjections(database.sequelize)
    process.stdout.write(`${count} ledgers folded; the lists show what they say.\n`)
  } finally {
    await database.close()
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
  process.exitCode = 1
})
