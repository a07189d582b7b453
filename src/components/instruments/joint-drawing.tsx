import { useMemo, type CSSProperties, type MouseEvent, type ReactElement } from 'react'
import type { Point } from '#shared/chart/drawing'
import { anchorFor } from '#shared/drawing/balloon-layout'
import { elevationDrawing, elevationLabel, layOut, spotItems, type DrawnJoint, type ElevationSpec } from '#shared/drawing/elevation'
import type { Box, DrawnPress, FramePart } from '#shared/drawing/frame'
import { jointPlaces, type Spot } from '#shared/press/places'
import { JointBalloon, jointStateWord } from '../marks'
import { DrawingItems, DrawingView } from './drawing-view'

export type { DrawnJoint }

/** A joint is being put at a spot of the drawing. */
export interface Placing {
  place: string | null
  onPlace: (place: string) => void
}

interface JointDrawingProps {
  press: DrawnPress
  joints: readonly DrawnJoint[]
  points?: readonly { letter: string; place: string }[]
  loose?: ReadonlySet<FramePart>
  selectedId?: string | null
  /** More joints that are pointed out: chosen for a report, or concerned by a repair. */
  markedIds?: readonly string[]
  /** Without it the balloons are part of the picture, not buttons. */
  onSelect?: (id: string) => void
  placing?: Placing | null
  tone?: 'dye' | 'steel'
  size: Box
}

interface HandleProps {
  joint: DrawnJoint
  centre: Point
  /** px: the balloon as drawn and as touched. */
  drawn: number
  touch: number
  tone: 'dye' | 'steel'
  selected: boolean
  onSelect: ((id: string) => void) | undefined
}

/** The balloon, 42 px as drawn and 56 px as touched while there is room. */
function Handle({ joint, centre, drawn, touch, tone, selected, onSelect }: HandleProps): ReactElement {
  const style: CSSProperties = { left: centre.x - touch / 2, top: centre.y - touch / 2, width: touch, height: touch }
  const box = 'absolute flex items-center justify-center rounded-full'
  const balloon = <JointBalloon number={joint.number} state={joint.state} tone={tone} size={drawn} decorative />
  const name = `Joint ${joint.number}, ${joint.name}, ${jointStateWord[joint.state]}`
  const ring = selected ? `ring-3 ring-inset ${tone === 'dye' ? 'ring-scribe' : 'ring-ink'}` : ''
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
      data-joint={joint.number}
      onClick={() => onSelect(joint.id)}
      className={`${box} touch-manipulation ${ring}`}
      style={style}
    >
      {balloon}
    </button>
  )
}

const NEAR = 64

type At = Spot & { tip: Point }

/** The spots a joint can be put at: tap near one, or go through them by key. */
function Spots({ spots, placing, size }: { spots: readonly At[]; placing: Placing; size: Box }): ReactElement {
  const tap = (event: MouseEvent<HTMLDivElement>): void => {
    const box = event.currentTarget.getBoundingClientRect()
    const scale = box.width > 0 ? size.width / box.width : 1
    const [x, y] = [(event.clientX - box.left) * scale, (event.clientY - box.top) * scale]
    const near = spots.map((spot) => ({ spot, apart: Math.hypot(spot.tip.x - x, spot.tip.y - y) })).sort((a, b) => a.apart - b.apart)[0]
    if (near && near.apart <= NEAR) placing.onPlace(near.spot.place)
  }
  return (
    <div role="group" aria-label="Where it stands" className="absolute inset-0 cursor-crosshair" onClick={tap}>
      {spots.map(({ place, label, tip }) => (
        <button
          key={place}
          type="button"
          aria-label={label}
          aria-pressed={place === placing.place}
          onClick={(event) => {
            event.stopPropagation()
            placing.onPlace(place)
          }}
          className="pointer-events-none absolute size-10 rounded-full"
          style={{ left: tip.x - 20, top: tip.y - 20 }}
        />
      ))}
    </div>
  )
}

/** The press as drawn on the board, with every joint in a balloon whose outline tells its state. */
export function JointDrawing(props: JointDrawingProps): ReactElement {
  const { press, joints, points, loose, selectedId = null, markedIds = [], onSelect, placing = null, tone = 'dye', size } = props
  const laid = useMemo(() => layOut({ press, joints, points, loose, size }), [press, joints, points, loose, size])
  const { size: drawn, touch, balloons } = laid.layout
  const spots = jointPlaces[press.kind].flatMap((spot): At[] => {
    const anchor = anchorFor(laid.elevation, spot.place)
    return anchor === null ? [] : [{ ...spot, tip: anchor.tip }]
  })
  return (
    <div
      role="group"
      aria-label={elevationLabel(press.kind, joints.length)}
      className={`relative ${tone === 'dye' ? 'bg-dye' : 'bg-sheet'}`}
      style={{ width: size.width, height: size.height }}
    >
      <svg aria-hidden width={size.width} height={size.height} className="absolute inset-0">
        <DrawingItems items={laid.frame} ground={tone} />
        {placing === null ? (
          <DrawingItems items={laid.leaders} ground={tone} />
        ) : (
          <DrawingItems items={spots.flatMap(({ place, tip }) => spotItems(tip, place === placing.place))} ground={tone} />
        )}
      </svg>
      {placing !== null && <Spots spots={spots} placing={placing} size={size} />}
      {placing === null &&
        laid.joints.map((joint, index) => {
          const balloon = balloons[index]
          return balloon === undefined ? null : (
            <Handle
              key={joint.id}
              joint={joint}
              centre={balloon.centre}
              drawn={drawn}
              touch={touch}
              tone={tone}
              selected={joint.id === selectedId || markedIds.includes(joint.id)}
              onSelect={onSelect}
            />
          )
        })}
    </div>
  )
}

/** Sheet that a printed elevation is laid out on (px); the printer scales it. */
const PRINTED: Box = { width: 620, height: 600 }

/** The same drawing inked on white, as lines a printer scales; on a screen it isn't there, nor for whoever listens to one. */
export function PrintedElevation({ className = '', ...spec }: Omit<ElevationSpec, 'size'> & { className?: string }): ReactElement {
  return (
    <div aria-hidden className={`hidden print:block print:break-inside-avoid ${className}`}>
      <DrawingView
        drawing={elevationDrawing({ ...spec, size: PRINTED })}
        label={elevationLabel(spec.press.kind, spec.joints.length)}
        ground="paper"
        className="h-auto w-full"
      />
    </div>
  )
}
