import {
  arrowHead,
  estimateTextWidth,
  hatch,
  pathThrough,
  type DrawingItem,
  type InkName,
  type PathItem,
  type Point,
} from '../chart/drawing'
import type { RamHeights } from './frame'

/** The hands of the draughtsman: lines that every elevation shares, as items of a drawing (px). */

const px = (value: number): string => String(Math.round(value * 100) / 100)

/** How a part's outline is drawn; one that hangs loose is chalked and dashed. */
export interface Pen {
  loose: boolean
}

export const HELD: Pen = { loose: false }

/** Outline of a part; filled with the ground, so that what lies behind it is hidden. */
export function outline(d: string, { loose }: Pen, fill: InkName | null = 'dye', width = 1.6): PathItem {
  return loose ? { kind: 'path', d, stroke: 'chalk', width: 2, fill, dash: '7 5' } : { kind: 'path', d, stroke: 'scribe', width, fill }
}

export const hair = (d: string): PathItem => ({ kind: 'path', d, stroke: 'faint-scribe', width: 1, fill: null, opacity: 0.75 })

export function centreLine(d: string, strong = false): PathItem {
  return {
    kind: 'path',
    d,
    stroke: strong ? 'faint-scribe' : 'ghost',
    width: strong ? 1.6 : 1,
    fill: null,
    dash: '14 4 3 4',
    opacity: strong ? 0.7 : 1,
  }
}

/** Path data of a rectangle between two corners. */
export const boxPath = (left: number, top: number, right: number, bottom: number): string =>
  `M${px(left)} ${px(top)}H${px(right)}V${px(bottom)}H${px(left)}Z`

export function hatched(left: number, top: number, right: number, bottom: number, spacing = 6): PathItem {
  const corners: Point[] = [
    { x: left, y: top },
    { x: right, y: top },
    { x: right, y: bottom },
    { x: left, y: bottom },
  ]
  return { kind: 'path', d: hatch(corners, spacing), stroke: 'faint-scribe', width: 1, fill: null, opacity: 0.55 }
}

export function ground(from: number, to: number, y: number): PathItem[] {
  const strokes: string[] = []
  for (let x = from; x < to - 4; x += 11) strokes.push(`M${px(x)} ${y + 10}L${px(x + 9)} ${y + 1}`)
  return [
    { kind: 'path', d: strokes.join(''), stroke: 'ghost', width: 1, fill: null, opacity: 0.8 },
    { kind: 'path', d: `M${px(from)} ${y}H${px(to)}`, stroke: 'faint-scribe', width: 1.6, fill: null, opacity: 0.8 },
  ]
}

const line = (d: string): PathItem => ({ kind: 'path', d, stroke: 'faint-scribe', width: 1.2, fill: null, opacity: 0.9 })
const arrows = (a: Point, b: Point): PathItem => ({
  kind: 'path',
  d: arrowHead(b, a, 9, 3) + arrowHead(a, b, 9, 3),
  stroke: null,
  width: 0,
  fill: 'faint-scribe',
})
const FIGURE = { kind: 'text', size: 16, weight: 400, condensed: true, anchor: 'middle', ink: 'faint-scribe', halo: null } as const

/** Half of the gap that a dimension figure needs in its line. */
export const halfFigure = (text: string): number => estimateTextWidth(text, 16, 400, true) / 2 + 4

/** A height; its figure breaks the line and reads from the right. */
export function upright(x: number, top: number, bottom: number, reach: number, text: string): DrawingItem[] {
  const middle = (top + bottom) / 2 - (bottom - top) * 0.175
  const half = halfFigure(text)
  return [
    {
      kind: 'path',
      d: `M${x - 5} ${top}H${px(reach)}M${x - 5} ${bottom}H${px(Math.max(x + 6, reach - 60))}`,
      stroke: 'ghost',
      width: 1.2,
      fill: null,
    },
    line(`M${x} ${top}V${px(middle - half)}M${x} ${px(middle + half)}V${bottom}`),
    arrows({ x, y: top }, { x, y: bottom }),
    { ...FIGURE, x: x + 5.5, y: middle, text, turned: -90 },
  ]
}

/** A width; its figure breaks the line. */
export function across(y: number, left: number, right: number, text: string): DrawingItem[] {
  const middle = (left + right) / 2
  const half = halfFigure(text)
  return [
    { kind: 'path', d: boxPath(middle - half, y - 10, middle + half, y + 10), stroke: null, width: 0, fill: 'dye' },
    line(`M${px(left)} ${px(y)}H${px(middle - half)}M${px(middle + half)} ${px(y)}H${px(right)}`),
    arrows({ x: left, y }, { x: right, y }),
    { ...FIGURE, x: middle, y: y + 5.5, text },
  ]
}

export interface Stack {
  cx: number
  /** Width that the parts are in proportion to. */
  span: number
  top: number
  bottom: number
  heights: RamHeights
}

/** Seat, cylinder, rod, adaptor, and the solid stack on its plate. */
export function ramStack({ cx, span, top, bottom, heights }: Stack, penOf: (part: 'seat' | 'ram' | 'adaptor') => Pen): DrawingItem[] {
  const box = (pen: Pen, share: number, from: number, to: number): PathItem => {
    const half = Math.round((span * share) / 2)
    return outline(boxPath(cx - half, from, cx + half, Math.max(from + 2, to)), pen)
  }
  const rod = Math.round((span * 0.073) / 2)
  const stack = Math.round((span * 0.171) / 2)
  const cylinder = Math.round((span * 0.155) / 2)
  const threads = Array.from({ length: 4 }, (_, index) => {
    const y = heights.rod - 2 - index * 4
    return pathThrough([
      { x: cx - rod, y },
      { x: cx + rod, y: y - 2 },
    ])
  }).join('')
  const ram = penOf('ram')
  return [
    box(penOf('seat'), 0.253, top, heights.seat),
    box(ram, 0.155, heights.seat, heights.cylinder),
    box(ram, 0.18, heights.seat, heights.flange),
    box(ram, 0.139, heights.cylinder, heights.nut),
    box(ram, 0.073, heights.nut, heights.rod),
    box(penOf('adaptor'), 0.114, heights.rod, heights.adaptor),
    box(HELD, 0.171, heights.adaptor, heights.stack),
    box(HELD, 0.45, heights.stack, bottom),
    hair(`${threads}M${cx - cylinder} ${heights.cylinder - 7}H${cx + cylinder}`),
    hatched(cx - stack, heights.adaptor, cx + stack, heights.stack),
  ]
}
