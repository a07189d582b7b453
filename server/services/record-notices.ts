import type { LedgerEntry } from '#shared/ledger/envelope'
import type { Seal } from '#shared/ledger/seal'
import type { ProofTestState } from '#shared/proof-test/state'
import type { Writing } from '../ledger/write'
import type { MailKind } from '#shared/api/mail'
import type { Letter } from '../mail/letter'
import { queueMail } from '../mail/queue'
import { peopleOfRecord } from '../mail/recipients'
import { countersignatureWanted, recordDeclined, recordSealed } from '../mail/record-letters'

/** Sends the seal out of the house, in the transaction of the signature: to lead, witness and owners. */
export async function tellOfSignature(
  writing: Writing,
  shopId: string,
  state: ProofTestState,
  entry: LedgerEntry,
  seal: Seal,
): Promise<void> {
  const { opened } = state
  if (!opened) return
  const recorded = { opened, state, seal }
  const { lead, witness } = opened.people
  const letterFor = (userId: string | null): { kind: MailKind; letter: Letter } => {
    if (entry.kind === 'declined') {
      const last = state.declined.at(-1)
      return { kind: 'declined', letter: recordDeclined(recorded, last?.printedName ?? witness.name, last?.why ?? '') }
    }
    if (entry.kind === 'countersigned') return { kind: 'record-sealed', letter: recordSealed(recorded, 'witness') }
    if (userId === witness.id) return { kind: 'countersignature-wanted', letter: countersignatureWanted(recorded) }
    return { kind: 'record-sealed', letter: recordSealed(recorded, 'lead') }
  }
  for (const to of await peopleOfRecord({ leadId: lead.id, witnessId: witness.id }, shopId, writing.transaction)) {
    await queueMail(writing, { ...letterFor(to.userId), shopId, key: entry.id, to })
  }
}
