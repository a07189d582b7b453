import type { Attachment } from '#shared/ledger/envelope'

export type AttachmentType = Attachment['type']

/** What the first bytes of a file say it is, whatever its name says. */
export type Sniffed = AttachmentType | 'heif' | null

const ascii = (bytes: Uint8Array, from: number, to: number): string => String.fromCharCode(...bytes.subarray(from, to))

/** Brands of the ISO base media file format (ISO/IEC 14496-12) that hold a still picture in HEIF or AVIF. */
const HEIF_BRANDS = new Set(['heic', 'heix', 'heim', 'heis', 'hevc', 'hevx', 'mif1', 'msf1', 'avif', 'avis'])

/**
 * The real type of a file by its signature: JPEG (ITU-T T.81, SOI), PNG (ISO/IEC 15948, 5.2), WebP (RFC 9649, 2.4),
 * PDF (ISO 32000-2, 7.5.2), HEIF (ISO/IEC 23008-12). Null for anything else.
 */
export function sniff(bytes: Uint8Array): Sniffed {
  if (bytes[0] === 0xff && bytes[1] === 0xd8 && bytes[2] === 0xff) return 'image/jpeg'
  if (ascii(bytes, 0, 8) === '\x89PNG\r\n\x1a\n') return 'image/png'
  if (ascii(bytes, 0, 4) === 'RIFF' && ascii(bytes, 8, 12) === 'WEBP') return 'image/webp'
  if (ascii(bytes, 0, 5) === '%PDF-') return 'application/pdf'
  return ascii(bytes, 4, 8) === 'ftyp' && HEIF_BRANDS.has(ascii(bytes, 8, 12)) ? 'heif' : null
}

const EXIF_AND_XMP = 0xe1
const IPTC = 0xed
const START_OF_SCAN = 0xda

/** JPEG keeps what the camera knew in application segments before the picture itself. */
function jpegTells(bytes: Uint8Array): boolean {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  for (let at = 2; at + 4 <= bytes.length && bytes[at] === 0xff;) {
    const marker = bytes[at + 1]
    if (marker === EXIF_AND_XMP || marker === IPTC) return true
    if (marker === START_OF_SCAN) return false
    at += 2 + view.getUint16(at + 2)
  }
  return false
}

const PNG_TELLING = new Set(['eXIf', 'iTXt', 'zTXt', 'tEXt'])

function pngTells(bytes: Uint8Array): boolean {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  for (let at = 8; at + 8 <= bytes.length; at += 12 + view.getUint32(at)) if (PNG_TELLING.has(ascii(bytes, at + 4, at + 8))) return true
  return false
}

const WEBP_TELLING = new Set(['EXIF', 'XMP '])

function webpTells(bytes: Uint8Array): boolean {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  for (let at = 12; at + 8 <= bytes.length;) {
    if (WEBP_TELLING.has(ascii(bytes, at, at + 4))) return true
    const length = view.getUint32(at + 4, true)
    at += 8 + length + (length % 2)
  }
  return false
}

/** Whether a picture carries words of its camera beside itself: where it was taken, with what, which way up. */
export function tellsOfItsCamera(bytes: Uint8Array, type: AttachmentType): boolean {
  if (type === 'image/jpeg') return jpegTells(bytes)
  if (type === 'image/png') return pngTells(bytes)
  return type === 'image/webp' && webpTells(bytes)
}

const KILO = 1024
const MEGA = KILO * KILO

/** "84 kB", "1.4 MB": by 1024, as the limit counts, and rounded up, so that nothing over the limit reads like it. */
export function sizeText(bytes: number): string {
  if (bytes < KILO) return `${bytes} bytes`
  if (bytes < MEGA) return `${Math.ceil(bytes / KILO)}\u00a0kB`
  return `${Math.ceil((bytes / MEGA) * 10) / 10}\u00a0MB`
}

/** The first and last four bytes of a hash, enough to tell one from another by eye. */
export const shortHash = (sha256: string): string => `${sha256.slice(0, 8)} … ${sha256.slice(-8)}`
