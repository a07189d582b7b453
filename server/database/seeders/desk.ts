import type { Sequelize, Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { Attachment, EntryDraft } from '#shared/ledger/envelope'
import type { Mark } from '#shared/proof-test/entries'
import type { Storage, Work } from '../../context'
import type { Writing } from '../../ledger/write'
import { membershipOf } from '../../services/membership'
import type { Sealing } from '../../services/sign-test'

/** What everything of the demo shop is written with: one transaction, so that it is there whole or not at all. */
export interface Desk {
  database: Sequelize
  transaction: Transaction
  storage: Storage
  /** The moment of loading; every date of the demo counts back from it. */
  now: Date
  sealing: Sealing
}

const MINUTE = 60_000
const DAY = 24 * 60 * MINUTE

/** A clock time (UTC, "14:05") so many days before the moment of loading, in ms. */
export function daysBefore(desk: Desk, days: number, clock: string): number {
  const midnight = Math.floor(desk.now.getTime() / DAY) * DAY
  const [hours = 0, minutes = 0] = clock.split(':').map(Number)
  return midnight - days * DAY + (hours * 60 + minutes) * MINUTE
}

/** So many minutes before the moment of loading, in ms. */
export function minutesBefore(desk: Desk, minutes: number): number {
  return desk.now.getTime() - minutes * MINUTE
}

export const dayOf = (at: number): string => new Date(at).toISOString().slice(0, 10)

/** A moment of the past as the writer dates what it receives. */
export function writingAt({ database, transaction }: Desk, at: number): Writing {
  return { database, transaction, now: new Date(at) }
}

/** What a person of a shop does at a moment of the past, with the rights the person has there. */
export async function workAt({ transaction }: Desk, shopId: string, userId: string, at: number): Promise<Work> {
  return { transaction, actor: await membershipOf({ transaction, userId, shopId }), now: new Date(at) }
}

interface Tablet {
  deviceId: string
  bootId: string
  entries: number
}

/** The tablets on which people write one ledger: each person's own, counting its entries and its time since it was started. */
export class Tablets {
  private readonly byPerson = new Map<string, Tablet>()

  constructor(
    private readonly ledgerId: string,
    /** When the tablets were started, in ms. */
    private readonly startedAt: number,
  ) {}

  stamp(personId: string, at: number): Pick<EntryDraft, 'deviceId' | 'bootId' | 'monotonicMs' | 'observedAt'> {
    const { deviceId, bootId } = this.tabletOf(personId)
    return { deviceId, bootId, monotonicMs: Math.round(at - this.startedAt), observedAt: new Date(at).toISOString() }
  }

  mark(personId: string, at: number): Mark {
    const { bootId, monotonicMs, observedAt } = this.stamp(personId, at)
    return { at: observedAt, bootId, monotonicMs }
  }

  /** The number of the person's next entry in this ledger. */
  count(personId: string): number {
    const tablet = this.tabletOf(personId)
    tablet.entries += 1
    return tablet.entries
  }

  draft(entry: {
    personId: string
    at: number
    kind: string
    v: number
    payload: Record<string, unknown>
    basedOnSeq: number
    attachments?: Attachment[]
  }): EntryDraft {
    const { personId, at, attachments = [], ...rest } = entry
    const stamp = this.stamp(personId, at)
    const deviceSeq = this.count(personId)
    return {
      id: newId({ msecs: at }),
      ledgerId: this.ledgerId,
      authorId: personId,
      deviceSeq,
      ...stamp,
      ...rest,
      attachments,
      overrides: [],
    }
  }

  private tabletOf(personId: string): Tablet {
    const known = this.byPerson.get(personId)
    if (known) return known
    const tablet = { deviceId: newId({ msecs: this.startedAt }), bootId: newId({ msecs: this.startedAt }), entries: 0 }
    this.byPerson.set(personId, tablet)
    return tablet
  }
}
