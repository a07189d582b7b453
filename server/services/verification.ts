import type { VerificationKeys } from '#shared/api/verification'
import type { AppContext } from '../context'
import { publicSealKeys } from '../ledger/seal-keys'

/** The public keys that this server's seals are checked with, today's first. */
export function servedKeys({ config }: Pick<AppContext, 'config'>): VerificationKeys {
  return { keys: publicSealKeys(config) }
}
