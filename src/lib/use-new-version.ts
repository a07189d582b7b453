import { useEffect, useState, useSyncExternalStore } from 'react'
import { newVersion } from './new-version'

/** How often it is looked whether the device has come to rest (ms). */
const LOOK_EVERY = 10_000

const isAtRest = async (): Promise<boolean> => (await import('./at-rest')).isAtRest(new Date())

/**
 * Loads the newer version of the program; undefined while there is none, or while it may not be offered: force may be on a
 * press, or an entry waits to be sent. It is looked once more before it is loaded.
 */
export function useNewVersion(): (() => void) | undefined {
  const ready = useSyncExternalStore(newVersion.subscribe, newVersion.isReady)
  const [atRest, setAtRest] = useState(false)
  useEffect(() => {
    if (!ready) return undefined
    let left = false
    const look = (): void => void isAtRest().then((rests) => left || setAtRest(rests))
    look()
    const timer = setInterval(look, LOOK_EVERY)
    return () => {
      left = true
      clearInterval(timer)
    }
  }, [ready])
  if (!ready || !atRest) return undefined
  return () => void isAtRest().then((rests) => (rests ? newVersion.load() : setAtRest(false)))
}
