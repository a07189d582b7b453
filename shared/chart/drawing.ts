/**
 * A drawing as a list of plain shapes in px, each with the name of its colour. The screen paints them with custom
 * properties, the server with fixed values: both show the same picture.
 */

/** Names of the colours a drawing uses; both ends own a palette with exactly these. */
export type InkName =
  | 'dye'
  | 'scribe'
  | 'faint-scribe'
  | 'ghost'
  | 'chalk'
  | 'stop'
  | 'stop-line'
  | 'stop-text'
  | 'sound-line'
  | 'on-stop'
  | 'on-chalk'
  | 'sound-fill'
  | 'tack-line'
  | 'reject-line'

export interface Point {
  x: number
  y: number
}

export interface PathItem {
  kind: 'path'
  /** SVG path data, absolute px. */
  d: string
  stroke: InkName | null
  width: number
  fill: InkName | null
  dash?: string
  opacity?: number
}

export interface TextItem {
  kind: 'text'
  x: number
  /** Base line. */
  y: number
  text: string
  size: number
  weight: 400 | 500 | 600
  condensed: boolean
  anchor: 'start' | 'middle' | 'end'
  ink: InkName
  /** A stroke of the ground's colour under the letters, so that lines break where words lie on them. */
  halo: InkName | null
  /** Turned about x, y (degrees, clockwise). */
  turned?: number
}

export type DrawingItem = PathItem | TextItem

export interface Drawing {
  width: number
  height: number
  items: DrawingItem[]
}

const round = (value: number): string => String(Math.round(value * 100) / 100)

/** Path data through the given points (px); closed when asked. */
export function pathThrough(points: readonly Point[], closed = false): string {
  const [first, ...rest] = points
  if (first === undefined) return ''
  const line = rest.map((point) => `L${round(point.x)} ${round(point.y)}`).join('')
  return `M${round(first.x)} ${round(first.y)}${line}${closed ? 'Z' : ''}`
}

/** Path data of a full circle (px). */
export function circlePath(centre: Point, radius: number): string {
  const { x, y } = centre
  const r = round(radius)
  return `M${round(x - radius)} ${round(y)}A${r} ${r} 0 1 1 ${round(x + radius)} ${round(y)}A${r} ${r} 0 1 1 ${round(x - radius)} ${round(y)}Z`
}

/** Path data of a filled arrow head (px) whose point lies on `tip`, coming from `from`. */
export function arrowHead(from: Point, tip: Point, length = 10, halfWidth = 3.4): string {
  const distance = Math.hypot(tip.x - from.x, tip.y - from.y)
  if (distance === 0) return ''
  const ux = (tip.x - from.x) / distance
  const uy = (tip.y - from.y) / distance
  const base = { x: tip.x - ux * length, y: tip.y - uy * length }
  return pathThrough(
    [tip, { x: base.x - uy * halfWidth, y: base.y + ux * halfWidth }, { x: base.x + uy * halfWidth, y: base.y - ux * halfWidth }],
    true,
  )
}

/**
 * Parallel strokes at 45°, rising to the right, cut to a convex polygon. Coordinates and spacing in px; the spacing
 * is measured across the strokes. Returns path data, empty for a polygon without area.
 */
export function hatch(polygon: readonly Point[], spacing: number): string {
  if (polygon.length < 3) return ''
  // Along a stroke x + y is constant (the y axis points down), so each stroke is one value of that sum.
  const sums = polygon.map((point) => point.x + point.y)
  const step = spacing * Math.SQRT2
  const first = Math.ceil(Math.min(...sums) / step) * step
  const last = Math.max(...sums)
  const strokes: string[] = []
  for (let sum = first; sum < last; sum += step) {
    const cuts: Point[] = []
    polygon.forEach((a, index) => {
      const b = polygon[(index + 1) % polygon.length]
      if (b === undefined) return
      const sa = a.x + a.y - sum
      const sb = b.x + b.y - sum
      if (sa > 0 === sb > 0) return
      const t = sa / (sa - sb)
      cuts.push({ x: a.x + (b.x - a.x) * t, y: a.y + (b.y - a.y) * t })
    })
    const [a, b] = cuts
    if (a !== undefined && b !== undefined && Math.hypot(a.x - b.x, a.y - b.y) > 1) strokes.push(pathThrough([a, b]))
  }
  return strokes.join('')
}

/**
 * Width of a text in px, estimated from classes of letters of IBM Plex Sans and its Condensed cut; within about 6 %.
 * Only for keeping words apart from lines: nothing is measured with it. Advances: common practice, no source.
 */
export function estimateTextWidth(text: string, size: number, weight: 400 | 500 | 600, condensed: boolean): number {
  let em = 0
  for (const letter of text) {
    if (letter === '\u202f' || letter === '\u2009') em += 0.2
    else if (/[ .,:;'’|il!]/.test(letter)) em += 0.28
    else if (/[fjrt()-]/.test(letter)) em += 0.38
    else if (/[mwMW%]/.test(letter)) em += 0.88
    else em += 0.6
  }
  const cut = condensed ? 0.87 : 1
  const heavier = weight === 600 ? 1.04 : weight === 500 ? 1.02 : 1
  return em * size * cut * heavier
}
