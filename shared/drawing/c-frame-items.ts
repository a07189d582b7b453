import type { DrawingItem } from '../chart/drawing'
import type { CFrame } from './c-frame-geometry'
import { boxPath, centreLine, ground, hair, outline, ramStack, type Pen } from './drafting'
import { ramHeights, type FramePart } from './frame'

/** The plate of the C with its rounded throat, its web, and its foot. Arms and column are one outline while nothing hangs loose. */
export function cFrameItems(frame: CFrame, penOf: (part: FramePart) => Pen): DrawingItem[] {
  const { axis, nose, column, back, top, floor, headBottom, bedTop, bedBottom, box } = frame
  const r = Math.min(22, (bedTop - headBottom) / 6)
  const joined = [
    `M${nose} ${top + 14}L${nose + 14} ${top}H${back}V${floor - 10}H${column - 10}V${bedBottom + 26}`,
    `L${column - 36} ${bedBottom}H${nose}V${bedTop}H${column - r}A${r} ${r} 0 0 0 ${column} ${bedTop - r}`,
    `V${headBottom + r}A${r} ${r} 0 0 0 ${column - r} ${headBottom}H${nose}Z`,
  ].join('')
  const head = `M${nose} ${top + 14}L${nose + 14} ${top}H${column}V${headBottom}H${nose}Z`
  const bed = `M${nose} ${bedTop}H${column}V${bedBottom + 26}H${column - 10}L${column - 36} ${bedBottom}H${nose}Z`
  const post = boxPath(column, top, back, floor - 10)
  const apart = (['head', 'bed', 'upright-left'] as const).some((part) => penOf(part).loose)
  const plate = apart
    ? [outline(post, penOf('upright-left')), outline(head, penOf('head')), outline(bed, penOf('bed'))]
    : [outline(joined, penOf('head'))]
  return [
    ...ground(Math.max(4, nose - 44), Math.min(box.width - 4, back + 44), floor),
    ...plate,
    outline(boxPath(nose + 16, bedTop + 5, nose + 20, bedBottom - 5), penOf('stiffener-left'), 'dye', 1.2),
    outline(boxPath(column + 12, headBottom + r, column + 16, bedTop - r), penOf('stiffener-right'), 'dye', 1.2),
    outline(boxPath(nose + 6, floor - 10, back + 16, floor), penOf('foot-left')),
    ...(apart
      ? []
      : [
          hair(
            [
              `M${nose} ${headBottom - 5}H${column - r}A${r + 5} ${r + 5} 0 0 1 ${column + 5} ${headBottom + r}`,
              `V${bedTop - r}A${r + 5} ${r + 5} 0 0 1 ${column - r} ${bedTop + 5}H${nose}`,
              `M${back - 6} ${top}V${floor - 10}M${nose} ${bedBottom - 5}H${column - 38}`,
            ].join(''),
          ),
        ]),
    ...ramStack({ cx: axis, span: frame.span, top: headBottom, bottom: bedTop, heights: ramHeights(frame) }, penOf),
    centreLine(`M${axis} ${top - 24}V${floor + 12}`, true),
    centreLine(`M${(column + back) / 2} ${top - 14}V${floor + 12}`),
  ]
}
