import { v7 as newId } from 'uuid'
import { entryText, FIRST_PREV_HASH, sha256Hex } from '#shared/ledger/chain'
import type { LedgerEntry as Entry, LedgerSubject } from '#shared/ledger/envelope'
import type { PressDraft } from '#shared/press/entries'
import type { FrameKind } from '#shared/press/model'
import { Ledger, LedgerEntry, Press, ProofTest } from '#server/models/index'

async function makeLedger(shopId: string, subject: LedgerSubject, id: string): Promise<void> {
  await Ledger.create({ id, shopId, subject, headSeq: 0, headHash: FIRST_PREV_HASH, createdAt: new Date() })
}

interface PressGiven {
  id?: string
  name?: string
  whatFor?: string
  kind?: FrameKind
  status?: string
  ratedTons?: number
  clearedTons?: number | null
  clearedUntil?: string | null
  lastChangedAt?: Date
}

const SHORT_TON = 8896.443230521

/** A row of the register of presses with its empty ledger; what lists read, without going through the writer. */
export async function makePressRow(shopId: string, given: PressGiven = {}): Promise<string> {
  const id = given.id ?? newId()
  const rated = given.ratedTons ?? 12
  const cleared = given.clearedTons ?? null
  await makeLedger(shopId, 'press', id)
  await Press.create({
    id,
    shopId,
    name: given.name ?? 'Press 2',
    whatFor: given.whatFor ?? 'straightening press',
    kind: given.kind ?? 'h-frame',
    status: given.status ?? 'building',
    ratedLoadNewton: rated * SHORT_TON,
    ratedLoadText: String(rated),
    ratedLoadUnit: 'short-ton',
    clearedToNewton: cleared === null ? null : cleared * SHORT_TON,
    clearedToText: cleared === null ? null : String(cleared),
    clearedToUnit: cleared === null ? null : 'short-ton',
    clearedUntil: given.clearedUntil ?? null,
    jointCount: 8,
    jointsAccepted: 8,
    lastChangedAt: given.lastChangedAt ?? new Date('2026-09-15T10:00:00Z'),
    headSeq: 1,
  })
  return id
}

interface TestGiven {
  id?: string
  number?: number
  pressName?: string
  status?: string
  result?: string | null
  lead?: { userId: string; name: string }
  openedAt?: Date
  concludedAt?: Date | null
}

let lastNumber = 0

/** A row of the register of proof tests with its empty ledger. */
export async function makeTestRow(
  shopId: string,
  pressId: string,
  people: { lead: { userId: string; name: string }; witness: { userId: string; name: string } },
  given: TestGiven = {},
): Promise<string> {
  const id = given.id ?? newId()
  lastNumber += 1
  const number = given.number ?? lastNumber
  await makeLedger(shopId, 'proof-test', id)
  await ProofTest.create({
    id,
    shopId,
    number: `PT-${String(number).padStart(4, '0')}`,
    numberIndex: number,
    pressId,
    pressName: given.pressName ?? 'Press 2',
    protocolName: 'First load by quarters',
    status: given.status ?? 'signed',
    result: given.result ?? null,
    ratedLoadNewton: 12 * SHORT_TON,
    ratedLoadText: '12',
    ratedLoadUnit: 'short-ton',
    reachedPercent: given.result === 'rejected' ? 75 : 100,
    stoppedAtPercent: given.result === 'rejected' ? 75 : null,
    leadId: people.lead.userId,
    leadName: people.lead.name,
    witnessId: people.witness.userId,
    witnessName: people.witness.name,
    openedAt: given.openedAt ?? new Date('2026-09-14T15:20:00Z'),
    concludedAt: given.concludedAt ?? null,
    sealedAt: null,
    headSeq: 1,
  })
  return id
}

/** Writes entries into a ledger's table as they would be stored. */
export async function storeEntries(shopId: string, entries: readonly Entry[]): Promise<void> {
  await LedgerEntry.bulkCreate(
    entries.map(({ hash, ...entry }) => ({
      ledgerId: entry.ledgerId,
      seq: entry.seq,
      shopId,
      id: entry.id,
      kind: entry.kind,
      canonical: entryText(entry, entry),
      prevHash: entry.prevHash,
      hash,
      authorId: entry.authorId,
      observedAt: new Date(entry.observedAt),
      receivedAt: new Date(entry.receivedAt),
      irregular: entry.irregular.length > 0,
    })),
  )
}

/** A press's ledger, chained from its first entry. */
export function pressLedger(pressId: string, authorId: string, drafts: readonly PressDraft[], at = '2026-09-18T10:00:00.000Z'): Entry[] {
  const deviceId = newId()
  const bootId = newId()
  let prevHash = FIRST_PREV_HASH
  return drafts.map((draft, index) => {
    const seq = index + 1
    const made = {
      id: newId(),
      ledgerId: pressId,
      kind: draft.kind,
      v: 1,
      payload: draft.payload,
      authorId,
      deviceId,
      deviceSeq: seq,
      basedOnSeq: index,
      observedAt: at,
      bootId,
      monotonicMs: index * 1000,
      attachments: [],
      overrides: [],
    }
    const chained = { seq, receivedAt: at, irregular: [], prevHash }
    const hash = sha256Hex(entryText(made, chained))
    prevHash = hash
    return { ...made, ...chained, hash }
  })
}
