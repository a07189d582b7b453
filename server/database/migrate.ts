import { readConfig } from '../config'
import { migrateDown, migrateUp } from './migrator'
import { openDatabase } from './open-database'

const usage = 'Use: npm run migrate -- up | down | down all\n'

async function main(): Promise<number> {
  const [direction = 'up', extent] = process.argv.slice(2)
  if (direction !== 'up' && direction !== 'down') {
    process.stderr.write(usage)
    return 1
  }
  const database = await openDatabase(readConfig(process.env), { shareRunning: true })
  try {
    const names =
      direction === 'up' ? await migrateUp(database.sequelize) : await migrateDown(database.sequelize, extent === 'all' ? 'all' : 'one')
    process.stdout.write(names.length === 0 ? 'Nothing to do.\n' : `${names.join('\n')}\n`)
  } finally {
    await database.close()
  }
  return 0
}

main().then(
  (code) => {
    process.exitCode = code
  },
  (error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
    process.exitCode = 1
  },
)
