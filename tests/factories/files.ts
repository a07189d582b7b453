import { createHash } from 'node:crypto'
import sharp from 'sharp'
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

/** The least that a reader of documents opens: one empty page (ISO 32000-1, 7.5). */
export function pdf(title = 'Certificate'): FileToSend {
  const objects = [
    '<< /Type /Catalog /Pages 2 0 R >>',
    '<< /Type /Pages /Kids [3 0 R] /Count 1 >>',
    '<< /Type /Page /Parent 2 0 R /MediaBox [0 0 200 100] >>',
    `<< /Title (${title}) >>`,
  ]
  let text = '%PDF-1.4\n'
  const places = objects.map((object, index) => {
    const at = text.length
    text += `${index + 1} 0 obj\n${object}\nendobj\n`
    return at
  })
  const from = text.length
  const rows = places.map((at) => `${String(at).padStart(10, '0')} 00000 n \n`).join('')
  text += `xref\n0 ${objects.length + 1}\n0000000000 65535 f \n${rows}trailer\n<< /Size ${objects.length + 1} /Root 1 0 R /Info 4 0 R >>\nstartxref\n${from}\n%%EOF\n`
  return fileOf(Buffer.from(text, 'latin1'), 'application/pdf', `${title}.pdf`)
}
