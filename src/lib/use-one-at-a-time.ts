import { useRef } from 'react'

/** A second tap comes before a button can say that it is busy: only the first one begins, until it has failed. */
export function useOneAtATime() {
  const begun = useRef(false)
  return {
    begin(): boolean {
      if (begun.current) return false
      begun.current = true
      return true
    },
    end(): void {
      begun.current = false
    },
  }
}
