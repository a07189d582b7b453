import { MarkShape } from '../../../components/marks'

const WIDE = 104
const HIGH = 24
const LEFT = 4
/** Room beyond 100 %, for a proof above rating. */
const MOST = 115

const at = (percent: number): number => LEFT + ((WIDE - 2 * LEFT) * Math.min(percent, MOST)) / MOST

type ReachedBarProps = {
  reached: number
  /** Where the test was stopped, when it was. */
  stoppedAt: number | null
  underWay: boolean
}

/** How far a test climbed, on the scale of its rated load: an arrow while it goes on, an octagon where it was stopped. */
export function ReachedBar({ reached, stoppedAt, underWay }: ReachedBarProps) {
  const middle = HIGH / 2
  const end = at(stoppedAt ?? reached)
  const words =
    stoppedAt !== null ? `stopped at ${stoppedAt} % of the rated load` : `${underWay ? 'so far' : 'reached'} ${reached} % of the rated load`
  return (
    <svg width={WIDE} height={HIGH} role="img" aria-label={words} className="block">
      <g stroke="var(--graphite)" strokeWidth="1.2">
        <path d={`M${LEFT} ${middle}H${at(100)}`} />
        <path d={[0, 25, 50, 75, 100].map((percent) => `M${at(percent)} ${middle - 6}v12`).join('')} />
      </g>
      {end > LEFT && <path d={`M${LEFT} ${middle}H${end}`} stroke="var(--ink)" strokeWidth="4.5" />}
      {stoppedAt !== null ? (
        <g>
          <circle cx={end} cy={middle} r="9" fill="var(--sheet)" />
          <MarkShape name="stop" x={end} y={middle} size={14} tone="steel" />
        </g>
      ) : underWay ? (
        <path d={`M${end - 4} ${middle - 8}l13 8-13 8Z`} fill="var(--ink)" />
      ) : (
        <path d={`M${end} ${middle - 8}v16`} stroke="var(--ink)" strokeWidth="2.2" />
      )}
    </svg>
  )
}
