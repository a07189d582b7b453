import { Resvg } from '@resvg/resvg-js'
import type { Drawing, DrawingItem, InkName } from '#shared/chart/drawing'
import { lineDrawing } from '#shared/chart/line-geometry'
import { recordLine } from '#shared/chart/record-line'
import type { ClimbEvaluation } from '#shared/proof-test/evaluate-climb'
import type { Opened } from '#shared/proof-test/entries'
import type { ProofTestState } from '#shared/proof-test/state'
import { textPath } from './text-paths'

/** The light palette of the screen: a record on paper has no dark one. */
const inks: Record<InkName, string> = {
  dye: '#142a66',
  scribe: '#f2f6fc',
  'faint-scribe': '#c4d1ec',
  ghost: '#5b74b8',
  chalk: '#f6de5a',
  stop: '#a00d17',
  'stop-line': '#ff8a80',
  'stop-text': '#ffb8b0',
  'sound-line': '#9be3c3',
  'on-stop': '#ffffff',
  'on-chalk': '#0b1733',
  'sound-fill': '#0f5c46',
  'tack-line': '#f6de5a',
  'reject-line': '#ff8a80',
}

const paint = (ink: InkName | null): string => (ink === null ? 'none' : inks[ink])

function svgOf(item: DrawingItem): string {
  if (item.kind === 'path') {
    const dash = item.dash === undefined ? '' : ` stroke-dasharray="${item.dash}"`
    const opacity = item.opacity === undefined ? '' : ` opacity="${item.opacity}"`
    return `<path d="${item.d}" fill="${paint(item.fill)}" stroke="${paint(item.stroke)}" stroke-width="${item.width}"${dash}${opacity}/>`
  }
  const d = textPath(item)
  const halo =
    item.halo === null ? '' : `<path d="${d}" fill="none" stroke="${paint(item.halo)}" stroke-width="5" stroke-linejoin="round"/>`
  const letters = `${halo}<path d="${d}" fill="${paint(item.ink)}"/>`
  return item.turned === undefined ? letters : `<g transform="rotate(${item.turned} ${item.x} ${item.y})">${letters}</g>`
}

/** A drawing as SVG without any text element: it looks the same wherever it is rendered. */
export function drawingSvg(drawing: Drawing): string {
  const { width, height, items } = drawing
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" width="${width}" height="${height}" viewBox="0 0 ${width} ${height}">`,
    `<rect width="${width}" height="${height}" fill="${inks.dye}"/>`,
    ...items.map(svgOf),
    '</svg>',
  ].join('')
}

export interface ChartPicture {
  png: Buffer
  /** px on the sheet; the picture itself has twice as many, so that it prints sharp. */
  width: number
  height: number
}

const SIZE = { width: 640, height: 536 }

/** The line of one leg as PNG; null before a stage was read. */
export function chartPicture(
  opened: Opened,
  climbs: readonly ClimbEvaluation[],
  state: Pick<ProofTestState, 'corrections'>,
): ChartPicture | null {
  const spec = recordLine(opened, climbs, SIZE, state)
  if (spec === null) return null
  const svg = drawingSvg(lineDrawing(spec))
  const png = new Resvg(svg, { fitTo: { mode: 'zoom', value: 2 }, font: { loadSystemFonts: false } }).render().asPng()
  return { png, ...SIZE }
}
