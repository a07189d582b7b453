import { Router } from 'express'
import type { Request } from 'express'
import { z } from 'zod'
import { appendRequestSchema, type AppendResponse, type AppendResult, type EntriesResponse } from '#shared/api/ledger'
import { openTestRequestSchema, signatureRequestSchema } from '#shared/api/proof-tests'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { SIGNATURE_KINDS } from '#shared/proof-test/entries'
import type { Transaction } from 'sequelize'
import type { AppContext } from '../context'
import { appendPress } from '../ledger/append-press'
import { appendToTest, lockTest } from '../ledger/append-proof-test'
import { openTest } from '../ledger/open-test'
import { parsePressDraft, parseProofTestDraft } from '../ledger/parse'
import { readEntries, readHead, readSeals } from '../ledger/read'
import { inRetriedTransaction } from '../ledger/retry'
import { loadSealKey } from '../ledger/seal-keys'
import { signTest } from '../ledger/sign'
import { createLedger, type Writing } from '../ledger/write'
import { authenticate, personOf } from '../middleware/authenticate'
import { idParam, parseBody, parseQuery, shopOf } from '../middleware/validate'
import { conflict, invalid, notFound, Problem } from '../problem'
import { membershipOf } from '../services/membership'
import { namesOf } from '../services/names'
import { verifyPassword } from '../services/sessions'

type Append = (writing: Writing, draft: EntryDraft) => Promise<LedgerEntry>

/** Takes a batch in order, an entry a transaction, with a result for each: what was kept stays kept. */
async function appendBatch(
  context: AppContext,
  ledgerId: string,
  entries: readonly EntryDraft[],
  append: Append,
  resendFrom: () => number | null = () => null,
): Promise<AppendResponse> {
  const results: AppendResult[] = []
  for (const draft of entries) {
    try {
      if (draft.ledgerId !== ledgerId) throw invalid({ ledgerId: 'This entry belongs to another ledger.' })
      const entry = await inRetriedTransaction(context.database, (transaction) =>
        append({ database: context.database, transaction, now: context.now() }, draft),
      )
      results.push({ outcome: 'kept', id: draft.id, entry })
    } catch (error) {
      if (!(error instanceof Problem) || error.status === 404 || error.status >= 500) throw error
      results.push({ outcome: 'refused', id: draft.id, problem: error.toBody() })
    }
  }
  return inRetriedTransaction(context.database, async (transaction) => {
    const head = await readHead(context.database, transaction, ledgerId)
    return { results, headSeq: head?.headSeq ?? 0, headHash: head?.headHash ?? '', resendFrom: resendFrom() }
  })
}

const afterSchema = z.object({ after: z.coerce.number().int().min(0).default(0) })

async function entriesOf(
  context: AppContext,
  transaction: Transaction,
  request: Request,
  subject: 'proof-test' | 'press',
  ledgerId: string,
): Promise<EntriesResponse> {
  const { database } = context
  const { after } = parseQuery(request, afterSchema)
  const head = await readHead(database, transaction, ledgerId)
  if (!head || head.subject !== subject) throw notFound(subject === 'press' ? 'This press' : 'This proof test')
  const entries = await readEntries(database, transaction, ledgerId, after)
  const last = entries.at(-1)
  return {
    ledgerId,
    entries,
    headSeq: last?.seq ?? head.headSeq,
    headHash: last?.hash ?? head.headHash,
    people: await namesOf(
      transaction,
      entries.map((entry) => entry.authorId),
    ),
    sealed: (await readSeals(database, transaction, ledgerId)).map(({ ledgerId: _ledgerId, ...seal }) => seal),
  }
}

/** Both ledgers over HTTP: reading what came after a number, and the only ways in. */
export function ledgerRoutes(context: AppContext): Router {
  const router = Router()
  const key = loadSealKey(context.config)
  router.use(['/presses', '/proof-tests'], authenticate(context))

  router.post('/presses', async (request, response) => {
    const shopId = shopOf(request)
    const { userId } = personOf(request)
    const { entries } = parseBody(request, appendRequestSchema)
    const [draft] = entries
    if (!draft || entries.length !== 1 || draft.kind !== 'registered') throw invalid({ entries: 'A press is entered with one entry.' })
    parsePressDraft(draft)
    const answer = await appendBatch(context, draft.ledgerId, [draft], async (writing, one) => {
      const actor = await membershipOf({ transaction: writing.transaction, userId, shopId })
      await createLedger(writing, { id: one.ledgerId, shopId, subject: 'press' })
      return appendPress(writing, { transaction: writing.transaction, actor, now: writing.now }, one)
    })
    response.status(201).json(answer)
  })

  router.get('/presses/:id/entries', async (request, response) => {
    const ledgerId = idParam(request, 'id')
    const { userId } = personOf(request)
    const answer = await inRetriedTransaction(context.database, async (transaction) => {
      const head = await readHead(context.database, transaction, ledgerId)
      if (!head || head.subject !== 'press') throw notFound('This press')
      await membershipOf({ transaction, userId, shopId: head.shopId })
      return entriesOf(context, transaction, request, 'press', ledgerId)
    })
    response.json(answer)
  })

  router.post('/presses/:id/entries', async (request, response) => {
    const ledgerId = idParam(request, 'id')
    const { userId } = personOf(request)
    const { entries } = parseBody(request, appendRequestSchema)
    const answer = await appendBatch(context, ledgerId, entries, async (writing, draft) => {
      const head = await readHead(writing.database, writing.transaction, ledgerId)
      if (!head) throw notFound('This press')
      const actor = await membershipOf({ transaction: writing.transaction, userId, shopId: head.shopId })
      parsePressDraft(draft)
      return appendPress(writing, { transaction: writing.transaction, actor, now: writing.now }, draft)
    })
    response.json(answer)
  })

  router.post('/proof-tests', async (request, response) => {
    const shopId = shopOf(request)
    const { userId } = personOf(request)
    const body = parseBody(request, openTestRequestSchema)
    const answer = await inRetriedTransaction(context.database, async (transaction) => {
      const actor = await membershipOf({ transaction, userId, shopId })
      const now = context.now()
      return openTest({ database: context.database, transaction, now }, { transaction, actor, now }, body)
    })
    response.status(201).json(answer)
  })

  router.get('/proof-tests/:id/entries', async (request, response) => {
    const ledgerId = idParam(request, 'id')
    const { userId } = personOf(request)
    const answer = await inRetriedTransaction(context.database, async (transaction) => {
      const head = await readHead(context.database, transaction, ledgerId)
      if (!head || head.subject !== 'proof-test') throw notFound('This proof test')
      await membershipOf({ transaction, userId, shopId: head.shopId })
      return entriesOf(context, transaction, request, 'proof-test', ledgerId)
    })
    response.json(answer)
  })

  router.post('/proof-tests/:id/entries', async (request, response) => {
    const ledgerId = idParam(request, 'id')
    const { userId } = personOf(request)
    const { entries, sentAt } = parseBody(request, appendRequestSchema)
    const clockOff = Date.parse(sentAt) - context.now().getTime()
    let missing: number | null = null
    const append: Append = async (writing, draft) => {
      const locked = await lockTest(writing, userId, ledgerId)
      if (draft.kind === 'opened' || SIGNATURE_KINDS.has(draft.kind)) throw conflict('own-route', 'This is not entered here.')
      parseProofTestDraft(draft)
      const expected = (locked.state.devices[draft.deviceId] ?? draft.deviceSeq - 1) + 1
      if (draft.deviceSeq > expected) missing ??= expected
      return appendToTest(writing, locked, draft, clockOff)
    }
    const answer = await appendBatch(context, ledgerId, entries, append, () => missing)
    response.json(answer)
  })

  router.post('/proof-tests/:id/signatures', async (request, response) => {
    const ledgerId = idParam(request, 'id')
    const { userId } = personOf(request)
    const body = parseBody(request, signatureRequestSchema)
    if (!(await verifyPassword(context, userId, body.password, request.ip ?? ''))) {
      throw invalid({ password: 'That is not your password. Nothing was signed.' })
    }
    const entry = await inRetriedTransaction(context.database, (transaction) =>
      signTest({ database: context.database, transaction, now: context.now() }, key, userId, ledgerId, body),
    )
    response.status(201).json({ entry })
  })

  return router
}
