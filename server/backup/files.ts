import { createHash } from 'node:crypto'
import { createReadStream } from 'node:fs'
import { mkdir, open, readdir, stat, utimes } from 'node:fs/promises'
import path from 'node:path'
import { DamagedSet } from './manifest'
import type { SetFile } from './manifest'

/** Of files and folders that hold secrets: for the account that made them, and nobody else. */
export const PRIVATE_FILE = 0o600
export const PRIVATE_FOLDER = 0o700

export function makePrivateFolder(folder: string): Promise<string | undefined> {
  return mkdir(folder, { recursive: true, mode: PRIVATE_FOLDER })
}

export async function hashOfFile(file: string): Promise<{ size: number; sha256: string }> {
  const hash = createHash('sha256')
  let size = 0
  for await (const chunk of createReadStream(file) as AsyncIterable<Buffer>) {
    hash.update(chunk)
    size += chunk.length
  }
  return { size, sha256: hash.digest('hex') }
}

/** Writes to a new file, through to the disk; answers what was written. Never over a file that is there. */
export async function writeNewFile(file: string, chunks: AsyncIterable<Uint8Array> | Iterable<Uint8Array>): Promise<Omit<SetFile, 'path'>> {
  await makePrivateFolder(path.dirname(file))
  const handle = await open(file, 'wx', PRIVATE_FILE)
  const hash = createHash('sha256')
  let size = 0
  try {
    for await (const chunk of chunks) {
      hash.update(chunk)
      size += chunk.length
      await handle.writeFile(chunk)
    }
    await handle.sync()
  } finally {
    await handle.close()
  }
  return { size, sha256: hash.digest('hex') }
}

/** A copy keeps its time: a key is in use since its file was written. */
export async function copyNewFile(from: string, to: string): Promise<Omit<SetFile, 'path'>> {
  const written = await writeNewFile(to, createReadStream(from) as AsyncIterable<Uint8Array>)
  const { atime, mtime } = await stat(from)
  await utimes(to, atime, mtime)
  return written
}

/** Files below a folder, by their paths in it, in order; none when there is no such folder. */
export async function filesBelow(folder: string): Promise<string[]> {
  const entries = await readdir(folder, { recursive: true, withFileTypes: true }).catch(() => [])
  return entries
    .filter((entry) => entry.isFile())
    .map((entry) => path.relative(folder, path.join(entry.parentPath, entry.name)))
    .sort()
}

/** Refuses a file that is missing, cut short or changed. */
export async function checkFile(folder: string, file: SetFile): Promise<void> {
  const full = path.join(folder, file.path)
  const found = await stat(full).catch(() => undefined)
  if (found === undefined || !found.isFile()) throw new DamagedSet(`${file.path} is missing from the backup.`)
  if (found.size < file.size) {
    throw new DamagedSet(`${file.path} was cut short: it has ${found.size} bytes, the manifest says ${file.size}.`)
  }
  if (found.size > file.size || (await hashOfFile(full)).sha256 !== file.sha256) {
    throw new DamagedSet(`${file.path} is damaged: it is not the file that the manifest describes.`)
  }
}

/** What was renamed into a folder stays there through a power cut. */
export async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r')
  try {
    await handle.sync()
  } finally {
    await handle.close()
  }
}
