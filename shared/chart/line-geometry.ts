import { arrowHead, circlePath, estimateTextWidth, hatch, pathThrough } from './drawing'
import type { Drawing, DrawingItem, InkName, Point, TextItem } from './drawing'
import { bandEdges, cutAtFrame, lineFrame } from './line-frame'
import type { LineFrame } from './line-frame'
import { layOutNotes } from './line-notes'
import type { PlacedNote } from './line-notes'
import type { LineChartSpec, LineNote } from './line-spec'
import { multiples } from './ticks'

export { loadScale, topOfScale } from './line-frame'
export type { LoadScale } from './line-frame'
export type { LineChartSpec, LineNote, LinePoint, LinePrediction, LineStage } from './line-spec'

function textItem(
  x: number,
  y: number,
  text: string,
  ink: InkName,
  style: Partial<Omit<TextItem, 'kind' | 'x' | 'y' | 'text' | 'ink'>> = {},
): TextItem {
  return { kind: 'text', x, y, text, ink, size: 16, weight: 400, condensed: false, anchor: 'start', halo: null, ...style }
}

function strokeItem(d: string, stroke: InkName, width: number, more: { dash?: string; opacity?: number } = {}): DrawingItem {
  return { kind: 'path', d, stroke, width, fill: null, ...more }
}

function fillItem(d: string, fill: InkName): DrawingItem {
  return { kind: 'path', d, stroke: null, width: 0, fill }
}

function axes(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  const items: DrawingItem[] = []
  const alone = spec.setting === 'alone'
  const small = alone ? 14 : 16
  items.push(strokeItem(`M${frame.left} ${frame.ceiling - 4}V${frame.zero}`, 'scribe', 1.6))
  items.push(strokeItem(`M${frame.left} ${frame.zero}H${frame.right}`, 'scribe', 1.6))
  const major = new Set(frame.axis.labels)
  for (const value of multiples(frame.axis.minorStep, 0, frame.axis.max)) {
    const tall = major.has(value)
    const x = Math.round(frame.x(value) * 2) / 2
    items.push(strokeItem(`M${x} ${frame.zero}v${tall ? 9 : 5}`, 'scribe', tall ? 1.4 : 1, tall ? {} : { opacity: 0.8 }))
  }
  for (const value of frame.axis.labels) {
    items.push(
      textItem(frame.x(value), frame.zero + (alone ? 26 : 26), value.toFixed(frame.axis.decimals), 'faint-scribe', {
        size: small,
        anchor: 'middle',
      }),
    )
  }
  if (spec.footnote !== undefined && alone)
    items.push(textItem(24, frame.zero + 46, spec.footnote, 'scribe', { size: 14, condensed: true }))
  const words = `${spec.xLabel}, ${spec.xUnit}`
  if (alone) items.push(textItem(frame.right, frame.zero + 46, words, 'faint-scribe', { size: 14, condensed: true, anchor: 'end' }))
  else items.push(...figureBelow(words, spec.width, frame))
  return items
}

/** What deflects, under the axis: from the axis on where it fits, else smaller from the edge, else in two lines. */
function figureBelow(words: string, width: number, frame: LineFrame): DrawingItem[] {
  const fits = (text: string, size: number, from: number) => from + estimateTextWidth(text, size, 400, true) <= width - 8
  if (width >= 300 && fits(words, 16, frame.left))
    return [textItem(frame.left, frame.zero + 54, words, 'faint-scribe', { condensed: true, size: 16 })]
  const style = { condensed: true, size: 14 }
  const half = words.lastIndexOf(' ', Math.ceil(words.length / 2))
  if (half < 0 || fits(words, 14, 12)) return [textItem(12, frame.zero + 54, words, 'faint-scribe', style)]
  return [words.slice(0, half), words.slice(half + 1)].map((line, index) =>
    textItem(12, frame.zero + 44 + index * 16, line, 'faint-scribe', style),
  )
}

/** A load beside its stage, in one line where it has room before the axis, else with its unit below it. */
function stageLoad(load: string, y: number, until: number): DrawingItem[] {
  const style = { size: 14, condensed: true }
  const [figure = '', ...unit] = load.split(' ')
  if (unit.length === 0 || 104 + estimateTextWidth(load, 14, 400, true) <= until) return [textItem(104, y + 5, load, 'faint-scribe', style)]
  return [
    textItem(104, y + 5, figure, 'faint-scribe', style),
    textItem(until - 3, y + 22, unit.join(' '), 'faint-scribe', { ...style, anchor: 'end' }),
  ]
}

function stageGuides(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  const items: DrawingItem[] = []
  for (const stage of spec.stages) {
    const y = Math.round(frame.y(stage.percent)) + 0.5
    const from = spec.setting === 'alone' ? Math.max(frame.left - 18, 0) : frame.left + 3
    if (stage.percent > 0) items.push(strokeItem(`M${from} ${y}H${frame.right}`, 'ghost', 1.6, { dash: '2 5', opacity: 0.8 }))
    if (spec.setting !== 'alone') continue
    items.push(textItem(47, y + 5, stage.label, 'scribe', { size: 16, weight: 600 }))
    if (stage.load !== undefined) items.push(...stageLoad(stage.load, y, frame.left - 3))
  }
  return items
}

function band(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  const edges = bandEdges(spec, frame)
  if (edges === null) return []
  const [origin, lowEnd] = edges.low
  const highEnd = edges.high[1]
  const corner = highEnd.y > lowEnd.y ? [{ x: highEnd.x, y: lowEnd.y }] : []
  return [
    strokeItem(hatch([origin, lowEnd, ...corner, highEnd], 10), 'ghost', 1, { opacity: 0.75 }),
    strokeItem(pathThrough(edges.low), 'faint-scribe', 1),
    strokeItem(pathThrough(edges.high), 'faint-scribe', 1),
  ]
}

/** The old line beside the new: thin, with hollow readings, and named under the title. */
function earlier({ earlier: old, setting, width }: LineChartSpec, frame: LineFrame): DrawingItem[] {
  if (old === undefined || old.points.length < 2) return []
  const at = old.points.map((point) => ({ x: frame.x(point.x), y: frame.y(point.y) }))
  const alone = setting === 'alone'
  const left = alone ? 24 : frame.left + 8
  const foot = alone ? 52 : frame.ceiling - 2
  const reading = (point: Point): DrawingItem => ({
    kind: 'path',
    d: circlePath(point, 3),
    stroke: 'faint-scribe',
    width: 1.2,
    fill: 'dye',
  })
  return [
    strokeItem(pathThrough(at), 'faint-scribe', 1),
    ...at.slice(1).map(reading),
    strokeItem(`M${left} ${foot - 5}h22`, 'faint-scribe', 1),
    reading({ x: left + 11, y: foot - 5 }),
    textItem(left + 30, foot, old.label, 'faint-scribe', { size: width < 300 ? 14 : 16, condensed: true, halo: 'dye' }),
  ]
}

/** The line through the readings, and beyond them the fit, dashed. A step that calls for a stop is drawn in red. */
function line(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  const items: DrawingItem[] = []
  if (spec.comparison !== undefined && spec.comparison.length > 1) {
    const path = pathThrough(spec.comparison.map((point) => ({ x: frame.x(point.x), y: frame.y(point.y) })))
    items.push(strokeItem(path, 'faint-scribe', 1.4, { dash: '3 4' }))
  }
  const trusted = spec.points.filter((point) => point.mark !== 'stop')
  const last = trusted[trusted.length - 1]
  if (spec.fit !== null && last !== undefined) {
    const [, end] = cutAtFrame(frame, spec.fit.intercept, spec.fit.slope)
    const start = { x: frame.x(spec.fit.intercept + spec.fit.slope * last.y), y: frame.y(last.y) }
    if (end.y < start.y) items.push(strokeItem(pathThrough([start, end]), 'scribe', 1.8, { dash: '9 5' }))
  }
  spec.points.forEach((point, index) => {
    const before = spec.points[index - 1]
    if (before === undefined) return
    const path = pathThrough([
      { x: frame.x(before.x), y: frame.y(before.y) },
      { x: frame.x(point.x), y: frame.y(point.y) },
    ])
    items.push(strokeItem(path, point.mark === 'stop' ? 'stop-line' : 'scribe', point.mark === 'stop' ? 2.2 : 1.8))
  })
  return items
}

/** Uncertainty bars to scale, never less than 3 px to each side, with the point on them. */
function readings(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  const items: DrawingItem[] = []
  for (const point of spec.points) {
    const x = frame.x(point.x)
    const y = frame.y(point.y)
    if (point.x === 0 && point.y === 0) {
      items.push(fillItem(circlePath({ x, y }, 4), 'scribe'))
      continue
    }
    const dx = Math.max(3, frame.x(point.ux) - frame.left)
    const dy = Math.max(3, frame.zero - frame.y(point.uy))
    items.push(
      strokeItem(`M${x - 6.5} ${y - dy}h13M${x - 6.5} ${y + dy}h13M${x} ${y - dy}V${y + dy}`, 'scribe', 1.6),
      strokeItem(`M${x - dx} ${y}H${x + dx}${dx > 5 ? `M${x - dx} ${y - 3}v6M${x + dx} ${y - 3}v6` : ''}`, 'scribe', 1.6),
      fillItem(circlePath({ x, y }, 3), 'scribe'),
    )
  }
  const set = spec.setPoint
  if (set !== undefined) {
    const x = frame.x(set.x)
    const dx = Math.max(3, frame.x(set.ux) - frame.left)
    items.push(strokeItem(`M${x - dx} ${frame.zero}H${x + dx}`, 'scribe', 1.6))
    items.push({ kind: 'path', d: circlePath({ x, y: frame.zero }, 4), stroke: 'scribe', width: 1.6, fill: 'dye' })
  }
  return items
}

/** The letters of its corrections at the lower right of a reading, where neither line nor bar runs. */
function corrections(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  const set = spec.setPoint === undefined ? [] : [{ ...spec.setPoint, y: 0 }]
  return [...spec.points, ...(spec.comparison ?? []), ...set].flatMap(({ x, y, corrected }) =>
    corrected === undefined
      ? []
      : [textItem(frame.x(x) + 9, frame.y(y) + (y > 0 ? 17 : -8), corrected, 'scribe', { size: 16, weight: 600, halo: 'dye' })],
  )
}

/** An octagon with a bar, in the middle of the step that calls for a stop. */
function stopMarks(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  return spec.points.flatMap((point, index) => {
    const before = spec.points[index - 1]
    if (point.mark !== 'stop' || before === undefined) return []
    const x = (frame.x(point.x) + frame.x(before.x)) / 2
    const y = (frame.y(point.y) + frame.y(before.y)) / 2
    const corners = Array.from({ length: 8 }, (_, corner) => {
      const angle = ((corner + 0.5) * Math.PI) / 4
      return { x: x + 9 * Math.cos(angle), y: y + 9 * Math.sin(angle) }
    })
    return [
      { kind: 'path', d: pathThrough(corners, true), stroke: 'stop-line', width: 1.6, fill: 'stop' },
      fillItem(`M${x - 4.5} ${y - 1.6}h9v3.2h-9Z`, 'on-stop'),
    ] satisfies DrawingItem[]
  })
}

function prediction(spec: LineChartSpec, frame: LineFrame): DrawingItem[] {
  const next = spec.prediction
  if (next === null) return []
  const ink: InkName = next.tone === 'scribe' ? 'scribe' : 'chalk'
  const y = frame.y(next.y)
  const from = frame.x(next.from)
  const to = frame.x(next.to)
  const items: DrawingItem[] = [strokeItem(`M${from} ${y - 10}v20M${to} ${y - 10}v20M${from} ${y}H${to}`, ink, 2)]
  if (ink === 'chalk') items.push({ kind: 'path', d: circlePath({ x: (from + to) / 2, y }, 4.6), stroke: 'chalk', width: 2, fill: 'dye' })
  return items
}

const LEADER: Record<LineNote['tone'], { words: InkName; line: InkName; rest: InkName }> = {
  scribe: { words: 'scribe', line: 'scribe', rest: 'faint-scribe' },
  chalk: { words: 'chalk', line: 'chalk', rest: 'chalk' },
  stop: { words: 'stop-text', line: 'stop-line', rest: 'scribe' },
}

function noteItems(note: PlacedNote): DrawingItem[] {
  const ink = LEADER[note.tone]
  const items: DrawingItem[] = []
  const [, elbow] = note.leader
  const tip = note.leader[note.leader.length - 1]
  items.push(strokeItem(pathThrough(note.leader), ink.line, 1.2))
  if (elbow !== undefined && tip !== undefined) {
    const from = note.leader[note.leader.length - 2] ?? elbow
    items.push(fillItem(arrowHead(from, tip), ink.line))
  }
  for (const row of note.rows) {
    items.push(
      textItem(row.x, row.y, row.text, row.strong ? ink.words : ink.rest, {
        size: row.size,
        weight: row.weight,
        condensed: true,
        anchor: note.anchor,
        halo: 'dye',
      }),
    )
  }
  if (note.markAt !== null) items.push(...noteMark(note.markAt, note.mark))
  return items
}

function noteMark(at: Point, mark: 'wait' | 'stop'): DrawingItem[] {
  if (mark === 'wait') return [fillItem(`M${at.x} ${at.y - 6.5}h4.4v13h-4.4ZM${at.x + 8} ${at.y - 6.5}h4.4v13h-4.4Z`, 'scribe')]
  const centre = { x: at.x + 7, y: at.y }
  return [
    { kind: 'path', d: circlePath(centre, 7), stroke: 'stop-line', width: 1.6, fill: 'stop' },
    fillItem(`M${centre.x - 3.6} ${centre.y - 1.4}h7.2v2.8h-7.2Z`, 'on-stop'),
  ]
}

/**
 * Lays out the chart of deflection against load as a list of shapes in px, the same for screen and spreadsheet.
 * Deflections in the display unit, loads in percent of rated load. Refuses nothing: what has no place is left out,
 * and throws a RangeError only for an `xMax` or `yMax` that is not positive.
 */
export function lineDrawing(spec: LineChartSpec): Drawing {
  if (!(spec.yMax > 0)) throw new RangeError('The load scale needs a positive end.')
  const frame = lineFrame(spec)
  const alone = spec.setting === 'alone'
  const items: DrawingItem[] = []
  if (spec.title !== undefined)
    items.push(textItem(alone ? 24 : frame.left, alone ? 30 : 36, spec.title, 'scribe', { size: alone ? 18 : 20, weight: 600 }))
  if (spec.aside !== undefined && spec.width >= 300)
    items.push(
      textItem(spec.width - (alone ? 24 : 33), alone ? 30 : 36, spec.aside, 'faint-scribe', {
        size: alone ? 14 : 16,
        condensed: true,
        anchor: 'end',
      }),
    )
  items.push(...stageGuides(spec, frame), ...band(spec, frame), ...axes(spec, frame))
  items.push(...earlier(spec, frame), ...line(spec, frame), ...prediction(spec, frame), ...readings(spec, frame), ...stopMarks(spec, frame))
  items.push(...corrections(spec, frame))
  for (const note of layOutNotes(spec, frame)) items.push(...noteItems(note))
  return { width: spec.width, height: spec.height, items }
}
