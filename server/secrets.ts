import { randomBytes } from 'node:crypto'
import { chmodSync, linkSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs'
import path from 'node:path'

function hasCode(error: unknown, code: string): boolean {
  return error instanceof Error && 'code' in error && error.code === code
}

/** Makes the folder for secrets if need be, readable by nobody else. */
export function ensureSecretsDirectory(directory: string): void {
  mkdirSync(directory, { recursive: true, mode: 0o700 })
  chmodSync(directory, 0o700)
}

/**
 * Reads a secret, or makes it on the first start. The file appears whole or not at all, and of two
 * processes that make it at the same time both end up with the same secret.
 */
export function loadOrCreateSecret(directory: string, name: string): string {
  ensureSecretsDirectory(directory)
  const file = path.join(directory, name)
  try {
    return readFileSync(file, 'utf8').trim()
  } catch (error) {
    if (!hasCode(error, 'ENOENT')) throw error
  }
  const draft = `${file}.${process.pid}.${randomBytes(4).toString('hex')}`
  writeFileSync(draft, `${randomBytes(32).toString('hex')}\n`, { mode: 0o600, flag: 'wx', flush: true })
  try {
    linkSync(draft, file)
  } catch (error) {
    if (!hasCode(error, 'EEXIST')) throw error
  } finally {
    rmSync(draft, { force: true })
  }
  return readFileSync(file, 'utf8').trim()
}
