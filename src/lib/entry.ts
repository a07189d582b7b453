import { v7 as newId } from 'uuid'
import type { Attachment, EntryDraft, Override } from '#shared/ledger/envelope'

const DEVICE = 'quarterload.device'
const COUNT = 'quarterload.device-seq.'

/** Says which run of the clock `monotonicMs` counts from: one per load of the page. */
export const bootId = newId()

/** Whole milliseconds since the page was loaded; nobody can set this clock. */
export const monotonicMs = (): number => Math.round(performance.now())

/** What stands in for storage where it is switched off: it lasts as long as the page, and so does the device's name. */
const memory = new Map<string, string>()

function read(key: string): string | undefined {
  try {
    return localStorage.getItem(key) ?? memory.get(key)
  } catch {
    return memory.get(key)
  }
}

function write(key: string, text: string): void {
  memory.set(key, text)
  try {
    localStorage.setItem(key, text)
  } catch {
    return
  }
}

/** The id that stands beside the counts of the forms: browsers write it late, and it is lost with them. */
function ownId(): string {
  const kept = read(DEVICE)
  if (kept !== undefined) return kept
  const made = newId()
  write(DEVICE, made)
  return made
}

let adopted: string | null = null

/** Takes the id under which this browser's outbox counts: it is on the disk when anything of the outbox is. */
export function adoptDeviceId(kept: string): void {
  adopted = kept
}

/** This browser's own id, made once and kept: the outbox's, as soon as that has been read. */
export const deviceId = (): string => adopted ?? ownId()

const count = (ledgerId: string): number => Number(read(COUNT + ledgerId) ?? 0)

/** The next number of this device's entries in a ledger; from 1, no gaps. */
export function takeDeviceSeq(ledgerId: string): number {
  const next = count(ledgerId) + 1
  write(COUNT + ledgerId, String(next))
  return next
}

/** Gives back the number of an entry that was refused and so never came to be, unless a later one was taken already. */
export function giveBackDeviceSeq({ ledgerId, deviceSeq }: Pick<EntryDraft, 'ledgerId' | 'deviceSeq'>): void {
  if (count(ledgerId) === deviceSeq) write(COUNT + ledgerId, String(deviceSeq - 1))
}

export interface EntryParts {
  ledgerId: string
  kind: string
  payload: object
  authorId: string
  /** The last entry this screen had seen when the entry was made. */
  basedOnSeq: number
  /** Of the payload's shape; 1 unless the kind has moved on. */
  v?: number
  overrides?: Override[]
  /** Photos and documents it names; their bytes follow by themselves. */
  attachments?: Attachment[]
  /** Made earlier, so that a second tap writes the same entry again. */
  id?: string
  deviceSeq?: number
  /** Whose number it is, if not this device's as it is named now. */
  deviceId?: string
  /** When it happened, if not just now. */
  observedAt?: string
}

/** Wraps what happened into an entry of this device, ready for the outbox or a POST. */
export function makeEntry(parts: EntryParts): EntryDraft {
  return {
    id: parts.id ?? newId(),
    ledgerId: parts.ledgerId,
    kind: parts.kind,
    v: parts.v ?? 1,
    payload: { ...parts.payload },
    authorId: parts.authorId,
    // Who counts is who is named: a form's count may have been lost when the outbox's was not.
    deviceId: parts.deviceId ?? (parts.deviceSeq === undefined ? ownId() : deviceId()),
    deviceSeq: parts.deviceSeq ?? takeDeviceSeq(parts.ledgerId),
    basedOnSeq: parts.basedOnSeq,
    observedAt: parts.observedAt ?? new Date().toISOString(),
    bootId,
    monotonicMs: monotonicMs(),
    attachments: parts.attachments ?? [],
    overrides: parts.overrides ?? [],
  }
}
