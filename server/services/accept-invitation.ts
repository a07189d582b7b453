import type { Transaction } from 'sequelize'
import type { AcceptRequest, InvitationLook } from '#shared/api/invitations'
import type { AppContext } from '../context'
import { inTransaction } from '../context'
import { Invitation, Press, Shop, User } from '../models'
import { invalid, notFound, Problem } from '../problem'
import { admit } from './invitations'
import { namesOf } from './names'
import { hashPassword } from './passwords'
import { accountFor } from './people'
import { checkPassword, startSession } from './sessions'
import type { Client, SignedIn } from './sessions'
import { hashOfToken, isTokenOf } from './tokens'

function refuseSpent({ revokedAt, acceptedAt, expiresAt }: Invitation, now: Date): void {
  if (acceptedAt !== null) throw new Problem(410, 'used', 'This invitation was accepted already. Sign in with the account it made.')
  if (revokedAt !== null) throw new Problem(410, 'revoked', 'This invitation was taken back. Ask whoever invited you for another.')
  if (expiresAt <= now) throw new Problem(410, 'expired', 'This invitation has run out. Ask whoever invited you for another.')
}

/** The invitation of a link that still holds. Locked when it is about to be used, so that it is used once. */
async function holding(transaction: Transaction, token: string, now: Date, lock = false): Promise<Invitation> {
  const invitation = await Invitation.findOne({
    where: { tokenHash: hashOfToken(token) },
    transaction,
    ...(lock ? { lock: transaction.LOCK.UPDATE } : {}),
  })
  if (invitation === null || !isTokenOf(token, invitation.tokenHash)) throw notFound('This invitation')
  refuseSpent(invitation, now)
  return invitation
}

/** Who invites, and to what. */
export function lookAtInvitation(context: AppContext, token: string): Promise<InvitationLook> {
  return inTransaction(
    context,
    async (transaction) => {
      const { kind, role, email, shopId, pressId, invitedBy, expiresAt } = await holding(transaction, token, context.now())
      const shop = await Shop.findByPk(shopId, { attributes: ['name'], raw: true, transaction })
      const press = pressId && (await Press.findOne({ where: { id: pressId, shopId }, attributes: ['name'], raw: true, transaction }))
      const account = await User.findOne({ where: { email }, attributes: ['id'], raw: true, transaction })
      const names = await namesOf(transaction, [invitedBy])
      return {
        kind,
        role,
        email,
        shopName: shop?.name ?? '',
        invitedBy: names[invitedBy] ?? '',
        pressName: press ? press.name : null,
        hasAccount: account !== null,
        expiresAt: expiresAt.toISOString(),
      }
    },
    { idempotent: true },
  )
}

/**
 * Makes the account, or signs in to the one there is, and admits it. Whoever has the link has shown that the address is
 * theirs; an account that exists asks for its password all the same.
 */
export async function acceptInvitation(context: AppContext, request: AcceptRequest, client: Client): Promise<SignedIn> {
  const look = await lookAtInvitation(context, request.token)
  const isNew = 'newPassword' in request
  if (isNew && look.hasAccount) throw invalid({ newPassword: 'This address has an account already. Enter its password.' })
  const known = isNew ? undefined : await checkPassword(context, { email: look.email, password: request.password, address: client.address })
  if (!isNew && known === undefined) throw invalid({ password: 'This is not the password of your account.' })
  const passwordHash = isNew ? await hashPassword(request.newPassword, context.config.bcryptCost) : ''
  // Not to be run twice: the second time would find the invitation used, and the person not signed in.
  return inTransaction(context, async (transaction) => {
    const now = context.now()
    const invitation = await holding(transaction, request.token, now, true)
    const user = known ?? (await accountFor({ transaction, now }, { email: look.email, name: isNew ? request.name : '' }, passwordHash))
    if (isNew && user.passwordHash !== passwordHash) {
      throw invalid({ newPassword: 'This address has an account already. Enter its password.' })
    }
    await admit({ transaction, now }, invitation, user.id)
    await invitation.update({ acceptedAt: now, acceptedBy: user.id }, { transaction })
    return startSession({ transaction, now }, user, client.userAgent)
  })
}
