import type { AppendRequest, AppendResponse, EntriesResponse } from '#shared/api/ledger'
import type { EntryDraft, LedgerEntry } from '#shared/ledger/envelope'
import { countDevice, type DeviceCount } from '#shared/proof-test/device-count'
import { Disconnected, ProblemError } from '../../src/lib/problem'

const refusal = (status: number, code: string, detail: string) => ({ type: 'about:blank' as const, title: 'No', status, code, detail })

/** What the link does to one request: takes it and answers, loses it, loses the answer, or delivers it twice. */
export type Link = 'answers' | 'loses-request' | 'loses-answer' | 'duplicates'

/**
 * A server for the outbox's tests: keeps an id once, in the order it came, knows who is signed in and which numbers of a
 * device are missing, as the real one does. The link to it can be bad, and it can be put back in time.
 */
export class LedgerDouble {
  readonly kept: LedgerEntry[] = []
  readonly requests: AppendRequest[] = []
  signedIn: string | null
  /** The next requests, in order; after them it answers. */
  link: Link[] = []
  refuse: (entry: EntryDraft) => ReturnType<typeof refusal> | null = () => null
  sealedSeq = 0
  private busy = 0
  /** The most requests that were under way at once. */
  mostAtOnce = 0

  constructor(signedIn: string | null) {
    this.signedIn = signedIn
  }

  get ids(): string[] {
    return this.kept.map((entry) => entry.id)
  }

  post = async (_testId: string, request: AppendRequest): Promise<AppendResponse> => {
    this.busy += 1
    this.mostAtOnce = Math.max(this.mostAtOnce, this.busy)
    try {
      await new Promise((resolve) => setTimeout(resolve, 0))
      this.requests.push(structuredClone(request))
      const link = this.link.shift() ?? 'answers'
      if (link === 'loses-request') throw new Disconnected()
      const answer = this.take(request)
      if (link === 'duplicates') this.take(request)
      if (link === 'loses-answer') throw new Disconnected()
      return answer
    } finally {
      this.busy -= 1
    }
  }

  read = async (testId: string, after: number): Promise<EntriesResponse> => {
    await new Promise((resolve) => setTimeout(resolve, 0))
    const sealed = this.sealedSeq > 0 ? [{ seq: this.sealedSeq, headHash: '', kid: '', signature: '', sealedAt: '' }] : []
    const entries = this.kept.slice(after)
    return { ledgerId: testId, entries, headSeq: this.kept.length, headHash: '', people: {}, sealed }
  }

  whoIsSignedIn = (): Promise<string> =>
    this.signedIn === null
      ? Promise.reject(new ProblemError(401, refusal(401, 'not-signed-in', 'Sign in.')))
      : Promise.resolve(this.signedIn)

  /** As if a backup of then were put back. */
  backTo(length: number): void {
    this.kept.length = length
  }

  private take({ entries }: AppendRequest): AppendResponse {
    if (this.signedIn === null) throw new ProblemError(401, refusal(401, 'not-signed-in', 'Sign in.'))
    const results = entries.map((entry): AppendResponse['results'][number] => {
      const no = entry.authorId === this.signedIn ? this.refuse(entry) : refusal(403, 'forbidden', 'Not yours.')
      if (no) return { outcome: 'refused', id: entry.id, problem: no }
      let kept = this.kept.find((one) => one.id === entry.id)
      if (!kept) {
        const seq = this.kept.length + 1
        // A hash that tells what came before, so that a ledger put back in time shows.
        const hash = `${seq}:${entry.id}`
        kept = { ...entry, seq, receivedAt: entry.observedAt, irregular: [], prevHash: '', hash }
        this.kept.push(kept)
      }
      return { outcome: 'kept', id: entry.id, entry: kept }
    })
    const device = entries.at(-1)?.deviceId
    const count = this.kept
      .filter((entry) => entry.deviceId === device)
      .reduce<DeviceCount | undefined>((before, entry) => countDevice(before, entry.deviceSeq), undefined)
    const missing = (count?.missing ?? []).map(([first, last]): [number, number] => [first, last])
    return { results, headSeq: this.kept.length, headHash: '', resendFrom: missing[0]?.[0] ?? null, missing }
  }
}
