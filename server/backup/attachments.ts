import { createHash } from 'node:crypto'
import { readFile } from 'node:fs/promises'
import path from 'node:path'
import type { Connection } from 'mariadb'
import type { Storage } from '../context'
import { writeNewFile } from './files'
import { ATTACHMENTS_FOLDER, DamagedSet } from './manifest'
import type { Manifest, SetFile } from './manifest'
import { rowsFrom } from './raw-connection'
import type { Table } from './tables'

const namedByHash = /^(?:[^/]+\/)*([0-9a-f]{64})$/

/** Bytes whose key ends in their SHA-256 must have it; what is made from them has a longer name. */
function isAltered(key: string, bytes: Uint8Array): boolean {
  const sha256 = namedByHash.exec(key)?.[1]
  return sha256 !== undefined && createHash('sha256').update(bytes).digest('hex') !== sha256
}

/** Copies every file of the storage, and says which of those that the database counts on are missing or altered. */
export async function keepAttachments(
  connection: Connection,
  storage: Storage,
  tables: readonly Table[],
  folder: string,
): Promise<{ files: SetFile[]; problems: string[] }> {
  const files: SetFile[] = []
  const problems: string[] = []
  const kept = new Set<string>()
  for (const { key } of await storage.list()) {
    const bytes = await storage.get(key)
    if (bytes === null) continue
    if (isAltered(key, bytes)) problems.push(`The attachment ${key} is altered: its bytes do not have the SHA-256 it is named by.`)
    const file = `${ATTACHMENTS_FOLDER}/${key}`
    files.push({ path: file, ...(await writeNewFile(path.join(folder, file), [bytes])) })
    kept.add(key)
  }
  if (!tables.some(({ name }) => name === 'attachments')) return { files, problems }
  const counted = await rowsFrom<{ shopId: string; sha256: string }>(connection, 'SELECT shop_id AS shopId, sha256 FROM attachments')
  for (const { shopId, sha256 } of counted) {
    if (!kept.has(`${shopId}/${sha256}`)) problems.push(`The attachment ${shopId}/${sha256} is missing from the storage.`)
  }
  return { files, problems }
}

function attachmentsIn({ files }: Manifest): { key: string; file: SetFile }[] {
  const prefix = `${ATTACHMENTS_FOLDER}/`
  return files.filter((file) => file.path.startsWith(prefix)).map((file) => ({ key: file.path.slice(prefix.length), file }))
}

/** Refuses bytes that are not those their name says, and a set that lacks some that its tables count on. */
export async function checkAttachments(folder: string, manifest: Manifest, counted: readonly string[]): Promise<void> {
  const keys = new Set<string>()
  for (const { key, file } of attachmentsIn(manifest)) {
    keys.add(key)
    if (isAltered(key, await readFile(path.join(folder, file.path)))) {
      throw new DamagedSet(`${file.path} is altered: its bytes do not have the SHA-256 it is named by.`)
    }
  }
  const missing = counted.find((key) => !keys.has(key))
  if (missing !== undefined) throw new DamagedSet(`${ATTACHMENTS_FOLDER}/${missing} is missing from the backup.`)
}

/** Puts every file of a set into the storage; what stands there whole already is left. Answers how many there are. */
export async function putAttachments(folder: string, manifest: Manifest, storage: Storage): Promise<number> {
  const all = attachmentsIn(manifest)
  for (const { key, file } of all) {
    const bytes = await readFile(path.join(folder, file.path))
    const there = await storage.get(key)
    if (there === null || !there.equals(bytes)) await storage.put(key, bytes)
  }
  return all.length
}
