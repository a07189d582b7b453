import { existsSync } from 'node:fs'
import path from 'node:path'
import type { PublicSealKey } from '#shared/ledger/check-ledger'
import { publicSealKeys } from '../ledger/seal-keys'
import { filesBelow } from './files'

/** Made by each database for itself: a restored one has its own. */
const ownToADatabase = new Set(['database-password', 'database-root-password'])
/** Folders that a restore makes beside the keys in use. */
const aside = /^(before-restore|restoring)-/

/** A secret that is being made, beside its place. */
const draft = /\.\d+\.[0-9a-f]{8}$/

/** The keys in a folder: the session secret, the sealing key and the public halves of retired ones, by their paths in it. */
export async function keyFilesIn(folder: string): Promise<string[]> {
  const files = await filesBelow(folder)
  return files.filter((file) => !aside.test(file) && !ownToADatabase.has(file) && !draft.test(file))
}

/** The public halves of the sealing keys in a folder, today's and retired ones. Makes none. */
export function publicKeysIn(folder: string): PublicSealKey[] {
  return existsSync(path.join(folder, 'sealing-key')) ? publicSealKeys({ secretsDirectory: folder }) : []
}
