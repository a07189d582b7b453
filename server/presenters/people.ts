import { can } from '#shared/policy'
import type { Actor, Role } from '#shared/policy'
import type { Person } from '#shared/api/people'
import type { GuestTest, SessionResponse } from '#shared/api/session'
import { shopSchema } from '#shared/api/shops'
import type { Shop as ShopBody } from '#shared/api/shops'
import type { Shop } from '../models'
import type { PersonInShop } from '../services/people'
import type { SignedIn } from '../services/sessions'

/** Columns are plain text; parsing gives them back their types and lets nothing else out. */
export function presentShop(shop: Shop): ShopBody {
  const { id, name, forceUnit, pressureUnit, lengthUnit, buildPauseDays, walkDownHours } = shop
  return shopSchema.parse({ id, name, forceUnit, pressureUnit, lengthUnit, buildPauseDays, walkDownHours })
}

export function presentSession(session: SignedIn, shops: { shop: Shop; role: Role }[], guestOf: GuestTest[]): SessionResponse {
  return {
    user: { id: session.userId, name: session.name, email: session.email },
    shops: shops.map(({ shop, role }) => ({ ...presentShop(shop), role })),
    guestOf,
    expiresAt: session.expiresAt.toISOString(),
  }
}

export function presentPerson(viewer: Actor, { user, membership }: PersonInShop): Person {
  const seesEmail = can(viewer, 'people:see-email', { shopId: membership.shopId })
  return {
    userId: user.id,
    name: user.name,
    ...(seesEmail ? { email: user.email } : {}),
    role: membership.role,
    addedAt: membership.createdAt.toISOString(),
    endedAt: membership.endedAt?.toISOString() ?? null,
  }
}
