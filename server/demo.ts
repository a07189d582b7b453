import { readConfig } from './config'
import { migrateUp } from './database/migrator'
import { openDatabase } from './database/open-database'
import { loadDemoShop, signInLines } from './database/seeders/demo'
import { initModels } from './models'
import { openStorage } from './storage/open-storage'

/** `npm run demo`: the demo shop for a database that has no shop yet, the one that DATABASE_URL names or the embedded one. */
async function main(): Promise<void> {
  const config = readConfig(process.env)
  const database = await openDatabase(config, { shareRunning: true })
  try {
    initModels(database.sequelize)
    await migrateUp(database.sequelize)
    const signIns = await loadDemoShop({
      config,
      database: database.sequelize,
      storage: await openStorage(config, new Date()),
      now: () => new Date(),
    })
    process.stdout.write(signInLines(signIns) || 'There are shops in this database already: nothing was loaded.\n')
  } finally {
    await database.close()
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
  process.exitCode = 1
})
