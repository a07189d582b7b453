import { randomBytes } from 'node:crypto'
import { access, mkdir, open, readFile, readdir, rename, rm, stat } from 'node:fs/promises'
import path from 'node:path'
import type { Storage, StoredFile } from '../context'
import { checkKey, inKeyOrder } from './keys'

/** Files on their way in: what a killed server leaves here is no file of anybody's. */
const INCOMING = '.incoming'
const DAY = 24 * 3_600_000

function isMissing(error: unknown): boolean {
  return error instanceof Error && 'code' in error && (error.code === 'ENOENT' || error.code === 'ENOTDIR')
}

/** A name in a folder is durable once the folder is. */
async function syncFolder(folder: string): Promise<void> {
  const handle = await open(folder, 'r')
  try {
    await handle.sync()
  } finally {
    await handle.close()
  }
}

/** Makes a folder and those above it, each durable in its parent, readable by nobody else. */
async function ensureFolder(folder: string): Promise<void> {
  const first = await mkdir(folder, { recursive: true, mode: 0o700 })
  if (first === undefined) return
  for (let made = folder; made.length >= first.length; made = path.dirname(made)) await syncFolder(path.dirname(made))
}

/** Files in a folder of this machine. A file appears whole, under its own name, or not at all. */
export class DiskStorage implements Storage {
  constructor(private readonly folder: string) {}

  async put(key: string, bytes: Buffer): Promise<void> {
    const file = this.fileOf(key)
    const incoming = path.join(this.folder, INCOMING)
    await ensureFolder(incoming)
    await ensureFolder(path.dirname(file))
    const draft = path.join(incoming, randomBytes(16).toString('hex'))
    try {
      const handle = await open(draft, 'wx', 0o600)
      try {
        await handle.writeFile(bytes)
        await handle.sync()
      } finally {
        await handle.close()
      }
      await rename(draft, file)
    } catch (error) {
      await rm(draft, { force: true })
      throw error
    }
    await syncFolder(path.dirname(file))
  }

  async get(key: string): Promise<Buffer | null> {
    try {
      return await readFile(this.fileOf(key))
    } catch (error) {
      if (isMissing(error)) return null
      throw error
    }
  }

  async has(key: string): Promise<boolean> {
    try {
      await access(this.fileOf(key))
      return true
    } catch (error) {
      if (isMissing(error)) return false
      throw error
    }
  }

  async list(prefix = ''): Promise<StoredFile[]> {
    const files: StoredFile[] = []
    for (const file of await this.filesBelow(this.folder)) {
      const key = path.relative(this.folder, file).split(path.sep).join('/')
      if (key.startsWith(prefix)) files.push({ key, size: (await stat(file)).size })
    }
    return inKeyOrder(files)
  }

  /** Removes what a server left on its way in when it was killed; younger files may be another server's work. */
  async tidy(now: Date): Promise<void> {
    const incoming = path.join(this.folder, INCOMING)
    for (const file of await this.filesBelow(incoming)) {
      if (now.getTime() - (await stat(file)).mtimeMs > DAY) await rm(file, { force: true })
    }
  }

  private async filesBelow(folder: string): Promise<string[]> {
    try {
      const found = await readdir(folder, { recursive: true, withFileTypes: true })
      const files = found.filter((one) => one.isFile()).map((one) => path.join(one.parentPath, one.name))
      const incoming = path.join(this.folder, INCOMING) + path.sep
      return folder === path.join(this.folder, INCOMING) ? files : files.filter((file) => !file.startsWith(incoming))
    } catch (error) {
      if (isMissing(error)) return []
      throw error
    }
  }

  private fileOf(key: string): string {
    return path.join(this.folder, ...checkKey(key).split('/'))
  }
}
