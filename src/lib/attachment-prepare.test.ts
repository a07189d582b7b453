import { createHash, randomBytes } from 'node:crypto'
import sharp from 'sharp'
import { describe, expect, it } from 'vitest'
import { LARGEST_ATTACHMENT } from '#shared/ledger/envelope'
import { sniff, tellsOfItsCamera } from './attachment-bytes'
import { fitted, prepareAttachment, type Shrink } from './attachment-prepare'

const bytes = (buffer: Buffer): Uint8Array<ArrayBuffer> => new Uint8Array(buffer)
const fileOf = (content: Buffer | string, name: string): File => new File([typeof content === 'string' ? content : bytes(content)], name)
const sha256 = (content: Uint8Array): string => createHash('sha256').update(content).digest('hex')

/** What the browser's canvas does, done by another library: the right way up, fitted, without what the camera noted. */
const shrink: Shrink = async (file) => {
  const content = Buffer.from(await file.arrayBuffer())
  const { autoOrient } = await sharp(content).metadata()
  const size = fitted(autoOrient.width, autoOrient.height)
  return new Blob([bytes(await sharp(content).autoOrient().resize(size.width, size.height).jpeg().toBuffer())])
}
const neverAsked: Shrink = () => Promise.reject(new Error('nothing is redrawn'))

const picture = (width = 40, height = 30) => sharp({ create: { width, height, channels: 3, background: '#804020' } })
const WITH_PLACE = { IFD0: { Make: 'Camera' }, IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '51/1 30/1 0/1' } }
const refusal = async (file: File, by: Shrink = shrink): Promise<string> =>
  prepareAttachment(file, by).then(
    () => 'taken',
    (failure: unknown) => (failure instanceof Error ? failure.message : 'unknown'),
  )

describe('a chosen file', () => {
  it('is kept byte by byte when it is a small photo that tells nothing but the picture', async () => {
    for (const [type, made] of [
      ['image/jpeg', await picture().jpeg().toBuffer()],
      ['image/png', await picture().png().toBuffer()],
      ['image/webp', await picture().webp().toBuffer()],
    ] as const) {
      const { attachment, bytes: kept } = await prepareAttachment(fileOf(made, 'weld.bin'), neverAsked)
      expect({ ...attachment, name: '' }).toEqual({ sha256: sha256(made), type, size: made.length, name: '' })
      expect(Buffer.from(kept).equals(made)).toBe(true)
    }
  })

  it('is redrawn when it tells where it was taken, and then tells it no more', async () => {
    const made = await picture().withExif(WITH_PLACE).jpeg().toBuffer()
    expect(tellsOfItsCamera(bytes(made), 'image/jpeg')).toBe(true)
    const { attachment, bytes: kept } = await prepareAttachment(fileOf(made, 'weld.jpg'), shrink)
    expect(attachment.sha256).not.toBe(sha256(made))
    expect(attachment.sha256).toBe(sha256(kept))
    expect((await sharp(kept).metadata()).exif).toBeUndefined()
    expect(tellsOfItsCamera(kept, 'image/jpeg')).toBe(false)
  })

  it('finds what the camera noted in PNG and WebP as well', async () => {
    expect(tellsOfItsCamera(bytes(await picture().withExif(WITH_PLACE).png().toBuffer()), 'image/png')).toBe(true)
    expect(tellsOfItsCamera(bytes(await picture().withExif(WITH_PLACE).webp().toBuffer()), 'image/webp')).toBe(true)
    expect(tellsOfItsCamera(bytes(await picture().png().toBuffer()), 'image/png')).toBe(false)
    expect(tellsOfItsCamera(bytes(await picture().webp().toBuffer()), 'image/webp')).toBe(false)
  })

  it('is made smaller when it is large: its long edge has 2000 px, and it is called a JPEG', async () => {
    const noise = randomBytes(1500 * 2400 * 3)
    const made = await sharp(noise, { raw: { width: 1500, height: 2400, channels: 3 } })
      .png()
      .toBuffer()
    const { attachment, bytes: kept } = await prepareAttachment(fileOf(made, 'joint 7.png'), shrink)
    const { width, height, format } = await sharp(kept).metadata()
    expect({ width, height, format }).toEqual({ width: 1250, height: 2000, format: 'jpeg' })
    expect(attachment).toMatchObject({ type: 'image/jpeg', name: 'joint 7.jpg', size: kept.length })
  })

  it('is never enlarged', () => {
    expect(fitted(640, 480)).toEqual({ width: 640, height: 480 })
    expect(fitted(4000, 3000)).toEqual({ width: 2000, height: 1500 })
    expect(fitted(9000, 2)).toEqual({ width: 2000, height: 1 })
  })

  it('is told by its bytes, not by its name', async () => {
    expect(await refusal(fileOf('only words', 'weld.jpg'))).toMatch(
      /^This file is no photo and no PDF, whatever its name says\. Take a photo/,
    )
    const pdf = await prepareAttachment(fileOf('%PDF-1.7 a certificate', 'certificate.jpg'), neverAsked)
    expect(pdf.attachment.type).toBe('application/pdf')
  })

  it('says of HEIC what to set, of an empty or damaged file what to do, and of a large document its limit', async () => {
    const heic = Buffer.concat([Buffer.from([0, 0, 0, 24]), Buffer.from('ftypheic'), Buffer.alloc(12)])
    expect(sniff(bytes(heic))).toBe('heif')
    expect(await refusal(fileOf(heic, 'weld.jpg'))).toMatch(/in HEIC.*Set the camera to JPEG/)
    expect(await refusal(fileOf('', 'weld.jpg'))).toMatch(/^This file is empty/)
    const cut = (await picture().withExif(WITH_PLACE).jpeg().toBuffer()).subarray(0, 200)
    expect(await refusal(fileOf(cut, 'weld.jpg'))).toMatch(/its file is damaged\. Take it again/)
    const long = Buffer.concat([Buffer.from('%PDF-1.7'), Buffer.alloc(LARGEST_ATTACHMENT)])
    expect(await refusal(fileOf(long, 'scan.pdf'))).toMatch(/^This document has 12\.1.MB; at most 12.MB are kept\. Scan it/)
  })
})
