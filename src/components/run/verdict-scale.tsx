import type { ReactElement } from 'react'
import { estimateTextWidth, hatch } from '#shared/chart/drawing'
import { axisTicks, multiples } from '#shared/chart/ticks'
import { setPercent } from '../typeset'

export type Verdict = 'within' | 'beyond' | 'undecided' | 'wait' | 'not-read'

interface VerdictScaleProps {
  /** What the number line is about, for the name of the picture. */
  about: string
  unit: string
  value: number
  /** Half width of the interval that the value may lie in. */
  uncertainty: number
  /** As it is to be read, for example "21 % ± 5". */
  text: string
  limit: { value: number; label: string }
  verdict: Verdict
  /** An earlier value, for comparison. */
  before?: { value: number; label: string }
  width?: number
  ground?: 'steel' | 'sheet'
}

const FOOT = 92
const HEIGHT = 126

const INK: Record<Verdict, string> = {
  within: 'var(--sound)',
  beyond: 'var(--stop-ink)',
  undecided: 'var(--ink)',
  wait: 'var(--ink)',
  'not-read': 'var(--ink)',
}

function Point({ x, verdict }: { x: number; verdict: Verdict }): ReactElement {
  const y = 62
  if (verdict === 'beyond') {
    const corners = Array.from({ length: 8 }, (_, corner) => {
      const angle = ((corner + 0.5) * Math.PI) / 4
      return `${x + 11 * Math.cos(angle)},${y + 11 * Math.sin(angle)}`
    })
    return <polygon points={corners.join(' ')} fill="var(--stop)" stroke="var(--stop-ink)" strokeWidth={1.6} />
  }
  if (verdict === 'undecided') {
    return (
      <g stroke="var(--ink)" strokeWidth={2}>
        <rect x={x - 8} y={y - 8} width={16} height={16} fill="var(--steel)" />
        <path d={`M${x - 8} ${y + 8}V${y - 8}L${x + 8} ${y + 8}Z`} fill="var(--ink)" />
      </g>
    )
  }
  return <circle cx={x} cy={y} r={7} fill={INK[verdict]} stroke="var(--steel)" strokeWidth={2} />
}

function Ruler({
  at,
  ticks,
  limit,
  unit,
}: {
  at: (value: number) => number
  ticks: ReturnType<typeof axisTicks>
  limit: number
  unit: string
}): ReactElement {
  const minors = multiples(ticks.minorStep, 0, ticks.max)
  const last = ticks.labels.length - 1
  const tail = unit === '%' ? '\u202f%' : ` ${unit}`
  return (
    <g>
      <g fill="none" stroke="var(--ink)">
        <path d={minors.map((value) => `M${at(value)} ${FOOT}v6`).join('')} strokeWidth={1} />
        <path d={ticks.labels.map((value) => `M${at(value)} ${FOOT}v12`).join('')} strokeWidth={1.6} />
        <path d={`M${at(0) - 0.8} ${FOOT}H${at(ticks.max) + 0.8}`} strokeWidth={1.8} />
      </g>
      {ticks.labels.map((value, index) => {
        const onLimit = Math.abs(value - limit) < ticks.minorStep / 10
        return (
          <text
            key={value}
            x={at(value)}
            y={FOOT + 30}
            fontSize={16}
            fontWeight={onLimit ? 600 : 400}
            textAnchor={index === 0 ? 'start' : index === last ? 'end' : 'middle'}
            fill={onLimit ? 'var(--ink)' : 'var(--graphite)'}
          >
            {value.toFixed(ticks.decimals)}
            {index === last ? tail : ''}
          </text>
        )
      })}
    </g>
  )
}

/** The value with its uncertainty beside its limit, on one number line: all of it, or none of it, past the limit. */
export function VerdictScale(props: VerdictScaleProps): ReactElement {
  const { value, uncertainty, limit, verdict, before, width = 568, unit, ground = 'steel' } = props
  const reach = Math.max(limit.value * 1.25, value + uncertainty, before?.value ?? 0, limit.value > 0 ? 0 : 1)
  const ticks = axisTicks(reach, width < 420 ? 4 : 6)
  const at = (x: number): number => 1 + ((width - 2) * Math.min(Math.max(x, 0), ticks.max)) / ticks.max
  const [from, to, here, edge] = [at(value - uncertainty), at(value + uncertainty), at(value), at(limit.value)]
  const ink = INK[verdict]
  const text = setPercent(props.text)
  const limitText = setPercent(limit.label)
  const half = estimateTextWidth(text, 22, 600, false) / 2
  const textX = Math.min(Math.max(here, half), width - half)
  // The value's own words stand higher than the limit's, so that the two may come close.
  const limitWidth = estimateTextWidth(limitText, 18, 600, false) + 14
  const clear = (left: number, right: number): boolean => left >= 0 && right <= width && (to + 4 < left || from - 4 > right)
  const side = clear(edge - limitWidth, edge) ? 'left' : clear(edge, edge + limitWidth) ? 'right' : 'over'
  const beyond = [
    { x: edge, y: FOOT - 26 },
    { x: width - 1, y: FOOT - 26 },
    { x: width - 1, y: FOOT },
    { x: edge, y: FOOT },
  ]
  return (
    <svg
      role="img"
      aria-label={`${props.about}: ${text}, ${limitText}`}
      viewBox={`0 0 ${width} ${HEIGHT}`}
      width={width}
      height={HEIGHT}
      className="block max-w-full overflow-visible"
    >
      <path d={hatch(beyond, 7)} fill="none" stroke="var(--stop-ink)" strokeWidth={1} opacity={0.75} />
      <path d={`M${edge} ${side === 'over' ? 6 : 48}V${FOOT + 12}`} stroke="var(--ink)" strokeWidth={3} />
      <Ruler at={at} ticks={ticks} limit={limit.value} unit={unit} />
      <text
        x={side === 'left' || (side === 'over' && edge > width / 2) ? edge - 11 : edge + 11}
        y={side === 'over' ? 18 : 62}
        fontSize={18}
        fontWeight={600}
        textAnchor={side === 'left' || (side === 'over' && edge > width / 2) ? 'end' : 'start'}
        fill="var(--ink)"
        stroke={`var(--${ground})`}
        strokeWidth={5}
        paintOrder="stroke"
      >
        {limitText}
      </text>
      {before !== undefined && (
        <g>
          <circle cx={at(before.value)} cy={80} r={4.4} fill="var(--ink)" />
          <text x={at(before.value) + 10} y={85} fontSize={16} fill="var(--graphite)">
            {setPercent(before.label)}
          </text>
        </g>
      )}
      <g fill="none" stroke={ink}>
        <path d={`M${from} 62H${to}`} strokeWidth={3.6} />
        <path d={`M${from} 52v20M${to} 52v20`} strokeWidth={2.2} />
      </g>
      <Point x={here} verdict={verdict} />
      <text
        x={textX}
        y={42}
        fontSize={22}
        fontWeight={600}
        textAnchor="middle"
        fill={ink}
        stroke={`var(--${ground})`}
        strokeWidth={5}
        paintOrder="stroke"
      >
        {text}
      </text>
    </svg>
  )
}
