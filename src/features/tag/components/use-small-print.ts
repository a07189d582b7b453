import { useLayoutEffect, useRef, useState } from 'react'

/** The small print is never set smaller than this share of its size: below it, nobody reads it. */
const LEAST = 0.74
const STEP = 0.02

function overflows(box: HTMLElement): boolean {
  return box.scrollHeight > box.clientHeight + 1
}

/** Sets the small print as large as its box lets it; says when even the smallest does not go in. */
export function useSmallPrint(words: string) {
  const box = useRef<HTMLDivElement>(null)
  const [full, setFull] = useState(false)
  useLayoutEffect(() => {
    const { current } = box
    if (!current) return
    const fit = () => {
      let share = 1
      current.style.setProperty('--tag-fit', String(share))
      while (overflows(current) && share > LEAST) {
        share -= STEP
        current.style.setProperty('--tag-fit', share.toFixed(2))
      }
      setFull(overflows(current))
    }
    fit()
    // The letters may come later than the words, and are not as wide as those that stood in for them.
    document.fonts?.addEventListener('loadingdone', fit)
    return () => {
      document.fonts?.removeEventListener('loadingdone', fit)
    }
  }, [words])
  return { box, full }
}
