import type { Sequelize, Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { CertificateFile } from '#shared/api/instruments'
import { calibrationSchema } from '#shared/instruments/model'
import type { Calibration as CalibrationBody } from '#shared/instruments/model'
import { attachmentSchema } from '#shared/ledger/envelope'
import type { Attachment } from '#shared/ledger/envelope'
import type { Work } from '../context'
import { recallInstrument } from '../ledger/press'
import { Calibration, User } from '../models'
import type { Instrument } from '../models'
import { conflict, invalid } from '../problem'
import { absentHashes } from './held-files'
import { authorize } from './membership'

export interface DatedCalibration {
  id: string
  calibration: CalibrationBody
  certificateFile: CertificateFile | null
  createdAt: Date
  createdBy: string
}

/** Somewhere on earth it is this day already. */
function latestToday(now: Date): string {
  return new Date(now.getTime() + 14 * 3_600_000).toISOString().slice(0, 10)
}

const readBody = (calibration: Pick<Calibration, 'details'>): CalibrationBody => calibrationSchema.parse(calibration.details)

type FileColumns = Pick<Calibration, 'fileSha256' | 'fileType' | 'fileSize' | 'fileName'>

/** The file of a calibration's certificate as it was named; null without one. */
export function certificateFileOf({ fileSha256, fileType, fileSize, fileName }: FileColumns): Attachment | null {
  if (fileSha256 === null) return null
  return attachmentSchema.parse({ sha256: fileSha256, type: fileType, size: fileSize, ...(fileName === null ? {} : { name: fileName }) })
}

/** The latest first: by the day of the comparison, then by when it was entered. */
const latestFirst: [string, string][] = [
  ['calibratedOn', 'DESC'],
  ['createdAt', 'DESC'],
  ['id', 'DESC'],
]

/** The calibration in force of each instrument that ever had one: the latest by its day. */
export async function calibrationsInForce(
  shopId: string,
  instrumentIds: readonly string[],
  transaction: Transaction,
): Promise<Map<string, CalibrationBody>> {
  const inForce = new Map<string, CalibrationBody>()
  if (instrumentIds.length === 0) return inForce
  const rows = await Calibration.findAll({
    where: { shopId, instrumentId: [...instrumentIds] },
    attributes: ['instrumentId', 'details'],
    order: latestFirst,
    raw: true,
    transaction,
  })
  for (const row of rows) if (!inForce.has(row.instrumentId)) inForce.set(row.instrumentId, readBody(row))
  return inForce
}

/** Every calibration of an instrument, the latest first, with the names of who entered them. */
export async function calibrationsOf(instrument: Pick<Instrument, 'id' | 'shopId'>, transaction: Transaction): Promise<DatedCalibration[]> {
  const rows = await Calibration.findAll({
    where: { shopId: instrument.shopId, instrumentId: instrument.id },
    order: latestFirst,
    raw: true,
    transaction,
  })
  const users = await User.findAll({ where: { id: rows.map((row) => row.createdBy) }, attributes: ['id', 'name'], raw: true, transaction })
  const names = new Map(users.map((user) => [user.id, user.name]))
  const files = new Map(rows.map((row) => [row.id, certificateFileOf(row)]))
  const named = [...files.values()].filter((file) => file !== null)
  const absent = new Set(await absentHashes(transaction, instrument.shopId, named))
  const fileOf = (id: string): CertificateFile | null => {
    const file = files.get(id) ?? null
    return file && { ...file, present: !absent.has(file.sha256) }
  }
  return rows.map((row) => ({
    id: row.id,
    calibration: readBody(row),
    certificateFile: fileOf(row.id),
    createdAt: row.createdAt,
    createdBy: names.get(row.createdBy) ?? '',
  }))
}

/**
 * Takes the instrument under its row lock, so that two calibrations at once leave the later one in force.
 * One that found it out of tolerance suspends, in the same transaction, every clearance that rests on it.
 */
export async function addCalibration(
  database: Sequelize,
  { transaction, actor, now }: Work,
  instrument: Instrument,
  calibration: CalibrationBody,
  certificateFile: Attachment | null = null,
): Promise<void> {
  authorize(actor, 'calibration:write', { shopId: instrument.shopId })
  if (instrument.retiredAt !== null) throw conflict('retired', 'This instrument is retired. Bring it back into use first.')
  if (calibration.calibratedOn > latestToday(now))
    throw invalid({ calibratedOn: 'This day is still to come. Give the day the comparison was made.' })
  const { calibratedOn, dueOn, certificate, comparedWith, result } = calibration
  await Calibration.create(
    {
      id: newId(),
      shopId: instrument.shopId,
      instrumentId: instrument.id,
      calibratedOn,
      dueOn,
      certificate,
      comparedWith,
      result,
      details: calibration,
      fileSha256: certificateFile?.sha256 ?? null,
      fileType: certificateFile?.type ?? null,
      fileSize: certificateFile?.size ?? null,
      fileName: certificateFile?.name ?? null,
      createdBy: actor.userId,
      createdAt: now,
    },
    { transaction },
  )
  const inForce = await calibrationsInForce(instrument.shopId, [instrument.id], transaction)
  if (inForce.get(instrument.id)?.result === 'out of tolerance') {
    await recallInstrument({ database, transaction, now }, instrument.shopId, actor.userId, {
      instrumentId: instrument.id,
      code: instrument.code,
      calibratedOn,
    })
  }
  await instrument.update({ dueOn: inForce.get(instrument.id)?.dueOn ?? null }, { transaction })
}
