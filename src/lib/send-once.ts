import type { AppendRequest, AppendResponse } from '#shared/api/ledger'
import type { EntryDraft } from '#shared/ledger/envelope'
import { giveBackDeviceSeq, makeEntry, type EntryParts } from './entry'
import { Disconnected, ProblemError } from './problem'

const KEY = 'quarterload.unanswered.'

const sameThing = (entry: EntryDraft, parts: EntryParts): boolean =>
  entry.ledgerId === parts.ledgerId &&
  entry.kind === parts.kind &&
  entry.authorId === parts.authorId &&
  JSON.stringify(entry.payload) === JSON.stringify(parts.payload)

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

/**
 * Sends entries that a form made, for ledgers that need the server at hand. What was sent and not answered is
 * kept under `slot`: the same thing sent again, even after a reload, is the same entries, so that the ledger
 * gets them once. Throws the refusal, when there is one.
 */
export async function sendOnce(
  slot: string,
  parts: readonly EntryParts[],
  post: (request: AppendRequest) => Promise<AppendResponse>,
): Promise<AppendResponse> {
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
