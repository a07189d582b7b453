import type { SessionResponse } from '#shared/api/session'
import { openCache } from './cache-database'

const HERE = 'here'

/** Who is signed in on this device, for when the server can't be asked. What another person opened here goes. */
export async function keepSession(session: SessionResponse, databaseName?: string): Promise<void> {
  const database = await openCache(databaseName)
  const tx = database.transaction(['session', 'ledgers', 'entries'], 'readwrite', { durability: 'strict' })
  const before = await tx.objectStore('session').get(HERE)
  if (before && before.user.id !== session.user.id)
    await Promise.all([tx.objectStore('ledgers').clear(), tx.objectStore('entries').clear()])
  await Promise.all([tx.objectStore('session').put(session, HERE), tx.done])
}

/** Who was signed in here when the server last answered; undefined when nobody is, or nothing can be kept. */
export async function readSession(databaseName?: string): Promise<SessionResponse | undefined> {
  try {
    return await (await openCache(databaseName)).get('session', HERE)
  } catch {
    return undefined
  }
}

/** Somebody signed out: neither the person nor what they opened stays. What waits to be sent is kept elsewhere, and stays. */
export async function forgetSession(databaseName?: string): Promise<void> {
  const database = await openCache(databaseName)
  const tx = database.transaction(['session', 'ledgers', 'entries'], 'readwrite', { durability: 'strict' })
  await Promise.all([tx.objectStore('session').clear(), tx.objectStore('ledgers').clear(), tx.objectStore('entries').clear(), tx.done])
}
