import { applyPress } from '#shared/press/apply'
import { decidePress } from '#shared/press/decide'
import { PRESS_ACTS, PRESS_CONSEQUENCES, PRESS_VERSION, type PressDraft } from '#shared/press/entries'
import type { PressState } from '#shared/press/state'
import { findingsOf } from '#shared/ledger/rules'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import type { Action } from '#shared/policy'
import { v7 as newId } from 'uuid'
import type { Work } from '../context'
import { conflict, forbidden, notFound } from '../problem'
import { authorize } from '../services/membership'
import { pressState, rememberFold } from './folds'
import { projectPress } from './projections'
import { lockHead, type LedgerHead } from './read'
import { alreadyWritten, writeEntry, type Writing } from './write'

const ACTIONS: Record<string, Action> = {
  registered: 'press:register',
  described: 'press:describe',
  'joint-added': 'press:describe',
  'joint-described': 'press:describe',
  'joint-retired': 'press:describe',
  'joint-worked': 'press:record',
  'joint-examined': 'press:record',
  changed: 'press:change-report',
  withdrawn: 'press:withdraw',
}

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
  rememberFold(writing.database, next)
  return entry
}

/** Appends one entry that a person made to a press's ledger, in the transaction given. */
export async function appendPress(writing: Writing, work: Work, draft: EntryDraft): Promise<LedgerEntry> {
  const head = await lockHead(writing.database, writing.transaction, draft.ledgerId)
  if (!head || head.subject !== 'press' || head.shopId !== work.actor.shopId) throw notFound('This press')
  const action = ACTIONS[draft.kind]
  if (!action) throw conflict('not-by-hand', 'This follows from a proof test and is not entered by hand.', ['P10'])
  authorize(work.actor, action, { shopId: head.shopId })
  if (draft.authorId !== work.actor.userId) throw forbidden()
  const known = await alreadyWritten(writing, draft)
  if (known) return known
  const state = await pressState(writing.database, writing.transaction, head)
  const findings = findingsOf(
    decidePress(state, { kind: draft.kind, payload: draft.payload, overrides: draft.overrides, at: draft.observedAt }),
  )
  const first = findings[0]
  if (first && (PRESS_ACTS.has(draft.kind) || PRESS_CONSEQUENCES.has(draft.kind) || !state.description)) {
    throw conflict(
      'refused',
      first.says,
      findings.map((finding) => finding.rule),
    )
  }
  return keep(
    writing,
    head,
    state,
    draft,
    findings.map((finding) => finding.rule),
  )
}

/**
 * Appends what a proof test does to its press, in the same transaction as the entry that causes it. The
 * test's ledger is locked before the press's, always in that order.
 */
export async function appendConsequence(writing: Writing, pressId: string, cause: EntryDraft, consequence: PressDraft): Promise<void> {
  const head = await lockHead(writing.database, writing.transaction, pressId)
  if (!head || head.subject !== 'press') throw notFound('This press')
  const state = await pressState(writing.database, writing.transaction, head)
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
