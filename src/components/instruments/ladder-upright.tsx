import type { ReactElement } from 'react'
import { loadScale } from '#shared/chart/line-geometry'
import type { LoadScale } from '#shared/chart/line-geometry'
import { multiples } from '#shared/chart/ticks'
import { MarkShape } from '../marks'
import { CONDENSED } from '../typeset'
import { RUNG_MARK, rungInk, topPercentOf } from './ladder-rungs'
import type { LadderProps, LadderStage } from './load-ladder'

const LEFT = 27
const RIGHT = 77
const MIDDLE = 52
const WORDS = 88

/** px to the neighbouring rungs: what fits under this one, and how tall its own figures may be. */
interface Room {
  below: number
  above: number
}

function Ticks({ scale, percents, top }: { scale: LoadScale; percents: number[]; top: number }): ReactElement {
  const minor = multiples(5, 0, top).filter((percent) => !percents.includes(percent))
  const d = (x: number, list: number[]): string => list.map((percent) => `M${x} ${scale.at(percent)}H${LEFT}`).join('')
  return (
    <g fill="none" stroke="var(--faint-scribe)">
      <path d={d(19, minor)} strokeWidth={1.6} opacity={0.6} />
      <path d={d(14, percents)} stroke="var(--scribe)" strokeWidth={1.8} opacity={0.9} />
    </g>
  )
}

function Cylinder({ scale }: { scale: LoadScale }): ReactElement {
  const foot = scale.zero + 4
  return (
    <g fill="none">
      <path
        d={`M${LEFT} ${scale.top - 20}V${foot}M${RIGHT} ${scale.top - 20}V${foot}`}
        stroke="var(--faint-scribe)"
        strokeWidth={1.6}
        opacity={0.75}
      />
      <path d={`M${MIDDLE} ${scale.top - 29}V${foot}`} stroke="var(--ghost)" strokeWidth={1.4} strokeDasharray="14 4 3 4" opacity={0.75} />
    </g>
  )
}

/** The ram is drawn from its head down and slid to its level, so that the slide is one transform. */
function Ram({ scale, percent }: { scale: LoadScale; percent: number }): ReactElement {
  const level = scale.at(percent)
  const long = scale.zero + 4 - scale.top + 60
  return (
    <g className="transition-transform duration-[400ms] ease-out" style={{ transform: `translateY(${level + 1}px)` }}>
      <rect x={41} y={14} width={22} height={long} fill="var(--thin-dye)" />
      <path d={`M41 14V${long}M63 14V${long}`} stroke="var(--scribe)" strokeWidth={1.6} opacity={0.85} />
      <path d="M31 0H73V9L63 16H41L31 9Z" fill="var(--scribe)" />
    </g>
  )
}

function Base({ scale }: { scale: LoadScale }): ReactElement {
  const top = scale.zero + 4
  return (
    <g fill="none" stroke="var(--scribe)">
      <rect x={LEFT} y={top} width={RIGHT - LEFT} height={40} fill="var(--thin-dye)" strokeWidth={1.6} />
      <path d={`M34 ${top + 8}H70`} stroke="var(--faint-scribe)" strokeWidth={1.6} opacity={0.6} />
      <path d={`M19 ${top + 40}H85`} strokeWidth={2} />
    </g>
  )
}

interface RungProps {
  stage: LadderStage
  y: number
  room: Room
  right: number
  shut: boolean
}

function Rung({ stage, y, room, right, shut }: RungProps): ReactElement {
  const ink = rungInk(stage, shut)
  const live = stage.state === 'now' || stage.state === 'waiting'
  const figures = room.above >= 76 ? 30 : room.above >= 52 ? 24 : 18
  const words = room.below >= 50 ? 16 : 14
  const first = y + (words === 16 ? 21 : 16)
  // With room for one line only, what is going on now matters more than the load, which the bench shows.
  const roomy = room.below >= 72
  const noteFirst = !roomy && room.below >= 38 && (live || stage.state === 'stopped')
  const loadInk = stage.state === 'to-come' ? 'var(--faint-scribe)' : 'var(--scribe)'
  return (
    <g>
      <path d={`M${RIGHT} ${y}H${right}`} stroke={ink.line} strokeWidth={ink.weight} strokeDasharray={ink.dash} fill="none" />
      {live && <rect x={RIGHT - 3} y={y - 18} width={6} height={25} fill="var(--chalk)" />}
      <text x={WORDS} y={y - 9} fontSize={figures} fontWeight={600} fill={ink.label}>
        {stage.label}
      </text>
      <MarkShape
        name={RUNG_MARK[stage.state]}
        x={right - 16}
        y={y - (figures === 30 ? 19 : 16)}
        size={figures === 30 ? 24 : 18}
        tone="dye"
      />
      {room.below >= 38 && !noteFirst && (
        <text x={WORDS} y={first} fontSize={words} fontWeight={500} fill={loadInk} fontFamily={CONDENSED}>
          {stage.load}
        </text>
      )}
      {(roomy || noteFirst) && (
        <text x={WORDS} y={noteFirst ? first : first + 20} fontSize={16} fontWeight={ink.noteWeight} fill={ink.note} fontFamily={CONDENSED}>
          {stage.note}
        </text>
      )}
    </g>
  )
}

/** The ladder standing up: beside the bench, on the same scale as the line. */
export function LadderUpright({ stages, levelPercent, topPercent, width, height }: LadderProps): ReactElement {
  const top = topPercentOf(stages, topPercent)
  const scale = loadScale(height, top)
  const stopped = stages.find((stage) => stage.state === 'stopped')
  const rungs = stages.map((stage, index): RungProps => {
    const lower = stages[index - 1]
    const upper = stages[index + 1]
    const y = Math.round(scale.at(stage.percent))
    return {
      stage,
      y,
      right: width - 12,
      shut: stopped !== undefined && stage.percent > stopped.percent,
      room: {
        below: lower === undefined ? height - y : scale.at(lower.percent) - y,
        above: upper === undefined ? Number.POSITIVE_INFINITY : y - scale.at(upper.percent),
      },
    }
  })
  return (
    <svg aria-hidden width={width} height={height} className="block">
      <Ticks scale={scale} percents={stages.map((stage) => stage.percent)} top={top} />
      <Cylinder scale={scale} />
      {levelPercent !== null && <Ram scale={scale} percent={levelPercent} />}
      <rect x={0} y={scale.zero + 44} width={width} height={height} fill="var(--dye)" />
      <Base scale={scale} />
      {rungs.map((rung) => (
        <Rung key={rung.stage.percent} {...rung} />
      ))}
    </svg>
  )
}
