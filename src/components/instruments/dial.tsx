import type { ReactElement } from 'react'
import { hatch } from '#shared/chart/drawing'
import type { Point } from '#shared/chart/drawing'
import { dialTicks, multiples } from '#shared/chart/ticks'
import { CONDENSED, groupDigits } from '../typeset'

interface DialProps {
  code: string
  /** All numbers are in the gauge's own unit. */
  fullScale: number
  unit: string
  major?: number
  minor?: number
  /** What was typed; the needle rests at zero until something was. */
  value: number | null
  /** What to pump to, and the figure as it is to be read. */
  target: { text: string; value: number } | null
  window: { from: number; to: number } | null
  /** The train's lowest limit and whose it is, for example "ram's limit". */
  limitFrom: { value: number; label: string } | null
  /** Readings of the stages before. */
  past?: number[]
  width?: number
}

const MIDDLE: Point = { x: 144, y: 108 }
const SWEEP = 270
const RIM_HALF = 139

const NORTH = -90
function onFace(degrees: number, radius: number): Point {
  const a = ((degrees + NORTH) * Math.PI) / 180
  return { x: MIDDLE.x + radius * Math.cos(a), y: MIDDLE.y + radius * Math.sin(a) }
}

function arc(from: number, to: number, radius: number): string {
  const a = onFace(from, radius)
  const b = onFace(to, radius)
  const large = to - from > 180 ? 1 : 0
  return `M${a.x.toFixed(2)} ${a.y.toFixed(2)}A${radius} ${radius} 0 ${large} 1 ${b.x.toFixed(2)} ${b.y.toFixed(2)}`
}

function ray(degrees: number, inner: number, outer: number): string {
  const a = onFace(degrees, inner)
  const b = onFace(degrees, outer)
  return `M${a.x.toFixed(2)} ${a.y.toFixed(2)}L${b.x.toFixed(2)} ${b.y.toFixed(2)}`
}

function Rim(): ReactElement {
  return (
    <g fill="none">
      <path d={arc(-RIM_HALF, RIM_HALF, 103)} stroke="var(--ghost)" strokeWidth={1} />
      <path d={arc(-RIM_HALF, RIM_HALF, 98)} stroke="var(--scribe)" strokeWidth={2} />
      <path d={ray(-RIM_HALF, 67, 103) + ray(RIM_HALF, 67, 103)} stroke="var(--scribe)" strokeWidth={1.4} />
    </g>
  )
}

interface FaceProps {
  at: (value: number) => number
  fullScale: number
  steps: ReturnType<typeof dialTicks>
  limit: number | null
}

function Face({ at, fullScale, steps, limit }: FaceProps): ReactElement {
  const free = (value: number): boolean => limit === null || value < limit
  const has = (step: number | null, value: number): boolean => step !== null && Math.abs(value / step - Math.round(value / step)) < 1e-6
  const majors = multiples(steps.major, 0, fullScale)
  const minors = multiples(steps.minor, 0, fullScale).filter((value) => !has(steps.major, value) && free(value))
  const mediums = minors.filter((value) => has(steps.medium, value))
  const rays = (values: number[], inner: number, outer: number): string => values.map((value) => ray(at(value), inner, outer)).join('')
  return (
    <g fill="none" stroke="var(--scribe)">
      <path d={rays(minors, 84, 90)} strokeWidth={1} opacity={0.75} />
      <path d={rays(mediums, 80, 90)} strokeWidth={1.6} opacity={0.8} />
      <path d={rays(majors.filter(free), 75, 90)} strokeWidth={1.8} />
      <path
        d={rays(
          majors.filter((value) => !free(value)),
          71,
          76,
        )}
        strokeWidth={1}
        opacity={0.8}
      />
    </g>
  )
}

function Labels({ at, fullScale, step }: { at: (value: number) => number; fullScale: number; step: number }): ReactElement {
  const inner = multiples(step, step, fullScale - step / 2)
  const decimals = decimalsOf(step)
  const ends: [number, Point][] = [
    [0, { x: 69, y: 201 }],
    [fullScale, { x: 226, y: 201 }],
  ]
  return (
    <g fontSize={17} fontWeight={500} fontFamily={CONDENSED} fill="var(--scribe)" textAnchor="middle">
      {inner.map((value) => {
        // Long figures move in, so that their outer end stays clear of the ticks.
        const half = groupDigits(value, decimals).length * 4.3
        const lean = (at(value) * Math.PI) / 180
        const point = onFace(at(value), 72 - half * Math.abs(Math.sin(lean)) - 6 * Math.abs(Math.cos(lean)))
        return (
          <text key={value} x={point.x} y={point.y + 6}>
            {groupDigits(value, decimals)}
          </text>
        )
      })}
      {ends.map(([value, point]) => (
        <text key={value} x={point.x} y={point.y}>
          {groupDigits(value, value % 1 === 0 ? 0 : decimals)}
        </text>
      ))}
    </g>
  )
}

function Forbidden({ from, to }: { from: number; to: number }): ReactElement {
  // The hatching is cut to the ring piece by piece: each short piece is as good as convex.
  const pieces = Math.max(1, Math.round((to - from) / 7))
  const strokes = Array.from({ length: pieces }, (_, index) => {
    const a = from + ((to - from) * index) / pieces
    const b = from + ((to - from) * (index + 1)) / pieces
    return hatch([onFace(a, 76), onFace(a, 90), onFace(b, 90), onFace(b, 76)], 4.6)
  }).join('')
  return (
    <g fill="none" stroke="var(--stop-line)">
      <path d={strokes} strokeWidth={1} opacity={0.6} />
      <path d={arc(from, to, 90) + arc(from, to, 76) + ray(from, 76, 90) + ray(to, 76, 90)} strokeWidth={1.2} />
    </g>
  )
}

function Needle({ degrees }: { degrees: number }): ReactElement {
  return (
    <g
      className="transition-transform duration-200 ease-out"
      style={{ transformOrigin: `${MIDDLE.x}px ${MIDDLE.y}px`, transform: `rotate(${degrees}deg)` }}
    >
      <g transform={`translate(${MIDDLE.x} ${MIDDLE.y})`}>
        <path d="M-3.6 -9 -0.4 -72H0.4L3.6 -9Z" fill="var(--scribe)" />
        <path d="M-3 8H3L2.6 30H-2.6Z" fill="var(--scribe)" />
        <circle r={9} fill="var(--dye)" stroke="var(--scribe)" strokeWidth={2.2} />
        <circle r={2.1} fill="var(--scribe)" />
      </g>
    </g>
  )
}

function inWords(props: DialProps): string {
  const { code, unit, value, target, window, limitFrom } = props
  const parts = [`Gauge ${code}`, value === null ? 'nothing typed yet' : `${value} ${unit} typed`]
  if (target !== null) parts.push(`pump to ${target.text} ${unit}`)
  if (window !== null) parts.push(`between ${window.from} and ${window.to} ${unit}`)
  if (limitFrom !== null) parts.push(`${limitFrom.label} at ${limitFrom.value} ${unit}`)
  return parts.join(', ')
}

/** The gauge's own face: what to pump to, what was typed, and where the train's lowest limit begins. */
export function Dial(props: DialProps): ReactElement {
  const { code, fullScale, unit, value, target, window, limitFrom, past = [], width = 288 } = props
  const drawn = dialTicks(fullScale, props.minor)
  const steps = { ...drawn, major: props.major ?? drawn.major }
  const at = (reading: number): number => -SWEEP / 2 + (SWEEP * Math.min(Math.max(reading, 0), fullScale * 1.02)) / fullScale
  const limit = limitFrom !== null && limitFrom.value < fullScale ? limitFrom.value : null
  return (
    <svg viewBox="0 0 288 208" width={width} height={(width * 208) / 288} role="img" aria-label={inWords(props)} className="block bg-dye">
      <Rim />
      <Face at={at} fullScale={fullScale} steps={steps} limit={limit} />
      {limit !== null && <Forbidden from={at(limit)} to={at(fullScale)} />}
      <Labels at={at} fullScale={fullScale} step={steps.label} />
      {past.map((reading) => {
        const dot = onFace(at(reading), 95)
        return <circle key={reading} cx={dot.x} cy={dot.y} r={3.4} fill="var(--scribe)" />
      })}
      <Needle degrees={at(value ?? 0)} />
      {window !== null && (
        <path
          d={arc(at(window.from), Math.max(at(window.to), at(window.from) + 1.5), 95)}
          fill="none"
          stroke="var(--chalk)"
          strokeWidth={9}
        />
      )}
      {target !== null && <path d={ray(at(target.value), 73, 91)} stroke="var(--chalk)" strokeWidth={3} />}
      <g fontFamily={CONDENSED} fontSize={16} fill="var(--faint-scribe)">
        <text x={8} y={20}>
          {code}
        </text>
        <text x={280} y={20} textAnchor="end">
          one tick
        </text>
        <text x={280} y={38} textAnchor="end">
          {groupDigits(steps.minor, decimalsOf(steps.minor))} {unit}
        </text>
      </g>
      {limitFrom !== null && <LimitWords label={limitFrom.label} />}
      {target !== null && (
        <g fill="var(--chalk)" textAnchor="middle" stroke="var(--dye)" strokeWidth={4} paintOrder="stroke">
          <text x={MIDDLE.x} y={171} fontSize={34} fontWeight={600}>
            {target.text}
          </text>
          <text x={MIDDLE.x} y={194} fontSize={16} fontWeight={500} fontFamily={CONDENSED}>
            pump to, {unit}
          </text>
        </g>
      )}
    </svg>
  )
}

function decimalsOf(step: number): number {
  const [, fraction] = String(step).split('.')
  return fraction?.length ?? 0
}

/** Two short lines at the edge: the owner of the limit, then "limit". */
function LimitWords({ label }: { label: string }): ReactElement {
  const words = label.split(' ')
  const last = words.pop() ?? ''
  return (
    <g fontFamily={CONDENSED} fontSize={16} fontWeight={500} fill="var(--stop-text)" textAnchor="end">
      <text x={282} y={162}>
        {words.join(' ').replace(/'/g, '’')}
      </text>
      <text x={282} y={180}>
        {last}
      </text>
    </g>
  )
}
