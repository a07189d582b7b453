import { createHash } from 'node:crypto'
import sharp from 'sharp'
import { plainPdf } from '#server/database/seeders/plain-pdf'
import type { Attachment } from '#shared/ledger/envelope'

export interface FileToSend {
  bytes: Buffer
  attachment: Attachment
}

export function fileOf(bytes: Buffer, type: Attachment['type'], name?: string): FileToSend {
  const sha256 = createHash('sha256').update(bytes).digest('hex')
  return { bytes, attachment: { sha256, type, size: bytes.length, ...(name === undefined ? {} : { name }) } }
}

/** Grey noise over a colour: no two are the same, and none of them is of anything. */
export async function picture(format: 'jpeg' | 'png' | 'webp' = 'jpeg', size = { width: 800, height: 600 }): Promise<FileToSend> {
  const noise = { type: 'gaussian' as const, mean: 128, sigma: 30 }
  const drawn = sharp({ create: { ...size, channels: 3, background: '#31506e', noise } })
  return fileOf(await drawn.toFormat(format).toBuffer(), `image/${format}`, `Joint 7.${format}`)
}

/** A document of one page. */
export const pdf = (title = 'Certificate'): FileToSend => fileOf(plainPdf([title]), 'application/pdf', `${title}.pdf`)
