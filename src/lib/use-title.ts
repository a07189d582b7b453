import { useEffect } from 'react'

/** Names the screen in the window's title. */
export function useTitle(title: string): void {
  useEffect(() => {
    document.title = `${title} · Quarterload`
  }, [title])
}
