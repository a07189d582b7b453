import { ramHeights, sheetSides, type Box, type Elevation, type PressDimensions } from './frame'

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
  const { dimensionX, laneLeft, laneRight, clear } = sheetSides(box)
  const from = laneLeft + 21 + clear
  const to = laneRight - 21 - clear
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
    parts: {
      head: { x: (axis + column) / 2, y: (top + headBottom) / 2 },
      'upright-left': { x: (column + back) / 2, y: (headBottom + bedTop) / 2 },
      seat: { x: axis + span * 0.16, y: headBottom + 10 },
      ram: { x: axis + span * 0.13, y: (ram.seat + ram.cylinder) / 2 },
      adaptor: { x: axis + span * 0.12, y: (ram.rod + ram.adaptor) / 2 },
      bed: { x: (axis + column) / 2, y: (bedTop + bedBottom) / 2 },
      'stiffener-left': { x: nose + 18, y: (bedTop + bedBottom) / 2 },
      'stiffener-right': { x: column + 14, y: (headBottom + bedTop) / 2 },
      'foot-left': { x: (nose + back) / 2, y: floor - 8 },
    },
    from: 30,
    innerFrom: headBottom + 48,
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
