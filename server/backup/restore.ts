import { existsSync } from 'node:fs'
import { mkdir, readFile, rename, rm } from 'node:fs/promises'
import path from 'node:path'
import type { Config } from '../config'
import { connect } from '../database/connection'
import { startEmbeddedMariaDb } from '../database/embedded-mariadb'
import { runningServerPid } from '../database/mariadb-process'
import { openDatabase } from '../database/open-database'
import { openStorage } from '../storage/open-storage'
import { dropTables, moveTablesAside, tablesIn } from './aside'
import { putAttachments } from './attachments'
import { checkSet } from './check'
import type { CheckedSet } from './check'
import { copyNewFile, filesBelow, makePrivateFolder, PRIVATE_FOLDER, syncFolder } from './files'
import { loadSet } from './load'
import { stampOf } from './make'
import { rowsFrom, withRawConnection } from './raw-connection'

export interface RestoreOptions {
  source: string
  /** Where the keys are, when they were put apart from the set. */
  keys?: string
  /** What is there is moved aside first; without it a place that holds data is refused. */
  replace: boolean
  now: Date
}

export interface Restored {
  ledgers: number
  attachments: number
  madeAt: string
  /** Where what was there before lies now. */
  aside: string[]
}

const notChanged = 'Nothing was changed.'
const addReplace = 'To put the backup in its place, add --replace: what is there is moved aside, not deleted.'

function restored({ manifest }: CheckedSet, ledgers: number, attachments: number, places: (string | undefined)[]): Restored {
  return { ledgers, attachments, madeAt: manifest.madeAt, aside: places.filter((place) => place !== undefined) }
}

/** Keys that are there already and are other ones: a restore over them would lose them. */
async function strangeKey(config: Config, set: CheckedSet): Promise<string | undefined> {
  for (const { path: file } of set.manifest.keyFiles) {
    const bytes = await readFile(path.join(set.keysFolder, file))
    const there = await readFile(path.join(config.secretsDirectory, file)).catch(() => undefined)
    if (there !== undefined && !there.equals(bytes)) return file
  }
  return undefined
}

async function refuseStrangeKeys(config: Config, set: CheckedSet): Promise<void> {
  const file = await strangeKey(config, set)
  if (file === undefined) return
  throw new Error(`${config.secretsDirectory} holds another ${file} than the backup. ${notChanged} ${addReplace}`)
}

/** Puts the keys beside those in use, whole, in a folder that a later step renames or moves from. */
async function draftKeys(config: Config, set: CheckedSet, stamp: string): Promise<string> {
  const draft = path.join(config.secretsDirectory, `restoring-${stamp}`)
  await makePrivateFolder(config.secretsDirectory)
  await mkdir(draft, { mode: PRIVATE_FOLDER })
  for (const { path: file } of set.manifest.keyFiles) await copyNewFile(path.join(set.keysFolder, file), path.join(draft, file))
  return draft
}

/** The keys in use become those of the set. What other ones had their names goes aside; what the set lacks stays. */
async function exchangeKeys(config: Config, draft: string, stamp: string): Promise<string | undefined> {
  const place = path.join(config.secretsDirectory, `before-restore-${stamp}`)
  let isUsed = false
  for (const file of await filesBelow(draft)) {
    const inUse = path.join(config.secretsDirectory, file)
    const before = await readFile(inUse).catch(() => undefined)
    if (before?.equals(await readFile(path.join(draft, file))) === true) continue
    if (before !== undefined) {
      await makePrivateFolder(path.dirname(path.join(place, file)))
      await rename(inUse, path.join(place, file))
      isUsed = true
    }
    await makePrivateFolder(path.dirname(inUse))
    await rename(path.join(draft, file), inUse)
  }
  await syncFolder(config.secretsDirectory)
  return isUsed ? place : undefined
}

/** A server that runs on this data would go on writing into what is moved aside. One that a killed server left is ended. */
async function refuseWhileRunning(config: Config): Promise<void> {
  const { dataDirectory: directory, secretsDirectory } = config
  if (runningServerPid(path.join(directory, 'mariadb.pid'), path.join(directory, 'mariadb')) === undefined) return
  await (await startEmbeddedMariaDb({ directory, secretsDirectory })).stop()
}

/**
 * The private database: made whole in a folder of its own beside the one in use, and put in its place only when
 * everything in it was found to be right.
 */
async function restoreEmbedded(config: Config, set: CheckedSet, { replace, now }: RestoreOptions): Promise<Restored> {
  const stamp = stampOf(now)
  const isThere = existsSync(path.join(config.dataDirectory, 'mariadb'))
  if (isThere) {
    await refuseWhileRunning(config)
    if (!replace) throw new Error(`${config.dataDirectory} holds a database already. ${notChanged} ${addReplace}`)
  } else if (!replace) {
    await refuseStrangeKeys(config, set)
  }
  await makePrivateFolder(config.dataDirectory)
  const keys = await draftKeys(config, set, stamp)
  const draft = path.join(config.dataDirectory, `restoring-${stamp}`)
  try {
    const database = await startEmbeddedMariaDb({ directory: draft, secretsDirectory: keys })
    let ledgers: number
    try {
      const sequelize = connect(database.url)
      try {
        ledgers = await loadSet(sequelize, set, now)
      } finally {
        await sequelize.close()
      }
    } finally {
      await database.stop()
    }
    const attachments = await putAttachments(set.folder, set.manifest, await openStorage(config, now))
    const replacedKeys = await exchangeKeys(config, keys, stamp)
    const inUse = path.join(config.dataDirectory, 'mariadb')
    const replaced = path.join(config.dataDirectory, `before-restore-${stamp}`)
    if (isThere) {
      await mkdir(replaced, { mode: PRIVATE_FOLDER })
      await rename(inUse, path.join(replaced, 'mariadb'))
    }
    await rename(path.join(draft, 'mariadb'), inUse)
    await syncFolder(config.dataDirectory)
    return restored(set, ledgers, attachments, [isThere ? replaced : undefined, replacedKeys])
  } finally {
    await rm(draft, { recursive: true, force: true })
    await rm(keys, { recursive: true, force: true })
  }
}

/** A database that is somebody else's to run: loaded where it is, and left as it was when that fails. */
async function restoreOutside(config: Config, set: CheckedSet, { replace, now }: RestoreOptions): Promise<Restored> {
  const stamp = stampOf(now)
  const { sequelize, close } = await openDatabase(config)
  try {
    const others = await withRawConnection(sequelize, (connection) =>
      rowsFrom(connection, 'SELECT ID FROM information_schema.PROCESSLIST WHERE DB = DATABASE() AND ID <> CONNECTION_ID()'),
    )
    if (others.length > 0)
      throw new Error(`Something else is connected to this database. ${notChanged} Stop every Quarterload server on it first.`)
    const tables = await tablesIn(sequelize)
    if (tables.length > 0 && !replace)
      throw new Error(`The database that DATABASE_URL names holds tables already. ${notChanged} ${addReplace}`)
    if (!replace) await refuseStrangeKeys(config, set)
    const replacedTables = tables.length > 0 ? await moveTablesAside(sequelize, tables, stamp) : undefined
    const keys = await draftKeys(config, set, stamp)
    try {
      const ledgers = await loadSet(sequelize, set, now)
      const attachments = await putAttachments(set.folder, set.manifest, await openStorage(config, now))
      return restored(set, ledgers, attachments, [replacedTables?.place, await exchangeKeys(config, keys, stamp)])
    } catch (error) {
      await (replacedTables === undefined ? dropTables(sequelize) : replacedTables.putBack())
      throw error
    } finally {
      await rm(keys, { recursive: true, force: true })
    }
  } finally {
    await close()
  }
}

/** Checks a whole set first, and only then writes; refuses a place that holds data unless it may be moved aside. */
export async function restoreBackup(config: Config, options: RestoreOptions): Promise<Restored> {
  const set = await checkSet(options.source, options.keys)
  return config.databaseUrl === undefined ? restoreEmbedded(config, set, options) : restoreOutside(config, set, options)
}
