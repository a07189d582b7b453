import type { DecisionMark } from '#shared/proof-test/record-stages'
import type { Notice, StandingMark, VerdictMark } from '#shared/proof-test/record-words'
import { GRAPHITE, INK, SOUND, STOP } from './typesetter'

/** The shapes that stand beside a decision, a verdict or a state, on white paper: the same as on the screen. */
export type PaperMark = DecisionMark | StandingMark | VerdictMark | Notice['mark']

interface Stroke {
  d: string
  stroke?: string
  fill?: string
  weight?: number
}

const circle = (radius: number): string =>
  `M${12 - radius} 12A${radius} ${radius} 0 1 1 ${12 + radius} 12A${radius} ${radius} 0 1 1 ${12 - radius} 12Z`
const OCTAGON = 'M7.4 1L16.6 1L23 7.4L23 16.6L16.6 23L7.4 23L1 16.6L1 7.4Z'
const BOX = 'M3.6 3.6L20.4 3.6L20.4 20.4L3.6 20.4Z'
const STOPPED: Stroke[] = [
  { d: OCTAGON, fill: '#a00d17', stroke: STOP },
  { d: 'M6.2 10L17.8 10L17.8 14L6.2 14Z', fill: '#ffffff' },
]
const NOT_READ: Stroke[] = [{ d: BOX, stroke: GRAPHITE, weight: 1.6 }]

const SHAPES: Record<PaperMark, readonly Stroke[]> = {
  'go-on': [{ d: 'M12 1.7L23 21.6L1 21.6Z', stroke: INK }],
  wait: [{ d: 'M4.2 3.2L9.1 3.2L9.1 20.8L4.2 20.8ZM14.9 3.2L19.8 3.2L19.8 20.8L14.9 20.8Z', fill: INK }],
  stop: STOPPED,
  beyond: STOPPED,
  undecided: [
    { d: BOX, stroke: INK },
    { d: 'M4 20.4L4 4L20.4 20.4Z', fill: INK },
  ],
  within: [
    { d: circle(11), stroke: SOUND },
    { d: 'M7.2 12.4L10.8 16L17 8.4', stroke: SOUND, weight: 2.2 },
  ],
  now: [{ d: 'M2 1.4L23 12L2 22.6Z', fill: INK }],
  'under-way': [{ d: 'M3 2.4L22.4 12L3 21.6Z', fill: INK }],
  'to-come': NOT_READ,
  'not-read': NOT_READ,
  abandoned: [
    { d: circle(10.6), stroke: INK },
    { d: 'M4.6 19.4L19.4 4.6', stroke: INK },
  ],
  'to-countersign': [
    { d: 'M3.1 20.9L7.8 8.6L15.3 4.5L19.5 8.7L15.4 16.2Z', stroke: INK, weight: 1.7 },
    { d: 'M3.1 20.9L10.2 13.8', stroke: INK, weight: 1.7 },
    { d: 'M15.4 1.7L22.3 8.6L20.1 10.8L13.2 3.9Z', fill: INK },
  ],
}

/** Draws a mark with its top left corner at x, y, `size` pt wide. */
export function drawMark(doc: PDFKit.PDFDocument, name: PaperMark, x: number, y: number, size: number): void {
  const weight = size >= 40 ? 1.1 : 2
  doc.save()
  doc.translate(x, y).scale(size / 24)
  for (const { d, stroke, fill, weight: own } of SHAPES[name]) {
    doc.path(d).undash().lineJoin('miter')
    const width = ((own ?? 2) * weight) / 2
    if (fill !== undefined && stroke !== undefined) doc.lineWidth(width).fillAndStroke(fill, stroke)
    else if (fill !== undefined) doc.fill(fill)
    else doc.lineWidth(width).stroke(stroke ?? INK)
  }
  doc.restore()
}
