const KEY = 'quarterload.test-names'
const MOST = 60

function read(): [string, string][] {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(KEY) ?? '[]')
    return Array.isArray(kept) ? (kept as [string, string][]) : []
  } catch {
    return []
  }
}

/** Remembers what a test is called, so that its entries can be named where the server can't be asked. */
export function rememberTestName(testId: string, name: string): void {
  const others = read().filter(([id]) => id !== testId)
  try {
    localStorage.setItem(KEY, JSON.stringify([[testId, name], ...others].slice(0, MOST)))
  } catch {
    return
  }
}

export const testName = (testId: string): string | null => read().find(([id]) => id === testId)?.[1] ?? null
