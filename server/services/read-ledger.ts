import type { EntriesResponse } from '#shared/api/ledger'
import { ledgerEntrySchema } from '#shared/ledger/envelope'
import type { LedgerEntry, LedgerSubject } from '#shared/ledger/envelope'
import type { StoredEntry } from '#shared/ledger/chain'
import { alteredProblem, findBroken, sayBroken } from '../ledger/check-stored'
import { entryOf, readHead, readSeals, readStored, readTogether } from '../ledger/read'
import { inRetriedTransaction } from '../ledger/retry'
import { notFound } from '../problem'
import type { Asking } from './ledgers'
import { membershipOf, readerOfTest } from './membership'
import { namesOf } from './names'

/** Entries that a client can read; null when an altered one is no entry any more. */
function readable(stored: readonly StoredEntry[]): LedgerEntry[] | null {
  try {
    const entries = stored.map(entryOf)
    return entries.every((entry) => ledgerEntrySchema.safeParse(entry).success) ? entries : null
  } catch {
    return null
  }
}

/**
 * Entries after a number, with the names of who wrote them and the seals; 404 for another shop's ledger. A ledger
 * that is read whole, and a sealed one however little of it is asked for, is checked as it was read.
 */
export async function readLedger(
  { context, userId }: Asking,
  subject: LedgerSubject,
  ledgerId: string,
  after: number,
): Promise<EntriesResponse> {
  const { database } = context
  return inRetriedTransaction(database, async (transaction) => {
    const head = await readHead(database, transaction, ledgerId)
    if (!head || head.subject !== subject) throw notFound(subject === 'press' ? 'This press' : 'This proof test')
    const asked = { transaction, userId, shopId: head.shopId }
    await (subject === 'press' ? membershipOf(asked) : readerOfTest(asked, ledgerId))
    const isSealed = after === 0 || (await readSeals(database, transaction, ledgerId)).length > 0
    const { seals, entries: stored } = await readTogether(
      () => readSeals(database, transaction, ledgerId),
      () => readStored(database, transaction, ledgerId, isSealed ? 0 : after),
    )
    const broken = isSealed ? findBroken(context, ledgerId, stored, seals) : null
    const wanted = stored.filter(({ seq }) => seq > after)
    const entries = broken === null ? wanted.map(entryOf) : readable(wanted)
    if (broken !== null && entries === null) throw alteredProblem(broken)
    const told = entries ?? []
    const last = told.at(-1)
    return {
      ledgerId,
      entries: told,
      headSeq: last?.seq ?? head.headSeq,
      headHash: last?.hash ?? head.headHash,
      people: await namesOf(
        transaction,
        told.map((entry) => entry.authorId),
      ),
      sealed: seals.map(({ ledgerId: _ledgerId, ...seal }) => seal),
      broken: broken && sayBroken(broken),
    }
  })
}
