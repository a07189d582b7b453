import type { ReactElement } from 'react'
import { estimateTextWidth } from '#shared/chart/drawing'
import { multiples } from '#shared/chart/ticks'
import { MarkShape } from '../marks'
import { CONDENSED } from '../typeset'
import { RUNG_MARK, rungInk, topPercentOf } from './ladder-rungs'
import type { LadderProps, LadderStage } from './load-ladder'

type Anchor = 'start' | 'middle' | 'end'

interface Lie {
  /** px from the left for a percentage. */
  at: (percent: number) => number
  zero: number
  end: number
  upper: number
  lower: number
}

interface Placed {
  stage: LadderStage
  x: number
  anchor: Anchor
  named: boolean
}

function lieOf(width: number, top: number, words: boolean): Lie {
  const zero = words ? 28 : 36
  const end = width - (words ? 44 : 32)
  const upper = words ? 41 : 30
  return {
    at: (percent) => zero + ((end - zero) * percent) / top,
    zero,
    end,
    upper,
    lower: upper + (words ? 40 : 27),
  }
}

function span(placed: Placed, text: string, size: number, weight: 400 | 600): [number, number] {
  const wide = estimateTextWidth(text, size, weight, weight === 400)
  const left = placed.anchor === 'start' ? placed.x : placed.anchor === 'end' ? placed.x - wide : placed.x - wide / 2
  return [left - 4, left + wide + 4]
}

/** Where rungs stand too close for all their names, the live one and the last keep theirs. */
function placeNames(stages: LadderStage[], lie: Lie, words: boolean): Placed[] {
  const last = stages.length - 1
  const all = stages.map((stage, index): Placed => {
    const endAnchor: Anchor = !words && index === last ? 'end' : 'middle'
    const anchor: Anchor = index === 0 && stage.percent === 0 ? 'start' : endAnchor
    return { stage, x: lie.at(stage.percent), anchor, named: false }
  })
  const rank = (placed: Placed): number =>
    placed.stage.state === 'now' || placed.stage.state === 'waiting' || placed.stage.state === 'stopped'
      ? 0
      : placed === all[last] || placed === all[0]
        ? 1
        : 2
  const taken: [number, number][] = []
  for (const placed of [...all].sort((a, b) => rank(a) - rank(b))) {
    const mine = span(placed, words ? longest(placed.stage) : shortName(placed.stage), words ? 16 : 16, words ? 400 : 600)
    if (taken.some(([from, to]) => mine[0] < to && from < mine[1])) continue
    taken.push(mine)
    placed.named = true
  }
  return all
}

const shortName = (stage: LadderStage): string => (stage.percent === 0 ? '0' : stage.label)
const longest = (stage: LadderStage): string => (stage.load.length > stage.note.length ? stage.load : stage.note)

function Ram({ lie, percent }: { lie: Lie; percent: number }): ReactElement {
  const middle = (lie.upper + lie.lower) / 2
  const half = (lie.lower - lie.upper) / 2 - 2
  const long = lie.end - lie.zero + 40
  return (
    <g className="transition-transform duration-[400ms] ease-out" style={{ transform: `translateX(${lie.at(percent) - 2}px)` }}>
      <rect x={-long} y={middle - 6} width={long - 8} height={12} fill="var(--thin-dye)" />
      <path d={`M${-long} ${middle - 6}H-10M${-long} ${middle + 6}H-10`} stroke="var(--scribe)" strokeWidth={1.8} opacity={0.85} />
      <path
        d={`M0 ${middle - half}H-6.5L-11.5 ${middle - half * 0.4}V${middle + half * 0.4}L-6.5 ${middle + half}H0Z`}
        fill="var(--scribe)"
      />
    </g>
  )
}

function Rung({ placed, lie, shut, words }: { placed: Placed; lie: Lie; shut: boolean; words: boolean }): ReactElement {
  const { stage, x, anchor, named } = placed
  const ink = rungInk(stage, shut)
  const over = words ? 8 : 7
  const toCome = stage.state === 'to-come'
  const label = toCome ? 'var(--faint-scribe)' : ink.label
  const live = stage.state === 'now' || stage.state === 'waiting'
  const markX = anchor === 'start' ? x + 9 : anchor === 'end' ? x - 9 : x
  return (
    <g>
      <path
        d={`M${x} ${lie.upper - over}V${toCome ? lie.lower : lie.lower + 12}`}
        stroke={ink.line}
        strokeWidth={ink.weight}
        strokeDasharray={toCome ? '4 4' : undefined}
      />
      {toCome && <path d={`M${x} ${lie.lower}v12`} stroke="var(--scribe)" strokeWidth={1.6} opacity={0.9} />}
      {named && (
        <text x={x} y={lie.upper - 14} fontSize={words ? 20 : 16} fontWeight={600} textAnchor={anchor} fill={label}>
          {shortName(stage)}
        </text>
      )}
      {words && named && (
        <g fontSize={16} textAnchor={anchor} fontFamily={CONDENSED}>
          <text x={x} y={lie.lower + 35} fontWeight={500} fill={live ? 'var(--chalk)' : 'var(--scribe)'}>
            {stage.load}
          </text>
          <text x={x} y={lie.lower + 56} fill={ink.note} fontWeight={stage.state === 'stopped' ? 600 : 400}>
            {stage.note}
          </text>
        </g>
      )}
      {!words && <MarkShape name={RUNG_MARK[stage.state]} x={markX} y={lie.lower + 27} size={18} tone="dye" />}
    </g>
  )
}

/** The ladder lying down: with words under its rungs, or on a phone with their marks only. */
export function LadderStrip(props: LadderProps & { words: boolean }): ReactElement {
  const { stages, levelPercent, topPercent, width, height, words } = props
  const top = topPercentOf(stages, topPercent)
  const lie = lieOf(width, top, words)
  const middle = (lie.upper + lie.lower) / 2
  const stopped = stages.find((stage) => stage.state === 'stopped')
  const percents = stages.map((stage) => stage.percent)
  const ticks = multiples(5, 0, top).filter((percent) => !percents.includes(percent))
  const box = words ? 13 : 12
  return (
    <svg aria-hidden width={width} height={height} className="block">
      <g fill="none" stroke="var(--faint-scribe)" strokeWidth={1.6}>
        <path d={`M${lie.zero} ${lie.upper}H${lie.end + 14}M${lie.zero} ${lie.lower}H${lie.end + 14}`} opacity={0.7} />
        <path d={ticks.map((percent) => `M${lie.at(percent)} ${lie.lower}v6`).join('')} opacity={0.7} />
        <path d={`M${lie.zero - box - 1} ${middle}H${lie.end + 20}`} stroke="var(--ghost)" strokeDasharray="14 4 3 4" opacity={0.75} />
      </g>
      {levelPercent !== null && (
        <svg x={lie.zero} y={0} width={Math.max(0, width - lie.zero)} height={height}>
          <g transform={`translate(${-lie.zero} 0)`}>
            <Ram lie={lie} percent={levelPercent} />
          </g>
        </svg>
      )}
      <rect
        x={lie.zero - box}
        y={lie.upper - 1}
        width={box}
        height={lie.lower - lie.upper + 2}
        fill="var(--thin-dye)"
        stroke="var(--scribe)"
        strokeWidth={1.6}
      />
      {placeNames(stages, lie, words).map((placed) => (
        <Rung
          key={placed.stage.percent}
          placed={placed}
          lie={lie}
          words={words}
          shut={stopped !== undefined && placed.stage.percent > stopped.percent}
        />
      ))}
    </svg>
  )
}
