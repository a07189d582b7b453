import type { AppendRequest, AppendResponse } from '#shared/api/ledger'
import type { EntryDraft } from '#shared/ledger/envelope'
import { giveBackDeviceSeq, makeEntry, type EntryParts } from './entry'
import { Disconnected, ProblemError } from './problem'

const KEY = 'quarterload.unanswered.'

const sameThing = (entry: EntryDraft, parts: EntryParts): boolean =>
  entry.ledgerId === parts.ledgerId &&
  entry.kind === parts.kind &&
  entry.authorId === parts.authorId &&
  JSON.stringify(entry.payload) === JSON.stringify(parts.payload) &&
  JSON.stringify(entry.attachments) === JSON.stringify(parts.attachments ?? [])

function read(slot: string): EntryDraft[] {
  try {
    return JSON.parse(localStorage.getItem(KEY + slot) ?? '[]') as EntryDraft[]
  } catch {
    return []
  }
}

function keep(slot: string, entries: readonly EntryDraft[]): void {
  try {
    if (entries.length === 0) localStorage.removeItem(KEY + slot)
    else localStorage.setItem(KEY + slot, JSON.stringify(entries))
  } catch {
    return
  }
}

/** The problem of the first entry that was refused; their numbers go to the entries that come next. */
function refusalIn(entries: readonly EntryDraft[], answer: AppendResponse): ProblemError | undefined {
  const refused = answer.results.flatMap((result) => (result.outcome === 'refused' ? [result] : []))
  for (const { id } of [...refused].reverse()) {
    const entry = entries.find((one) => one.id === id)
    if (entry) giveBackDeviceSeq(entry)
  }
  const [first] = refused
  return first && new ProblemError(first.problem.status, first.problem)
}

const underWay = new Map<string, Promise<AppendResponse>>()

/**
 * Sends entries that a form made, for ledgers that need the server at hand. What was sent and not answered is
 * kept under `slot`: the same thing sent again, even after a reload, is the same entries, so that the ledger
 * gets them once. A second tap while the first is under way waits for the same answer. Throws the refusal, when
 * there is one.
 */
export function sendOnce(slot: string, parts: readonly EntryParts[], post: Post): Promise<AppendResponse> {
  const already = underWay.get(slot)
  if (already) return already
  const sending = send(slot, parts, post).finally(() => underWay.delete(slot))
  underWay.set(slot, sending)
  return sending
}

type Post = (request: AppendRequest) => Promise<AppendResponse>

async function send(slot: string, parts: readonly EntryParts[], post: Post): Promise<AppendResponse> {
  const unanswered = read(slot)
  const entries = parts.map((part, index) => {
    const before = unanswered[index]
    return before && sameThing(before, part) ? before : makeEntry(part)
  })
  keep(slot, entries)
  let answer: AppendResponse
  try {
    answer = await post({ sentAt: new Date().toISOString(), entries })
  } catch (error) {
    if (!(error instanceof Disconnected)) {
      keep(slot, [])
      for (const entry of [...entries].reverse()) giveBackDeviceSeq(entry)
    }
    throw error
  }
  keep(slot, [])
  const refusal = refusalIn(entries, answer)
  if (refusal) throw refusal
  return answer
}
