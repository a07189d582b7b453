import type { Sequelize, Transaction } from 'sequelize'
import type { Logger } from 'pino'
import type { Actor } from '#shared/policy'
import type { Config } from './config'
import { runTransaction } from './transaction'

export interface StoredFile {
  key: string
  /** Bytes. */
  size: number
}

/**
 * Where bytes are kept. Keys are made by the program: `<shop>/<SHA-256>`, so that what stands under a key never
 * changes, and putting it twice is harmless.
 */
export interface Storage {
  /** Resolves when the bytes are durable, whole, under their key. */
  put(key: string, bytes: Buffer): Promise<void>
  /** null when nothing stands under the key. */
  get(key: string): Promise<Buffer | null>
  has(key: string): Promise<boolean>
  /** Every file whose key begins with `prefix`, in order of the keys. */
  list(prefix?: string): Promise<StoredFile[]>
}

/** What one running server is made of; handed down, never global. */
export interface AppContext {
  config: Config
  database: Sequelize
  /** Bytes of photos and documents. */
  storage: Storage
  /** Signs the session cookie. */
  sessionSecret: string
  logger: Logger
  now(): Date
  /** Aborted when the server is asked to stop: streams that would stay open end themselves on it. */
  closing: AbortSignal
}

/** What a service works with: everything it reads and writes is in the one transaction. */
export interface Work {
  transaction: Transaction
  actor: Actor
  now: Date
}

/**
 * READ COMMITTED: what a row lock waited for is seen as it is now. Runs again by itself when the database took it back;
 * `idempotent` says that it may also run again when nobody knows whether its COMMIT arrived.
 */
export function inTransaction<T>(
  context: Pick<AppContext, 'database'>,
  work: (transaction: Transaction) => Promise<T>,
  { idempotent = false } = {},
): Promise<T> {
  return runTransaction(context.database, { idempotent }, work)
}
