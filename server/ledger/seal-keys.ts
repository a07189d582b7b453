import { sha256Hex } from '#shared/ledger/chain'
import { publicKeyOf } from '#shared/ledger/seal'
import type { Config } from '../config'
import { loadOrCreateSecret } from '../secrets'

export interface SealKey {
  kid: string
  secretKey: string
  publicKey: string
}

/**
 * The key that seals signatures: an Ed25519 secret in a folder of its own, outside the database, so that
 * nobody with the database alone can rewrite a record unnoticed. `kid` is the start of the public key's hash.
 */
export function loadSealKey(config: Config): SealKey {
  const secretKey = loadOrCreateSecret(config.secretsDirectory, 'sealing-key')
  const publicKey = publicKeyOf(secretKey)
  return { kid: sha256Hex(publicKey).slice(0, 16), secretKey, publicKey }
}
