import { circlePath, type DrawingItem } from '../chart/drawing'
import { boxPath, centreLine, ground, hair, HELD, outline, ramStack, type Pen } from './drafting'
import { ramHeights, type FramePart } from './frame'
import type { Portal } from './portal-geometry'

type PenOf = (part: FramePart) => Pen

const lines = (x: number, post: number, spans: readonly [number, number][]): string =>
  spans.map(([a, b]) => `M${x - post} ${a}V${b}M${x + post} ${a}V${b}`).join('')

/** Channels standing on the floor, with the flange's hidden edge; or round posts. */
function uprights(portal: Portal, penOf: PenOf): DrawingItem[] {
  const { left, right, post, top, floor, headTop, headBottom, bedTop, bedBottom, kind } = portal
  const foot = kind === 'h-frame' ? floor - 8 : floor - 12
  const spans: [number, number][] =
    kind === 'bench'
      ? [[headBottom, bedTop]]
      : [
          [headBottom, bedTop],
          [bedBottom, foot],
        ]
  const inset = Math.max(3, post * 0.24)
  return (['left', 'right'] as const).flatMap((side) => {
    const x = side === 'left' ? left : right
    const pen = penOf(`upright-${side}`)
    const cap = kind === 'four-post' ? '' : `M${x - post} ${headTop}V${top}H${x + post}V${headTop}`
    const edges = lines(x, post, spans)
    return [outline(edges + cap, pen, null), hair(kind === 'four-post' ? edges : lines(x, post - inset, spans))]
  })
}

function nuts({ left, right, post, headTop, headBottom, bedTop, bedBottom }: Portal): DrawingItem[] {
  const front = [left, right].flatMap((x) =>
    [headTop - 11, headBottom, bedTop - 11, bedBottom].flatMap((y): DrawingItem[] => [
      outline(boxPath(x - post * 1.7, y, x + post * 1.7, y + 11), HELD),
      outline(`M${x - post * 0.7} ${y}v11M${x + post * 0.7} ${y}v11`, HELD, null, 1),
    ]),
  )
  const back = [left + post * 4.6, right - post * 4.6].map((x): DrawingItem => ({
    ...outline(boxPath(x - post * 1.4, headTop - 8, x + post * 1.4, headTop), HELD, null, 1.2),
    opacity: 0.65,
  }))
  return [...front, ...back]
}

/** Every hole at its pitch; the ones the bed is pinned in stand out with their centre lines. */
function holes({ left, right, holes: empty, pin }: Portal): DrawingItem[] {
  const small = [left, right].flatMap((x) =>
    empty.flatMap((y): DrawingItem[] => [
      { kind: 'path', d: circlePath({ x, y }, 4.6), stroke: 'faint-scribe', width: 1.1, fill: null, opacity: 0.9 },
      { kind: 'path', d: `M${x - 7.5} ${y}h15`, stroke: 'faint-scribe', width: 0.8, fill: null, opacity: 0.9 },
    ]),
  )
  const pinned = [left, right].flatMap((x): DrawingItem[] => [
    { kind: 'path', d: circlePath({ x, y: pin }, 6), stroke: 'scribe', width: 1.8, fill: null },
    { kind: 'path', d: `M${x - 14} ${pin}h28M${x} ${pin - 14}v28`, stroke: 'scribe', width: 1, fill: null },
  ])
  return [...small, ...pinned]
}

function beams({ cx, headHalf, headTop, headBottom, bedHalf, bedTop, bedBottom, span }: Portal, penOf: PenOf): DrawingItem[] {
  const flange = Math.max(3, Math.round((headBottom - headTop) * 0.075))
  const rib = Math.round(span * 0.151)
  const rail = (half: number, y: number): string => `M${cx - half} ${y}H${cx + half}`
  const stiffener = (x: number, pen: Pen): DrawingItem => outline(boxPath(x - 2, bedTop + 4, x + 2, bedBottom - 4), pen, 'dye', 1.2)
  return [
    outline(boxPath(cx - headHalf, headTop, cx + headHalf, headBottom), penOf('head')),
    outline(boxPath(cx - bedHalf, bedTop, cx + bedHalf, bedBottom), penOf('bed')),
    stiffener(cx - rib, penOf('stiffener-left')),
    stiffener(cx + rib, penOf('stiffener-right')),
    hair(
      rail(headHalf, headTop + flange) +
        rail(headHalf, headBottom - flange) +
        rail(bedHalf, bedTop + flange) +
        rail(bedHalf, bedBottom - flange),
    ),
  ]
}

function feet({ cx, left, right, post, floor, span, kind, top }: Portal, penOf: PenOf): DrawingItem[] {
  const half = Math.round(span * (kind === 'four-post' ? 0.13 : 0.225))
  const plate = kind === 'four-post' ? 12 : 8
  const rise = Math.min(57, (floor - top) * 0.105)
  return [left, right].flatMap((x): DrawingItem[] => {
    const out = x < cx ? -1 : 1
    const pen = penOf(x < cx ? 'foot-left' : 'foot-right')
    const middle = x + out * 2
    const gusset = `M${x + out * post} ${floor - plate - rise}L${x + out * (post + rise * 0.55)} ${floor - plate}`
    const base = outline(boxPath(middle - half, floor - plate, middle + half, floor), pen)
    return kind === 'h-frame' ? [base, outline(gusset, pen, null)] : [base]
  })
}

/** What a bench press stands on. */
function pads({ cx, bedHalf, bedBottom, floor, span }: Portal): DrawingItem[] {
  const wide = Math.round(span * 0.1)
  return [cx - bedHalf, cx + bedHalf - wide].map((x) => outline(boxPath(x, bedBottom, x + wide, floor), HELD))
}

/** Two uprights, a head and a bed: H-frame, four-post or bench press, each with its own feet and fixings. */
export function portalItems(portal: Portal, penOf: PenOf): DrawingItem[] {
  const { cx, left, right, top, floor, headBottom, bedTop, bedHalf, kind, box } = portal
  return [
    ...ground(Math.max(4, cx - bedHalf - 54), Math.min(box.width - 4, cx + bedHalf + 54), floor),
    ...uprights(portal, penOf),
    ...(kind === 'bench' ? pads(portal) : feet(portal, penOf)),
    ...beams(portal, penOf),
    ...(kind === 'four-post' ? nuts(portal) : []),
    ...ramStack({ cx, span: portal.span, top: headBottom, bottom: bedTop, heights: ramHeights(portal) }, penOf),
    centreLine(`M${left} ${top - 18}V${floor + 14}M${right} ${top - 18}V${floor + 14}`),
    centreLine(`M${cx} ${top - 28}V${floor + 14}`, true),
    ...(kind === 'h-frame' ? holes(portal) : []),
  ]
}
