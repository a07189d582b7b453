import { boxPath, type Pen, across, halfFigure, upright } from './drafting'
import { circlePath, pathThrough, type Drawing, type DrawingItem, type Point } from '../chart/drawing'
import { balloonItems, leaderItems, type JointMarkState } from './balloon-items'
import { placeBalloons, reachOf, type BalloonLayout } from './balloon-layout'
import { cFrameElevation, cFrameOf } from './c-frame-geometry'
import { cFrameItems } from './c-frame-items'
import { millimetres, type Box, type DrawnPress, type Elevation, type FramePart } from './frame'
import { portalElevation, portalOf } from './portal-geometry'
import { portalItems } from './portal-items'

export interface DrawnJoint {
  id: string
  number: number
  name: string
  state: JointMarkState
  place: string | null
}

export interface ElevationSpec {
  press: DrawnPress
  joints: readonly DrawnJoint[]
  points?: readonly { letter: string; place: string }[]
  /** Parts that hang on no joint: dashed, with a mark and a word. */
  loose?: ReadonlySet<FramePart>
  size: Box
}

/** An elevation laid out on a sheet: the frame's lines, and where every joint's balloon stands. */
export interface LaidOut {
  size: Box
  elevation: Elevation
  /** By number. */
  joints: DrawnJoint[]
  layout: BalloonLayout
  /** Frame, dimensions and measuring points, without joints. */
  frame: DrawingItem[]
  leaders: DrawingItem[]
}

interface Laid {
  elevation: Elevation
  items: DrawingItem[]
  height: { x: number; top: number; bottom: number; reach: number }
  /** Between which lines the width is written, and at which heights it may be, best first. */
  width: { left: number; right: number; metres: number | null; at: number[] }
}

function portal({ press, size }: ElevationSpec, penOf: (part: FramePart) => Pen): Laid {
  const laid = portalOf(press.kind, press.dimensions, size)
  const { left, right, post, top, floor, bedBottom, dimensionX, kind } = laid
  // On a bench press the daylight is taken up by the ram, so the figure goes above the head.
  const under = [Math.min(bedBottom + 129, (bedBottom + floor) / 2 + 20), floor - 40, bedBottom + 34, bedBottom + 62]
  return {
    elevation: portalElevation(laid),
    items: portalItems(laid, penOf),
    height: { x: dimensionX, top, bottom: floor, reach: left - post - 9 },
    width: {
      left,
      right,
      metres: press.dimensions.width,
      at: kind === 'bench' ? [top - 18] : under.filter((y) => y < floor - 24 && y > bedBottom + 26),
    },
  }
}

function cFrame({ press, size }: ElevationSpec, penOf: (part: FramePart) => Pen): Laid {
  const laid = cFrameOf(press.dimensions, size)
  const { axis, column, top, floor, bedBottom, nose, dimensionX } = laid
  return {
    elevation: cFrameElevation(laid),
    items: cFrameItems(laid, penOf),
    height: { x: dimensionX, top, bottom: floor, reach: nose - 8 },
    width: { left: axis, right: column, metres: press.dimensions.throat ?? null, at: [Math.round((bedBottom + floor) / 2) + 6] },
  }
}

function measuringPoint(letter: string, spot: Elevation['points'][string]): DrawingItem[] {
  const { x, y } = spot.at
  const left = spot.letter === 'left'
  const corners = [
    { x, y: y - 7.5 },
    { x: x + 8.5, y: y + 7 },
    { x: x - 8.5, y: y + 7 },
  ]
  return [
    { kind: 'path', d: pathThrough(corners, true), stroke: 'scribe', width: 1.5, fill: 'dye' },
    {
      kind: 'text',
      x: left ? x - (spot.clear ?? 13) : x + (spot.clear ?? 13),
      y: y + 7,
      text: letter,
      size: 16,
      weight: 500,
      condensed: true,
      anchor: left ? 'end' : 'start',
      ink: 'scribe',
      halo: 'dye',
    },
  ]
}

/** A half-filled square and its word: nobody has said what holds this part. */
function looseMark({ x, y }: Point): DrawingItem[] {
  return [
    { kind: 'path', d: boxPath(x - 8, y - 8, x + 8, y + 8), stroke: 'tack-line', width: 2, fill: 'dye' },
    { kind: 'path', d: boxPath(x - 8, y, x + 8, y + 8), stroke: null, width: 0, fill: 'tack-line' },
    {
      kind: 'text',
      x: x + 13,
      y: y + 5.5,
      text: 'loose',
      size: 16,
      weight: 600,
      condensed: true,
      anchor: 'start',
      ink: 'tack-line',
      halo: 'dye',
    },
  ]
}

/** Whether no balloon stands on a figure of this half width in the middle of a line. */
function clearOfBalloons({ balloons, size }: BalloonLayout, x: number, y: number, half: number): boolean {
  const reach = reachOf(size)
  return balloons.every(({ centre }) => Math.abs(centre.x - x) >= half + reach || Math.abs(centre.y - y) >= 10 + reach)
}

/** Lays an elevation out on a sheet (px), to scale as far as the sheet allows. */
export function layOut(spec: ElevationSpec): LaidOut {
  const { press, points = [], loose = new Set<FramePart>(), size } = spec
  const penOf = (part: FramePart): Pen => ({ loose: loose.has(part) })
  const laid = press.kind === 'c-frame' ? cFrame(spec, penOf) : portal(spec, penOf)
  const { elevation, items, height, width } = laid
  const joints = [...spec.joints].sort((a, b) => a.number - b.number)
  const layout = placeBalloons(joints, elevation)
  const tall = millimetres(press.dimensions.height)
  const wide = millimetres(width.metres)
  const middle = (width.left + width.right) / 2
  const y = wide === null ? undefined : width.at.find((one) => clearOfBalloons(layout, middle, one, halfFigure(wide)))
  const frame = [
    ...items,
    ...(tall === null ? [] : upright(height.x, height.top, height.bottom, height.reach, tall)),
    ...(wide === null || y === undefined ? [] : across(y, width.left, width.right, wide)),
    ...points.flatMap(({ letter, place }) => {
      const spot = elevation.points[place]
      return spot === undefined ? [] : measuringPoint(letter, spot)
    }),
    ...[...loose].flatMap((part) => {
      const at = elevation.parts[part]
      return at === undefined ? [] : looseMark(at)
    }),
  ]
  const leaders = joints.flatMap(({ state }, index) => {
    const balloon = layout.balloons[index]
    return balloon === undefined ? [] : leaderItems(state, balloon.centre, balloon.tip, layout.size)
  })
  return { size, elevation, joints, layout, frame, leaders }
}

/** The balloons of an elevation that was laid out. */
export function balloonsOf({ joints, layout }: LaidOut): DrawingItem[] {
  return joints.flatMap(({ number, state }, index) => {
    const balloon = layout.balloons[index]
    return balloon === undefined ? [] : balloonItems({ number, state, at: balloon.centre, size: layout.size })
  })
}

/** The whole elevation as one picture: what the screen shows, for a sheet of paper. */
export function elevationDrawing(spec: ElevationSpec): Drawing {
  const laid = layOut(spec)
  return { ...laid.size, items: [...laid.frame, ...laid.leaders, ...balloonsOf(laid)] }
}

/** A small cross at a spot that a joint can be put at (px). */
export function spotItems(at: Point, chosen: boolean): DrawingItem[] {
  const arm = chosen ? 9 : 6
  const cross = `M${at.x - arm} ${at.y - arm}L${at.x + arm} ${at.y + arm}M${at.x + arm} ${at.y - arm}L${at.x - arm} ${at.y + arm}`
  return [
    { kind: 'path', d: circlePath(at, arm + 3), stroke: null, width: 0, fill: 'dye', opacity: 0.8 },
    { kind: 'path', d: cross, stroke: 'tack-line', width: chosen ? 3 : 2, fill: null },
  ]
}

const KIND: Record<DrawnPress['kind'], string> = {
  'h-frame': 'H-frame, front elevation',
  'c-frame': 'C-frame, side elevation',
  'four-post': 'Four-post frame, front elevation',
  bench: 'Bench press, front elevation',
}

/** What the picture shows, for those who can't see it. */
export const elevationLabel = (kind: DrawnPress['kind'], joints: number): string =>
  `${KIND[kind]}, ${joints} ${joints === 1 ? 'joint' : 'joints'}`
