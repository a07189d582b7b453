import type { ReactNode } from 'react'
import { arrowHead, pathThrough, type Point } from '#shared/chart/drawing'
import { CONDENSED } from '../../components/typeset'

/** What the drawings of the help pages share: scribed lines on dye, in a board 432 wide. */

export const WIDE = 432

type Ink = 'scribe' | 'faint-scribe' | 'ghost' | 'chalk' | 'sound-line' | 'stop-line' | 'stop-text'

const ink = (name: Ink): string => `var(--${name})`

export function Board({ label, height, children }: { label: string; height: number; children: ReactNode }) {
  return (
    <svg role="img" aria-label={label} viewBox={`0 0 ${WIDE} ${height}`} className="mx-auto block w-full max-w-[540px]">
      {children}
    </svg>
  )
}

type SayProps = {
  x: number
  y: number
  anchor?: 'start' | 'middle' | 'end'
  tone?: Ink
  strong?: boolean
  /** On a filled shape nothing has to be kept off the letters. */
  onShape?: boolean
  size?: number
  children: ReactNode
}

export function Say({ x, y, anchor = 'start', tone = 'faint-scribe', strong = false, onShape = false, size = 18, children }: SayProps) {
  return (
    <text
      x={x}
      y={y}
      textAnchor={anchor}
      fill={ink(tone)}
      fontSize={size}
      fontWeight={strong ? 600 : 400}
      fontFamily={CONDENSED}
      paintOrder="stroke"
      stroke={onShape ? undefined : 'var(--dye)'}
      strokeWidth={5}
      strokeLinejoin="round"
    >
      {children}
    </text>
  )
}

/** A letter of a formula, low letters beside it. */
export function Letter({ sub, children }: { sub?: string; children: ReactNode }) {
  return (
    <>
      <tspan fontStyle="italic">{children}</tspan>
      {sub !== undefined && (
        <tspan dy={5} fontSize="0.72em">
          {sub}
        </tspan>
      )}
    </>
  )
}

type LineProps = { points: readonly Point[]; tone?: Ink; width?: number; dash?: string; closed?: boolean; fill?: string }

export function Line({ points, tone = 'scribe', width = 1.6, dash, closed = false, fill = 'none' }: LineProps) {
  return (
    <path
      d={pathThrough(points, closed)}
      fill={fill}
      stroke={ink(tone)}
      strokeWidth={width}
      strokeDasharray={dash}
      strokeLinejoin="round"
    />
  )
}

export function Arrow({
  from,
  to,
  tone = 'scribe',
  width = 1.6,
  head = 10,
}: {
  from: Point
  to: Point
  tone?: Ink
  width?: number
  head?: number
}) {
  return (
    <g>
      <path d={pathThrough([from, to])} fill="none" stroke={ink(tone)} strokeWidth={width} />
      <path d={arrowHead(from, to, head, head * 0.36)} fill={ink(tone)} />
    </g>
  )
}

/** A distance between two places, arrows at both ends; its words stand beside it. */
export function Distance({ from, to, tone = 'faint-scribe' }: { from: Point; to: Point; tone?: Ink }) {
  return (
    <g>
      <path d={pathThrough([from, to])} fill="none" stroke={ink(tone)} strokeWidth={1.2} />
      <path d={arrowHead(from, to, 9, 3) + arrowHead(to, from, 9, 3)} fill={ink(tone)} />
    </g>
  )
}

/** A figure with its uncertainty to scale, three px at least each way. */
export function Whisker({ at, half, upright = false, tone = 'scribe' }: { at: Point; half: number; upright?: boolean; tone?: Ink }) {
  const reach = Math.max(3, half)
  const { x, y } = at
  const d = upright
    ? `M${x} ${y - reach}V${y + reach}M${x - 4} ${y - reach}H${x + 4}M${x - 4} ${y + reach}H${x + 4}`
    : `M${x - reach} ${y}H${x + reach}M${x - reach} ${y - 4}V${y + 4}M${x + reach} ${y - 4}V${y + 4}`
  return (
    <g>
      <path d={d} fill="none" stroke={ink(tone)} strokeWidth={1.6} />
      <circle cx={x} cy={y} r={3.2} fill={ink(tone)} />
    </g>
  )
}

/** Two axes from a corner, with what they show. */
export function Axes({
  left,
  right,
  top,
  bottom,
  up,
  along,
}: {
  left: number
  right: number
  top: number
  bottom: number
  up: string
  along: string
}) {
  return (
    <g>
      <Arrow from={{ x: left, y: bottom }} to={{ x: left, y: top }} tone="faint-scribe" width={1.2} />
      <Arrow from={{ x: left, y: bottom }} to={{ x: right, y: bottom }} tone="faint-scribe" width={1.2} />
      <Say x={left} y={top - 10}>
        {up}
      </Say>
      <Say x={right} y={bottom + 24} anchor="end">
        {along}
      </Say>
    </g>
  )
}

/** A scale from a span of values to a span of px. */
export const scaleTo =
  (low: number, high: number, from: number, to: number) =>
  (value: number): number =>
    from + ((value - low) / (high - low)) * (to - from)
