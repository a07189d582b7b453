/** What somebody has typed into a long form and not sent yet, kept on this device over a reload. */
const KEY = 'quarterload.draft.'

interface Kept {
  version: number
  values: unknown
}

/** The draft as it was left; undefined when there is none, or when it was typed into an older form. */
export function readDraft<T>(name: string, version: number): T | undefined {
  try {
    const kept = JSON.parse(localStorage.getItem(KEY + name) ?? 'null') as Kept | null
    return kept !== null && kept.version === version ? (kept.values as T) : undefined
  } catch {
    return undefined
  }
}

/** False where this device keeps nothing, so that the form can say so. */
export function keepDraft(name: string, version: number, values: unknown): boolean {
  try {
    localStorage.setItem(KEY + name, JSON.stringify({ version, values } satisfies Kept))
    return true
  } catch {
    return false
  }
}

export function dropDraft(name: string): void {
  try {
    localStorage.removeItem(KEY + name)
  } catch {
    return
  }
}
