/** Whether the browser promised to keep what this site stores, and how much room there is. */
export interface StorageState {
  /** `kept`: never cleared by itself. `may-clear`: cleared when the device runs short. `unknown`: the browser won't say. */
  keeping: 'kept' | 'may-clear' | 'unknown'
  /** Bytes, as the browser estimates them; null where it doesn't. */
  used: number | null
  room: number | null
}

const storage = (): StorageManager | undefined => (typeof navigator === 'undefined' ? undefined : navigator.storage)

export async function readStorageState(): Promise<StorageState> {
  const manager = storage()
  const [persisted, estimate] = await Promise.all([
    typeof manager?.persisted === 'function' ? manager.persisted().catch(() => null) : null,
    typeof manager?.estimate === 'function' ? manager.estimate().catch(() => null) : null,
  ])
  return {
    keeping: persisted === null ? 'unknown' : persisted ? 'kept' : 'may-clear',
    used: estimate?.usage ?? null,
    room: estimate?.quota === undefined || estimate.usage === undefined ? null : Math.max(0, estimate.quota - estimate.usage),
  }
}

/**
 * Asks the browser to keep what is stored here (Storage Standard, "persist"). To be called after a person's tap: some
 * browsers ask the person, and refuse a page that asks by itself.
 */
export async function askToKeep(): Promise<StorageState> {
  const manager = storage()
  if (typeof manager?.persist === 'function') await manager.persist().catch(() => false)
  return readStorageState()
}

let asked = false

/** The same once a page, for taps that have another purpose: nobody is asked twice. */
export async function askToKeepOnce(): Promise<void> {
  if (asked) return
  asked = true
  if ((await readStorageState()).keeping === 'may-clear') await askToKeep()
}

/** Bytes as a person reads them. */
export function sayBytes(bytes: number): string {
  if (bytes < 1_000_000) return `${Math.max(1, Math.round(bytes / 1000))} kB`
  if (bytes < 1_000_000_000) return `${Math.round(bytes / 1_000_000)} MB`
  return `${(bytes / 1_000_000_000).toFixed(1)} GB`
}
