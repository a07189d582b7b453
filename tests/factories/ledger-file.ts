import { kidOf } from '#shared/ledger/check-ledger'
import { writeLedgerFile, type LedgerFileBody } from '#shared/ledger/ledger-file'
import { makeSeal, publicKeyOf, type Seal } from '#shared/ledger/seal'
import { SIGNATURE_KINDS } from '#shared/proof-test/entries'
import { recordedTest, storedEntries, type RecordedTest } from './recorded-test'

export const SECRET_KEY = '5a'.repeat(32)
export const PUBLIC_KEY = publicKeyOf(SECRET_KEY)

/** A seal over every signature of a recorded test. */
export function sealsOf(recorded: RecordedTest, secretKey = SECRET_KEY): Seal[] {
  return recorded.entries
    .filter(({ kind }) => SIGNATURE_KINDS.has(kind))
    .map(({ seq, hash, receivedAt }) =>
      makeSeal({ kid: kidOf(publicKeyOf(secretKey)), ledgerId: recorded.id, seq, headHash: hash, sealedAt: receivedAt }, secretKey),
    )
}

/** What a recorded test's file says, before it is written; sealed and signed with the key given. */
export function ledgerFileOf(recorded: RecordedTest = recordedTest(), secretKey = SECRET_KEY): LedgerFileBody {
  const publicKey = publicKeyOf(secretKey)
  return {
    format: 'quarterload ledger',
    formatVersion: 1,
    subject: 'proof-test',
    ledgerId: recorded.id,
    shop: 'Ziegler & Søn – Press-shop',
    title: recorded.state.opened?.number ?? '',
    exportedAt: '2026-09-16T07:00:00.000Z',
    entries: storedEntries(recorded.entries),
    seals: sealsOf(recorded, secretKey),
    keys: [{ kid: kidOf(publicKey), publicKey, retired: false }],
    people: recorded.people,
    writtenBy: kidOf(publicKey),
  }
}

/** The bytes of a recorded test's file. */
export function ledgerFileBytes(body: LedgerFileBody = ledgerFileOf(), secretKey = SECRET_KEY): Uint8Array {
  return new TextEncoder().encode(writeLedgerFile(body, { secretKey, publicKey: publicKeyOf(secretKey) }))
}
