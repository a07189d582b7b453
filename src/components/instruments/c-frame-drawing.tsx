import type { ReactElement } from 'react'
import type { Elevation } from './balloon-layout'
import { Across, CentreLine, Ground, Hair, millimetres, Outline, RamStack, Upright } from './drafting'
import { ramHeights } from './portal-geometry'
import type { Box, PressDimensions } from './portal-geometry'

/** A C-frame from the side: the ram's axis left, the column right (px). */
export interface CFrame {
  box: Box
  dimensionX: number
  laneLeft: number
  laneRight: number
  axis: number
  nose: number
  column: number
  back: number
  top: number
  floor: number
  headBottom: number
  bedTop: number
  bedBottom: number
  span: number
}

const TYPICAL = { height: 1.2, throat: 0.3 }

/** Lays out the side elevation inside a box (px), to scale as far as the box allows. */
export function cFrameOf(dimensions: PressDimensions, box: Box): CFrame {
  const small = box.width < 440
  const dimensionX = small ? 14 : 36
  const laneLeft = dimensionX + (small ? 34 : 40)
  const laneRight = box.width - (small ? 30 : 56)
  const from = laneLeft + 21 + (small ? 8 : 33)
  const to = laneRight - 21 - (small ? 8 : 33)
  const height = dimensions.height ?? TYPICAL.height
  const throat = dimensions.throat ?? dimensions.width ?? TYPICAL.throat
  const floor = Math.round(box.height - 24)
  const room = floor - 30
  // Nose, throat and column together: the column is drawn a quarter of the height deep, a common proportion.
  const deep = throat * 1.45 + height * 0.24
  const scale = Math.min(room / height, (to - from) / deep)
  const tall = Math.round(Math.max(height * scale, room * 0.72))
  const wide = Math.max(deep * scale, (to - from) * 0.7)
  const nose = Math.round((from + to - wide) / 2)
  const back = Math.round(nose + wide)
  const column = Math.round(back - wide * ((height * 0.24) / deep))
  const axis = Math.round(nose + (column - nose) * (0.45 / 1.45))
  const top = floor - tall
  return {
    box,
    dimensionX,
    laneLeft,
    laneRight,
    axis,
    nose,
    column,
    back,
    top,
    floor,
    headBottom: Math.round(top + tall * 0.2),
    bedTop: Math.round(floor - tall * 0.34),
    bedBottom: Math.round(floor - tall * 0.16),
    span: Math.min((axis - nose) * 3.4, wide * 0.9),
  }
}

/** Where joints and measuring points of a C-frame are. */
export function cFrameElevation(frame: CFrame): Elevation {
  const { axis, nose, column, back, top, floor, headBottom, bedTop, bedBottom, span } = frame
  const ram = ramHeights(frame)
  const inner = Math.round((axis + span * 0.13 + column) / 2)
  return {
    lanes: { 'outer-left': frame.laneLeft, 'outer-right': frame.laneRight, 'inner-left': inner, 'inner-right': inner },
    from: Math.max(24, top - 4),
    to: floor - 26,
    anchors: {
      'head-left': { tip: { x: nose + 2, y: top + 24 }, lane: 'outer-left', y: top + 8 },
      'head-right': { tip: { x: back - 4, y: top + 8 }, lane: 'outer-right', y: top + 4 },
      'throat-top': { tip: { x: column + 2, y: headBottom + 6 }, lane: 'inner-right', y: headBottom + 52 },
      'throat-bottom': { tip: { x: column + 2, y: bedTop - 6 }, lane: 'inner-right', y: bedTop - 52 },
      'column-back': { tip: { x: back, y: (headBottom + bedTop) / 2 }, lane: 'outer-right', y: (headBottom + bedTop) / 2 - 24 },
      'ram-seat': { tip: { x: axis - span * 0.12, y: ram.seat - 1 }, lane: 'outer-left', y: ram.seat + 34 },
      'ram-adaptor': { tip: { x: axis - span * 0.06, y: ram.rod + 5 }, lane: 'outer-left', y: ram.rod + 26 },
      'bed-left': { tip: { x: nose + 2, y: bedTop + 16 }, lane: 'outer-left', y: bedTop + 6 },
      'bed-stiffener-left': { tip: { x: nose + 19, y: bedBottom - 14 }, lane: 'outer-left', y: bedBottom + 24 },
      'foot-left': { tip: { x: nose + 20, y: floor - 9 }, lane: 'outer-left', y: floor - 30 },
      'foot-right': { tip: { x: back - 6, y: floor - 9 }, lane: 'outer-right', y: floor - 40 },
    },
    points: {
      'bed-middle': { at: { x: axis, y: bedBottom + 9 }, letter: 'right' },
      'bed-left': { at: { x: nose + 12, y: bedBottom + 9 }, letter: 'left' },
      'head-middle': { at: { x: nose + 12, y: headBottom + 9 }, letter: 'left' },
      'head-left': { at: { x: nose + 12, y: headBottom + 9 }, letter: 'left' },
    },
  }
}

/** The plate of the C with its rounded throat, its web, and its foot. */
export function CFrameDrawing({ frame, dimensions }: { frame: CFrame; dimensions: PressDimensions }): ReactElement {
  const { axis, nose, column, back, top, floor, headBottom, bedTop, bedBottom, box } = frame
  const r = Math.min(22, (bedTop - headBottom) / 6)
  const height = millimetres(dimensions.height)
  const throat = millimetres(dimensions.throat ?? null)
  const outline = [
    `M${nose} ${top + 14}L${nose + 14} ${top}H${back}V${floor - 10}H${column - 10}V${bedBottom + 26}`,
    `L${column - 36} ${bedBottom}H${nose}V${bedTop}H${column - r}A${r} ${r} 0 0 0 ${column} ${bedTop - r}`,
    `V${headBottom + r}A${r} ${r} 0 0 0 ${column - r} ${headBottom}H${nose}Z`,
  ].join('')
  return (
    <g>
      <Ground from={Math.max(4, nose - 44)} to={Math.min(box.width - 4, back + 44)} y={floor} />
      <Outline>
        <path d={outline} fill="var(--dye)" />
        <rect x={nose + 16} y={bedTop + 5} width={4} height={bedBottom - bedTop - 10} strokeWidth={1.2} />
        <rect x={nose + 6} y={floor - 10} width={back - nose + 10} height={10} fill="var(--dye)" />
      </Outline>
      <Hair
        d={[
          `M${nose} ${headBottom - 5}H${column - r}A${r + 5} ${r + 5} 0 0 1 ${column + 5} ${headBottom + r}`,
          `V${bedTop - r}A${r + 5} ${r + 5} 0 0 1 ${column - r} ${bedTop + 5}H${nose}`,
          `M${back - 6} ${top}V${floor - 10}M${nose} ${bedBottom - 5}H${column - 38}`,
        ].join('')}
      />
      <RamStack cx={axis} span={frame.span} top={headBottom} bottom={bedTop} heights={ramHeights(frame)} />
      <CentreLine d={`M${axis} ${top - 24}V${floor + 12}`} strong />
      <CentreLine d={`M${(column + back) / 2} ${top - 14}V${floor + 12}`} />
      {height !== null && <Upright x={frame.dimensionX} top={top} bottom={floor} reach={nose - 8} text={height} />}
      {throat !== null && <Across y={Math.round((bedBottom + floor) / 2) + 6} left={axis} right={column} text={throat} />}
    </g>
  )
}
