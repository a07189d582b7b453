import { useEffect } from 'react'

/** Keeps the screen on while `on`, where the device can; it is asked again when the page comes back into view. */
export function useWakeLock(on: boolean): void {
  useEffect(() => {
    if (!on || typeof navigator === 'undefined' || !('wakeLock' in navigator)) return undefined
    let lock: WakeLockSentinel | null = null
    let left = false
    const ask = async (): Promise<void> => {
      if (document.visibilityState !== 'visible') return
      try {
        lock = await navigator.wakeLock.request('screen')
        if (left) await lock.release()
      } catch {
        // A low battery refuses it: the screen then goes dark as it always does.
        lock = null
      }
    }
    const again = (): void => void ask()
    void ask()
    document.addEventListener('visibilitychange', again)
    return () => {
      left = true
      document.removeEventListener('visibilitychange', again)
      if (lock) void lock.release()
    }
  }, [on])
}
