import { UniqueConstraintError } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { OpenShopRequest } from '#shared/api/open-shop'
import type { ChangeShopRequest } from '#shared/api/shops'
import type { AppContext, Work } from '../context'
import { inTransaction } from '../context'
import { Membership, Shop, User } from '../models'
import { invalid, notFound } from '../problem'
import { authorize } from './membership'
import { hashPassword } from './passwords'
import { addShippedProtocols } from './protocols'
import { checkPassword, startSession } from './sessions'
import type { Client, SignedIn } from './sessions'

const addressTaken = 'This e-mail address has an account already. Enter its password to open another shop with it.'

/** Whoever has an account opens a further shop with the same password, and keeps the name. */
async function ownerFor(
  context: AppContext,
  request: OpenShopRequest,
  client: Client,
): Promise<{ existing: User } | { passwordHash: string }> {
  const known = await User.findOne({ where: { email: request.email }, attributes: ['id'], raw: true })
  if (known === null) return { passwordHash: await hashPassword(request.password, context.config.bcryptCost) }
  const existing = await checkPassword(context, { email: request.email, password: request.password, address: client.address })
  if (existing === undefined) throw invalid({ email: addressTaken })
  return { existing }
}

/** A shop with its owner and the protocols that every shop starts with, in the caller's transaction. */
export async function foundShop(
  { transaction, now }: Pick<Work, 'transaction' | 'now'>,
  userId: string,
  shop: Pick<OpenShopRequest, 'shopName' | 'forceUnit' | 'pressureUnit' | 'lengthUnit'>,
): Promise<string> {
  const { shopName: name, forceUnit, pressureUnit, lengthUnit } = shop
  const { id } = await Shop.create(
    { id: newId(), name, forceUnit, pressureUnit, lengthUnit, buildPauseDays: 30, walkDownHours: 12, createdAt: now },
    { transaction },
  )
  await Membership.create({ shopId: id, userId, role: 'owner', createdAt: now, endedAt: null }, { transaction })
  await addShippedProtocols({ transaction, now, shopId: id, userId })
  return id
}

/** Opens a shop, with its owner, and signs the owner in. */
export async function openShop(context: AppContext, request: OpenShopRequest, client: Client): Promise<SignedIn> {
  const owner = await ownerFor(context, request, client)
  const now = context.now()
  try {
    // Not to be run twice: the second time would find the address taken, or found a second shop.
    return await inTransaction(context, async (transaction) => {
      const user =
        'existing' in owner
          ? owner.existing
          : await User.create(
              { id: newId(), email: request.email, name: request.ownerName, passwordHash: owner.passwordHash, createdAt: now },
              { transaction },
            )
      await foundShop({ transaction, now }, user.id, request)
      return startSession({ transaction, now }, user, client.userAgent)
    })
  } catch (error) {
    if (error instanceof UniqueConstraintError) throw invalid({ email: addressTaken })
    throw error
  }
}

export async function readShop({ transaction, actor }: Work): Promise<Shop> {
  authorize(actor, 'shop:read', { shopId: actor.shopId })
  const shop = await Shop.findByPk(actor.shopId, { transaction })
  if (shop === null) throw notFound('This shop')
  return shop
}

export async function changeShop(work: Work, change: ChangeShopRequest): Promise<Shop> {
  authorize(work.actor, 'shop:settings', { shopId: work.actor.shopId })
  const shop = await readShop(work)
  return shop.update(change, { transaction: work.transaction })
}
