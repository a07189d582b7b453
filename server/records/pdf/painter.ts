import type { Drawing, DrawingItem, InkName, PathItem, TextItem } from '#shared/chart/drawing'
import { textPath } from '../text-paths'
import type { Paper } from './paper'

/** Paints a drawing as vectors, inked on white: what is dye blue on a screen would drown a printer. */

export interface Placed {
  x: number
  y: number
  /** pt for one px of the drawing. */
  scale: number
}

export type Inks = Record<InkName, string>

function path(doc: PDFKit.PDFDocument, item: PathItem, inks: Inks): void {
  if (item.d === '' || (item.stroke === null && item.fill === null)) return
  doc.save()
  if (item.opacity !== undefined) doc.opacity(item.opacity)
  doc.path(item.d).lineWidth(item.width).lineJoin('miter')
  if (item.dash !== undefined) {
    const lengths = item.dash.split(/[ ,]+/).map(Number)
    doc.dash(lengths as unknown as number, {})
  }
  if (item.fill !== null && item.stroke !== null) doc.fillAndStroke(inks[item.fill], inks[item.stroke])
  else if (item.fill !== null) doc.fill(inks[item.fill])
  else if (item.stroke !== null) doc.stroke(inks[item.stroke])
  doc.restore()
}

function words(paper: Paper, item: TextItem, inks: Inks): void {
  const { doc, type } = paper
  const style = { size: item.size, weight: item.weight, family: item.condensed ? 'condensed' : 'sans', ink: inks[item.ink] } as const
  const width = type.width(item.text, style)
  const x = item.anchor === 'start' ? item.x : item.anchor === 'end' ? item.x - width : item.x - width / 2
  doc.save()
  if (item.turned !== undefined) doc.rotate(item.turned, { origin: [item.x, item.y] })
  // The white round the letters is drawn as outlines: set as words, a search would find everything twice.
  if (item.halo !== null) doc.path(textPath(item)).lineWidth(5).lineJoin('round').undash().stroke(inks[item.halo])
  type.set(item.text, x, item.y, style)
  doc.restore()
}

function item(paper: Paper, one: DrawingItem, inks: Inks): void {
  if (one.kind === 'path') path(paper.doc, one, inks)
  else words(paper, one, inks)
}

/** Paints a drawing at its place, as one figure that `alt` describes. */
export function paintDrawing(paper: Paper, drawing: Drawing, { x, y, scale }: Placed, inks: Inks, alt: string): void {
  paper.tag(
    'Figure',
    () => {
      paper.doc.save()
      paper.doc.translate(x, y).scale(scale)
      for (const one of drawing.items) item(paper, one, inks)
      paper.doc.restore()
    },
    { alt },
  )
}
