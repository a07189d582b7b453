import { openDB, type DBSchema, type IDBPDatabase } from 'idb'
import type { Attachment } from '#shared/ledger/envelope'

/** What a photo or document belongs to; `draft` until its calibration has an id. */
export type Owner = `ledger:${string}` | `calibration:${string}` | `draft:${string}`

/** A photo or document whose bytes lie on this device. */
export interface KeptFile {
  owner: Owner
  attachment: Attachment
  keptAt: string
  /** The server has the entry that names it, so that it will take the bytes. */
  named: boolean
  /** Why the server will never take these bytes. */
  refused: string | null
}

export interface FilesSchema extends DBSchema {
  files: { key: [string, string]; value: KeptFile }
  bytes: { key: [string, string]; value: ArrayBuffer }
}

export type FilesDatabase = IDBPDatabase<FilesSchema>

export const keyOf = ({ owner, attachment }: Pick<KeptFile, 'owner' | 'attachment'>): [string, string] => [owner, attachment.sha256]

/** The bytes stand apart from what is said of them: listing what waits loads no photo. */
export function openFiles(name: string, onGone: () => void): Promise<FilesDatabase> {
  return openDB<FilesSchema>(name, 1, {
    upgrade(database) {
      database.createObjectStore('files')
      database.createObjectStore('bytes')
    },
    // Another page wants a newer shape, or the browser took the storage away: it is opened again at the next use.
    blocking(_from, _to, event) {
      ;(event.target as IDBDatabase | null)?.close()
      onGone()
    },
    terminated: onGone,
  })
}

const LONGEST_WRITE = 15_000

/** A disk that doesn't answer is a disk that refuses. */
export function inTime<T>(write: Promise<T>): Promise<T> {
  let timer: ReturnType<typeof setTimeout> | undefined
  const late = new Promise<never>((_resolve, reject) => {
    timer = setTimeout(() => reject(new Error('the storage does not answer')), LONGEST_WRITE)
  })
  return Promise.race([write, late]).finally(() => clearTimeout(timer))
}
