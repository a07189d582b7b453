import { inflateSync } from 'node:zlib'

/** WOFF 1.0 (W3C Recommendation, 13 December 2012): sections 3 and 4, header and table directory. */
const HEADER = 44
const ENTRY = 20
const SFNT_HEADER = 12
const SFNT_ENTRY = 16

const padded = (length: number): number => (length + 3) & ~3

interface Table {
  tag: Buffer
  checksum: number
  bytes: Buffer
}

function tablesOf(woff: Buffer): Table[] {
  return Array.from({ length: woff.readUInt16BE(12) }, (_table, index) => {
    const at = HEADER + index * ENTRY
    const [offset, packed, length] = [woff.readUInt32BE(at + 4), woff.readUInt32BE(at + 8), woff.readUInt32BE(at + 12)]
    const stored = woff.subarray(offset, offset + packed)
    return { tag: woff.subarray(at, at + 4), checksum: woff.readUInt32BE(at + 16), bytes: packed < length ? inflateSync(stored) : stored }
  })
}

/**
 * The font inside a WOFF file as it was before it was packed. Unpacked once, it needn't be unpacked in JavaScript for
 * every record that is printed.
 */
export function sfntOf(woff: Buffer): Buffer {
  const tables = tablesOf(woff)
  const power = Math.floor(Math.log2(tables.length))
  const head = Buffer.alloc(SFNT_HEADER + tables.length * SFNT_ENTRY)
  woff.copy(head, 0, 4, 8)
  head.writeUInt16BE(tables.length, 4)
  head.writeUInt16BE(2 ** power * 16, 6)
  head.writeUInt16BE(power, 8)
  head.writeUInt16BE(tables.length * 16 - 2 ** power * 16, 10)
  const parts: Buffer[] = [head]
  let offset = head.length
  tables.forEach(({ tag, checksum, bytes }, index) => {
    const at = SFNT_HEADER + index * SFNT_ENTRY
    tag.copy(head, at)
    head.writeUInt32BE(checksum, at + 4)
    head.writeUInt32BE(offset, at + 8)
    head.writeUInt32BE(bytes.length, at + 12)
    parts.push(bytes, Buffer.alloc(padded(bytes.length) - bytes.length))
    offset += padded(bytes.length)
  })
  return Buffer.concat(parts)
}
