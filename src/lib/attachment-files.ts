import type { Attachment } from '#shared/ledger/envelope'
import { inTime, keyOf, openFiles, type FilesDatabase, type KeptFile, type Owner } from './attachment-database'
import type { Prepared } from './attachment-prepare'
import { ProblemError } from './problem'

/** What this device keeps for one ledger or calibration. */
export interface OwnFiles {
  loaded: boolean
  files: readonly KeptFile[]
}

export interface FilesParts {
  databaseName: string
  put: (owner: Owner, attachment: Attachment, bytes: ArrayBuffer) => Promise<void>
  /** How long to wait before trying again, by how often it has failed (ms). */
  delay?: (failures: number) => number
  /** Tells whether anything else on this device still speaks of a file: an entry that waits, a form half filled in. */
  speaksOf?: () => Promise<(sha256: string) => boolean>
  now?: () => number
}

type SentListener = (owner: Owner, attachment: Attachment) => void

const LOCK = 'quarterload-files'
/** What the server may answer of bytes that it will not take at another time either. */
const NEVER = new Set([400, 413, 415, 422])
/** How long what was chosen for a form and never entered is kept (ms): somebody may come back to the form. */
const KEEP_CHOSEN = 30 * 86_400_000
const EMPTY: OwnFiles = { loaded: false, files: [] }

/** Grows to half a minute; a random part, so that tablets that lost one link don't come back all at once. */
const backoff = (failures: number): number => Math.min(30_000, 1000 * 2 ** Math.min(failures, 5)) * (0.75 + Math.random() / 2)

async function alone(work: () => Promise<void>): Promise<void> {
  if (typeof navigator !== 'undefined' && 'locks' in navigator) await navigator.locks.request(LOCK, work)
  else await work()
}

const saysOf = (failure: unknown): string =>
  typeof failure === 'object' && failure !== null && 'name' in failure && failure.name === 'QuotaExceededError'
    ? 'its storage is full'
    : 'its storage does not take it'

/**
 * Photos and documents on this device: written through to the disk before an entry names them, sent when the server
 * has that entry, and let go only when the server has answered for the bytes.
 */
export class KeptFiles {
  private readonly parts: FilesParts
  private database: Promise<FilesDatabase> | null = null
  private readonly listeners = new Set<() => void>()
  private readonly sentListeners = new Set<SentListener>()
  private readonly owners = new Map<Owner, OwnFiles>()
  private readonly channel: BroadcastChannel | null
  private sending: Promise<void> | null = null
  private askedAgain = false
  /** What nobody said to be named is tried as well: an answer may have been lost with the page that waited for it. */
  private everything = true
  private failures = 0
  private timer: ReturnType<typeof setTimeout> | null = null

  constructor(parts: FilesParts) {
    this.parts = parts
    this.channel = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel(parts.databaseName)
    this.channel?.addEventListener('message', () => void this.refresh())
    if (typeof window !== 'undefined') window.addEventListener('online', () => this.sendNow({ everything: true }))
  }

  subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener)
    return () => this.listeners.delete(listener)
  }

  /** The same object until something about this owner changes. */
  of = (owner: Owner): OwnFiles => {
    const known = this.owners.get(owner)
    if (known) return known
    this.owners.set(owner, EMPTY)
    queueMicrotask(() => void this.refresh())
    return EMPTY
  }

  /** Called when the server has the bytes. */
  onSent(listener: SentListener): () => void {
    this.sentListeners.add(listener)
    return () => this.sentListeners.delete(listener)
  }

  /** Resolves when the bytes are on the disk; rejects with a sentence when they can't be kept. */
  async keep(owner: Owner, { attachment, bytes }: Prepared): Promise<void> {
    const file: KeptFile = { owner, attachment, keptAt: new Date().toISOString(), named: false, refused: null }
    try {
      await inTime(this.put(file, bytes.slice().buffer))
    } catch (failure) {
      throw new Error(`This device can’t keep the file: ${saysOf(failure)}. Enter it without, or free some space and choose it again.`, {
        cause: failure,
      })
    }
    await this.changed()
  }

  /** Whether bytes that the server waits for are still here; what it will never take does not count. */
  async wait(): Promise<boolean> {
    const all = await (await this.opened()).getAll('files')
    return all.some(({ named, refused }) => named && refused === null)
  }

  /** Takes back what no entry names. */
  async remove(owner: Owner, sha256: string): Promise<void> {
    const database = await this.opened()
    const tx = database.transaction(['files', 'bytes'], 'readwrite')
    await Promise.all([tx.objectStore('files').delete([owner, sha256]), tx.objectStore('bytes').delete([owner, sha256]), tx.done])
    await this.changed()
  }

  /** The server has an entry, or a calibration, that names these: their bytes are sent. */
  async named(owner: Owner, hashes: readonly string[]): Promise<void> {
    if (hashes.length === 0) return
    const database = await this.opened()
    const tx = database.transaction('files', 'readwrite', { durability: 'strict' })
    for (const sha256 of hashes) {
      const file = await tx.store.get([owner, sha256])
      if (file && !file.named) await tx.store.put({ ...file, named: true }, keyOf(file))
    }
    await tx.done
    await this.changed()
    this.sendNow()
  }

  /** What was kept for a draft belongs to what the draft became. */
  async belongsTo(from: Owner, to: Owner, hashes: readonly string[]): Promise<void> {
    const database = await this.opened()
    const tx = database.transaction(['files', 'bytes'], 'readwrite', { durability: 'strict' })
    const files = tx.objectStore('files')
    const bytes = tx.objectStore('bytes')
    for (const sha256 of hashes) {
      const [file, content] = [await files.get([from, sha256]), await bytes.get([from, sha256])]
      if (!file || !content) continue
      await Promise.all([files.put({ ...file, owner: to, named: true }, [to, sha256]), bytes.put(content, [to, sha256])])
      await Promise.all([files.delete([from, sha256]), bytes.delete([from, sha256])])
    }
    await tx.done
    await this.changed()
    this.sendNow()
  }

  async blob(owner: Owner, attachment: Attachment): Promise<Blob | null> {
    const bytes = await (await this.opened()).get('bytes', [owner, attachment.sha256])
    return bytes ? new Blob([bytes], { type: attachment.type }) : null
  }

  /** Tries at once, instead of when the timer would. */
  sendNow({ everything = false } = {}): void {
    if (this.timer) clearTimeout(this.timer)
    this.timer = null
    this.everything ||= everything
    this.askedAgain = true
    this.sending ??= this.sendUntilQuiet().finally(() => {
      this.sending = null
    })
  }

  /** Resolves when the sender has nothing to do now. */
  async settled(): Promise<void> {
    while (this.sending) await this.sending
  }

  close(): void {
    if (this.timer) clearTimeout(this.timer)
    this.channel?.close()
    void this.database?.then((database) => database.close()).catch(() => undefined)
  }

  private opened(): Promise<FilesDatabase> {
    this.database ??= openFiles(this.parts.databaseName, () => {
      this.database = null
    }).catch((failure: unknown) => {
      this.database = null
      throw failure
    })
    return this.database
  }

  private async put(file: KeptFile, bytes: ArrayBuffer): Promise<void> {
    const database = await this.opened()
    const tx = database.transaction(['files', 'bytes'], 'readwrite', { durability: 'strict' })
    const before = await tx.objectStore('files').get(keyOf(file))
    await Promise.all([
      tx.objectStore('files').put({ ...file, named: before?.named ?? false }, keyOf(file)),
      tx.objectStore('bytes').put(bytes, keyOf(file)),
      tx.done,
    ])
  }

  private async changed(): Promise<void> {
    await this.refresh()
    this.channel?.postMessage('changed')
  }

  private async refresh(): Promise<void> {
    try {
      const all = await (await this.opened()).getAll('files')
      for (const [owner, before] of this.owners) {
        const files = all.filter((file) => file.owner === owner)
        const same = before.loaded && JSON.stringify(before.files) === JSON.stringify(files)
        if (!same) this.owners.set(owner, { loaded: true, files })
      }
    } catch {
      // Nothing can be kept here, so nothing is: the field says so when somebody chooses a file.
      for (const owner of this.owners.keys()) this.owners.set(owner, { loaded: true, files: [] })
    }
    for (const listener of this.listeners) listener()
  }

  private async sendUntilQuiet(): Promise<void> {
    try {
      while (this.askedAgain) {
        this.askedAgain = false
        await alone(() => this.sendAll())
      }
      this.failures = 0
    } catch {
      this.askedAgain = false
      this.everything = true
      this.tryLater()
    }
  }

  private tryLater(): void {
    const delay = (this.parts.delay ?? backoff)(this.failures)
    this.failures += 1
    if (this.timer) clearTimeout(this.timer)
    this.timer = setTimeout(() => this.sendNow(), delay)
  }

  private async sendAll(): Promise<void> {
    const { everything } = this
    const all = await (await this.opened()).getAll('files')
    const isDraft = ({ owner }: KeptFile): boolean => owner.startsWith('draft:')
    const due = all.filter((file) => !isDraft(file) && file.refused === null && (everything || file.named))
    const unnamed = everything ? all.filter(isDraft) : []
    let left: unknown
    for (const file of due) {
      try {
        await this.sendOne(file)
      } catch (failure) {
        // A lost link, an ended session or a server in trouble holds up all of them.
        if (
          !(failure instanceof ProblemError) ||
          failure.status === 401 ||
          failure.status === 408 ||
          failure.status === 429 ||
          failure.status >= 500
        )
          throw failure
        if (NEVER.has(failure.status)) await this.setRefused(file, failure.detail)
        else if (file.named) left = failure
        else if (failure.code === 'not-named-yet') unnamed.push(file)
      }
    }
    this.everything = false
    await this.letGo(unnamed)
    if (left !== undefined) throw left
  }

  /** Of what no entry names, as the server has just said, what was chosen long ago and nothing here speaks of. */
  private async letGo(unnamed: readonly KeptFile[]): Promise<void> {
    const now = (this.parts.now ?? Date.now)()
    const old = unnamed.filter(({ named, keptAt }) => !named && now - Date.parse(keptAt) > KEEP_CHOSEN)
    if (old.length === 0 || !this.parts.speaksOf) return
    const isSpokenOf = await this.parts.speaksOf()
    for (const { owner, attachment } of old) if (!isSpokenOf(attachment.sha256)) await this.remove(owner, attachment.sha256)
  }

  private async sendOne(file: KeptFile): Promise<void> {
    const database = await this.opened()
    const bytes = await database.get('bytes', keyOf(file))
    if (!bytes) return this.setRefused(file, 'Its bytes are gone from this device.')
    await this.parts.put(file.owner, file.attachment, bytes)
    for (const listener of this.sentListeners) listener(file.owner, file.attachment)
    await this.remove(file.owner, file.attachment.sha256)
  }

  private async setRefused(file: KeptFile, refused: string): Promise<void> {
    await (await this.opened()).put('files', { ...file, refused }, keyOf(file))
    await this.changed()
  }
}
