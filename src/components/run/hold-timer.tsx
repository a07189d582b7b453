import type { ReactElement } from 'react'
import { multiples } from '#shared/chart/ticks'
import { Fit } from '../fit'
import { setPercent } from '../typeset'

interface HoldTimerProps {
  /** Seconds. */
  total: number
  elapsed: number
  /** For example "Hold 75 %". */
  label: string
  /** For example "left, from the mark". */
  sub: string
  size?: 'tablet' | 'phone'
}

/** "1:24" of seconds; whole seconds only, and never below zero. */
export function clockFigure(seconds: number): string {
  const whole = Math.max(0, Math.ceil(seconds))
  return `${Math.floor(whole / 60)}:${String(whole % 60).padStart(2, '0')}`
}

interface HoldSteps {
  label: number
  middle: number
  fine: number
}

/** Steps of a hold's scale in seconds: about four labels, whatever the hold. */
export function holdSteps(total: number): HoldSteps {
  const steps: [number, HoldSteps][] = [
    [30, { label: 10, middle: 5, fine: 1 }],
    [60, { label: 15, middle: 5, fine: 5 }],
    [120, { label: 30, middle: 10, fine: 5 }],
    [300, { label: 60, middle: 15, fine: 15 }],
    [600, { label: 120, middle: 60, fine: 30 }],
    [1200, { label: 300, middle: 60, fine: 60 }],
  ]
  const found = steps.find(([most]) => total <= most)
  if (found !== undefined) return found[1]
  const label = Math.ceil(total / 240) * 60
  return { label, middle: label / 2, fine: label / 4 }
}

interface ScaleProps {
  total: number
  elapsed: number
  width: number
  words: boolean
}

function Scale({ total, elapsed, width, words }: ScaleProps): ReactElement {
  const steps = holdSteps(total)
  const left = 1
  const right = width - 1
  const at = (seconds: number): number => left + ((right - left) * Math.min(seconds, total)) / total
  const foot = 28
  const labels = multiples(steps.label, 0, total)
  if (labels[labels.length - 1] !== total) labels.push(total)
  const rays = (values: number[], tall: number): string => values.map((value) => `M${at(value).toFixed(1)} ${foot}v${-tall}`).join('')
  const done = at(Math.floor(elapsed))
  return (
    <svg aria-hidden width={width} height={words ? 52 : 30} className="block overflow-visible">
      <g fill="none" stroke="var(--scribe)">
        <path d={rays(multiples(steps.fine, 0, total), 7)} strokeWidth={1.2} opacity={0.8} />
        <path d={rays(multiples(steps.middle, 0, total), words ? 12 : 10)} strokeWidth={1.4} opacity={0.8} />
        <path d={rays(labels, 20)} strokeWidth={1.8} />
        <path d={`M${left - 1} ${foot}H${right + 1}`} strokeWidth={1.8} />
      </g>
      <rect x={left} y={foot - 8} width={Math.max(0, done - left)} height={8} fill="var(--chalk)" />
      <path d={`M${done - 9} ${foot - 23}h18L${done} ${foot - 6.5}Z`} fill="var(--chalk)" />
      {words &&
        labels.map((value, index) => {
          const anchor = index === 0 ? 'start' : index === labels.length - 1 ? 'end' : 'middle'
          const inner = index > 0 && index < labels.length - 1
          const close = at(steps.label) - at(0) < 44
          const crowded = inner && (close || (index === labels.length - 2 && at(total) - at(value) < 58))
          return crowded ? null : (
            <text key={value} x={at(value)} y={foot + 20} fontSize={16} textAnchor={anchor} fill="var(--faint-scribe)">
              {clockFigure(value)}
            </text>
          )
        })}
    </svg>
  )
}

/** What is left of the hold, in figures and on a scale. It steps by the second and never glides. */
export function HoldTimer({ total, elapsed, label, sub, size = 'tablet' }: HoldTimerProps): ReactElement {
  const left = clockFigure(total - Math.floor(elapsed))
  const named = setPercent(label)
  if (size === 'phone') {
    return (
      <div role="timer" aria-label={`${named}, ${left} left`} className="ground-dye flex items-center gap-9 px-5 py-2">
        <span className="text-46 font-semibold leading-[46px]">{left}</span>
        <span className="min-w-0 flex-1">
          <Scale total={total} elapsed={elapsed} width={218} words={false} />
          <span className="block text-16 leading-[22px] text-faint-scribe">{sub}</span>
        </span>
      </div>
    )
  }
  return (
    <div role="timer" aria-label={`${named}, ${left} left`} className="ground-dye flex h-20 items-center px-4">
      <span className="min-w-[118px] text-54 font-semibold leading-[54px] tracking-[-0.01em]">{left}</span>
      <span className="ml-2 min-w-0 shrink-[3]">
        <span className="block truncate text-20 font-semibold leading-[24px]">{named}</span>
        <span className="block truncate font-condensed text-16 leading-[24px] text-faint-scribe">{sub}</span>
      </span>
      <Fit className="ml-auto mt-2 h-[52px] min-w-[140px] max-w-[300px] flex-1" initial={{ width: 300, height: 52 }}>
        {({ width }) => (
          <div className="flex justify-end">
            <Scale total={total} elapsed={elapsed} width={Math.min(292, width - 8)} words />
          </div>
        )}
      </Fit>
    </div>
  )
}
