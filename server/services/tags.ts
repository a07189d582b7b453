import { randomInt } from 'node:crypto'
import { UniqueConstraintError } from 'sequelize'
import type { PublicTag, TagResponse } from '#shared/api/tags'
import { publicTagOf } from '#shared/press/public-tag'
import type { AppContext, Work } from '../context'
import { inTransaction } from '../context'
import { pressState } from '../ledger/folds'
import { readHead } from '../ledger/read'
import { Shop, Tag } from '../models'
import { notFound } from '../problem'
import { authorize } from './membership'

/** Without letters and figures that are mistaken for each other: 31 of them, 16 long, are 79 bits. */
const ALPHABET = 'abcdefghjkmnpqrstuvwxyz23456789'
const LENGTH = 16

const newCode = (): string => Array.from({ length: LENGTH }, () => ALPHABET[randomInt(ALPHABET.length)]).join('')

const LOOPBACK = /^https?:\/\/(localhost|127\.|\[::1\])/

/** The press's tag: its code is made once, so that a paper that hangs on it stays true. `origin` is where people reach the server. */
export async function tagOf({ transaction, actor, now }: Work, pressId: string, origin: string): Promise<TagResponse> {
  const { shopId } = actor
  authorize(actor, 'press:read', { shopId })
  const known = await Tag.findOne({ where: { shopId, pressId }, raw: true, transaction })
  const code = known?.code ?? newCode()
  if (known === null) {
    try {
      await Tag.create({ code, shopId, pressId, createdAt: now }, { transaction })
    } catch (error) {
      if (!(error instanceof UniqueConstraintError)) throw error
      return tagOf({ transaction, actor, now }, pressId, origin)
    }
  }
  return { code, address: `${origin}/tag/${code}`, reachable: !LOOPBACK.test(origin) }
}

/** What anybody who holds a tag may read, as it is at this moment; a code that nobody gave out is unknown. */
export function readPublicTag(context: AppContext, code: string, day: string | undefined): Promise<PublicTag> {
  return inTransaction(
    context,
    async (transaction) => {
      const tag = await Tag.findOne({ where: { code }, raw: true, transaction })
      const head = tag && (await readHead(context.database, transaction, tag.pressId))
      if (!tag || !head) throw notFound('This tag')
      const shop = await Shop.findByPk(tag.shopId, { attributes: ['name'], raw: true, transaction })
      const state = await pressState(context.database, transaction, head)
      const now = context.now().toISOString()
      const said = publicTagOf(state, shop?.name ?? '', day ?? now.slice(0, 10), now)
      if (!said) throw notFound('This tag')
      return said
    },
    { idempotent: true },
  )
}
