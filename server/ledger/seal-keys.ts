import { randomBytes } from 'node:crypto'
import { readdirSync, readFileSync, renameSync, statSync, writeFileSync } from 'node:fs'
import path from 'node:path'
import { servedKeySchema, type ServedKey } from '#shared/api/verification'
import { kidOf } from '#shared/ledger/check-ledger'
import { publicKeyOf } from '#shared/ledger/seal'
import type { Config } from '../config'
import { loadOrCreateSecret } from '../secrets'

export interface SealKey {
  kid: string
  secretKey: string
  publicKey: string
}

const SECRET = 'sealing-key'
const publicName = (kid: string): string => `public-key-${kid}.json`

/** The file appears whole or not at all, in place of what was there. */
function replaceFile(directory: string, name: string, text: string): void {
  const draft = path.join(directory, `${name}.${process.pid}.${randomBytes(4).toString('hex')}`)
  writeFileSync(draft, text, { mode: 0o600, flag: 'wx', flush: true })
  renameSync(draft, path.join(directory, name))
}

function keyOf(secretKey: string): SealKey {
  const publicKey = publicKeyOf(secretKey)
  return { kid: kidOf(publicKey), secretKey, publicKey }
}

/**
 * The key that seals signatures: an Ed25519 secret in a folder of its own, outside the database, so that
 * nobody with the database alone can rewrite a record unnoticed. Read anew each time: servers that share the
 * folder all follow when the key is changed.
 */
export function loadSealKey({ secretsDirectory }: Pick<Config, 'secretsDirectory'>): SealKey {
  return keyOf(loadOrCreateSecret(secretsDirectory, SECRET))
}

function writtenKeys(directory: string): ServedKey[] {
  return readdirSync(directory)
    .filter((name) => /^public-key-[0-9a-f]{16}\.json$/.test(name))
    .map((name) => servedKeySchema.parse(JSON.parse(readFileSync(path.join(directory, name), 'utf8'))))
}

/** The public half of every key that seals or ever sealed here: today's first, then the retired ones, youngest first. */
export function publicSealKeys({ secretsDirectory }: Pick<Config, 'secretsDirectory'>): ServedKey[] {
  const { kid, publicKey } = loadSealKey({ secretsDirectory })
  const since = statSync(path.join(secretsDirectory, SECRET)).mtime.toISOString()
  const retired = writtenKeys(secretsDirectory)
    .filter((key) => key.kid !== kid)
    .sort((a, b) => (a.since < b.since ? 1 : -1))
  return [{ kid, publicKey, since, retiredOn: null }, ...retired]
}

/**
 * Seals with a new key from now on. Of the old one the public half is kept and served, so that what it sealed still
 * verifies; its secret half is gone. The public half is written first: no moment is without it.
 */
export function rotateSealKey({ secretsDirectory }: Pick<Config, 'secretsDirectory'>, now: Date): { old: ServedKey; fresh: SealKey } {
  const [today] = publicSealKeys({ secretsDirectory })
  if (!today) throw new Error('There is no sealing key to change.')
  const old: ServedKey = { ...today, retiredOn: now.toISOString() }
  replaceFile(secretsDirectory, publicName(old.kid), `${JSON.stringify(old, null, 2)}\n`)
  const fresh = keyOf(randomBytes(32).toString('hex'))
  replaceFile(secretsDirectory, SECRET, `${fresh.secretKey}\n`)
  return { old, fresh }
}
