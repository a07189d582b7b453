import { useLayoutEffect, useRef, useState } from 'react'
import type { ReactElement, ReactNode } from 'react'

export interface Size {
  width: number
  height: number
}

interface FitProps {
  /** Size to draw at until the box has been measured, and where nothing can be measured. */
  initial: Size
  className?: string
  children: (size: Size) => ReactNode
}

/** Gives a drawing the box it lies in, in whole px, so that lines and type keep their weight at every size. */
export function Fit({ initial, className, children }: FitProps): ReactElement {
  const box = useRef<HTMLDivElement>(null)
  const [size, setSize] = useState<Size>(initial)
  useLayoutEffect(() => {
    const element = box.current
    if (element === null || typeof ResizeObserver === 'undefined') return undefined
    const measure = (): void => {
      const width = Math.floor(element.clientWidth)
      const height = Math.floor(element.clientHeight)
      if (width === 0 || height === 0) return
      setSize((known) => (known.width === width && known.height === height ? known : { width, height }))
    }
    measure()
    const observer = new ResizeObserver(measure)
    observer.observe(element)
    return () => observer.disconnect()
  }, [])
  return (
    <div ref={box} className={`relative overflow-hidden ${className ?? 'h-full w-full'}`}>
      <div className="absolute inset-0">{children(size)}</div>
    </div>
  )
}
