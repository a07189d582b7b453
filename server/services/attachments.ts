import { createHash } from 'node:crypto'
import { fileTypeFromBuffer } from 'file-type'
import { QueryTypes } from 'sequelize'
import type { Transaction } from 'sequelize'
import { PICTURE_SIZES, type HeldAttachment, type PictureSize } from '#shared/api/attachments'
import type { NamedAttachment } from '#shared/ledger/attachments'
import type { Attachment as Named, LedgerSubject } from '#shared/ledger/envelope'
import { can, isGuestOf } from '#shared/policy'
import { inTransaction } from '../context'
import { pressState, proofTestState } from '../ledger/folds'
import { readHead, type LedgerHead } from '../ledger/read'
import { Calibration } from '../models'
import { forbidden, notFound, Problem } from '../problem'
import { smallerPicture, type Picture } from '../storage/pictures'
import { certificateFileOf } from './calibrations'
import { absentHashes } from './held-files'
import type { Asking } from './ledgers'
import { actorIn, authorize, membershipOf } from './membership'
import { namesOf } from './names'
import { pressAction } from './press-entries'
import { assignmentOf } from './test-entries'

/** Who names a file, and so says who may read and send it. */
export type NamedBy = { ledger: string } | { calibration: string }
export type Doing = 'read' | 'send'

interface Files<File extends Named = Named> {
  shopId: string
  named: readonly File[]
}

interface Asked {
  context: Asking['context']
  userId: string
  transaction: Transaction
}

async function filesOfTest({ context, userId, transaction }: Asked, head: LedgerHead, doing: Doing): Promise<Files<NamedAttachment>> {
  const { shopId } = head
  const state = await proofTestState(context.database, transaction, head)
  const assignment = assignmentOf(state)
  const actor = await actorIn({ transaction, userId, shopId })
  const hasPart = assignment !== undefined && Object.values(assignment).includes(userId)
  if (actor.role === null && !hasPart && !isGuestOf(actor, head.id)) throw notFound('This proof test')
  if (doing === 'send') authorize(actor, 'proof-test:append-fact', { shopId, assignment })
  return { shopId, named: state.attachments }
}

async function filesOfPress({ context, userId, transaction }: Asked, head: LedgerHead, doing: Doing): Promise<Files<NamedAttachment>> {
  const { shopId } = head
  const actor = await membershipOf({ transaction, userId, shopId })
  const { history } = await pressState(context.database, transaction, head)
  const all = history.flatMap(({ attachments, seq, kind }) => attachments.map((one) => ({ ...one, seq, kind, lost: null })))
  if (doing === 'read') return { shopId, named: all }
  // Whoever may make an entry of a kind may send what such an entry names: the crew their photos of a knock, not of an examination.
  const mayMake = (kind: string) => {
    const action = pressAction(kind)
    return action !== undefined && can(actor, action, { shopId })
  }
  const named = all.filter(({ kind }) => mayMake(kind))
  return { shopId, named }
}

async function filesOfLedger(asked: Asked, ledgerId: string, doing: Doing): Promise<Files<NamedAttachment>> {
  const head = await readHead(asked.context.database, asked.transaction, ledgerId)
  if (!head) throw notFound()
  return head.subject === 'press' ? filesOfPress(asked, head, doing) : filesOfTest(asked, head, doing)
}

async function filesOfCalibration({ userId, transaction }: Asked, id: string, doing: Doing): Promise<Files> {
  const calibration = await Calibration.findOne({ where: { id }, raw: true, transaction })
  if (!calibration) throw notFound('This calibration')
  const { shopId } = calibration
  const actor = await actorIn({ transaction, userId, shopId })
  if (actor.role === null) throw notFound('This calibration')
  authorize(actor, doing === 'send' ? 'calibration:write' : 'instrument:read', { shopId })
  const file = certificateFileOf(calibration)
  return { shopId, named: file ? [file] : [] }
}

function filesOf(asked: Asked, by: NamedBy, doing: Doing): Promise<Files> {
  return 'ledger' in by ? filesOfLedger(asked, by.ledger, doing) : filesOfCalibration(asked, by.calibration, doing)
}

const keyOf = (shopId: string, sha256: string): string => `${shopId}/${sha256}`
const sha256Of = (bytes: Buffer): string => createHash('sha256').update(bytes).digest('hex')

/** A file that somebody may send: what was named, and where it goes. */
export interface Expected {
  shopId: string
  file: Named
}

const wrongBytes = (detail: string): Problem =>
  new Problem(422, 'wrong-bytes', `${detail} It was not kept. Choose the file again and name it in a new entry.`)

/** What is to come under a hash, before its bytes are read: 409 while no entry names it, since the entry goes first. */
export async function expectFile({ context, userId }: Asking, by: NamedBy, sha256: string, type: string): Promise<Expected> {
  const { shopId, files } = await inTransaction(context, async (transaction) => {
    const asked = { context, userId, transaction }
    const isIt = (one: Named) => one.sha256 === sha256
    const { shopId, named } = await filesOf(asked, by, 'send')
    const files = named.filter(isIt)
    // Named by an entry that this person may not make: it never becomes theirs to send, so that trying again is no use.
    if (files.length === 0 && (await filesOf(asked, by, 'read')).named.some(isIt)) throw forbidden()
    return { shopId, files }
  })
  const file = files.find((one) => one.type === type)
  if (file) return { shopId, file }
  if (files.length > 0) throw wrongBytes('This file was named as another type.')
  throw new Problem(409, 'not-named-yet', 'No entry names this file yet. Send the entry first, then the file.')
}

/** Keeps the bytes of a file, when they are what was named; once and for all, so that sending them again is harmless. */
export async function keepFile({ context }: Asking, { shopId, file }: Expected, bytes: Buffer): Promise<void> {
  const { sha256, type, size } = file
  if (bytes.length !== size) throw wrongBytes(`This file has ${bytes.length} bytes and was named with ${size}.`)
  if (sha256Of(bytes) !== sha256) throw wrongBytes('These are not the bytes that were named.')
  if ((await fileTypeFromBuffer(bytes))?.mime !== type) throw wrongBytes('This file is not what its name says.')
  const key = keyOf(shopId, sha256)
  // Also when it is known already: a file that got lost under a row that promises it comes back this way.
  if (!(await context.storage.has(key))) await context.storage.put(key, bytes)
  await inTransaction(
    context,
    (transaction) =>
      context.database.query('INSERT IGNORE INTO attachments (shop_id, sha256, type, size, stored_at) VALUES (?, ?, ?, ?, ?)', {
        replacements: [shopId, sha256, type, size, context.now()],
        type: QueryTypes.INSERT,
        transaction,
      }),
    { idempotent: true },
  )
}

/** A file's bytes, or a smaller picture of it. */
export interface Served {
  file: Named
  bytes: Buffer
}

const notHereYet = (): Problem =>
  new Problem(
    404,
    'not-here-yet',
    'This file is named and has not arrived yet. It comes from the device that took it, once that has a connection.',
  )

/** The bytes as they were sent: checked against their hash each time, so that nobody is shown others. */
async function readWhole({ storage, logger }: Asking['context'], key: string, sha256: string): Promise<Buffer> {
  const bytes = await storage.get(key)
  if (bytes === null) {
    logger.error({ key }, 'A file that was kept is missing from the storage')
    throw notHereYet()
  }
  if (sha256Of(bytes) !== sha256) {
    logger.error({ key }, 'A file that was kept has other bytes now')
    throw new Problem(
      500,
      'altered-file',
      'The bytes of this file were altered after they were kept, so they are not shown. Restore them from a backup.',
    )
  }
  return bytes
}

/** A smaller picture of a photo that is kept, made from bytes that were checked; null when they can't be shown as one. */
export async function pictureOf(context: Asking['context'], shopId: string, { sha256 }: Named, longest: number): Promise<Picture | null> {
  return smallerPicture(await readWhole(context, keyOf(shopId, sha256), sha256), longest)
}

async function readSmaller(context: Asking['context'], shopId: string, file: Named, size: PictureSize): Promise<Buffer> {
  if (file.type === 'application/pdf') throw new Problem(404, 'no-picture', 'A document has no small picture. Open the document itself.')
  const smallKey = `${keyOf(shopId, file.sha256)}.${size}`
  const made = await context.storage.get(smallKey)
  if (made !== null) return made
  const picture = await pictureOf(context, shopId, file, PICTURE_SIZES[size])
  if (picture === null) throw new Problem(422, 'no-picture', 'This file can’t be shown as a picture. Its bytes are kept as they were sent.')
  await context.storage.put(smallKey, picture.jpeg)
  return picture.jpeg
}

/** A file that a ledger or a calibration names, for somebody who may read it. */
export async function readFile({ context, userId }: Asking, by: NamedBy, sha256: string, size?: PictureSize): Promise<Served> {
  const { shopId, file, isHere } = await inTransaction(context, async (transaction) => {
    const { shopId, named } = await filesOf({ context, userId, transaction }, by, 'read')
    const found = named.find((one) => one.sha256 === sha256)
    if (!found) throw notFound('This file')
    return { shopId, file: found, isHere: (await absentHashes(transaction, shopId, [found])).length === 0 }
  })
  if (!isHere) throw notHereYet()
  if (size === undefined) return { file, bytes: await readWhole(context, keyOf(shopId, sha256), sha256) }
  return { file: { ...file, type: 'image/jpeg' }, bytes: await readSmaller(context, shopId, file, size) }
}

/** Every file that a ledger names, with whether it is here. */
export async function listFiles({ context, userId }: Asking, subject: LedgerSubject, ledgerId: string): Promise<HeldAttachment[]> {
  return inTransaction(context, async (transaction) => {
    const head = await readHead(context.database, transaction, ledgerId)
    if (head?.subject !== subject) throw notFound(subject === 'press' ? 'This press' : 'This proof test')
    const { shopId, named } = await filesOfLedger({ context, userId, transaction }, ledgerId, 'read')
    const absent = new Set(await absentHashes(transaction, shopId, named))
    const names = await namesOf(
      transaction,
      named.flatMap(({ lost }) => (lost ? [lost.by] : [])),
    )
    return named.map(({ kind: _kind, lost, ...file }) => ({
      ...file,
      present: !absent.has(file.sha256),
      lost: lost && { ...lost, by: names[lost.by] ?? '' },
    }))
  })
}
