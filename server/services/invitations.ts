import { UniqueConstraintError } from 'sequelize'
import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import { INVITATION_DAYS } from '#shared/api/invitations'
import type { InvitationsResponse, InviteRequest } from '#shared/api/invitations'
import { can } from '#shared/policy'
import type { Role } from '#shared/policy'
import type { AppContext, Work } from '../context'
import { memberInvited, witnessInvited } from '../mail/account-letters'
import { queueMail } from '../mail/queue'
import { Invitation, Membership, Press, ProofTest, Shop, TestGuest, User } from '../models'
import { invalid, notFound } from '../problem'
import { authorize } from './membership'
import { namesOf } from './names'
import { hashOfToken, newToken } from './tokens'

const DAY = 86_400_000
/** Open at once, in a shop: nobody need write to a whole town. */
const MOST_OPEN = 100

async function refuseMembers({ transaction, actor }: Work, email: string): Promise<void> {
  const user = await User.findOne({ where: { email }, attributes: ['id'], raw: true, transaction })
  const where = { shopId: actor.shopId, userId: user?.id ?? '', endedAt: null }
  if (user && (await Membership.findOne({ where, attributes: ['role'], raw: true, transaction }))) {
    throw invalid({ email: 'This person belongs to the shop already.' })
  }
}

/** Invites by mail. The link is in the letter and nowhere else: what is kept is its hash. */
export async function invite(database: AppContext['database'], work: Work, request: InviteRequest): Promise<Invitation> {
  const { transaction, actor, now } = work
  const { shopId, userId } = actor
  authorize(actor, request.kind === 'member' ? 'people:invite' : 'proof-test:invite-witness', { shopId })
  // One at a time in a shop, so that the count holds and nobody is invited twice at once.
  const shop = await Shop.findByPk(shopId, { transaction, lock: transaction.LOCK.UPDATE })
  const inviter = await User.findByPk(userId, { attributes: ['name'], raw: true, transaction })
  if (!shop || !inviter) throw notFound('This shop')
  await refuseMembers(work, request.email)
  const pressId = request.kind === 'witness' ? request.pressId : null
  const press =
    pressId === null ? null : await Press.findOne({ where: { id: pressId, shopId }, attributes: ['name'], raw: true, transaction })
  if (pressId !== null && !press) throw invalid({ pressId: 'This press is not here. Choose one from the list.' })
  const open = { shopId, acceptedAt: null, revokedAt: null }
  // The link that was sent before stops working: there is one letter to look for.
  await Invitation.update({ revokedAt: now }, { where: { ...open, email: request.email, kind: request.kind, pressId }, transaction })
  if ((await Invitation.count({ where: open, transaction })) >= MOST_OPEN) {
    throw invalid({ email: `There are ${MOST_OPEN} open invitations. Revoke some first.` })
  }
  const token = newToken()
  const expiresAt = new Date(now.getTime() + INVITATION_DAYS * DAY)
  const invitation = await Invitation.create(
    {
      id: newId(),
      shopId,
      kind: request.kind,
      email: request.email,
      role: request.kind === 'member' ? request.role : null,
      pressId,
      tokenHash: hashOfToken(token),
      invitedBy: userId,
      createdAt: now,
      expiresAt,
    },
    { transaction },
  )
  const invited = { shopName: shop.name, inviterName: inviter.name, expiresAt }
  await queueMail(
    { database, transaction, now },
    {
      kind: 'invitation',
      shopId,
      key: invitation.id,
      to: { userId: null, email: request.email },
      letter:
        request.kind === 'member'
          ? memberInvited({ ...invited, role: request.role })
          : witnessInvited({ ...invited, pressName: press?.name ?? '' }),
      secret: token,
    },
  )
  return invitation
}

async function pressNames(shopId: string, ids: readonly string[], transaction: Transaction): Promise<Map<string, string>> {
  const presses = await Press.findAll({ where: { shopId, id: [...new Set(ids)] }, attributes: ['id', 'name'], raw: true, transaction })
  return new Map(presses.map(({ id, name }) => [id, name]))
}

async function guestsOf(shopId: string, transaction: Transaction): Promise<InvitationsResponse['guests']> {
  const guests = await TestGuest.findAll({
    where: { shopId, endedAt: null },
    order: [['createdAt', 'DESC']],
    limit: 200,
    raw: true,
    transaction,
  })
  const names = await namesOf(
    transaction,
    guests.map(({ userId }) => userId),
  )
  const presses = await pressNames(
    shopId,
    guests.map(({ pressId }) => pressId),
    transaction,
  )
  const tests = await ProofTest.findAll({
    where: { shopId, id: guests.flatMap(({ proofTestId }) => proofTestId ?? []) },
    attributes: ['id', 'number'],
    raw: true,
    transaction,
  })
  const numbers = new Map(tests.map(({ id, number }) => [id, number]))
  return guests.map(({ invitationId, userId, pressId, proofTestId }) => ({
    invitationId,
    userId,
    name: names[userId] ?? '',
    pressId,
    pressName: presses.get(pressId) ?? '',
    test: proofTestId === null ? null : { proofTestId, number: numbers.get(proofTestId) ?? '' },
  }))
}

/** What waits, the newest first, and who came from outside. Leads see what concerns tests; others nothing. */
export async function listInvitations({ transaction, actor, now }: Work): Promise<InvitationsResponse> {
  const { shopId } = actor
  authorize(actor, 'proof-test:invite-witness', { shopId })
  const seesMembers = can(actor, 'people:invite', { shopId })
  const open = await Invitation.findAll({
    where: { shopId, acceptedAt: null, revokedAt: null, ...(seesMembers ? {} : { kind: 'witness' as const }) },
    order: [['createdAt', 'DESC']],
    limit: 200,
    raw: true,
    transaction,
  })
  const names = await namesOf(
    transaction,
    open.map(({ invitedBy }) => invitedBy),
  )
  const presses = await pressNames(
    shopId,
    open.flatMap(({ pressId }) => pressId ?? []),
    transaction,
  )
  return {
    invitations: open.map(({ id, kind, role, email, pressId, invitedBy, createdAt, expiresAt }) => ({
      id,
      kind,
      role,
      email,
      pressId,
      pressName: pressId === null ? null : (presses.get(pressId) ?? ''),
      invitedBy: names[invitedBy] ?? '',
      createdAt: createdAt.toISOString(),
      expiresAt: expiresAt.toISOString(),
      expired: expiresAt <= now,
    })),
    guests: await guestsOf(shopId, transaction),
  }
}

export async function shopOfInvitation(id: string, transaction: Transaction): Promise<string | undefined> {
  return (await Invitation.findOne({ where: { id }, attributes: ['shopId'], raw: true, transaction }))?.shopId
}

/** Revokes an invitation that waits. Of one that was accepted from outside, the view of the test ends; what was signed stays. */
export async function revokeInvitation({ transaction, actor, now }: Work, id: string): Promise<void> {
  const { shopId } = actor
  const invitation = await Invitation.findOne({ where: { id, shopId }, transaction, lock: transaction.LOCK.UPDATE })
  if (invitation === null) throw notFound('This invitation')
  authorize(actor, invitation.kind === 'member' ? 'people:invite' : 'proof-test:invite-witness', { shopId })
  await TestGuest.update({ endedAt: now }, { where: { shopId, invitationId: id, endedAt: null }, transaction })
  if (invitation.acceptedAt === null && invitation.revokedAt === null) await invitation.update({ revokedAt: now }, { transaction })
}

/** What an accepted invitation makes of its person: a member, or the guest of a test. */
export async function admit(
  { transaction, now }: Pick<Work, 'transaction' | 'now'>,
  invitation: Invitation,
  userId: string,
): Promise<void> {
  const { shopId, id: invitationId, pressId } = invitation
  if (invitation.kind === 'witness' && pressId !== null) {
    await TestGuest.create({ id: newId(), shopId, invitationId, userId, pressId, proofTestId: null, createdAt: now }, { transaction })
    return
  }
  const role: Role = invitation.role ?? 'crew'
  const former = await Membership.findOne({ where: { shopId, userId }, transaction, lock: transaction.LOCK.UPDATE })
  // Somebody was quicker and added them by hand: that role stands.
  if (former !== null && former.endedAt === null) return
  try {
    if (former === null) await Membership.create({ shopId, userId, role, createdAt: now, endedAt: null }, { transaction })
    else await former.update({ role, endedAt: null }, { transaction })
  } catch (error) {
    if (!(error instanceof UniqueConstraintError)) throw error
  }
}
