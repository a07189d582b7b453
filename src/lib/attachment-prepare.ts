import { sha256 as hash } from '@noble/hashes/sha2.js'
import { LARGEST_ATTACHMENT, type Attachment } from '#shared/ledger/envelope'
import { sizeText, sniff, tellsOfItsCamera, type AttachmentType } from './attachment-bytes'

/** Bytes as they will be kept and hashed, and what an entry says of them. */
export interface Prepared {
  attachment: Attachment
  bytes: Uint8Array<ArrayBuffer>
}

/** A file that can't be taken. The message says what is so and what to do. */
export class FileRefused extends Error {
  override readonly name = 'FileRefused'
}

const LONG_EDGE = 2000
const JPEG_QUALITY = 0.85
/** A photo up to this size is kept byte by byte, if it tells nothing but the picture. */
const SMALL_ENOUGH = 1_200_000

const LONGEST_NAME = 120
const NOT_A_PICTURE = 'This file is no photo and no PDF, whatever its name says. Take a photo, or choose a JPEG, PNG or WebP, or a PDF.'
const HEIF =
  'This photo is in HEIC, which not every device here can show. Set the camera to JPEG (often called “most compatible”), or take it here with “Take photo”.'
const UNREADABLE = 'This photo can’t be opened: its file is damaged. Take it again, or choose another.'

/** Makes a picture smaller in the browser; replaced in tests, where no browser draws. */
export type Shrink = (file: Blob) => Promise<Blob>

/** Width and height with the long edge at most 2000 px, never enlarged. */
export function fitted(width: number, height: number): { width: number; height: number } {
  const scale = Math.min(1, LONG_EDGE / Math.max(width, height))
  return { width: Math.max(1, Math.round(width * scale)), height: Math.max(1, Math.round(height * scale)) }
}

/** Drawn the right way up on white and written as JPEG: nothing of what the camera noted goes along. */
async function redraw(file: Blob): Promise<Blob> {
  const picture = await createImageBitmap(file, { imageOrientation: 'from-image' })
  const size = fitted(picture.width, picture.height)
  const canvas = Object.assign(document.createElement('canvas'), size)
  const pen = canvas.getContext('2d')
  if (!pen) throw new Error('no canvas')
  pen.fillStyle = '#fff'
  pen.fillRect(0, 0, size.width, size.height)
  pen.imageSmoothingQuality = 'high'
  pen.drawImage(picture, 0, 0, size.width, size.height)
  picture.close()
  return new Promise((resolve, reject) =>
    canvas.toBlob((blob) => (blob ? resolve(blob) : reject(new Error('no picture'))), 'image/jpeg', JPEG_QUALITY),
  )
}

const hex = (bytes: Uint8Array): string => [...bytes].map((byte) => byte.toString(16).padStart(2, '0')).join('')

/** SHA-256 of bytes, lower-case hex; by the browser where it offers it, which it does on secure origins only. */
export async function sha256Of(bytes: Uint8Array<ArrayBuffer>): Promise<string> {
  const subtle = (globalThis.crypto as Crypto | undefined)?.subtle as SubtleCrypto | undefined
  return hex(subtle ? new Uint8Array(await subtle.digest('SHA-256', bytes)) : hash(bytes))
}

const tooLarge = (size: number, what: 'document' | 'photo'): FileRefused =>
  new FileRefused(
    what === 'document'
      ? `This document has ${sizeText(size)}; at most ${sizeText(LARGEST_ATTACHMENT)} are kept. Scan it at a lower resolution, or attach its pages in parts.`
      : `This photo has ${sizeText(size)}; at most ${sizeText(LARGEST_ATTACHMENT)} are kept. Take it again at a lower resolution.`,
  )

function named(file: File, type: AttachmentType): string | undefined {
  const name = file.name.trim()
  if (name === '') return undefined
  const fits = type === 'image/jpeg' && !/\.jpe?g$/i.test(name) ? `${name.replace(/\.[^.]{1,5}$/, '')}.jpg` : name
  return fits.length <= LONGEST_NAME ? fits : fits.slice(fits.length - LONGEST_NAME).trim()
}

async function bytesOf(file: Blob): Promise<Uint8Array<ArrayBuffer>> {
  return new Uint8Array(await file.arrayBuffer())
}

async function smaller(file: Blob, shrink: Shrink): Promise<Uint8Array<ArrayBuffer>> {
  try {
    return await bytesOf(await shrink(file))
  } catch (failure) {
    throw new FileRefused(UNREADABLE, { cause: failure })
  }
}

/**
 * Makes a chosen file ready to be named in an entry: its real type is looked up in its bytes, a photo is redrawn with
 * its long edge at 2000 px unless it is small and tells nothing of its camera, and the bytes as they will be kept are
 * hashed. A PDF stays as it is. Refuses with `FileRefused`.
 */
export async function prepareAttachment(file: File, shrink: Shrink = redraw): Promise<Prepared> {
  if (file.size === 0) throw new FileRefused('This file is empty. Choose another, or take the photo again.')
  const type = sniff(new Uint8Array(await file.slice(0, 32).arrayBuffer()))
  if (type === null) throw new FileRefused(NOT_A_PICTURE)
  if (type === 'heif') throw new FileRefused(HEIF)
  if (type === 'application/pdf' && file.size > LARGEST_ATTACHMENT) throw tooLarge(file.size, 'document')
  const original = await bytesOf(file)
  const asItIs = type === 'application/pdf' || (original.length <= SMALL_ENOUGH && !tellsOfItsCamera(original, type))
  const bytes = asItIs ? original : await smaller(file, shrink)
  if (bytes.length > LARGEST_ATTACHMENT) throw tooLarge(bytes.length, 'photo')
  const kept: AttachmentType = asItIs ? type : 'image/jpeg'
  const name = named(file, kept)
  return { bytes, attachment: { sha256: await sha256Of(bytes), type: kept, size: bytes.length, ...(name === undefined ? {} : { name }) } }
}
