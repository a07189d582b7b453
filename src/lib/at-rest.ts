import { foldProofTest } from '#shared/proof-test/apply'
import { files } from './attachments'
import { fetchLedger } from './fetch-ledger'
import { ledgerCache, type KeptLedger } from './ledger-cache'
import { outbox } from './outbox'

const loaded = ({ testId, entries }: Pick<KeptLedger, 'testId' | 'entries'>): boolean => foldProofTest(testId, entries).loaded !== null

/** Whether force may be on the press of a test: what is kept of it may be old, so the server is asked before it is believed. */
async function underLoad(kept: KeptLedger): Promise<boolean> {
  if (!loaded(kept)) return false
  try {
    const { entries } = await fetchLedger(kept.testId, () => ({ ...kept, fromDevice: true }), new AbortController().signal)
    return loaded({ testId: kept.testId, entries })
  } catch {
    return true
  }
}

/**
 * Whether this device may be disturbed: no test that was opened on it is under load as far as it can know, and no entry and
 * no photo of one waits to be sent. Where that can't be read, it may not.
 */
export async function isAtRest(now: Date): Promise<boolean> {
  const { loaded: read, unsent } = outbox.summary()
  if (!read || unsent > 0 || (await files.wait().catch(() => true))) return false
  for (const kept of await ledgerCache.readAll(now)) {
    if (await underLoad(kept)) return false
  }
  return true
}
