import { arrowHead, circlePath, pathThrough, type DrawingItem, type InkName, type Point } from '../chart/drawing'
import { boxPath } from './drafting'

/** How far a joint has come: its make-up, and once it is finished what its last examination found. */
export type JointMarkState = 'open' | 'tacked' | 'finished' | 'accepted' | 'rejected'

/** What the outline of a balloon says, in words. */
export const jointStateWord: Record<JointMarkState, string> = {
  open: 'open',
  tacked: 'tacked',
  finished: 'finished, not examined',
  accepted: 'accepted',
  rejected: 'rejected',
}

/** Ring with the upper right quarter missing. */
function brokenRing({ x, y }: Point, r: number): string {
  const point = (degrees: number): string => {
    const a = (degrees * Math.PI) / 180
    return `${(x + r * Math.sin(a)).toFixed(2)} ${(y - r * Math.cos(a)).toFixed(2)}`
  }
  return `M${point(72)}A${r} ${r} 0 1 1 ${point(-18)}`
}

function tacked({ x, y }: Point, reach: number): DrawingItem[] {
  const dot = Math.max(2.4, reach * 0.14)
  const corners: Point[] = [
    { x, y: y - reach },
    { x: x + reach, y },
    { x, y: y + reach },
    { x: x - reach, y },
  ]
  return [
    { kind: 'path', d: pathThrough(corners, true), stroke: 'tack-line', width: 1.6, fill: 'chalk' },
    ...corners.map((corner): DrawingItem => ({
      kind: 'path',
      d: circlePath(corner, dot),
      stroke: 'on-chalk',
      width: 1,
      fill: 'tack-line',
    })),
  ]
}

function rejected({ x, y }: Point, half: number): DrawingItem[] {
  const out = half * 1.36
  const strikes = [-1, 1].flatMap((a) =>
    [-1, 1].map((b) =>
      pathThrough([
        { x: x + a * half * 0.98, y: y + b * half * 0.98 },
        { x: x + a * out, y: y + b * out },
      ]),
    ),
  )
  return [
    { kind: 'path', d: boxPath(x - half, y - half, x + half, y + half), stroke: 'reject-line', width: 1.6, fill: 'stop' },
    { kind: 'path', d: strikes.join(''), stroke: 'reject-line', width: 2, fill: null },
  ]
}

export interface BalloonShape {
  /** Without a number the outline alone is drawn, as beside its word in a list of what outlines mean. */
  number?: number
  state: JointMarkState
  at: Point
  /** Diameter of the ring (px). A diamond reaches a little further. */
  size: number
}

function shapeOf({ number, state, at, size }: BalloonShape): DrawingItem[] {
  const width = size >= 40 ? 2 : 1.8
  const r = size / 2 - width / 2
  const ring = (stroke: InkName | null, weight = width): DrawingItem => ({
    kind: 'path',
    d: circlePath(at, r),
    stroke,
    width: weight,
    fill: 'dye',
  })
  switch (state) {
    case 'open':
      return [ring(null), { kind: 'path', d: brokenRing(at, r), stroke: 'scribe', width, fill: null }]
    case 'tacked':
      return tacked(at, (size / 2) * (number === undefined ? 1 : 1.2))
    case 'finished':
      return [ring('scribe')]
    case 'accepted':
      return [
        ring('sound-line', width * 0.9),
        { kind: 'path', d: circlePath(at, r - Math.max(2.6, size * 0.075)), stroke: null, width: 0, fill: 'sound-fill' },
      ]
    case 'rejected':
      return rejected(at, size * (number === undefined ? 0.4 : 0.42))
  }
}

const NUMBER_INK: Record<JointMarkState, InkName> = {
  open: 'scribe',
  tacked: 'on-chalk',
  finished: 'scribe',
  accepted: 'on-stop',
  rejected: 'on-stop',
}

/** The balloon of a joint: its outline says how far the joint has come. */
export function balloonItems(shape: BalloonShape): DrawingItem[] {
  const { number, state, at, size } = shape
  if (number === undefined) return shapeOf(shape)
  const text = String(number)
  const type = size * (text.length > 2 ? 0.4 : 0.52)
  return [
    ...shapeOf(shape),
    {
      kind: 'text',
      x: at.x,
      y: at.y + type * 0.355,
      text,
      size: type,
      weight: 600,
      condensed: false,
      anchor: 'middle',
      ink: NUMBER_INK[state],
      halo: null,
    },
  ]
}

/** The line from a balloon to what it points at; nothing where it stands on it. */
export function leaderItems(state: JointMarkState, centre: Point, tip: Point | null, size: number): DrawingItem[] {
  if (tip === null) return []
  const distance = Math.hypot(tip.x - centre.x, tip.y - centre.y)
  const clear = size * (state === 'tacked' ? 0.64 : state === 'rejected' ? 0.6 : 0.52)
  if (distance <= clear + 6) return []
  const start: Point = {
    x: centre.x + ((tip.x - centre.x) * clear) / distance,
    y: centre.y + ((tip.y - centre.y) * clear) / distance,
  }
  const ink: InkName = state === 'tacked' ? 'tack-line' : state === 'rejected' ? 'reject-line' : 'scribe'
  return [
    { kind: 'path', d: pathThrough([start, tip]), stroke: ink, width: 1.2, fill: null },
    { kind: 'path', d: arrowHead(start, tip, 10, 3.2), stroke: null, width: 0, fill: ink },
  ]
}
