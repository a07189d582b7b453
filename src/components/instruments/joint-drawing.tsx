import type { CSSProperties, ReactElement } from 'react'
import { arrowHead } from '#shared/chart/drawing'
import type { Point } from '#shared/chart/drawing'
import { JointBalloon, jointStateWord } from '../marks'
import type { JointMarkState } from '../marks'
import { CONDENSED } from '../typeset'
import { placeBalloons, TOUCH } from './balloon-layout'
import type { Elevation, PlacedBalloon } from './balloon-layout'
import { CFrameDrawing, cFrameElevation, cFrameOf } from './c-frame-drawing'
import type { FrameKind } from './joint-places'
import { PortalDrawing } from './portal-drawing'
import { portalElevation, portalOf } from './portal-geometry'
import type { Box, PressDimensions } from './portal-geometry'

export type { PressDimensions } from './portal-geometry'

export interface DrawnJoint {
  id: string
  number: number
  name: string
  state: JointMarkState
  place: string | null
}

export interface DrawnPress {
  kind: FrameKind
  dimensions: PressDimensions
}

interface JointDrawingProps {
  press: DrawnPress
  joints: DrawnJoint[]
  points?: { letter: string; place: string }[]
  selectedId?: string | null
  /** More joints that are pointed out: chosen for a report, or concerned by a repair. */
  markedIds?: readonly string[]
  /** Without it the balloons are part of the picture, not buttons. */
  onSelect?: (id: string) => void
  tone?: 'dye' | 'steel'
  size: Box
}

const BALLOON = 42

/** On paper the same drawing is inked: its colours stand for the dye's. */
const INKED = {
  '--dye': 'var(--sheet)',
  '--thin-dye': 'var(--steel)',
  '--scribe': 'var(--ink)',
  '--faint-scribe': 'var(--graphite)',
  '--ghost': 'var(--hairline)',
} as CSSProperties

function Leader({ balloon, joint }: { balloon: PlacedBalloon; joint: DrawnJoint }): ReactElement | null {
  const { centre, tip } = balloon
  if (tip === null) return null
  const distance = Math.hypot(tip.x - centre.x, tip.y - centre.y)
  const clear = joint.state === 'tacked' ? 27 : joint.state === 'rejected' ? 25 : 22
  if (distance <= clear + 6) return null
  const start: Point = {
    x: centre.x + ((tip.x - centre.x) * clear) / distance,
    y: centre.y + ((tip.y - centre.y) * clear) / distance,
  }
  const ink =
    joint.state === 'tacked' ? 'var(--tack-line)' : joint.state === 'rejected' ? 'var(--reject-line)' : 'var(--scribe)'
  return (
    <g>
      <path d={`M${start.x} ${start.y}L${tip.x} ${tip.y}`} stroke={ink} strokeWidth={1.2} />
      <path d={arrowHead(start, tip, 10, 3.2)} fill={ink} />
    </g>
  )
}

function MeasuringPoint({ letter, spot }: { letter: string; spot: Elevation['points'][string] }): ReactElement {
  const { x, y } = spot.at
  const left = spot.letter === 'left'
  return (
    <g>
      <path
        d={`M${x} ${y - 7.5}L${x + 8.5} ${y + 7}H${x - 8.5}Z`}
        fill="var(--dye)"
        stroke="var(--scribe)"
        strokeWidth={1.5}
      />
      <text
        x={left ? x - (spot.clear ?? 13) : x + (spot.clear ?? 13)}
        y={y + 7}
        fontSize={16}
        fontWeight={500}
        fontFamily={CONDENSED}
        textAnchor={left ? 'end' : 'start'}
        fill="var(--scribe)"
        stroke="var(--dye)"
        strokeWidth={4}
        paintOrder="stroke"
      >
        {letter}
      </text>
    </g>
  )
}

interface HandleProps {
  joint: DrawnJoint
  centre: Point
  tone: 'dye' | 'steel'
  selected: boolean
  onSelect: ((id: string) => void) | undefined
}

/** The balloon, 42 px as drawn and 56 px as touched. */
function Handle({ joint, centre, tone, selected, onSelect }: HandleProps): ReactElement {
  const style: CSSProperties = {
    left: centre.x - TOUCH / 2,
    top: centre.y - TOUCH / 2,
    width: TOUCH,
    height: TOUCH,
  }
  const box = 'absolute flex items-center justify-center rounded-full'
  const balloon = <JointBalloon number={joint.number} state={joint.state} tone={tone} size={BALLOON} decorative />
  const name = `Joint ${joint.number}, ${joint.name}, ${jointStateWord[joint.state]}`
  const ring = selected ? 'ring-3 ring-[var(--scribe)] ring-inset' : ''
  if (onSelect === undefined) {
    return (
      <span role="img" aria-label={name} className={`${box} ${ring}`} style={style}>
        {balloon}
      </span>
    )
  }
  return (
    <button
      type="button"
      aria-label={name}
      aria-pressed={selected}
      onClick={() => onSelect(joint.id)}
      className={`${box} touch-manipulation ${ring}`}
      style={style}
    >
      {balloon}
    </button>
  )
}

const KIND: Record<FrameKind, string> = {
  'h-frame': 'H-frame, front elevation',
  'c-frame': 'C-frame, side elevation',
  'four-post': 'Four-post frame, front elevation',
  bench: 'Bench press, front elevation',
}

/** The press as drawn on the board, with every joint in a balloon whose outline tells its state. */
export function JointDrawing(props: JointDrawingProps): ReactElement {
  const { press, joints, points = [], selectedId = null, markedIds = [], onSelect, tone = 'dye', size } = props
  const cFrame = press.kind === 'c-frame' ? cFrameOf(press.dimensions, size) : null
  const portal = cFrame === null ? portalOf(press.kind, press.dimensions, size) : null
  const elevation = cFrame !== null ? cFrameElevation(cFrame) : portal !== null ? portalElevation(portal) : null
  if (elevation === null) return <></>
  const ordered = [...joints].sort((a, b) => a.number - b.number)
  const balloons = placeBalloons(ordered, elevation)
  const lines = { '--tack-line': tone === 'dye' ? 'var(--chalk)' : 'var(--ink)', '--reject-line': tone === 'dye' ? 'var(--stop-line)' : 'var(--stop-ink)' }
  return (
    <div
      role="group"
      aria-label={`${KIND[press.kind]}, ${joints.length} joints`}
      className={`relative ${tone === 'dye' ? 'bg-dye' : 'bg-sheet'}`}
      style={{ ...size, ...lines, ...(tone === 'steel' ? INKED : {}) } as CSSProperties}
    >
      <svg aria-hidden width={size.width} height={size.height} className="absolute inset-0">
        {portal !== null && <PortalDrawing portal={portal} dimensions={press.dimensions} />}
        {cFrame !== null && <CFrameDrawing frame={cFrame} dimensions={press.dimensions} />}
        {points.map((point) => {
          const spot = elevation.points[point.place]
          return spot === undefined ? null : <MeasuringPoint key={point.letter} letter={point.letter} spot={spot} />
        })}
        {ordered.map((joint, index) => {
          const balloon = balloons[index]
          return balloon === undefined ? null : <Leader key={joint.id} balloon={balloon} joint={joint} />
        })}
      </svg>
      {ordered.map((joint, index) => {
        const balloon = balloons[index]
        return balloon === undefined ? null : (
          <Handle
            key={joint.id}
            joint={joint}
            centre={balloon.centre}
            tone={tone}
            selected={joint.id === selectedId || markedIds.includes(joint.id)}
            onSelect={onSelect}
          />
        )
      })}
    </div>
  )
}
