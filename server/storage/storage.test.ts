import { createHash, randomBytes } from 'node:crypto'
import { mkdirSync, mkdtempSync, readdirSync, rmSync, statSync, utimesSync, writeFileSync } from 'node:fs'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import S3rver from 's3rver'
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest'
import type { Storage } from '../context'
import { DiskStorage } from './disk'
import { openStorage } from './open-storage'
import { S3Storage } from './s3'

const folder = mkdtempSync(path.join(tmpdir(), 'quarterload-storage-'))
const diskFolder = path.join(folder, 'deep', 'attachments')
let fake: S3rver
let endpoint = ''

beforeAll(async () => {
  fake = new S3rver({
    address: '127.0.0.1',
    port: 0,
    silent: true,
    directory: path.join(folder, 's3'),
    configureBuckets: [{ name: 'evidence', configs: [] }],
  })
  const { port } = await fake.run()
  endpoint = `http://127.0.0.1:${port}`
  // What the fake takes from everybody.
  vi.stubEnv('AWS_ACCESS_KEY_ID', 'S3RVER')
  vi.stubEnv('AWS_SECRET_ACCESS_KEY', 'S3RVER')
})

afterAll(async () => {
  await fake.close()
  rmSync(folder, { recursive: true, force: true })
  vi.unstubAllEnvs()
})

const bucket = (prefix: string) => new S3Storage({ bucket: 'evidence', endpoint, region: 'us-east-1', prefix })

/** What every place for bytes keeps to; each of them is taken through the same. */
describe.each<[string, () => Storage]>([
  ['a folder', () => new DiskStorage(diskFolder)],
  ['a bucket', () => bucket('')],
  ['a bucket with a prefix', () => bucket('one-shop/files/')],
])('%s', (_name, make) => {
  const shop = randomBytes(8).toString('hex')
  const keyOf = (bytes: Buffer) => `${shop}/${createHash('sha256').update(bytes).digest('hex')}`

  it('gives back what was put, byte for byte, also when it is large', async () => {
    const storage = make()
    for (const size of [1, 1000, 12 * 1024 * 1024]) {
      const bytes = randomBytes(size)
      await storage.put(keyOf(bytes), bytes)
      expect((await storage.get(keyOf(bytes)))?.equals(bytes), `${size} bytes`).toBe(true)
      expect(await storage.has(keyOf(bytes))).toBe(true)
    }
  })

  it('answers null and false for what was never put', async () => {
    const storage = make()
    expect(await storage.get(`${shop}/nothing`)).toBeNull()
    expect(await storage.has(`${shop}/nothing`)).toBe(false)
    expect(await storage.get('nobody/nothing')).toBeNull()
    expect(await storage.has('nobody/nothing')).toBe(false)
  })

  it('takes the same twice, also at once', async () => {
    const storage = make()
    const bytes = randomBytes(5000)
    await Promise.all(Array.from({ length: 5 }, () => storage.put(keyOf(bytes), bytes)))
    await storage.put(keyOf(bytes), bytes)
    expect((await storage.get(keyOf(bytes)))?.equals(bytes)).toBe(true)
    expect((await storage.list(keyOf(bytes))).map(({ size }) => size)).toEqual([5000])
  })

  it('lists what begins with a prefix, in order, with sizes, and nothing of others', async () => {
    const storage = make()
    const mine = `${shop}-list`
    const empty = await storage.list(mine)
    expect(empty).toEqual([])
    await storage.put(`${mine}/b`, Buffer.from('bb'))
    await storage.put(`${mine}/a`, Buffer.from('a'))
    await storage.put(`${mine}/a.thumb`, Buffer.from('aaa'))
    await storage.put(`${shop}-other/a`, Buffer.from('other'))
    expect(await storage.list(`${mine}/`)).toEqual([
      { key: `${mine}/a`, size: 1 },
      { key: `${mine}/a.thumb`, size: 3 },
      { key: `${mine}/b`, size: 2 },
    ])
    expect((await storage.list()).length).toBeGreaterThanOrEqual(4)
  })

  it.each(['../outside', 'a/../../b', '/etc/passwd', 'a//b', '', '.incoming/x', 'a\\..\\b', 'a/.', 'a\0b'])(
    'refuses the key %j',
    async (key) => {
      const storage = make()
      await expect(storage.put(key, Buffer.from('x'))).rejects.toThrow(RangeError)
      await expect(storage.get(key)).rejects.toThrow(RangeError)
      await expect(storage.has(key)).rejects.toThrow(RangeError)
    },
  )
})

describe('a folder', () => {
  it('keeps its files from other people of the machine, and no half of one under a name', async () => {
    const storage = new DiskStorage(diskFolder)
    await storage.put('shop/photo', Buffer.from('photo'))
    expect(statSync(path.join(diskFolder, 'shop/photo')).mode & 0o777).toBe(0o600)
    expect(statSync(path.join(diskFolder, 'shop')).mode & 0o777).toBe(0o700)
    expect(readdirSync(path.join(diskFolder, '.incoming'))).toEqual([])
  })

  it('leaves nothing behind when it cannot keep a file, and says so', async () => {
    const storage = new DiskStorage(diskFolder)
    // A folder stands where the file should go.
    mkdirSync(path.join(diskFolder, 'shop/taken'), { recursive: true })
    await expect(storage.put('shop/taken', Buffer.from('x'))).rejects.toThrow()
    expect(readdirSync(path.join(diskFolder, '.incoming'))).toEqual([])
  })

  it('clears away what a killed server left on its way in, a day later, and lists none of it', async () => {
    const incoming = path.join(diskFolder, '.incoming')
    mkdirSync(incoming, { recursive: true })
    writeFileSync(path.join(incoming, 'old'), 'half')
    writeFileSync(path.join(incoming, 'young'), 'half')
    const twoDaysAgo = Date.now() / 1000 - 2 * 86_400
    utimesSync(path.join(incoming, 'old'), twoDaysAgo, twoDaysAgo)
    const storage = await openStorage({ dataDirectory: path.dirname(diskFolder), s3: undefined }, new Date())
    expect(readdirSync(incoming)).toEqual(['young'])
    expect((await storage.list()).some(({ key }) => key.includes('young'))).toBe(false)
  })
})

describe('a bucket', () => {
  it('is used when it is named, and one prefix sees nothing of another', async () => {
    const s3 = { bucket: 'evidence', endpoint, region: 'us-east-1', prefix: 'mine/' }
    const storage = await openStorage({ dataDirectory: folder, s3 }, new Date())
    await storage.put('shop/photo', Buffer.from('photo'))
    expect((await bucket('').list('mine/')).map(({ key }) => key)).toEqual(['mine/shop/photo'])
    expect(await bucket('yours/').list()).toEqual([])
  })

  it('passes on what the storage says when it fails, and takes it for no missing file', async () => {
    const wrong = new S3Storage({ bucket: 'no-such-bucket', endpoint, region: 'us-east-1', prefix: '' })
    await expect(wrong.put('shop/photo', Buffer.from('x'))).rejects.toThrow()
    await expect(wrong.get('shop/photo')).rejects.toThrow()
  })

  it('lists every page of a long list', async () => {
    // The fake's own pages need a cipher that today's OpenSSL has no more, so that two pages are written out here.
    const page = (key: string, next: string) =>
      `<?xml version="1.0"?><ListBucketResult xmlns="http://s3.amazonaws.com/doc/2006-03-01/"><Contents><Key>many/${key}</Key><Size>7</Size></Contents>${next}</ListBucketResult>`
    const asked: (string | null)[] = []
    const paging = createServer((request, response) => {
      const token = new URL(request.url ?? '', 'http://fake').searchParams.get('continuation-token')
      asked.push(token)
      const more = '<IsTruncated>true</IsTruncated><NextContinuationToken>page 2</NextContinuationToken>'
      response
        .setHeader('Content-Type', 'application/xml')
        .end(token === null ? page('shop/a', more) : page('shop/b', '<IsTruncated>false</IsTruncated>'))
    })
    await new Promise<void>((resolve) => paging.listen(0, '127.0.0.1', resolve))
    try {
      const { port } = paging.address() as AddressInfo
      const storage = new S3Storage({ bucket: 'evidence', endpoint: `http://127.0.0.1:${port}`, region: 'us-east-1', prefix: 'many/' })
      expect(await storage.list('shop/')).toEqual([
        { key: 'shop/a', size: 7 },
        { key: 'shop/b', size: 7 },
      ])
      expect(asked).toEqual([null, 'page 2'])
    } finally {
      paging.closeAllConnections()
      paging.close()
    }
  })
})
