import type { Action, Assignment } from '#shared/policy'
import type { RecordView } from './record-view'

/** Whose turn it is to sign, as far as the person who reads is concerned. */
export type SignTurn = { is: 'lead' } | { is: 'witness' } | { is: 'waits'; says: string } | { is: 'nobody' }

type Ask = (action: Action, subject: { shopId: string; assignment: Assignment; testId: string }) => boolean

/** The people named when the test was opened, as the policy asks for them. */
export function assignmentOf({ opened }: RecordView): Assignment {
  const { lead, pumpHand, witness } = opened.people
  return { leadId: lead.id ?? '', pumpHandId: pumpHand.id, witnessId: witness.id ?? '' }
}

/** Asks the shared policy; what the ledger's own rules say is the server's to enforce. */
export function signTurn(record: RecordView, can: Ask): SignTurn {
  const { opened, standing } = record
  const subject = { shopId: opened.shop.id, assignment: assignmentOf(record), testId: record.id }
  if (standing === 'to sign') {
    if (can('proof-test:sign-as-lead', subject)) return { is: 'lead' }
    return { is: 'waits', says: `Waits for ${opened.people.lead.name}, who ran the test, to sign.` }
  }
  if (standing === 'to countersign') {
    if (can('proof-test:countersign', subject)) return { is: 'witness' }
    return { is: 'waits', says: `Waits for ${opened.people.witness.name}, who was there, to countersign.` }
  }
  return { is: 'nobody' }
}

/** The part that a reader has in a test by its opening. */
export function partOf(record: RecordView, userId: string): 'lead' | 'witness' | 'other' {
  const { lead, witness } = record.opened.people
  return userId === lead.id ? 'lead' : userId === witness.id ? 'witness' : 'other'
}

/**
 * While a test is under way its witness reads the gauge without target, force or the lead's figures (DOMAIN 4):
 * the record stays shut to them until nothing is left to read.
 */
export function isShutToWitness(record: RecordView, userId: string): boolean {
  return record.standing === 'under way' && partOf(record, userId) === 'witness'
}
