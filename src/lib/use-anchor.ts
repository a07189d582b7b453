import { useEffect } from 'react'
import { useLocation } from 'react-router-dom'

/** Brings a part of the page into view, and puts the reader there. */
export function bringIntoView(id: string): void {
  const part = document.getElementById(id)
  if (!part) return
  // What draws nothing, as a test's page, can't be scrolled either.
  if ('scrollIntoView' in part) part.scrollIntoView({ block: 'start' })
  part.focus({ preventScroll: true })
}

/** Brings the part that the address names into view, and puts the reader there, once it is drawn. */
export function useAnchor(): void {
  const { hash } = useLocation()
  useEffect(() => {
    if (hash !== '') bringIntoView(hash.slice(1))
  }, [hash])
}
