import type { AppendRequest, AppendResponse, AppendResult } from '#shared/api/ledger'
import type { OpenTestRequest, SignatureRequest } from '#shared/api/proof-tests'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import type { DeviceCount } from '#shared/proof-test/device-count'
import { SIGNATURE_KINDS } from '#shared/proof-test/entries'
import type { AppContext } from '../context'
import { parsePressDraft, parseProofTestDraft } from '../ledger/parse'
import { readHead } from '../ledger/read'
import { inRetriedTransaction } from '../ledger/retry'
import { createLedger, type Writing } from '../ledger/write'
import { conflict, invalid, notFound, Problem } from '../problem'
import { membershipOf } from './membership'
import { openTest } from './open-test'
import { appendPress } from './press-entries'
import { verifyPassword } from './sessions'
import { signTest } from './sign-test'
import { appendToTest, lockTest } from './test-entries'

/** Who asks: the person of the session. */
export interface Asking {
  context: AppContext
  userId: string
}

/** Of missing numbers in one answer: the rest is asked for when these have come. */
const MOST_RUNS = 100

type Append = (writing: Writing, draft: EntryDraft) => Promise<LedgerEntry>

/** Takes a batch in order, an entry a transaction, with a result for each: what was kept stays kept. */
async function appendBatch(
  context: AppContext,
  ledgerId: string,
  entries: readonly EntryDraft[],
  append: Append,
): Promise<Omit<AppendResponse, 'resendFrom'>> {
  const { database } = context
  const results: AppendResult[] = []
  for (const draft of entries) {
    try {
      if (draft.ledgerId !== ledgerId) throw invalid({ ledgerId: 'This entry belongs to another ledger.' })
      const entry = await inRetriedTransaction(database, (transaction) => append({ database, transaction, now: context.now() }, draft))
      results.push({ outcome: 'kept', id: draft.id, entry })
    } catch (error) {
      if (!(error instanceof Problem) || error.status === 404 || error.status >= 500) throw error
      results.push({ outcome: 'refused', id: draft.id, problem: error.toBody() })
    }
  }
  const head = await inRetriedTransaction(database, (transaction) => readHead(database, transaction, ledgerId))
  return { results, headSeq: head?.headSeq ?? 0, headHash: head?.headHash ?? '' }
}

/** Enters a press: its ledger and the first entry in it. */
export async function registerPress({ context, userId }: Asking, shopId: string, { entries }: AppendRequest): Promise<AppendResponse> {
  const [draft] = entries
  if (!draft || entries.length !== 1 || draft.kind !== 'registered') throw invalid({ entries: 'A press is entered with one entry.' })
  parsePressDraft(draft)
  const answer = await appendBatch(context, draft.ledgerId, [draft], async (writing, one) => {
    const actor = await membershipOf({ transaction: writing.transaction, userId, shopId })
    await createLedger(writing, { id: one.ledgerId, shopId, subject: 'press' })
    return appendPress(writing, { actor }, one)
  })
  return { ...answer, resendFrom: null }
}

export async function appendPressEntries(
  { context, userId }: Asking,
  pressId: string,
  { entries }: AppendRequest,
): Promise<AppendResponse> {
  const answer = await appendBatch(context, pressId, entries, async (writing, draft) => {
    const head = await readHead(writing.database, writing.transaction, pressId)
    if (!head) throw notFound('This press')
    const actor = await membershipOf({ transaction: writing.transaction, userId, shopId: head.shopId })
    parsePressDraft(draft)
    return appendPress(writing, { actor }, draft)
  })
  return { ...answer, resendFrom: null }
}

export async function appendTestEntries(
  { context, userId }: Asking,
  testId: string,
  { entries, sentAt }: AppendRequest,
): Promise<AppendResponse> {
  const clockOff = Date.parse(sentAt) - context.now().getTime()
  let count: DeviceCount | undefined
  const answer = await appendBatch(context, testId, entries, async (writing, draft) => {
    const locked = await lockTest(writing, userId, testId)
    if (draft.kind === 'opened' || SIGNATURE_KINDS.has(draft.kind)) throw conflict('own-route', 'This is not entered here.')
    parseProofTestDraft(draft)
    const entry = await appendToTest(writing, locked, draft, { clockOff })
    count = locked.state.devices[draft.deviceId]
    return entry
  })
  const missing = (count?.missing ?? []).slice(0, MOST_RUNS).map(([first, last]): [number, number] => [first, last])
  return { ...answer, resendFrom: missing[0]?.[0] ?? null, missing }
}

export async function openProofTest(
  { context, userId }: Asking,
  shopId: string,
  request: OpenTestRequest,
): Promise<{ id: string; number: string }> {
  const { database } = context
  return inRetriedTransaction(database, async (transaction) => {
    const actor = await membershipOf({ transaction, userId, shopId })
    const now = context.now()
    return openTest({ database, transaction, now }, { transaction, actor, now }, request)
  })
}

/** Signs, countersigns or declines; the password is checked before the transaction begins, under the sign-in limits. */
export async function signProofTest(
  { context, userId }: Asking,
  address: string,
  testId: string,
  request: SignatureRequest,
): Promise<LedgerEntry> {
  if (!(await verifyPassword(context, userId, request.password, address))) {
    throw invalid({ password: 'That is not your password. Nothing was signed.' })
  }
  const { database } = context
  return inRetriedTransaction(database, (transaction) =>
    signTest({ database, transaction, now: context.now() }, context, userId, testId, request),
  )
}
