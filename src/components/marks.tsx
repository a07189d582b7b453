import type { ReactElement, SVGProps } from 'react'

export { JointBalloon, jointStateWord } from './joint-balloon'
export type { JointMarkState } from './joint-balloon'
export { ProductMark } from './product-mark'

export type MarkName =
  | 'go-on'
  | 'wait'
  | 'stop'
  | 'beyond'
  | 'undecided'
  | 'within'
  | 'now'
  | 'to-come'
  | 'not-read'
  | 'datum'
  | 'abandoned'
  | 'to-countersign'
  | 'clock'
  | 'clock-late'
  | 'under-way'
  | 'not-connected'
  | 'measuring-point'
  | 'chevron'

/** The ground a mark lies on: dye blue, steel or sheet, a red plate, or a chalk plate. */
export type Tone = 'dye' | 'steel' | 'plate' | 'chalk'

interface MarkProps {
  name: MarkName
  size?: number
  tone?: Tone
  /** What it says to someone who can't see it. Without it the mark is decoration beside its own word. */
  label?: string
  className?: string
}

const LINE: Record<Tone, string> = {
  dye: 'var(--scribe)',
  steel: 'var(--ink)',
  plate: 'var(--on-stop, #fff)',
  chalk: 'var(--on-chalk)',
}
const FAINT: Record<Tone, string> = {
  dye: 'var(--faint-scribe)',
  steel: 'var(--graphite)',
  plate: 'var(--on-stop, #fff)',
  chalk: 'var(--on-chalk)',
}
const SOUND: Record<Tone, string> = {
  dye: 'var(--sound-line)',
  steel: 'var(--sound)',
  plate: 'var(--on-stop, #fff)',
  chalk: 'var(--on-chalk)',
}

const OCTAGON = '7.03,0 16.97,0 24,7.03 24,16.97 16.97,24 7.03,24 0,16.97 0,7.03'

/** On a red plate the octagon is an outline, and finer the larger it is. */
function Octagon({ tone, weight }: { tone: Tone; weight: number }): ReactElement {
  const hollow = tone === 'plate'
  const edge = tone === 'dye' ? 'var(--stop-line)' : hollow ? LINE.plate : 'var(--stop-ink)'
  const inset = weight / 2
  const scale = (24 - weight) / 24
  return (
    <>
      <polygon
        points={OCTAGON}
        transform={`translate(${inset} ${inset}) scale(${scale})`}
        fill={hollow ? 'none' : 'var(--stop)'}
        stroke={edge}
        strokeWidth={weight / scale}
      />
      <rect x={6.2} y={hollow ? 10.2 : 10} width={11.6} height={hollow ? 3.6 : 4} fill="var(--on-stop, #fff)" />
    </>
  )
}

function Clock({ late, colour }: { late: boolean; colour: string }): ReactElement {
  return (
    <g fill="none" stroke={colour} strokeWidth={1.8}>
      <circle cx={12} cy={12} r={10.6} />
      <path d="M12 5.4V12.6L16.4 14.8" strokeWidth={late ? 1.6 : 1.8} />
      {late && <path d="M1.6 22.4 22.4 1.6" strokeWidth={2.2} />}
    </g>
  )
}

/** The nib of a pen, for what still waits for a countersignature. */
function Nib({ colour }: { colour: string }): ReactElement {
  return (
    <g transform="rotate(45 12 12)" fill="none" stroke={colour} strokeWidth={1.7} strokeLinejoin="miter">
      <path d="M12 24.6 6.6 12.6 9 4.4h6l2.4 8.2Z" />
      <path d="M12 24V14.6" />
      <circle cx={12} cy={12.8} r={1.5} fill={colour} stroke="none" />
      <rect x={8.2} y={-1.4} width={7.6} height={3.2} fill={colour} stroke="none" />
    </g>
  )
}

function shape(name: MarkName, tone: Tone, weight: number): ReactElement {
  const line = LINE[tone]
  const faint = FAINT[tone]
  const sound = SOUND[tone]
  switch (name) {
    case 'go-on':
      return <path d="M12 1.7 23 21.6H1Z" fill="none" stroke={line} strokeWidth={weight} strokeLinejoin="miter" />
    case 'datum':
      return <path d="M12 22.3 1 2.4H23Z" fill="none" stroke={line} strokeWidth={weight} strokeLinejoin="miter" />
    case 'measuring-point':
      return <path d="M12 3.6 22 20.4H2Z" fill="none" stroke={line} strokeWidth={weight} strokeLinejoin="miter" />
    case 'wait':
      return <path d="M4.2 3.2h4.9v17.6H4.2zM14.9 3.2h4.9v17.6h-4.9z" fill={line} />
    case 'stop':
    case 'beyond':
      return <Octagon tone={tone} weight={tone === 'plate' && weight >= 1.7 ? 1.6 : weight} />
    case 'undecided':
      return (
        <g>
          <rect x={3.4} y={3.4} width={17.2} height={17.2} fill="none" stroke={line} strokeWidth={weight} />
          <path d="M4 20.6V4L20.6 20.6Z" fill={line} />
        </g>
      )
    case 'within':
      return (
        <g fill="none" stroke={sound} strokeWidth={weight}>
          <circle cx={12} cy={12} r={11} />
          <path d="M7.2 12.4 10.8 16 17 8.4" strokeWidth={weight * 1.1} />
        </g>
      )
    case 'now':
      return <path d="M2 1.4 23 12 2 22.6Z" fill={tone === 'dye' ? 'var(--chalk)' : line} />
    case 'under-way':
      return <path d="M3 2.4 22.4 12 3 21.6Z" fill={line} />
    case 'to-come':
    case 'not-read':
      return <rect x={3.6} y={3.6} width={16.8} height={16.8} fill="none" stroke={faint} strokeWidth={1.6} />
    case 'abandoned':
      return (
        <g fill="none" stroke={line} strokeWidth={weight}>
          <circle cx={12} cy={12} r={10.6} />
          <path d="M4.6 19.4 19.4 4.6" />
        </g>
      )
    case 'to-countersign':
      return <Nib colour={line} />
    case 'clock':
      return <Clock late={false} colour={line} />
    case 'clock-late':
      return <Clock late colour={tone === 'dye' ? 'var(--stop-line)' : 'var(--stop-ink)'} />
    case 'not-connected':
      return (
        <g fill="none" stroke={line} strokeWidth={weight}>
          <circle cx={12} cy={12} r={10.6} strokeDasharray="4.2 2.46" />
          <path d="M3.4 20.6 20.6 3.4" />
        </g>
      )
    case 'chevron':
      return <path d="M8 3.4 16.6 12 8 20.6" fill="none" stroke={faint} strokeWidth={2.2} />
  }
}

/** Accessible name or decoration: an SVG is one or the other, never an unnamed picture. */
export function pictureRole(label: string | undefined): SVGProps<SVGSVGElement> {
  return label === undefined ? { 'aria-hidden': true } : { role: 'img', 'aria-label': label }
}

/** One of the shapes that says a decision, a verdict or a state, beside its word. */
export function Mark({ name, size = 24, tone = 'steel', label, className }: MarkProps): ReactElement {
  const weight = size >= 60 ? 0.95 : size >= 36 ? 1.7 : 2
  return (
    <svg viewBox="0 0 24 24" width={size} height={size} overflow="visible" className={className ?? 'shrink-0'} {...pictureRole(label)}>
      {shape(name, tone, weight)}
    </svg>
  )
}

/** The same shape inside another drawing, centred on a point of it. */
export function MarkShape(props: { name: MarkName; x: number; y: number; size: number; tone: Tone }): ReactElement {
  const scale = props.size / 24
  return (
    <g transform={`translate(${props.x - props.size / 2} ${props.y - props.size / 2}) scale(${scale})`}>
      {shape(props.name, props.tone, 2)}
    </g>
  )
}
