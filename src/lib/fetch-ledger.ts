import { entriesResponseSchema, type EntriesResponse } from '#shared/api/ledger'
import { api } from './api-client'
import { mergeEntries, wholeUpTo, type KnownLedger } from './known-ledger'
import { ledgerCache } from './ledger-cache'

const LONGEST_WAIT = 8000

const ask = (testId: string, after: number, signal: AbortSignal): Promise<EntriesResponse> =>
  api.get(entriesResponseSchema, `/api/proof-tests/${encodeURIComponent(testId)}/entries`, {
    query: { after },
    signal: AbortSignal.any([signal, AbortSignal.timeout(LONGEST_WAIT)]),
  })

/** Whether an answer continues what is known. It doesn't when the server was set back to an older copy of its data. */
function continues(known: KnownLedger, after: number, answer: EntriesResponse): boolean {
  const last = known.entries[after - 1]
  if (!last) return true
  const [first] = answer.entries
  return first ? first.prevHash === last.hash : answer.headSeq === last.seq && answer.headHash === last.hash
}

/**
 * What came after what is known of a test, put together with it and kept on this device. `latest` is asked again when the
 * answer is here: what the outbox handed on meanwhile stays. The same object as before when nothing is new.
 */
export async function fetchLedger(testId: string, latest: () => KnownLedger | undefined, signal: AbortSignal): Promise<KnownLedger> {
  const known = latest()
  const after = known ? wholeUpTo(known.entries) : 0
  const answer = await ask(testId, after, signal)
  if (known?.fromDevice && !continues(known, after, answer)) {
    await ledgerCache.forget(testId).catch(() => undefined)
    return fetchLedger(testId, () => undefined, signal)
  }
  const before = latest()
  const sealedSeq = Math.max(before?.sealedSeq ?? 0, ...answer.sealed.map((seal) => seal.seq))
  const entries = mergeEntries(before?.entries ?? [], answer.entries)
  if (before && before.entries === entries && before.sealedSeq === sealedSeq) {
    void ledgerCache.heard(testId, new Date()).catch(() => undefined)
    return before.fromDevice ? { ...before, fromDevice: undefined } : before
  }
  const ledger = { ledgerId: answer.ledgerId, entries, people: { ...before?.people, ...answer.people }, sealedSeq }
  void ledgerCache.keep(testId, ledger, new Date()).catch(() => undefined)
  return ledger
}

/** Brings what this device keeps of a test up to date, so that it opens without a network. Throws when nothing answers. */
export async function keepOnDevice(testId: string, signal: AbortSignal = new AbortController().signal): Promise<KnownLedger> {
  const kept = await ledgerCache.read(testId)
  return fetchLedger(testId, () => kept && { ...kept, fromDevice: true }, signal)
}
