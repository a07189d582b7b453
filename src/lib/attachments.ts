import type { Attachment } from '#shared/ledger/envelope'
import { apiUrl } from './api-client'
import type { Owner } from './attachment-database'
import { KeptFiles } from './attachment-files'
import { outbox } from './outbox'
import { Disconnected, readProblem } from './problem'

/** Long enough for the largest file over a slow link. */
const LONGEST_SEND = 120_000

export type Size = 'thumb' | 'page' | undefined

/** Where the server has a photo or document, as far as its owner is known to it. */
export function attachmentUrl(owner: Owner, sha256: string, size?: Size): string {
  const [of, id = ''] = owner.split(':')
  return apiUrl(`/api/attachments/${sha256}`, { [of ?? 'ledger']: id, size })
}

async function problemOf(response: Response) {
  try {
    return readProblem(response.status, JSON.parse(await response.text()))
  } catch {
    return readProblem(response.status, undefined)
  }
}

async function putBytes(owner: Owner, { sha256, type }: Attachment, bytes: ArrayBuffer): Promise<void> {
  let response: Response
  try {
    response = await fetch(attachmentUrl(owner, sha256), {
      method: 'PUT',
      headers: { 'content-type': type, accept: 'application/problem+json' },
      credentials: 'same-origin',
      body: bytes,
      signal: AbortSignal.timeout(LONGEST_SEND),
    })
  } catch (failure) {
    throw new Disconnected(failure)
  }
  if (!response.ok) throw await problemOf(response)
}

/** What the entries of this device name, on their way or sent, and what stands in its drafts. Throws where that can't be read. */
async function speaksOf(): Promise<(sha256: string) => boolean> {
  const { waiting, attention, sent } = await outbox.contents()
  const named = new Set([...waiting, ...attention, ...sent].flatMap(({ entry }) => entry.attachments.map(({ sha256 }) => sha256)))
  const drafts = Object.keys(localStorage).map((key) => localStorage.getItem(key) ?? '')
  return (sha256) => named.has(sha256) || drafts.some((text) => text.includes(sha256))
}

/** The photos and documents of this browser. */
export const files = new KeptFiles({ databaseName: 'quarterload-files', put: putBytes, speaksOf })

/** The entry first, its bytes after: what the server has kept may be followed by what it names. */
outbox.onKept((_testId, entries) => {
  for (const { ledgerId, attachments } of entries) {
    if (attachments.length === 0) continue
    const hashes = attachments.map(({ sha256 }) => sha256)
    // Where the storage has failed meanwhile, the next start tries everything that it finds.
    files.named(`ledger:${ledgerId}`, hashes).catch(() => undefined)
  }
})
