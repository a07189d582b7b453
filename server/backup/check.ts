import path from 'node:path'
import { migrations as known } from '../database/migrations'
import { checkAttachments } from './attachments'
import { checkFile } from './files'
import { publicKeysIn } from './keys'
import { headOf, LedgerStreamCheck, namesOf, sealOf } from './ledger-check'
import type { Named } from './ledger-check'
import { DamagedSet, KEYS_FOLDER, readManifest } from './manifest'
import type { Manifest, SetTable } from './manifest'
import { rowsInSet } from './rows'

export interface CheckedSet {
  folder: string
  keysFolder: string
  manifest: Manifest
  ledgers: number
}

/** Refuses what a later program made, and what is no state that this one has ever been in. */
function checkMigrations({ migrations }: Manifest): void {
  const later = migrations.find((name) => !known.some((migration) => migration.name === name))
  if (later !== undefined) {
    throw new DamagedSet(`This backup was made by a newer Quarterload (it has ${later}). Update this one, then restore.`)
  }
  if (migrations.some((name, index) => known[index]?.name !== name)) {
    throw new DamagedSet('The manifest is damaged: it names migrations that do not follow each other.')
  }
}

function tableOf(manifest: Manifest, name: string): SetTable {
  const table = manifest.tables.find((one) => one.name === name)
  if (table === undefined) throw new DamagedSet(`The manifest is damaged: it has no table ${name}.`)
  return table
}

async function allRows<T>(folder: string, table: SetTable, read: (row: Named) => T): Promise<T[]> {
  const named = namesOf(table.columns)
  const found: T[] = []
  for await (const row of rowsInSet(folder, table)) found.push(read(named(row)))
  return found
}

async function checkLedgers(folder: string, keysFolder: string, manifest: Manifest): Promise<number> {
  const heads = await allRows(folder, tableOf(manifest, 'ledgers'), headOf)
  const seals = await allRows(folder, tableOf(manifest, 'seals'), sealOf)
  const check = new LedgerStreamCheck(heads, seals, publicKeysIn(keysFolder))
  const entries = tableOf(manifest, 'ledger_entries')
  const named = namesOf(entries.columns)
  for await (const row of rowsInSet(folder, entries)) check.take(named(row))
  const { problems, ledgers } = check.finish()
  if (problems.length > 0) throw new DamagedSet(problems.join('\n'))
  const other = heads.find((head) => !manifest.ledgers.some(({ id, headHash }) => id === head.id && headHash === head.headHash))
  if (other !== undefined || heads.length !== manifest.ledgers.length) {
    throw new DamagedSet(`The heads of the ledgers are not those that the manifest names${other === undefined ? '' : ` (${other.id})`}.`)
  }
  return ledgers
}

async function checkKeys(keysFolder: string, manifest: Manifest): Promise<void> {
  for (const file of manifest.keyFiles) {
    await checkFile(keysFolder, file).catch((error: unknown) => {
      if (!(error instanceof DamagedSet)) throw error
      const advice = manifest.keys === 'apart' ? ' The keys of this backup were put apart: name their folder with --keys.' : ''
      throw new DamagedSet(`Of the keys, ${error.message}${advice}`)
    })
  }
}

/** Goes through a whole set before anything is written: files, rows, chains, seals, attachments, keys. */
export async function checkSet(folder: string, givenKeys: string | undefined): Promise<CheckedSet> {
  const manifest = await readManifest(folder)
  checkMigrations(manifest)
  const keysFolder = givenKeys ?? path.join(folder, KEYS_FOLDER)
  for (const file of manifest.files) await checkFile(folder, file)
  const unlisted = manifest.tables.find(({ file }) => !manifest.files.some((one) => one.path === file))
  if (unlisted !== undefined) throw new DamagedSet(`The manifest is damaged: it does not list ${unlisted.file}.`)
  await checkKeys(keysFolder, manifest)
  const ledgers = await checkLedgers(folder, keysFolder, manifest)
  const counted = manifest.tables.some(({ name }) => name === 'attachments')
    ? await allRows(folder, tableOf(manifest, 'attachments'), (row) => `${row('shop_id')}/${row('sha256')}`)
    : []
  await checkAttachments(folder, manifest, counted)
  return { folder, keysFolder, manifest, ledgers }
}
