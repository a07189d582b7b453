import { SOON_DAYS } from '#shared/api/today'
import type { AppContext } from '../context'
import { inTransaction } from '../context'
import { dueThing } from '../mail/due-letters'
import { queueMail } from '../mail/queue'
import { peopleWith } from '../mail/recipients'
import { Shop } from '../models'
import { readCalendar } from './calendar'

const DAY = 86_400_000
/** What ran out longer ago was told when it did, or stood on Today before there were letters. */
const LOOK_BACK_DAYS = 60

const addDays = (day: string, count: number): string => new Date(Date.parse(`${day}T00:00:00Z`) + count * DAY).toISOString().slice(0, 10)

async function tellShop(context: Pick<AppContext, 'database' | 'now'>, shopId: string, day: string): Promise<void> {
  await inTransaction(
    context,
    async (transaction) => {
      const now = context.now()
      const recipients = await peopleWith(['owner', 'lead'], shopId, transaction)
      const reader = recipients[0]?.userId
      if (!reader) return
      // Nobody asks: what is due is read as an owner would read it.
      const work = { transaction, actor: { userId: reader, shopId, role: 'owner' as const }, now }
      const { items } = await readCalendar(work, addDays(day, -LOOK_BACK_DAYS), addDays(day, SOON_DAYS))
      for (const thing of items.flatMap((item) => dueThing(item, day) ?? [])) {
        for (const to of recipients) await queueMail({ database: context.database, transaction, now }, { ...thing, shopId, to })
      }
    },
    { idempotent: true },
  )
}

/** Queues a letter for each thing that falls due soon or is overdue, once for each thing, date and person. */
export async function tellWhatIsDue(context: Pick<AppContext, 'database' | 'now'>, day: string, closing?: AbortSignal): Promise<void> {
  const shops = await Shop.findAll({ attributes: ['id'], order: ['id'], raw: true })
  for (const { id } of shops) {
    if (closing?.aborted) throw new Error('The server was asked to stop.')
    await tellShop(context, id, day)
  }
}
