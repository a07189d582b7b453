import { applyPress, isAccepted, restsOn } from '#shared/press/apply'
import { nameJoints } from '#shared/press/joints'
import { decidePress } from '#shared/press/decide'
import { QueryTypes } from 'sequelize'
import { PRESS_ACTS, PRESS_CONSEQUENCES, PRESS_VERSION, type PressDraft, type PressPayload } from '#shared/press/entries'
import type { PressState } from '#shared/press/state'
import { findingsOf } from '#shared/ledger/rules'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { v7 as newId } from 'uuid'
import { tellOfClearance } from '../mail/clearance-notice'
import { conflict, notFound } from '../problem'
import { pressState, rememberFold } from './folds'
import { projectPress } from './projections'
import { lockHead, type LedgerHead } from './read'
import { alreadyWritten, writeEntry, type Writing } from './write'

async function keep(
  writing: Writing,
  head: LedgerHead,
  state: PressState,
  draft: EntryDraft,
  irregular: readonly string[],
): Promise<LedgerEntry> {
  const entry = await writeEntry(writing, head, draft, irregular)
  const next = applyPress(state, entry)
  await projectPress(writing.database, writing.transaction, head.shopId, next)
  await tellOfClearance(writing, head.shopId, state, next, entry.id)
  rememberFold(writing.database, next)
  return entry
}

/** A press's ledger, locked, with its state: where every append begins. */
export interface LockedPress {
  head: LedgerHead
  state: PressState
}

export async function lockPress(writing: Writing, pressId: string): Promise<LockedPress | null> {
  const head = await lockHead(writing.database, writing.transaction, pressId)
  if (!head || head.subject !== 'press') return null
  return { head, state: await pressState(writing.database, writing.transaction, head) }
}

/**
 * Appends one entry that a person made to a press that is locked. An act that the rules don't allow is
 * refused; a fact lands, marked with the rules it goes against.
 */
export async function appendToPress(writing: Writing, { head, state }: LockedPress, draft: EntryDraft): Promise<LedgerEntry> {
  const known = await alreadyWritten(writing, draft)
  if (known) return known
  const { kind, payload, overrides, observedAt } = draft
  const findings = findingsOf(decidePress(state, { kind, payload, overrides, at: observedAt }))
  const rules = findings.map((finding) => finding.rule)
  const [first] = findings
  if (first && (PRESS_ACTS.has(kind) || PRESS_CONSEQUENCES.has(kind) || !state.description)) {
    throw conflict(first.severity === 'reason' ? 'needs-reason' : 'refused', first.says, rules)
  }
  return keep(writing, head, state, draft, rules)
}

/** Entries that the server makes by itself carry this device. */
export const SERVER_DEVICE = '00000000-0000-7000-8000-000000000001'

/** Suspends the clearance of every press of the shop that rests on an instrument found out of tolerance (DOMAIN 3.2). */
export async function recallInstrument(
  writing: Writing,
  shopId: string,
  authorId: string,
  recalled: PressPayload<'instrument-recalled'>,
): Promise<void> {
  const { database, transaction, now } = writing
  const presses = await database.query<{ id: string }>(
    "SELECT id FROM presses WHERE shop_id = ? AND status IN ('cleared', 'suspended') ORDER BY id",
    {
      replacements: [shopId],
      type: QueryTypes.SELECT,
      transaction,
    },
  )
  for (const { id } of presses) {
    const locked = await lockPress(writing, id)
    if (!locked || !restsOn(locked.state, recalled.instrumentId)) continue
    const cause = {
      id: newId(),
      ledgerId: id,
      kind: 'instrument-recalled',
      v: PRESS_VERSION,
      payload: recalled,
      authorId,
      deviceId: SERVER_DEVICE,
      deviceSeq: locked.head.headSeq + 1,
      basedOnSeq: locked.head.headSeq,
      observedAt: now.toISOString(),
      bootId: SERVER_DEVICE,
      monotonicMs: Math.round(performance.now()),
      attachments: [],
      overrides: [],
    }
    await keep(writing, locked.head, locked.state, cause, [])
  }
}

/**
 * Appends what a proof test does to its press, in the same transaction as the entry that causes it. The
 * test's ledger is locked before the press's, always in that order.
 */
export async function appendConsequence(writing: Writing, pressId: string, cause: EntryDraft, consequence: PressDraft): Promise<void> {
  const locked = await lockPress(writing, pressId)
  if (!locked) throw notFound('This press')
  const { head, state } = locked
  if (consequence.kind === 'clearance-given') {
    const fallen = state.joints.filter((joint) => !isAccepted(joint)).map((joint) => joint.number)
    const { proofTestId, number } = consequence.payload
    const why = `${nameJoints(fallen)} fell back after the press was loaded, so it gives no clearance.`
    if (fallen.length > 0) return appendConsequence(writing, pressId, cause, { kind: 'test-ended', payload: { proofTestId, number, why } })
  }
  const payload: Record<string, unknown> = consequence.payload
  const decision = decidePress(state, { kind: consequence.kind, payload, overrides: [], at: cause.observedAt, consequence: true })
  const findings = findingsOf(decision)
  const first = findings[0]
  if (first && (consequence.kind === 'test-opened' || consequence.kind === 'clearance-given')) {
    throw conflict(
      'refused',
      first.says,
      findings.map((finding) => finding.rule),
    )
  }
  const draft: EntryDraft = {
    ...cause,
    id: newId(),
    ledgerId: pressId,
    kind: consequence.kind,
    v: PRESS_VERSION,
    payload,
    basedOnSeq: state.headSeq,
    attachments: [],
    overrides: [],
  }
  await keep(
    writing,
    head,
    state,
    draft,
    findings.map((finding) => finding.rule),
  )
}
