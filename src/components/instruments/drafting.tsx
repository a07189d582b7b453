import type { ReactElement, ReactNode } from 'react'
import { arrowHead, hatch } from '#shared/chart/drawing'
import type { Point } from '#shared/chart/drawing'
import { CONDENSED } from '../typeset'

/** The hands of the draughtsman: lines that every elevation shares. */

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

export function Hatched({ left, top, right, bottom, spacing = 6 }: { left: number; top: number; right: number; bottom: number; spacing?: number }): ReactElement {
  const corners = [
    { x: left, y: top },
    { x: right, y: top },
    { x: right, y: bottom },
    { x: left, y: bottom },
  ]
  return <path d={hatch(corners, spacing)} fill="none" stroke="var(--faint-scribe)" strokeWidth={1} opacity={0.55} />
}

export function Ground({ from, to, y }: { from: number; to: number; y: number }): ReactElement {
  const strokes: string[] = []
  for (let x = from; x < to - 4; x += 11) strokes.push(`M${x} ${y + 10}L${x + 9} ${y + 1}`)
  return (
    <g fill="none">
      <path d={strokes.join('')} stroke="var(--ghost)" strokeWidth={1} opacity={0.8} />
      <path d={`M${from} ${y}H${to}`} stroke="var(--faint-scribe)" strokeWidth={1.6} opacity={0.8} />
    </g>
  )
}

function Arrows({ a, b }: { a: Point; b: Point }): ReactElement {
  return <path d={arrowHead(b, a, 9, 3) + arrowHead(a, b, 9, 3)} fill="var(--faint-scribe)" />
}

const FIGURE = { fontSize: 16, fontFamily: CONDENSED, fill: 'var(--faint-scribe)', textAnchor: 'middle' } as const

/** A dimension figure breaks its line; it is left out where nobody has measured. */
export function Upright({ x, top, bottom, reach, text }: { x: number; top: number; bottom: number; reach: number; text: string }): ReactElement {
  const middle = (top + bottom) / 2 - (bottom - top) * 0.175
  const half = text.length * 4.2 + 3
  return (
    <g>
      <path d={`M${x - 5} ${top}H${reach}M${x - 5} ${bottom}H${reach - 60}`} stroke="var(--ghost)" strokeWidth={1.2} />
      <path
        d={`M${x} ${top}V${middle - half}M${x} ${middle + half}V${bottom}`}
        stroke="var(--faint-scribe)"
        strokeWidth={1.2}
        opacity={0.9}
      />
      <Arrows a={{ x, y: top }} b={{ x, y: bottom }} />
      <text {...FIGURE} transform={`translate(${x + 5.5} ${middle}) rotate(-90)`}>
        {text}
      </text>
    </g>
  )
}

export function Across({ y, left, right, text }: { y: number; left: number; right: number; text: string }): ReactElement {
  const middle = (left + right) / 2
  const half = text.length * 4.2 + 3
  return (
    <g>
      <rect x={middle - half} y={y - 10} width={half * 2} height={20} fill="var(--dye)" />
      <path
        d={`M${left} ${y}H${middle - half}M${middle + half} ${y}H${right}`}
        stroke="var(--faint-scribe)"
        strokeWidth={1.2}
        opacity={0.9}
      />
      <Arrows a={{ x: left, y }} b={{ x: right, y }} />
      <text {...FIGURE} x={middle} y={y + 5.5}>
        {text}
      </text>
    </g>
  )
}

/** Millimetres, as on every shop drawing; groups of three. */
export function millimetres(metres: number | null | undefined): string | null {
  if (metres === null || metres === undefined) return null
  return Math.round(metres * 1000)
    .toString()
    .replace(/\B(?=(\d{3})+$)/g, '\u202f')
}

interface RamProps {
  cx: number
  /** Width that the parts are in proportion to. */
  span: number
  top: number
  bottom: number
  heights: { seat: number; flange: number; cylinder: number; nut: number; rod: number; adaptor: number; stack: number }
}

/** Seat, cylinder, rod, adaptor, and the solid stack on its plate. */
export function RamStack({ cx, span, top, bottom, heights }: RamProps): ReactElement {
  const box = (share: number, from: number, to: number): ReactElement => {
    const half = Math.round((span * share) / 2)
    return <rect x={cx - half} y={from} width={half * 2} height={Math.max(2, to - from)} fill="var(--dye)" />
  }
  const rod = Math.round((span * 0.073) / 2)
  const stack = Math.round((span * 0.171) / 2)
  const cylinder = Math.round((span * 0.155) / 2)
  const threads = Array.from({ length: 4 }, (_, index) => {
    const y = heights.rod - 2 - index * 4
    return `M${cx - rod} ${y}L${cx + rod} ${y - 2}`
  }).join('')
  return (
    <g>
      <Outline>
        {box(0.253, top, heights.seat)}
        {box(0.155, heights.seat, heights.cylinder)}
        {box(0.18, heights.seat, heights.flange)}
        {box(0.139, heights.cylinder, heights.nut)}
        {box(0.073, heights.nut, heights.rod)}
        {box(0.114, heights.rod, heights.adaptor)}
        {box(0.171, heights.adaptor, heights.stack)}
        {box(0.45, heights.stack, bottom)}
      </Outline>
      <Hair d={`${threads}M${cx - cylinder} ${heights.cylinder - 7}H${cx + cylinder}`} />
      <Hatched left={cx - stack} right={cx + stack} top={heights.adaptor} bottom={heights.stack} />
    </g>
  )
}
