import { fingerprintOf } from '#shared/ledger/check-ledger'
import { readConfig } from '../config'
import { rotateSealKey } from './seal-keys'

const { old, fresh } = rotateSealKey(readConfig(process.env), new Date())
process.stdout.write(
  [
    `From now on key ${fresh.kid} seals. Its fingerprint: ${fingerprintOf(fresh.publicKey)}`,
    `Key ${old.kid} is retired: what it sealed still verifies, with the public half that stays served.`,
    'Keep a copy of the folder of secrets: without the retired public halves old seals cannot be told from forged ones.',
    '',
  ].join('\n'),
)
