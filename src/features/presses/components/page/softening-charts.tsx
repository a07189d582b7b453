import type { ReactElement } from 'react'
import { CartesianGrid, ErrorBar, Line, LineChart, ReferenceLine, XAxis, YAxis } from 'recharts'
import type { ClimbHistory } from '#shared/api/press-history'
import { multiples, roundSteps, tidy } from '#shared/chart/ticks'
import { formatNumber, toUnit, unitLabel, type LengthUnit } from '#shared/units'
import { Fit } from '../../../../components/fit'
import { MarkShape } from '../../../../components/marks'
import { CONDENSED } from '../../../../components/typeset'
import { shortDate } from '../../../../lib/dates'
import { stiffnessUnit } from './softening-figures'

interface Point {
  at: number
  number: string
  value: number
  U: number
  limit: number | null
  wrong: boolean
}

const DAY = 86_400_000

const words = { fill: 'var(--faint-scribe)', fontFamily: CONDENSED, fontSize: 16 }

/** A reading, or the octagon of a test that did not end well. */
function Reading({ cx = 0, cy = 0, payload }: { cx?: number; cy?: number; payload?: Point }): ReactElement {
  return payload?.wrong ? (
    <MarkShape name="stop" x={cx} y={cy} size={17} tone="dye" />
  ) : (
    <circle cx={cx} cy={cy} r={4} fill="var(--scribe)" />
  )
}

/** Its limit, over the reading that it belongs to: a protocol may change between tests. */
function Limit({ cx = 0, cy = 0 }: { cx?: number; cy?: number }): ReactElement {
  return <path d={`M${cx - 13} ${cy}H${cx + 13}`} stroke="var(--stop-line)" strokeWidth={2.5} />
}

/** Room to both sides of the first and last test, so that a single one stands in the middle. */
function spanOf(climbs: readonly ClimbHistory[]): [number, number] {
  const moments = climbs.map(({ on }) => Date.parse(on))
  const from = Math.min(...moments)
  const to = Math.max(...moments)
  const room = Math.max((to - from) * 0.12, 3 * DAY)
  return [from - room, to + room]
}

/** Dates that have room beside each other, the first and the last always. */
function datesOf(climbs: readonly ClimbHistory[], [from, to]: [number, number], width: number): number[] {
  const least = ((to - from) * 96) / Math.max(width, 200)
  const moments = [...new Set(climbs.map(({ on }) => Date.parse(on)))].sort((a, b) => a - b)
  const last = moments.at(-1) ?? 0
  const shown: number[] = []
  for (const moment of moments) {
    const before = shown.at(-1)
    if (moment === last) {
      while (shown.length > 1 && last - (shown.at(-1) ?? 0) < least) shown.pop()
      if (before === undefined || last - (shown.at(-1) ?? 0) >= least) shown.push(last)
    } else if (before === undefined || moment - before >= least) shown.push(moment)
  }
  return shown
}

/** A scale of round steps that takes in every figure, from zero where the distance from nothing is what counts. */
function scaleOf(reach: readonly number[], fromZero: boolean): { domain: [number, number]; ticks: number[]; decimals: number } {
  const low = fromZero ? Math.min(0, ...reach) : Math.min(...reach)
  const high = Math.max(...reach)
  const span = high - low || Math.abs(high) || 1
  const [step = span] = roundSteps(span / 3, span * 2, [1, 2, 5])
  const from = Math.floor(tidy(low / step)) * step
  const to = Math.ceil(tidy(high / step)) * step
  const end = to === from ? from + step : to
  return { domain: [from, end], ticks: multiples(step, from, end), decimals: Math.max(0, -Math.floor(Math.log10(step) + 1e-9)) }
}

interface PanelProps {
  title: string
  unit: string
  points: Point[]
  span: [number, number]
  dates: number[]
  width: number
  height: number
  /** The panel at the foot names the dates; the others share them. */
  foot: boolean
  fromZero: boolean
}

/** Height of the plate by how many panels it holds: the first is the tallest, the last names the dates. */
const PLATE = ['', 'h-[220px]', 'h-[392px]', 'h-[542px]']

const LEFT = 64
const RIGHT = 24
const TOP = 34

function Panel({ title, unit, points, span, dates, width, height, foot, fromZero }: PanelProps): ReactElement {
  const reach = points.flatMap(({ value, U, limit }) => [value - U, value + U, ...(limit === null ? [] : [limit])])
  const { domain, ticks, decimals } = scaleOf(reach, fromZero)
  return (
    <div className="relative">
      <p className="absolute top-1 left-4 z-10 font-semibold">
        {title} <span className="font-condensed font-normal text-faint-scribe">{unit}</span>
      </p>
      <LineChart
        width={width}
        height={height}
        data={points}
        accessibilityLayer={false}
        margin={{ top: TOP, right: RIGHT, bottom: foot ? 6 : 10, left: 0 }}
      >
        <CartesianGrid stroke="var(--ghost)" strokeDasharray="2 5" vertical={false} />
        {dates.map((moment) => (
          <ReferenceLine key={moment} x={moment} stroke="var(--ghost)" strokeDasharray="2 5" />
        ))}
        <XAxis
          dataKey="at"
          type="number"
          scale="time"
          domain={span}
          ticks={dates}
          interval={0}
          tickFormatter={(moment: number) => shortDate(new Date(moment))}
          tick={foot ? words : false}
          height={foot ? 32 : 4}
          tickLine={foot ? { stroke: 'var(--scribe)' } : false}
          axisLine={{ stroke: 'var(--scribe)', strokeWidth: 1.6 }}
        />
        <YAxis
          type="number"
          width={LEFT}
          domain={domain}
          ticks={ticks}
          interval={0}
          tickFormatter={(value: number) => formatNumber(value, decimals)}
          tick={words}
          tickLine={{ stroke: 'var(--scribe)' }}
          axisLine={{ stroke: 'var(--scribe)', strokeWidth: 1.6 }}
        />
        {points.some(({ limit }) => limit !== null) && (
          <Line dataKey="limit" stroke="none" dot={<Limit />} activeDot={false} isAnimationActive={false} legendType="none" />
        )}
        <Line
          dataKey="value"
          type="linear"
          stroke="var(--scribe)"
          strokeWidth={1.8}
          dot={<Reading />}
          activeDot={false}
          isAnimationActive={false}
        >
          {points.some(({ U }) => U > 0) && (
            <ErrorBar dataKey="U" width={6} strokeWidth={1.6} stroke="var(--scribe)" direction="y" isAnimationActive={false} />
          )}
        </Line>
      </LineChart>
    </div>
  )
}

type Figure = (climb: ClimbHistory) => { value: number | null; U?: number | null; limit?: number | null }

function pointsOf(climbs: readonly ClimbHistory[], figure: Figure): Point[] {
  return climbs.flatMap((climb) => {
    const { value, U = 0, limit = null } = figure(climb)
    if (value === null) return []
    const wrong = climb.result === 'rejected' || climb.result === 'abandoned'
    return [{ at: Date.parse(climb.on), number: climb.number, value, U: U ?? 0, limit, wrong }]
  })
}

/**
 * Three panels on one axis of dates: stiffness with what its line can tell, set and pressure loss against their limits.
 * For the eye alone; the table below says the same.
 */
export function SofteningCharts({ climbs, lengthUnit }: { climbs: readonly ClimbHistory[]; lengthUnit: LengthUnit }): ReactElement {
  const stiffness = stiffnessUnit(lengthUnit)
  const length = (si: number | null) => (si === null ? null : toUnit(si, lengthUnit))
  const share = (value: number | null) => (value === null ? null : value * 100)
  const panels = [
    {
      title: 'Stiffness',
      unit: stiffness.label,
      fromZero: false,
      points: pointsOf(climbs, ({ stiffness: value, stiffnessU: U }) => ({
        value: value === null ? null : stiffness.of(value),
        U: U === null ? null : stiffness.of(U),
      })),
    },
    {
      title: 'Permanent set',
      unit: unitLabel(lengthUnit),
      fromZero: true,
      points: pointsOf(climbs, ({ set, setLimit }) => ({ value: length(set), limit: length(setLimit) })),
    },
    {
      title: 'Pressure loss',
      unit: '% in the hold at full load',
      fromZero: true,
      points: pointsOf(climbs, ({ pressureLoss, pressureLossLimit }) => ({ value: share(pressureLoss), limit: share(pressureLossLimit) })),
    },
  ].filter(({ points }) => points.length > 0)
  const span = spanOf(climbs)
  const limits = panels.some(({ points }) => points.some(({ limit }) => limit !== null))
  return (
    <figure aria-hidden="true" className="py-3">
      <Fit className={`w-full ${PLATE[panels.length]}`} initial={{ width: 720, height: 520 }}>
        {({ width }) =>
          panels.map(({ title, ...panel }, index) => (
            <Panel
              key={title}
              title={title}
              {...panel}
              span={span}
              dates={datesOf(climbs, span, width - LEFT - RIGHT)}
              width={width}
              height={index === 0 ? 220 : index === panels.length - 1 ? 172 : 150}
              foot={index === panels.length - 1}
            />
          ))
        }
      </Fit>
      <figcaption className="flex flex-wrap gap-x-6 gap-y-1 px-4 pt-1 font-condensed text-faint-scribe">
        <span>Bars: what the line can tell</span>
        {limits && (
          <span className="flex items-center gap-2">
            <svg width={26} height={8}>
              <path d="M0 4H26" stroke="var(--stop-line)" strokeWidth={2.5} />
            </svg>
            limit
          </span>
        )}
        {climbs.some(({ result }) => result === 'rejected' || result === 'abandoned') && (
          <span className="flex items-center gap-2">
            <svg width={17} height={17}>
              <MarkShape name="stop" x={8.5} y={8.5} size={17} tone="dye" />
            </svg>
            did not end well
          </span>
        )}
      </figcaption>
    </figure>
  )
}
