import jwt from 'jsonwebtoken'
import { Op, QueryTypes } from 'sequelize'
import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { ChangePasswordRequest, SignInRequest } from '#shared/api/session'
import type { AppContext } from '../context'
import { inTransaction } from '../context'
import { Membership, Session, Shop, User } from '../models'
import { Problem, invalid, notSignedIn } from '../problem'
import { retried } from '../transaction'
import { tellOfPassword } from './password-notice'
import { comparePassword, hashPassword } from './passwords'
import { withinLimits } from './sign-in-limits'

const sessionMilliseconds = 14 * 24 * 3_600_000
const seenEveryMilliseconds = 5 * 60_000
const algorithm = 'HS256'

export interface SignedIn {
  sessionId: string
  userId: string
  name: string
  email: string
  expiresAt: Date
}

export interface Client {
  address: string
  userAgent: string
}

function seconds(time: Date): number {
  return Math.floor(time.getTime() / 1000)
}

export function tokenFor(context: AppContext, session: SignedIn): string {
  const times = { iat: seconds(context.now()), exp: seconds(session.expiresAt) }
  return jwt.sign({ sid: session.sessionId, ...times }, context.sessionSecret, { algorithm, subject: session.userId })
}

function sessionIdIn(context: AppContext, token: string): string | undefined {
  try {
    const payload = jwt.verify(token, context.sessionSecret, {
      algorithms: [algorithm],
      clockTimestamp: seconds(context.now()),
    })
    if (typeof payload === 'string') return undefined
    const sid: unknown = payload['sid']
    return typeof sid === 'string' ? sid : undefined
  } catch {
    return undefined
  }
}

/** The living session that the cookie names, if there is one. */
export async function resumeSession(context: AppContext, token: string): Promise<SignedIn | undefined> {
  const sessionId = sessionIdIn(context, token)
  if (sessionId === undefined) return undefined
  const now = context.now()
  const [row] = await retried(() =>
    context.database.query<Omit<SignedIn, 'sessionId'> & { lastSeenAt: Date }>(
      `SELECT s.user_id AS userId, u.name AS name, u.email AS email, s.expires_at AS expiresAt, s.last_seen_at AS lastSeenAt
         FROM sessions s JOIN users u ON u.id = s.user_id
        WHERE s.id = ? AND s.ended_at IS NULL AND s.expires_at > ?`,
      { replacements: [sessionId, now], type: QueryTypes.SELECT },
    ),
  )
  if (row === undefined) return undefined
  if (now.getTime() - row.lastSeenAt.getTime() > seenEveryMilliseconds) {
    await Session.update({ lastSeenAt: now }, { where: { id: sessionId } })
  }
  return { sessionId, userId: row.userId, name: row.name, email: row.email, expiresAt: row.expiresAt }
}

export async function startSession(
  { transaction, now }: { transaction: Transaction; now: Date },
  user: { id: string; name: string; email: string },
  userAgent: string,
): Promise<SignedIn> {
  const expiresAt = new Date(now.getTime() + sessionMilliseconds)
  await Session.destroy({ where: { userId: user.id, expiresAt: { [Op.lt]: now } }, transaction })
  const session = await Session.create(
    { id: newId(), userId: user.id, userAgent: userAgent.slice(0, 200), createdAt: now, lastSeenAt: now, expiresAt, endedAt: null },
    { transaction },
  )
  return { sessionId: session.id, userId: user.id, name: user.name, email: user.email, expiresAt }
}

/** The account with this password, within the limits; undefined when either is wrong. */
export function checkPassword(context: AppContext, given: { email: string; password: string; address: string }): Promise<User | undefined> {
  return withinLimits(context, given, async () => {
    const user = await User.findOne({ where: { email: given.email } })
    const matches = await comparePassword(given.password, user?.passwordHash, context.config.bcryptCost)
    return matches && user !== null ? user : undefined
  })
}

/** For signatures: whether this is the person's password. Counted like an attempt to sign in; throws 429 past the limits. */
export async function verifyPassword(context: AppContext, userId: string, password: string, address: string): Promise<boolean> {
  const user = await User.findByPk(userId, { attributes: ['email'], raw: true })
  if (user === null) return false
  const found = await checkPassword(context, { email: user.email, password, address })
  return found?.id === userId
}

export async function signIn(context: AppContext, request: SignInRequest, client: Client): Promise<SignedIn> {
  const user = await checkPassword(context, { ...request, address: client.address })
  if (user === undefined) {
    throw new Problem(401, 'wrong-sign-in', 'The e-mail address and the password do not go together. Check both and try again.')
  }
  // A session that nobody was told of is never used, so this may run twice.
  return inTransaction(context, (transaction) => startSession({ transaction, now: context.now() }, user, client.userAgent), {
    idempotent: true,
  })
}

export async function endSession(context: AppContext, sessionId: string): Promise<void> {
  await Session.update({ endedAt: context.now() }, { where: { id: sessionId, endedAt: null } })
}

/** The other sessions end: whoever knew the old password is out. */
export async function changePassword(
  context: AppContext,
  signedIn: SignedIn,
  request: ChangePasswordRequest,
  address: string,
): Promise<void> {
  if (!(await verifyPassword(context, signedIn.userId, request.currentPassword, address))) {
    throw invalid({ currentPassword: 'This is not your present password.' })
  }
  const passwordHash = await hashPassword(request.newPassword, context.config.bcryptCost)
  const changeId = newId()
  const change = async (transaction: Transaction) => {
    const [changed] = await User.update({ passwordHash }, { where: { id: signedIn.userId }, transaction })
    if (changed === 0) throw notSignedIn()
    await Session.update(
      { endedAt: context.now() },
      { where: { userId: signedIn.userId, id: { [Op.ne]: signedIn.sessionId }, endedAt: null }, transaction },
    )
    const queueing = { database: context.database, transaction, now: context.now() }
    await tellOfPassword(queueing, { id: signedIn.userId, name: signedIn.name, email: signedIn.email }, changeId, 'changed')
  }
  await inTransaction(context, change, { idempotent: true })
}

/** The shops this person belongs to now, by name. */
export async function shopsOf(userId: string, transaction?: Transaction): Promise<{ shop: Shop; role: Membership['role'] }[]> {
  const memberships = await Membership.findAll({ where: { userId, endedAt: null }, raw: true, transaction })
  const roleIn = new Map(memberships.map(({ shopId, role }) => [shopId, role]))
  const shops = await Shop.findAll({ where: { id: [...roleIn.keys()] }, order: ['name', 'id'], raw: true, transaction })
  return shops.flatMap((shop) => {
    const role = roleIn.get(shop.id)
    return role === undefined ? [] : [{ shop, role }]
  })
}
