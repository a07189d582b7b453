import { useEffect } from 'react'

/** Brings these tests onto this device, so that each opens and goes on without a network. */
export function useKeptOnDevice(testIds: readonly string[]): void {
  const wanted = testIds.join(',')
  useEffect(() => {
    if (wanted === '') return undefined
    const left = new AbortController()
    const bring = async (): Promise<void> => {
      const { keepOnDevice } = await import('./fetch-ledger')
      for (const id of wanted.split(',')) {
        if (left.signal.aborted) return
        await keepOnDevice(id, left.signal)
      }
    }
    // Without a link there is nothing to bring; the next visit tries again.
    bring().catch(() => undefined)
    return () => left.abort()
  }, [wanted])
}
