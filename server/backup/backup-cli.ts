import path from 'node:path'
import { parseArgs } from 'node:util'
import { readConfig } from '../config'
import { openDatabase } from '../database/open-database'
import { openStorage } from '../storage/open-storage'
import { fromWhereItWasAsked, tell } from './command'
import { makeBackup } from './make'
import type { MadeBackup } from './make'

function report({ folder, keysFolder, manifest, manifestSha256, problems }: MadeBackup): string {
  const rows = manifest.tables.reduce((sum, table) => sum + table.rows, 0)
  const bytes = manifest.files.reduce((sum, file) => sum + file.size, 0)
  return [
    `The backup is in ${folder}: ${manifest.ledgers.length} ledgers, ${rows} rows, ${manifest.files.length} files, ${(bytes / 1e6).toFixed(1)} MB.`,
    `SHA-256 of its manifest, which vouches for every other file: ${manifestSha256}`,
    keysFolder === undefined
      ? 'It contains secrets: the key that seals records lies in it, beside them. Keep it where nobody else reads it, or put the keys apart with --keys FOLDER.'
      : `The keys are in ${keysFolder}. Keep them apart from the backup; it can’t be restored without them.`,
    'Copy it to another machine: a backup on the same disk goes with the disk.',
    ...(problems.length === 0
      ? ['Every chain and every seal in it is whole.']
      : ['WHAT IS WRONG, and will keep this backup from being restored:', ...problems]),
    '',
  ].join('\n')
}

/** `npm run backup [-- TARGET] [--keys FOLDER]`: database, attachments and keys of one moment, while servers go on. */
async function main(): Promise<number> {
  const { positionals, values } = parseArgs({ allowPositionals: true, options: { keys: { type: 'string' } } })
  const config = readConfig(process.env)
  const [target] = positionals
  const database = await openDatabase(config, { shareRunning: true })
  try {
    const now = new Date()
    const made = await makeBackup(
      { config, database: database.sequelize, storage: await openStorage(config, now) },
      {
        target: target === undefined ? path.join(config.dataDirectory, 'backups') : fromWhereItWasAsked(target),
        keysTarget: values.keys === undefined ? undefined : fromWhereItWasAsked(values.keys),
        now,
      },
    )
    process.stdout.write(report(made))
    return made.problems.length === 0 ? 0 : 1
  } finally {
    await database.close()
  }
}

await tell(main)
