import { randomUUID } from 'node:crypto'
import { personSchema } from '#shared/api/people'
import { sessionResponseSchema } from '#shared/api/session'
import type { Role } from '#shared/policy'
import { ApiClient } from './client'

export const password = 'correct horse, long enough'

export interface SignedInPerson {
  client: ApiClient
  userId: string
  name: string
  email: string
  password: string
  shopId: string
}

export function freshEmail(): string {
  return `${randomUUID()}@people.example`
}

/** A new shop, through the API, with its owner signed in. */
export async function openShop(given: { shopName?: string; ownerName?: string; email?: string } = {}): Promise<SignedInPerson> {
  const client = new ApiClient()
  const email = given.email ?? freshEmail()
  const name = given.ownerName ?? 'Ida Marsh'
  const response = await client
    .post('/api/shops', { shopName: given.shopName ?? 'Kiln Lane Fabrication', ownerName: name, email, password })
    .expect(201)
  const session = sessionResponseSchema.parse(response.body)
  const shopId = session.shops.at(-1)?.id
  if (shopId === undefined) throw new Error('The new shop is not in the session.')
  return { client, userId: session.user.id, name, email, password, shopId }
}

export async function signIn(email: string, given: { password?: string; client?: ApiClient } = {}): Promise<ApiClient> {
  const client = given.client ?? new ApiClient()
  await client.post('/api/session', { email, password: given.password ?? password }).expect(200)
  return client
}

const names: Record<Role, string> = { owner: 'Olaf Brandt', lead: 'Lena Vogt', witness: 'Wim Faber', crew: 'Cora Lind' }

/** Somebody whom the owner adds, signed in on a browser of their own. */
export async function addPerson(owner: SignedInPerson, role: Role, given: { name?: string; email?: string } = {}): Promise<SignedInPerson> {
  const email = given.email ?? freshEmail()
  const name = given.name ?? names[role]
  const response = await owner.client.post(`/api/people?shop=${owner.shopId}`, { name, email, role, password }).expect(201)
  const person = personSchema.parse(response.body)
  return { client: await signIn(email), userId: person.userId, name: person.name, email, password, shopId: owner.shopId }
}

/** A shop with a person in every role. */
export async function openStaffedShop(): Promise<Record<Role, SignedInPerson>> {
  const owner = await openShop()
  return {
    owner,
    lead: await addPerson(owner, 'lead'),
    witness: await addPerson(owner, 'witness'),
    crew: await addPerson(owner, 'crew'),
  }
}
