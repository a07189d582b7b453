import type { ReactElement, ReactNode } from 'react'
import { hatch } from '#shared/chart/drawing'

/** Lines of a draughtsman, for drawings that stand on a screen alone. */

export function Outline({ children }: { children: ReactNode }): ReactElement {
  return (
    <g fill="none" stroke="var(--scribe)" strokeWidth={1.6} strokeLinejoin="miter">
      {children}
    </g>
  )
}

export function Hair({ d }: { d: string }): ReactElement {
  return <path d={d} fill="none" stroke="var(--faint-scribe)" strokeWidth={1} opacity={0.75} />
}

export function CentreLine({ d, strong = false }: { d: string; strong?: boolean }): ReactElement {
  return (
    <path
      d={d}
      fill="none"
      stroke={strong ? 'var(--faint-scribe)' : 'var(--ghost)'}
      strokeWidth={strong ? 1.6 : 1}
      strokeDasharray="14 4 3 4"
      opacity={strong ? 0.7 : 1}
    />
  )
}

export function Hatched({
  left,
  top,
  right,
  bottom,
  spacing = 6,
}: {
  left: number
  top: number
  right: number
  bottom: number
  spacing?: number
}): ReactElement {
  const corners = [
    { x: left, y: top },
    { x: right, y: top },
    { x: right, y: bottom },
    { x: left, y: bottom },
  ]
  return <path d={hatch(corners, spacing)} fill="none" stroke="var(--faint-scribe)" strokeWidth={1} opacity={0.55} />
}
