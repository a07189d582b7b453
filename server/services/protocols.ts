import type { Transaction } from 'sequelize'
import { v7 as newId } from 'uuid'
import type { ProtocolRequest } from '#shared/api/protocols'
import { SHIPPED_PROTOCOLS, protocolContentSchema } from '#shared/proof-test/protocol'
import type { ProtocolContent } from '#shared/proof-test/protocol'
import type { Work } from '../context'
import { Protocol, ProtocolVersion, Shop, User } from '../models'
import { conflict, invalid, notFound } from '../problem'
import { authorize } from './membership'

export interface ProtocolInShop {
  id: string
  name: string
  version: number
  content: ProtocolContent
  archived: boolean
}

export interface DatedVersion {
  version: number
  content: ProtocolContent
  createdAt: Date
  createdBy: string
}

export interface ProtocolWithVersions {
  shopId: string
  protocol: ProtocolInShop
  versions: DatedVersion[]
}

/** The shop that a protocol belongs to; undefined for an id that nobody gave out. */
export async function shopOfProtocol(id: string, transaction: Transaction): Promise<string | undefined> {
  return (await Protocol.findOne({ where: { id }, attributes: ['shopId'], raw: true, transaction }))?.shopId
}

/** Those for new tests first, then the archived, each by name. */
export async function listProtocols({ transaction, actor }: Work): Promise<ProtocolInShop[]> {
  const { shopId } = actor
  authorize(actor, 'protocol:read', { shopId })
  const protocols = await Protocol.findAll({ where: { shopId }, order: ['name', 'id'], raw: true, transaction })
  const versions = await ProtocolVersion.findAll({
    where: { shopId, protocolId: protocols.map((one) => one.id) },
    attributes: ['protocolId', 'version', 'content'],
    raw: true,
    transaction,
  })
  const contents = new Map(versions.map((one) => [`${one.protocolId} ${one.version}`, one.content]))
  const rows = protocols.map(({ id, name, currentVersion, archivedAt }) => ({
    id,
    name,
    version: currentVersion,
    content: protocolContentSchema.parse(contents.get(`${id} ${currentVersion}`)),
    archived: archivedAt !== null,
  }))
  return [...rows.filter((one) => !one.archived), ...rows.filter((one) => one.archived)]
}

async function protocolIn({ transaction, actor }: Work, id: string, lock = false): Promise<Protocol> {
  const protocol = await Protocol.findOne({
    where: { id, shopId: actor.shopId },
    transaction,
    lock: lock ? transaction.LOCK.UPDATE : undefined,
  })
  if (protocol === null) throw notFound('This protocol')
  return protocol
}

export async function readProtocol(work: Work, id: string): Promise<ProtocolWithVersions> {
  const { transaction, actor } = work
  const { shopId } = actor
  authorize(actor, 'protocol:read', { shopId })
  const protocol = await protocolIn(work, id)
  const stored = await ProtocolVersion.findAll({ where: { shopId, protocolId: id }, order: [['version', 'DESC']], raw: true, transaction })
  const users = await User.findAll({
    where: { id: stored.map((one) => one.createdBy) },
    attributes: ['id', 'name'],
    raw: true,
    transaction,
  })
  const names = new Map(users.map((user) => [user.id, user.name]))
  const versions = stored.map(({ version, content, createdAt, createdBy }) => ({
    version,
    content: protocolContentSchema.parse(content),
    createdAt,
    createdBy: names.get(createdBy) ?? '',
  }))
  const current = versions.find((one) => one.version === protocol.currentVersion)
  if (current === undefined) throw new Error(`Protocol ${id} lacks its version ${protocol.currentVersion}.`)
  const { name, currentVersion, archivedAt } = protocol
  return { shopId, protocol: { id, name, version: currentVersion, content: current.content, archived: archivedAt !== null }, versions }
}

/** Names are compared under the shop's row lock, so that two people can't give the same one at once. */
async function refuseTakenName({ transaction, actor }: Work, name: string, ownId?: string): Promise<void> {
  await Shop.findByPk(actor.shopId, { attributes: ['id'], transaction, lock: transaction.LOCK.UPDATE })
  const others = await Protocol.findAll({ where: { shopId: actor.shopId, name }, attributes: ['id'], raw: true, transaction })
  if (others.some((other) => other.id !== ownId)) {
    throw invalid({ name: `Another protocol of this shop is called ${name}. Give this one a name of its own.` })
  }
}

type Writing = Pick<Work, 'transaction' | 'now'> & { shopId: string; userId: string }

async function writeVersion(
  { transaction, now, shopId, userId }: Writing,
  protocolId: string,
  version: number,
  content: ProtocolContent,
): Promise<void> {
  await ProtocolVersion.create({ shopId, protocolId, version, content, createdBy: userId, createdAt: now }, { transaction })
}

async function writeFirst(writing: Writing, { name, content }: ProtocolRequest): Promise<string> {
  const { transaction, now, shopId } = writing
  const protocol = await Protocol.create({ id: newId(), shopId, name, currentVersion: 1, createdAt: now }, { transaction })
  await writeVersion(writing, protocol.id, 1, content)
  return protocol.id
}

/** What every shop starts with; part of opening it. */
export async function addShippedProtocols(writing: Writing): Promise<void> {
  for (const shipped of SHIPPED_PROTOCOLS) await writeFirst(writing, shipped)
}

export async function addProtocol(work: Work, request: ProtocolRequest): Promise<string> {
  const { transaction, actor, now } = work
  authorize(actor, 'protocol:write', { shopId: actor.shopId })
  await refuseTakenName(work, request.name)
  return writeFirst({ transaction, now, shopId: actor.shopId, userId: actor.userId }, request)
}

/** The next version. Older ones stay as they are: tests were run by them. */
export async function addProtocolVersion(work: Work, id: string, { name, content }: ProtocolRequest): Promise<void> {
  const { transaction, actor, now } = work
  authorize(actor, 'protocol:write', { shopId: actor.shopId })
  await refuseTakenName(work, name, id)
  const protocol = await protocolIn(work, id, true)
  if (protocol.archivedAt !== null) throw conflict('archived', 'This protocol is archived. Bring it back first.')
  const version = protocol.currentVersion + 1
  await writeVersion({ transaction, now, shopId: actor.shopId, userId: actor.userId }, id, version, content)
  await protocol.update({ name, currentVersion: version }, { transaction })
}

export async function archiveProtocol(work: Work, id: string, archived: boolean): Promise<void> {
  const { transaction, actor, now } = work
  authorize(actor, 'protocol:write', { shopId: actor.shopId })
  const protocol = await protocolIn(work, id, true)
  await protocol.update({ archivedAt: archived ? (protocol.archivedAt ?? now) : null }, { transaction })
}

export interface ProtocolForTest {
  id: string
  name: string
  version: number
  content: ProtocolContent
}

/** The protocol as a test freezes it: its current version. */
export async function protocolForTest(work: Work, id: string): Promise<ProtocolForTest> {
  const { protocol } = await readProtocol(work, id)
  if (protocol.archived) throw conflict('archived', `The protocol ${protocol.name} is archived. Choose another one, or bring it back.`)
  return { id, name: protocol.name, version: protocol.version, content: protocol.content }
}
