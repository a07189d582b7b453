import { QueryTypes } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { SignatureRequest } from '#shared/api/proof-tests'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { makeSeal } from '#shared/ledger/seal'
import { PROOF_TEST_VERSION, type Opened } from '#shared/proof-test/entries'
import type { AppContext } from '../context'
import { conflict, notFound } from '../problem'
import { absentHashes } from './held-files'
import { tellOfSignature } from './record-notices'
import { appendToTest, lockTest } from './test-entries'
import { alteredProblem, findBroken } from '../ledger/check-stored'
import { SERVER_DEVICE } from '../ledger/press'
import { readEntry, readSeals, readStored } from '../ledger/read'
import { loadSealKey } from '../ledger/seal-keys'
import type { Writing } from '../ledger/write'

function payloadOf(
  request: SignatureRequest,
  opened: Opened,
  userId: string,
  signedAt: string,
): { kind: string; payload: Record<string, unknown> } {
  const { lead, witness } = opened.people
  const person = userId === witness.id ? witness : lead
  const printedName = person.name
  if (request.as === 'decline') return { kind: 'declined', payload: { personId: userId, printedName, why: request.why } }
  const { meaning, headHash } = request
  return {
    kind: request.as === 'lead' ? 'signed' : 'countersigned',
    payload: { personId: userId, printedName, meaning, signedAt, headHash, relation: person.relation },
  }
}

/** What seals are made and checked with, and who is told of a ledger that is not whole. */
export type Sealing = Pick<AppContext, 'config' | 'logger'>

/** A seal vouches for every entry below it, so that none is put on a ledger that somebody changed meanwhile. */
async function refuseBroken({ database, transaction }: Writing, sealing: Sealing, testId: string): Promise<void> {
  const stored = await readStored(database, transaction, testId)
  const broken = findBroken({ ...sealing, database }, testId, stored, await readSeals(database, transaction, testId))
  if (broken !== null) throw alteredProblem(broken)
}

/**
 * Signs, countersigns or declines, for a person whose password was just checked: the only writer of these
 * kinds. Refuses when the ledger has moved on since the person read it, or is not whole as it is stored. Every
 * signature is sealed.
 */
export async function signTest(
  writing: Writing,
  sealing: Sealing,
  userId: string,
  testId: string,
  request: SignatureRequest,
): Promise<LedgerEntry> {
  const { database, transaction, now } = writing
  const locked = await lockTest(writing, userId, testId)
  const { head, state } = locked
  if (!state.opened) throw notFound('This proof test')
  const known = await readEntry(database, transaction, request.entryId)
  if (known) {
    if (known.ledgerId === testId && known.authorId === userId) return known
    throw conflict('id-reused', 'This signature’s id was used already. Sign again.')
  }
  await refuseBroken(writing, sealing, testId)
  if (head.headHash !== request.headHash) {
    throw conflict('stale-head', 'Something was added to this record since you read it. Read it again, then sign.')
  }
  const { kind, payload } = payloadOf(request, state.opened, userId, now.toISOString())
  const draft: EntryDraft = {
    id: request.entryId,
    ledgerId: testId,
    kind,
    v: PROOF_TEST_VERSION,
    payload,
    authorId: userId,
    deviceId: SERVER_DEVICE,
    deviceSeq: head.headSeq + 1,
    basedOnSeq: head.headSeq,
    observedAt: now.toISOString(),
    bootId: SERVER_DEVICE,
    monotonicMs: Math.round(performance.now()),
    attachments: [],
    overrides: [],
  }
  // Asked in the same transaction: bytes only ever arrive, so that what is here now is here when it commits.
  const absentFiles = await absentHashes(transaction, head.shopId, state.attachments)
  const entry = await appendToTest(writing, locked, draft, { absentFiles })
  const key = loadSealKey(sealing.config)
  const seal = makeSeal(
    { kid: key.kid, ledgerId: testId, seq: entry.seq, headHash: entry.hash, sealedAt: now.toISOString() },
    key.secretKey,
  )
  await database.query(
    'INSERT INTO seals (id, shop_id, ledger_id, seq, head_hash, kid, signature, entry_id, sealed_at) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?)',
    {
      replacements: [newId(), head.shopId, testId, seal.seq, seal.headHash, seal.kid, seal.signature, entry.id, now],
      type: QueryTypes.INSERT,
      transaction,
    },
  )
  await tellOfSignature(writing, head.shopId, locked.state, entry, seal)
  return entry
}
