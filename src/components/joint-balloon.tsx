import type { ReactElement } from 'react'

export type JointMarkState = 'open' | 'tacked' | 'finished' | 'accepted' | 'rejected'

/** What the outline of a balloon says, in words. */
export const jointStateWord: Record<JointMarkState, string> = {
  open: 'open',
  tacked: 'tacked',
  finished: 'finished, not examined',
  accepted: 'accepted',
  rejected: 'rejected',
}

type BalloonTone = 'dye' | 'steel'

interface ShapeProps {
  /** Without a number the outline alone is drawn, as beside its word in a list of what outlines mean. */
  number?: number
  state: JointMarkState
  x: number
  y: number
  /** Diameter of the ring. A diamond reaches a little further. */
  size: number
  tone: BalloonTone
}

const INK: Record<BalloonTone, { line: string; ground: string; edge: string; sound: string; struck: string }> = {
  dye: {
    line: 'var(--scribe)',
    ground: 'var(--dye)',
    edge: 'var(--chalk)',
    sound: 'var(--sound-line)',
    struck: 'var(--stop-line)',
  },
  steel: {
    line: 'var(--ink)',
    ground: 'none',
    edge: 'var(--on-chalk)',
    sound: 'var(--sound)',
    struck: 'var(--stop-ink)',
  },
}

/** Ring with the upper right quarter missing. */
function brokenRing(x: number, y: number, r: number): string {
  const point = (degrees: number): string => {
    const a = (degrees * Math.PI) / 180
    return `${(x + r * Math.sin(a)).toFixed(2)} ${(y - r * Math.cos(a)).toFixed(2)}`
  }
  return `M${point(72)}A${r} ${r} 0 1 1 ${point(-18)}`
}

function Tacked({ x, y, reach, tone }: { x: number; y: number; reach: number; tone: BalloonTone }): ReactElement {
  const dot = Math.max(2.4, reach * 0.14)
  const corners: [number, number][] = [
    [x, y - reach],
    [x + reach, y],
    [x, y + reach],
    [x - reach, y],
  ]
  const onPaper = tone === 'steel'
  // On paper chalk has too little contrast to be an edge, so the edge and the dots are dark there.
  return (
    <g>
      <polygon
        points={corners.map(([a, b]) => `${a},${b}`).join(' ')}
        fill="var(--chalk)"
        stroke={onPaper ? 'var(--ink)' : 'var(--chalk)'}
        strokeWidth={onPaper ? 1.6 : 1}
      />
      {corners.map(([a, b]) => (
        <circle
          key={`${a}/${b}`}
          cx={a}
          cy={b}
          r={dot}
          fill={onPaper ? 'var(--ink)' : 'var(--chalk)'}
          stroke={onPaper ? 'none' : 'var(--on-chalk)'}
          strokeWidth={1}
        />
      ))}
    </g>
  )
}

function Rejected({ x, y, half, tone }: { x: number; y: number; half: number; tone: BalloonTone }): ReactElement {
  const out = half * 1.36
  const ink = INK[tone]
  const strikes = [-1, 1].flatMap((a) =>
    [-1, 1].map((b) => `M${x + a * half * 0.98} ${y + b * half * 0.98}L${x + a * out} ${y + b * out}`),
  )
  return (
    <g stroke={ink.struck} strokeWidth={2}>
      <rect x={x - half} y={y - half} width={half * 2} height={half * 2} fill="var(--stop)" strokeWidth={1.6} />
      <path d={strikes.join('')} fill="none" />
    </g>
  )
}

function outline({ state, x, y, size, tone, number }: ShapeProps): ReactElement {
  const ink = INK[tone]
  const weight = size >= 40 ? 2 : 1.8
  const r = size / 2 - weight / 2
  switch (state) {
    case 'open':
      return (
        <>
          <circle cx={x} cy={y} r={r} fill={ink.ground} />
          <path d={brokenRing(x, y, r)} fill="none" stroke={ink.line} strokeWidth={weight} />
        </>
      )
    case 'tacked':
      return <Tacked x={x} y={y} reach={(size / 2) * (number === undefined ? 1 : 1.2)} tone={tone} />
    case 'finished':
      return <circle cx={x} cy={y} r={r} fill={ink.ground} stroke={ink.line} strokeWidth={weight} />
    case 'accepted':
      return (
        <>
          <circle cx={x} cy={y} r={r} fill={ink.ground} stroke={ink.sound} strokeWidth={weight * 0.9} />
          <circle cx={x} cy={y} r={r - Math.max(2.6, size * 0.075)} fill="var(--sound-fill)" />
        </>
      )
    case 'rejected':
      return <Rejected x={x} y={y} half={size * (number === undefined ? 0.4 : 0.42)} tone={tone} />
  }
}

function numberColour(state: JointMarkState, tone: BalloonTone): string {
  if (state === 'tacked') return 'var(--on-chalk)'
  if (state === 'accepted' || state === 'rejected') return '#fff'
  return INK[tone].line
}

/** The balloon of a joint inside a drawing: its outline says how far the joint has come. */
export function JointBalloonShape(props: ShapeProps): ReactElement {
  const { number, state, x, y, size, tone } = props
  const text = number === undefined ? '' : String(number)
  const type = size * (text.length > 2 ? 0.4 : 0.52)
  return (
    <g data-state={state}>
      {outline(props)}
      {text !== '' && (
        <text
          x={x}
          y={y + type * 0.355}
          fontSize={type}
          fontWeight={600}
          textAnchor="middle"
          fill={numberColour(state, tone)}
        >
          {text}
        </text>
      )}
    </g>
  )
}

interface JointBalloonProps {
  number?: number
  state: JointMarkState
  tone?: BalloonTone
  size?: number
  /** Replaces "Joint 7, tacked". */
  label?: string
  /** True where the words beside it already say the same. */
  decorative?: boolean
}

/** The balloon of a joint on its own, named for those who can't see it. */
export function JointBalloon(props: JointBalloonProps): ReactElement {
  const { number, state, tone = 'steel', size = 42, label, decorative = false } = props
  const named = label ?? (number === undefined ? jointStateWord[state] : `Joint ${number}, ${jointStateWord[state]}`)
  // Room for the corners of the diamond and the strikes, without making the balloon itself smaller.
  const box = Math.ceil(size * 1.36)
  return (
    <svg
      viewBox={`0 0 ${box} ${box}`}
      width={box}
      height={box}
      style={{ margin: -(box - size) / 2 }}
      className="shrink-0"
      {...(decorative ? { 'aria-hidden': true } : { role: 'img', 'aria-label': named })}
    >
      <JointBalloonShape number={number} state={state} x={box / 2} y={box / 2} size={size} tone={tone} />
    </svg>
  )
}
