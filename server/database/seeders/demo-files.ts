import { createHash } from 'node:crypto'
import type { Attachment as Named } from '#shared/ledger/envelope'
import { Attachment } from '../../models'
import { demoPhoto, type DrawnSubject } from './demo-drawings'
import type { Desk } from './desk'
import { plainPdf } from './plain-pdf'

/** Keeps the bytes of a file of the demo shop, the row after them, and answers how an entry names it. */
async function keep(
  { storage, transaction }: Desk,
  shopId: string,
  at: number,
  bytes: Buffer,
  file: Pick<Named, 'type' | 'name'>,
): Promise<Named> {
  const sha256 = createHash('sha256').update(bytes).digest('hex')
  await storage.put(`${shopId}/${sha256}`, bytes)
  const { type } = file
  await Attachment.upsert({ shopId, sha256, type, size: bytes.length, storedAt: new Date(at) }, { transaction })
  return { sha256, size: bytes.length, ...file }
}

export async function keepDemoPhoto(desk: Desk, shopId: string, at: number, subject: DrawnSubject, name: string): Promise<Named> {
  return keep(desk, shopId, at, await demoPhoto(subject), { type: 'image/jpeg', name })
}

export function keepDemoCertificate(desk: Desk, shopId: string, at: number, lines: readonly string[], name: string): Promise<Named> {
  const bytes = plainPdf(['DEMO CERTIFICATE', 'Invented for the demo shop: no laboratory stands behind it.', ...lines])
  return keep(desk, shopId, at, bytes, { type: 'application/pdf', name })
}
