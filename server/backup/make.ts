import { readFileSync } from 'node:fs'
import { rename, rm } from 'node:fs/promises'
import path from 'node:path'
import type { Connection } from 'mariadb'
import type { Sequelize } from 'sequelize'
import type { PublicSealKey } from '#shared/ledger/check-ledger'
import { projectRoot } from '../config'
import type { Config } from '../config'
import type { Storage } from '../context'
import { keepAttachments } from './attachments'
import { copyNewFile, makePrivateFolder, syncFolder, writeNewFile } from './files'
import { keyFilesIn, publicKeysIn } from './keys'
import { headOf, LedgerStreamCheck, namesOf, sealOf } from './ledger-check'
import type { Head } from './ledger-check'
import { KEYS_FOLDER, MANIFEST, SET_FORMAT } from './manifest'
import type { Manifest, SetFile, SetTable } from './manifest'
import { beginSnapshot, rowsFrom, withRawConnection } from './raw-connection'
import { readTable, writeTable } from './rows'
import type { Row } from './rows'
import { describeTables, MIGRATIONS_TABLE } from './tables'
import type { Table } from './tables'

export interface MadeBackup {
  folder: string
  /** Where the keys are, when they were put apart. */
  keysFolder: string | undefined
  manifest: Manifest
  /** Of the manifest, which names every other file by its hash. */
  manifestSha256: string
  /** What is wrong with what was kept; a sentence each. */
  problems: string[]
}

export interface BackupSource {
  config: Config
  database: Sequelize
  storage: Storage
}

export interface BackupOptions {
  /** Where the set is made, in a folder named by the time. */
  target: string
  /** Another place for the keys, where they are to lie apart from the database. */
  keysTarget?: string
  now: Date
}

export function stampOf(now: Date): string {
  return now.toISOString().slice(0, 19).replace('T', '-').replaceAll(':', '')
}

function programVersion(): string {
  const { version } = JSON.parse(readFileSync(path.join(projectRoot, 'package.json'), 'utf8')) as { version: string }
  return version
}

async function rowsOfTable<T>(
  connection: Connection,
  tables: readonly Table[],
  name: string,
  read: (row: Row, table: Table) => T,
): Promise<T[]> {
  const table = tables.find((one) => one.name === name)
  if (table === undefined) throw new Error(`The database has no table ${name}: start Quarterload on it once, then back it up.`)
  const found: T[] = []
  for await (const row of readTable(connection, table)) found.push(read(row, table))
  return found
}

interface KeptTables {
  tables: SetTable[]
  files: SetFile[]
  heads: Head[]
  problems: string[]
}

/** Reads every table and, while its entries pass by, checks every ledger. */
async function keepTables(
  connection: Connection,
  described: readonly Table[],
  folder: string,
  publicKeys: readonly PublicSealKey[],
): Promise<KeptTables> {
  const heads = await rowsOfTable(connection, described, 'ledgers', (row, { columns }) => headOf(namesOf(columns)(row)))
  const seals = await rowsOfTable(connection, described, 'seals', (row, { columns }) => sealOf(namesOf(columns)(row)))
  const check = new LedgerStreamCheck(heads, seals, publicKeys)
  const tables: SetTable[] = []
  const files: SetFile[] = []
  for (const table of described) {
    const named = namesOf(table.columns)
    const kept = await writeTable(connection, table, folder, (row) => {
      if (table.name === 'ledger_entries') check.take(named(row))
    })
    tables.push(kept.table)
    files.push(kept.file)
  }
  return { tables, files, heads, problems: check.finish().problems }
}

async function keepKeys(from: string, to: string): Promise<SetFile[]> {
  const kept: SetFile[] = []
  for (const file of await keyFilesIn(from)) {
    kept.push({ path: file, ...(await copyNewFile(path.join(from, file), path.join(to, file))) })
  }
  return kept
}

/**
 * Makes a backup of one moment while servers go on. It gets its name when it is whole: a set that was interrupted
 * has a name ending in `.partial`, and no manifest.
 */
export async function makeBackup({ config, database, storage }: BackupSource, options: BackupOptions): Promise<MadeBackup> {
  const name = `quarterload-backup-${stampOf(options.now)}`
  const folder = path.join(options.target, name)
  const draft = `${folder}.partial`
  await makePrivateFolder(draft)
  const keysFolder = options.keysTarget === undefined ? undefined : path.join(options.keysTarget, `${name}-keys`)
  try {
    const kept = await withRawConnection(database, async (connection) => {
      await beginSnapshot(connection)
      const [about] = await rowsFrom<{ version: string }>(connection, 'SELECT VERSION() AS version')
      const migrations = await rowsFrom<{ name: string }>(connection, `SELECT name FROM ${MIGRATIONS_TABLE} ORDER BY name`)
      const described = await describeTables(connection)
      const { files, ...tables } = await keepTables(connection, described, draft, publicKeysIn(config.secretsDirectory))
      // After the snapshot: bytes are never deleted, so all that it names are there.
      const attachments = await keepAttachments(connection, storage, described, draft)
      return { about, migrations, files, tables, attachments }
    })
    const keyFiles = await keepKeys(config.secretsDirectory, keysFolder ?? path.join(draft, KEYS_FOLDER))
    const manifest: Manifest = {
      format: SET_FORMAT,
      program: 'quarterload',
      version: programVersion(),
      madeAt: options.now.toISOString(),
      database: kept.about?.version ?? '',
      migrations: kept.migrations.map(({ name: migration }) => migration),
      tables: kept.tables.tables,
      ledgers: kept.tables.heads,
      keys: keysFolder === undefined ? 'inside' : 'apart',
      keyFiles,
      files: [...kept.files, ...kept.attachments.files],
    }
    const written = await writeNewFile(path.join(draft, MANIFEST), [Buffer.from(`${JSON.stringify(manifest, null, 1)}\n`)])
    await rename(draft, folder)
    await syncFolder(options.target)
    const problems = [...kept.tables.problems, ...kept.attachments.problems]
    return { folder, keysFolder, manifest, manifestSha256: written.sha256, problems }
  } catch (error) {
    await rm(draft, { recursive: true, force: true })
    throw error
  }
}
