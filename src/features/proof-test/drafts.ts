import { useCallback, useSyncExternalStore } from 'react'

/** What is being typed, by test and place, kept over a reload. Nothing here counts as read: only an entered row does. */
const PREFIX = 'quarterload.draft.'
const listeners = new Set<() => void>()
const memory = new Map<string, string>()

function read(key: string): string | null {
  try {
    return localStorage.getItem(PREFIX + key) ?? memory.get(key) ?? null
  } catch {
    return memory.get(key) ?? null
  }
}

function write(key: string, text: string | null): void {
  if (text === null) memory.delete(key)
  else memory.set(key, text)
  try {
    if (text === null) localStorage.removeItem(PREFIX + key)
    else localStorage.setItem(PREFIX + key, text)
  } catch {
    // Storage is switched off: the draft lasts as long as the page.
  }
  for (const listener of listeners) listener()
}

const subscribe = (listener: () => void): (() => void) => {
  listeners.add(listener)
  return () => listeners.delete(listener)
}

function parse<T>(text: string | null, empty: T): T {
  if (text === null) return empty
  try {
    return { ...empty, ...(JSON.parse(text) as T) }
  } catch {
    return empty
  }
}

/** Throws away what was typed at a place, once it was entered. */
export function dropDraft(key: string): void {
  write(key, null)
}

/** Something typed at one place of one test; it survives a reload of the page. */
export function useDraft<T extends object>(key: string, empty: T): [T, (change: Partial<T>) => void] {
  const text = useSyncExternalStore(subscribe, () => read(key))
  const draft = parse(text, empty)
  const change = useCallback(
    (more: Partial<T>) => write(key, JSON.stringify({ ...parse(read(key), empty), ...more })),
    // `empty` is the same shape at every call for one key.
    // eslint-disable-next-line react-hooks/exhaustive-deps
    [key],
  )
  return [draft, change]
}

/** A test that is concluded leaves nothing half-typed behind. */
export function dropDraftsOf(testId: string): void {
  const mine = (key: string): boolean => key.startsWith(`${testId}.`)
  try {
    Object.keys(localStorage)
      .filter((key) => key.startsWith(PREFIX) && mine(key.slice(PREFIX.length)))
      .forEach((key) => localStorage.removeItem(key))
  } catch {
    // Nothing was kept there.
  }
  for (const key of [...memory.keys()].filter(mine)) memory.delete(key)
  for (const listener of listeners) listener()
}
