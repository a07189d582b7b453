import { createHash, randomBytes } from 'node:crypto'
import { Op } from 'sequelize'
import type { Sequelize } from 'sequelize'
import type { Calendar, CalendarItem } from '#shared/api/calendar'
import { nameJoints } from '#shared/press/joints'
import { isAccepted } from '#shared/press/apply'
import type { PressState } from '#shared/press/state'
import type { AppContext, Work } from '../context'
import { inTransaction } from '../context'
import { pressState } from '../ledger/folds'
import { readHead } from '../ledger/read'
import { CalendarFeed, Instrument, Press, Shop } from '../models'
import { notFound } from '../problem'
import { actorIn, authorize } from './membership'

const MOST = 1000
const DAY = 86_400_000

/** A press that is shut, and what has to be done to it, from the day it became so. */
function shutItems(state: PressState, pressId: string, pressName: string): CalendarItem[] {
  const { clearance, toRepeat } = state
  const on = (clearance.is === 'withdrawn' ? clearance.at : (state.history.at(-1)?.at ?? '')).slice(0, 10)
  if (on === '' || state.underTest) return []
  if (clearance.is === 'suspended' && clearance.until === 'the joints are accepted') {
    const joints = nameJoints(state.joints.filter((joint) => !isAccepted(joint)).map((joint) => joint.number))
    return [{ kind: 'examination', on, pressId, pressName, joints }]
  }
  return toRepeat ? [{ kind: 'retest', on, pressId, pressName, number: toRepeat.number }] : []
}

async function shutPresses({ transaction, actor }: Work, database: Sequelize): Promise<CalendarItem[]> {
  const shut = await Press.findAll({
    where: { shopId: actor.shopId, status: { [Op.in]: ['suspended', 'withdrawn'] } },
    attributes: ['id', 'name'],
    limit: MOST,
    raw: true,
    transaction,
  })
  const items: CalendarItem[] = []
  for (const { id, name } of shut) {
    const head = await readHead(database, transaction, id)
    if (head) items.push(...shutItems(await pressState(database, transaction, head), id, name))
  }
  return items
}

/** What falls due in a shop between two days, both counted; what is already late and still open is in it whatever the day. */
export async function readCalendar(work: Work, from: string, to: string): Promise<Calendar> {
  const { transaction, actor } = work
  const { shopId } = actor
  authorize(actor, 'calendar:read', { shopId })
  const database = Press.sequelize
  if (database === undefined) throw new Error('The models are not bound to a connection.')
  const instruments = await Instrument.findAll({
    where: { shopId, retiredAt: null, dueOn: { [Op.between]: [from, to] } },
    attributes: ['id', 'code', 'kind', 'dueOn'],
    limit: MOST,
    raw: true,
    transaction,
  })
  const cleared = await Press.findAll({
    where: { shopId, status: 'cleared', clearedUntil: { [Op.between]: [from, to] } },
    attributes: ['id', 'name', 'clearedUntil'],
    limit: MOST,
    raw: true,
    transaction,
  })
  const items: CalendarItem[] = [
    ...instruments.flatMap(({ id, code, kind, dueOn }): CalendarItem[] =>
      dueOn === null ? [] : [{ kind: 'calibration', on: dueOn, instrumentId: id, code, instrumentKind: kind }],
    ),
    ...cleared.flatMap(({ id, name, clearedUntil }): CalendarItem[] =>
      clearedUntil === null ? [] : [{ kind: 'clearance', on: clearedUntil, pressId: id, pressName: name }],
    ),
    ...(await shutPresses(work, database)),
  ]
  return { items: items.sort((a, b) => a.on.localeCompare(b.on)) }
}

const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex')

/** Makes a new secret address for this person and shop; the one before ends. */
export async function renewFeed({ transaction, actor, now }: Work, origin: string): Promise<string> {
  const { shopId, userId } = actor
  authorize(actor, 'calendar:read', { shopId })
  const token = randomBytes(24).toString('base64url')
  await CalendarFeed.destroy({ where: { shopId, userId }, transaction })
  await CalendarFeed.create({ shopId, userId, tokenHash: hashOf(token), createdAt: now }, { transaction })
  return `${origin}/api/calendar/${token}.ics`
}

export async function endFeed({ transaction, actor }: Work): Promise<void> {
  await CalendarFeed.destroy({ where: { shopId: actor.shopId, userId: actor.userId }, transaction })
}

export interface FollowedCalendar extends Calendar {
  shopId: string
  shopName: string
}

/** What a calendar program that follows a secret address reads; nothing once its person has left the shop. */
export function readFeed(context: AppContext, token: string): Promise<FollowedCalendar> {
  return inTransaction(
    context,
    async (transaction) => {
      const feed = await CalendarFeed.findOne({ where: { tokenHash: hashOf(token) }, raw: true, transaction })
      if (!feed) throw notFound('This calendar')
      const actor = await actorIn({ transaction, userId: feed.userId, shopId: feed.shopId })
      if (actor.role === null) throw notFound('This calendar')
      const shop = await Shop.findByPk(feed.shopId, { attributes: ['name'], raw: true, transaction })
      const now = context.now()
      const day = (offset: number) => new Date(now.getTime() + offset * DAY).toISOString().slice(0, 10)
      const { items } = await readCalendar({ transaction, actor, now }, day(-365), day(730))
      return { items, shopId: feed.shopId, shopName: shop?.name ?? '' }
    },
    { idempotent: true },
  )
}
