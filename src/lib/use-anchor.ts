import { useEffect } from 'react'
import { useLocation } from 'react-router-dom'

/** Brings the part that the address names into view, and puts the reader there, once it is drawn. */
export function useAnchor(): void {
  const { hash } = useLocation()
  useEffect(() => {
    const part = hash === '' ? null : document.getElementById(hash.slice(1))
    if (!part) return
    part.scrollIntoView({ block: 'start' })
    part.focus({ preventScroll: true })
  }, [hash])
}
