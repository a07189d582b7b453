import { v7 as newId } from 'uuid'
import type { Attachment, Override } from '#shared/ledger/envelope'
import { PRESS_VERSION, type PressDraft } from '#shared/press/entries'
import type { Joint, PressDescription } from '#shared/press/model'
import { appendPress } from '../../services/press-entries'
import { pressState } from '../../ledger/folds'
import { parsePressDraft } from '../../ledger/parse'
import { readHead } from '../../ledger/read'
import { createLedger } from '../../ledger/write'
import { Tablets, workAt, writingAt, type Desk } from './desk'

/** A press's ledger, as the people of a shop write it by hand. */
export class PressBook {
  private readonly tablets: Tablets

  private constructor(
    private readonly desk: Desk,
    private readonly shopId: string,
    readonly id: string,
    readonly description: PressDescription,
    readonly joints: readonly Joint[],
    startedAt: number,
  ) {
    this.tablets = new Tablets(id, startedAt)
  }

  /** Enters a press: its ledger begins with this entry. */
  static async register(
    desk: Desk,
    shopId: string,
    by: string,
    at: number,
    press: { description: PressDescription; joints: Joint[]; lastWorkedOn: string | null },
  ): Promise<PressBook> {
    const id = newId({ msecs: at })
    await createLedger(writingAt(desk, at), { id, shopId, subject: 'press' })
    const book = new PressBook(desk, shopId, id, press.description, press.joints, at - 25 * 60_000)
    await book.write({ kind: 'registered', payload: press }, by, at)
    return book
  }

  async write(
    draft: PressDraft,
    by: string,
    at: number,
    { overrides = [], attachments = [] }: { overrides?: Override[]; attachments?: Attachment[] } = {},
  ): Promise<void> {
    const receivedAt = at + 350
    const writing = writingAt(this.desk, receivedAt)
    const head = await readHead(writing.database, writing.transaction, this.id)
    const entry = this.tablets.draft({ personId: by, at, ...draft, v: PRESS_VERSION, basedOnSeq: head?.headSeq ?? 0, attachments })
    const work = await workAt(this.desk, this.shopId, by, receivedAt)
    await appendPress(writing, work, parsePressDraft({ ...entry, overrides }))
  }

  /** Says what was done about the repair that stands open, and closes it. */
  async closeRepair(said: { note: string; done: string; doneBy: string }, by: string, at: number): Promise<void> {
    const { database, transaction } = writingAt(this.desk, at)
    const head = await readHead(database, transaction, this.id)
    const open = head && (await pressState(database, transaction, head)).repairs.find((repair) => !repair.closed)
    if (!open) throw new Error(`No repair of ${this.description.name} is open.`)
    const { note, done, doneBy } = said
    await this.write({ kind: 'repair-noted', payload: { repairId: open.id, note, doneBy } }, by, at - 3 * 3_600_000)
    await this.write({ kind: 'repair-closed', payload: { repairId: open.id, done, doneBy } }, by, at)
  }

  joint(name: string): Joint {
    const joint = this.joints.find((one) => one.name === name)
    if (!joint) throw new Error(`${this.description.name} has no joint called ${name}.`)
    return joint
  }

  member(kind: PressDescription['members'][number]['kind'], side = ''): string {
    const member = this.description.members.find((one) => one.kind === kind && one.name.toLowerCase().includes(side))
    if (!member) throw new Error(`${this.description.name} has no ${side} ${kind}.`)
    return member.id
  }
}
