import 'fake-indexeddb/auto'
import { IDBFactory } from 'fake-indexeddb'
import { afterEach, describe, expect, it, vi } from 'vitest'
import type { Attachment } from '#shared/ledger/envelope'
import type { Owner } from './attachment-database'
import { KeptFiles } from './attachment-files'
import type { Prepared } from './attachment-prepare'
import { Disconnected, ProblemError } from './problem'

const ledger: Owner = 'ledger:01990000-0000-7000-8000-000000000001'

function photo(letter: string): Prepared {
  const bytes = new TextEncoder().encode(`photo ${letter}`)
  return { bytes, attachment: { sha256: letter.repeat(64), type: 'image/jpeg', size: bytes.length, name: `${letter}.jpg` } }
}

const problem = (status: number, code: string, detail = 'No.') => new ProblemError(status, { code, detail })

/** A server that takes bytes of entries that it has; `down` answers instead of it. */
class Server {
  readonly kept = new Map<string, string>()
  readonly named = new Set<string>()
  asked = 0
  down: Error | null = null

  put = async (owner: Owner, { sha256 }: Attachment, bytes: ArrayBuffer): Promise<void> => {
    await Promise.resolve()
    this.asked += 1
    if (this.down) throw this.down
    if (!this.named.has(sha256)) throw problem(409, 'not-named-yet')
    this.kept.set(`${owner} ${sha256.charAt(0)}`, new TextDecoder().decode(bytes))
  }
}

let names = 0
const opened: KeptFiles[] = []
function open(server: Server, databaseName = `files-${(names += 1)}`) {
  const files = new KeptFiles({ databaseName, put: server.put, delay: () => 5 })
  opened.push(files)
  return files
}
async function listed(files: KeptFiles, owner = ledger) {
  files.of(owner)
  await vi.waitFor(() => expect(files.of(owner).loaded).toBe(true))
  return files.of(owner).files.map(({ attachment, named, refused }) => ({ name: attachment.name, named, refused }))
}

afterEach(() => {
  vi.unstubAllGlobals()
  for (const files of opened.splice(0)) files.close()
})

describe('photos on this device', () => {
  it('are on the disk before an entry names them, and survive the page', async () => {
    const server = new Server()
    const first = open(server, 'files-reload')
    await first.keep(ledger, photo('a'))
    first.close()
    const second = open(server, 'files-reload')
    expect(await listed(second)).toEqual([{ name: 'a.jpg', named: false, refused: null }])
    const blob = await second.blob(ledger, photo('a').attachment)
    expect(await blob?.text()).toBe('photo a')
    expect(blob?.type).toBe('image/jpeg')
  })

  it('go to the server after their entry, and are let go only when it has answered for them', async () => {
    const server = new Server()
    const files = open(server)
    const sent: string[] = []
    files.onSent((owner, { sha256 }) => sent.push(`${owner} ${sha256.charAt(0)}`))
    await files.keep(ledger, photo('a'))
    server.down = new Disconnected()
    await files.named(ledger, [photo('a').attachment.sha256])
    await files.settled()
    expect(await listed(files)).toEqual([{ name: 'a.jpg', named: true, refused: null }])
    server.down = null
    server.named.add(photo('a').attachment.sha256)
    await vi.waitFor(() => expect(server.kept.get(`${ledger} a`)).toBe('photo a'))
    await vi.waitFor(async () => expect(await listed(files)).toEqual([]))
    expect(sent).toEqual([`${ledger} a`])
  })

  it('wait while the server does not have their entry yet', async () => {
    const server = new Server()
    const files = open(server)
    await files.keep(ledger, photo('a'))
    await files.named(ledger, [photo('a').attachment.sha256])
    await vi.waitFor(() => expect(server.asked).toBeGreaterThan(2))
    expect(await listed(files)).toHaveLength(1)
    server.named.add(photo('a').attachment.sha256)
    await vi.waitFor(() => expect(server.kept.size).toBe(1))
  })

  it('are tried at the next start when the page died between the answer and its note', async () => {
    const server = new Server()
    const first = open(server, 'files-died')
    await first.keep(ledger, photo('a'))
    first.close()
    server.named.add(photo('a').attachment.sha256)
    const second = open(server, 'files-died')
    second.sendNow({ everything: true })
    await vi.waitFor(() => expect(server.kept.get(`${ledger} a`)).toBe('photo a'))
  })

  it('are not sent for good when the server will never take them, and say why; the others go on', async () => {
    const server = new Server()
    const files = open(server)
    for (const letter of ['a', 'b']) {
      await files.keep(ledger, photo(letter))
      server.named.add(photo(letter).attachment.sha256)
    }
    const { put } = server
    server.put = (owner, attachment, bytes) =>
      attachment.name === 'a.jpg' ? Promise.reject(problem(422, 'wrong-bytes', 'These are other bytes.')) : put(owner, attachment, bytes)
    const second = new KeptFiles({ databaseName: `files-${names}`, put: server.put, delay: () => 5 })
    opened.push(second)
    second.sendNow({ everything: true })
    await vi.waitFor(() => expect([...server.kept.keys()]).toEqual([`${ledger} b`]))
    await vi.waitFor(async () => expect(await listed(second)).toEqual([{ name: 'a.jpg', named: false, refused: 'These are other bytes.' }]))
  })

  it('wait for the same shop to be signed in again', async () => {
    const server = new Server()
    const files = open(server)
    await files.keep(ledger, photo('a'))
    server.named.add(photo('a').attachment.sha256)
    server.down = problem(401, 'signed-out')
    await files.named(ledger, [photo('a').attachment.sha256])
    await files.settled()
    expect(await listed(files)).toHaveLength(1)
    server.down = null
    files.sendNow()
    await vi.waitFor(() => expect(server.kept.size).toBe(1))
  })

  it('of a draft stay here until it has become something', async () => {
    const server = new Server()
    const files = open(server)
    await files.keep('draft:calibration', photo('c'))
    server.named.add(photo('c').attachment.sha256)
    files.sendNow({ everything: true })
    await files.settled()
    expect(server.asked).toBe(0)
    await files.belongsTo('draft:calibration', 'calibration:1', [photo('c').attachment.sha256])
    await vi.waitFor(() => expect(server.kept.get('calibration:1 c')).toBe('photo c'))
    expect(await listed(files, 'draft:calibration')).toEqual([])
  })

  it('that were chosen and never entered are let go after thirty days, unless something here still speaks of them', async () => {
    const server = new Server()
    const draft: Owner = 'draft:calibration'
    let now = Date.now()
    let down = true
    const spokenOf = new Set(['b'.repeat(64)])
    const files = new KeptFiles({
      databaseName: 'files-abandoned',
      put: (...asked) => (down ? Promise.reject(new Disconnected()) : server.put(...asked)),
      delay: () => 60_000,
      now: () => now,
      speaksOf: () => Promise.resolve((sha256) => spokenOf.has(sha256)),
    })
    opened.push(files)
    for (const letter of ['a', 'b', 'c', 'e']) await files.keep(ledger, photo(letter))
    for (const letter of ['b', 'd']) await files.keep(draft, photo(letter))
    await files.named(ledger, ['c'.repeat(64)])
    server.named.add('e'.repeat(64))
    const look = async () => {
      files.sendNow({ everything: true })
      await files.settled()
      const all = [...(await listed(files)), ...(await listed(files, draft))]
      return all.map(({ name }) => name)
    }
    now += 31 * 86_400_000
    // Nothing is let go on a guess: the server may have the entry, and its answer was lost.
    expect(await look()).toEqual(['a.jpg', 'b.jpg', 'c.jpg', 'e.jpg', 'b.jpg', 'd.jpg'])
    down = false
    now -= 2 * 86_400_000
    expect(await look()).toEqual(['a.jpg', 'b.jpg', 'c.jpg', 'b.jpg', 'd.jpg'])
    now += 2 * 86_400_000
    expect(await look()).toEqual(['b.jpg', 'c.jpg', 'b.jpg'])
    expect([...server.kept.keys()]).toEqual([`${ledger} e`])
    spokenOf.clear()
    expect(await look()).toEqual(['c.jpg'])
  })

  it('can be left out again, and a disk that takes nothing says so', async () => {
    const server = new Server()
    const files = open(server)
    await files.keep(ledger, photo('a'))
    await files.remove(ledger, photo('a').attachment.sha256)
    expect(await listed(files)).toEqual([])
    const broken = new IDBFactory()
    broken.open = () => {
      throw new DOMException('no room', 'QuotaExceededError')
    }
    vi.stubGlobal('indexedDB', broken)
    await expect(open(server).keep(ledger, photo('b'))).rejects.toThrow(
      'This device can’t keep the file: its storage is full. Enter it without, or free some space and choose it again.',
    )
  })
})
