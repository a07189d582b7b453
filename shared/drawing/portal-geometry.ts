import type { FrameKind } from '../press/model'
import { ramHeights, sheetSides, type Anchor, type Box, type Elevation, type Lane, type PressDimensions } from './frame'

/** Everything that stands between two uprights, in px: the same geometry draws H-frames, four-posts and bench presses. */
export interface Portal {
  kind: FrameKind
  box: Box
  cx: number
  /** Upright centre lines, and half an upright's width. */
  left: number
  right: number
  post: number
  top: number
  floor: number
  headTop: number
  headBottom: number
  headHalf: number
  bedTop: number
  bedBottom: number
  bedHalf: number
  pin: number
  holes: number[]
  dimensionX: number
  lanes: Record<Lane, number>
  /** px per metre across; parts are drawn in proportion to the opening. */
  span: number
}

const TYPICAL: Record<FrameKind, { height: number; width: number }> = {
  'h-frame': { height: 1.6, width: 0.71 },
  'four-post': { height: 1.8, width: 0.9 },
  bench: { height: 0.7, width: 0.42 },
  'c-frame': { height: 1.2, width: 0.3 },
}

const BALLOON = 21

function holesBetween(first: number, last: number, count: number, pitch: number): number[] {
  if (count < 1) return []
  const step = count === 1 ? 0 : Math.min(pitch, (last - first) / (count - 1))
  const middle = (first + last) / 2
  return Array.from({ length: count }, (_, index) => Math.round(middle + (index - (count - 1) / 2) * step) + 0.5)
}

/** Lays out a portal frame inside a box (px), to scale as far as the box allows. */
export function portalOf(kind: FrameKind, dimensions: PressDimensions, box: Box): Portal {
  const { dimensionX, laneLeft, laneRight, clear } = sheetSides(box)
  const cx = Math.round((laneLeft + laneRight) / 2)
  const half = (laneRight - laneLeft) / 2 - BALLOON - clear
  const typical = TYPICAL[kind]
  const height = dimensions.height ?? typical.height
  const width = dimensions.width ?? typical.width
  const floor = Math.round(box.height - 24)
  const room = floor - (kind === 'bench' ? 56 : 30)
  const scale = Math.min(room / height, (2 * half) / (width * 1.22))
  // A frame much slimmer or squatter than its box is drawn wider or taller than it is: the figures tell the truth.
  const tall = Math.round(Math.max(height * scale, room * 0.72))
  const span = Math.max(width * scale, half * 1.1)
  const left = Math.round(cx - span / 2)
  const right = Math.round(cx + span / 2)
  const post = Math.max(kind === 'four-post' ? 8 : 9, span * (kind === 'four-post' ? 0.05 : 0.063))
  const top = floor - tall
  const headTop = top + 5
  const headBottom = Math.round(headTop + Math.min(64, Math.max(34, tall * 0.1)))
  const bedDepth = Math.round(Math.min(66, Math.max(34, tall * 0.105)))
  const count = kind === 'h-frame' ? (dimensions.holes ?? 7) : 0
  const pitch = (dimensions.holePitch ?? height * 0.094) * (tall / height)
  const holes = holesBetween(headBottom + tall * 0.14, floor - tall * 0.17, count, pitch)
  const bedHole = dimensions.bedHole ?? Math.ceil(count * 0.68)
  const low = kind === 'bench' ? floor - 18 - bedDepth / 2 : floor - tall * 0.24
  const pinned = holes[Math.min(Math.max(bedHole, 1), Math.max(count, 1)) - 1]
  const pin = pinned ?? Math.round(low) + 0.5
  const inner = (left + post + cx - span * 0.09) / 2
  return {
    kind,
    box,
    cx,
    left,
    right,
    post,
    top,
    floor,
    headTop,
    headBottom,
    headHalf: Math.round(span * 0.584),
    bedTop: Math.round(pin - bedDepth / 2 - 1),
    bedBottom: Math.round(pin + bedDepth / 2 - 1),
    bedHalf: Math.round(span * 0.612),
    pin,
    holes: holes.filter((hole) => hole !== pinned),
    dimensionX,
    lanes: {
      'outer-left': laneLeft,
      'outer-right': laneRight,
      'inner-left': Math.round(inner),
      'inner-right': Math.round(2 * cx - inner),
    },
    span,
  }
}

/** Where joints and measuring points of a portal frame are. */
export function portalElevation(portal: Portal): Elevation {
  const { cx, left, right, post, headBottom, bedTop, bedBottom, pin, floor, span, headTop } = portal
  const ram = ramHeights(portal)
  const both = (name: string, lane: 'outer' | 'inner', dx: number, y: number, balloonY: number): Record<string, Anchor> => ({
    [`${name}-left`]: { tip: { x: cx - dx, y }, lane: `${lane}-left`, y: balloonY },
    [`${name}-right`]: { tip: { x: cx + dx, y }, lane: `${lane}-right`, y: balloonY },
  })
  const postX = (right - left) / 2
  const middle = (headBottom + bedTop) / 2
  const under = bedBottom + 67
  // Under a four-post's bed the nuts come first.
  const below = bedBottom + (portal.kind === 'four-post' ? 21 : 9)
  // The letters stand outside the uprights; on a bench press, whose pads are there, inside.
  const bench = portal.kind === 'bench'
  const clear = bench ? 13 : post + 5
  const atLeft = { at: { x: left, y: below }, letter: bench ? 'right' : 'left', clear } as const
  const atRight = { at: { x: right, y: below }, letter: bench ? 'left' : 'right', clear } as const
  return {
    lanes: portal.lanes,
    parts: {
      head: { x: cx + span * 0.3, y: (headTop + headBottom) / 2 },
      'upright-left': { x: left, y: middle },
      'upright-right': { x: right, y: middle },
      seat: { x: cx + span * 0.16, y: headBottom + 10 },
      ram: { x: cx + span * 0.13, y: (ram.seat + ram.cylinder) / 2 },
      adaptor: { x: cx + span * 0.12, y: (ram.rod + ram.adaptor) / 2 },
      bed: { x: cx, y: pin },
      'stiffener-left': { x: cx - span * 0.151, y: pin },
      'stiffener-right': { x: cx + span * 0.151, y: pin },
      'foot-left': { x: left, y: floor - 10 },
      'foot-right': { x: right, y: floor - 10 },
    },
    from: 30,
    innerFrom: headBottom + 48,
    to: floor - 26,
    anchors: {
      ...both('head', 'outer', postX + post * 0.55, headBottom - 1, headBottom - 28),
      ...both('column-top', 'outer', postX + post, headTop - 3, headTop - 2),
      ...both('bed-pin', 'outer', postX + 6.5, pin - 3, pin - 30),
      ...both('bed', 'outer', postX + post * 0.6, bedTop + 6, bedTop - 18),
      ...both('bed-stiffener', 'inner', span * 0.155, bedBottom - 12, under < floor - 60 ? under : bedTop - 54),
      ...both('upright', 'outer', postX + post, middle, middle),
      ...both('foot', 'outer', postX + post + 8, floor - 9, floor - 58),
      'ram-seat': { tip: { x: cx - span * 0.115, y: ram.seat - 1 }, lane: 'inner-left', y: ram.seat + 38 },
      'ram-adaptor': { tip: { x: cx + span * 0.045, y: ram.rod + 4 }, lane: 'inner-right', y: ram.rod - 45 },
    },
    points: {
      'bed-middle': { at: { x: cx, y: bedBottom + 9 }, letter: 'right' },
      'bed-pin-left': atLeft,
      'bed-pin-right': atRight,
      'bed-left': atLeft,
      'bed-right': atRight,
      'head-middle': { at: { x: cx + span * 0.3, y: headBottom + 9 }, letter: 'right' },
      'head-left': { at: { x: left + post + 16, y: headBottom + 9 }, letter: 'right' },
      'head-right': { at: { x: right - post - 16, y: headBottom + 9 }, letter: 'left' },
    },
  }
}
