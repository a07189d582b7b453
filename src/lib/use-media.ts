import { useSyncExternalStore } from 'react'

/** Whether a media query holds; false where there is no window to ask. */
export function useMedia(query: string): boolean {
  return useSyncExternalStore(
    (notify) => {
      if (typeof window === 'undefined' || !window.matchMedia) return () => undefined
      const list = window.matchMedia(query)
      list.addEventListener('change', notify)
      return () => list.removeEventListener('change', notify)
    },
    () => typeof window !== 'undefined' && Boolean(window.matchMedia?.(query).matches),
    () => false,
  )
}

/** Narrower than a tablet held upright: lists become rows of two lines. */
export const usePhone = (): boolean => useMedia('(max-width: 719.98px)')
