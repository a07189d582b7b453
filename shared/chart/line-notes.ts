import { estimateTextWidth } from './drawing'
import type { Point } from './drawing'
import { bandEdges } from './line-frame'
import type { LineFrame } from './line-frame'
import type { LineChartSpec, LineNote } from './line-spec'

interface Row {
  x: number
  /** Base line. */
  y: number
  text: string
  size: number
  weight: 400 | 500 | 600
  strong: boolean
}

/** A note with its words, its leader and the place it was given (px). */
export interface PlacedNote {
  tone: LineNote['tone']
  mark: 'wait' | 'stop'
  markAt: Point | null
  anchor: 'start' | 'end'
  rows: Row[]
  /** Shelf, elbow and tip; the tip has the arrow head. */
  leader: Point[]
}

interface Box {
  left: number
  right: number
  top: number
  bottom: number
}

interface Wanted {
  note: LineNote
  at: Point
  /** The first line is a caption above the statement, as for the next prediction. */
  captioned: boolean
}

const MOST_NOTES = 3
const MARK_WIDTH = 24
/** A leader that drops less than this (px) is hard to tell from the stage lines. */
const SLANT = 38

type Sized = { text: string; size: number; weight: 400 | 500 | 600; strong: boolean; step: number }

function sizes(wanted: Wanted, small: boolean): Sized[] {
  const big = small ? 15 : 19
  const rest = small ? 14 : 16
  return wanted.note.lines.map((text, index) => {
    if (wanted.captioned && index === 0) return { text, size: rest, weight: 500, strong: true, step: rest + 2 }
    const statement = index === (wanted.captioned ? 1 : 0)
    return statement
      ? { text, size: big, weight: 600, strong: true, step: big + (small ? 3 : 1) }
      : { text, size: rest, weight: 400, strong: false, step: rest + (index === 1 ? 6 : 4) }
  })
}

const overlap = (a: Box, b: Box): boolean => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom

const holds = (box: Box, point: Point): boolean => box.left < point.x && point.x < box.right && box.top < point.y && point.y < box.bottom

/** True when the straight stroke a–b passes through the box. */
function crosses(box: Box, a: Point, b: Point): boolean {
  let enter = 0
  let leave = 1
  const edges: [number, number][] = [
    [a.x - b.x, a.x - box.left],
    [b.x - a.x, box.right - a.x],
    [a.y - b.y, a.y - box.top],
    [b.y - a.y, box.bottom - a.y],
  ]
  for (const [p, q] of edges) {
    if (p === 0) {
      if (q < 0) return false
      continue
    }
    const t = q / p
    if (p < 0) enter = Math.max(enter, t)
    else leave = Math.min(leave, t)
    if (enter > leave) return false
  }
  return true
}

/** True when two straight strokes cross each other. */
function cross([a, b]: [Point, Point], [c, d]: [Point, Point]): boolean {
  const side = (p: Point, q: Point, r: Point): number => (q.x - p.x) * (r.y - p.y) - (q.y - p.y) * (r.x - p.x)
  return side(a, b, c) > 0 !== side(a, b, d) > 0 && side(c, d, a) > 0 !== side(c, d, b) > 0
}

/** Strokes that words must not lie on: edges of the band, the fit, the steps. */
function strokes(spec: LineChartSpec, frame: LineFrame): [Point, Point][] {
  const list: [Point, Point][] = []
  const edges = bandEdges(spec, frame)
  if (edges !== null) list.push(edges.low, edges.high)
  const top = (frame.zero - frame.ceiling) / (frame.zero - frame.y(1))
  if (spec.fit !== null) {
    const { slope, intercept } = spec.fit
    list.push([
      { x: frame.x(intercept), y: frame.zero },
      { x: frame.x(intercept + slope * top), y: frame.ceiling },
    ])
  }
  const chains = [spec.points, spec.comparison ?? []]
  for (const chain of chains) {
    chain.forEach((point, index) => {
      const before = chain[index - 1]
      if (before === undefined) return
      list.push([
        { x: frame.x(before.x), y: frame.y(before.y) },
        { x: frame.x(point.x), y: frame.y(point.y) },
      ])
    })
  }
  return list
}

interface Candidate {
  box: Box
  anchor: 'start' | 'end'
  leader: Point[]
  cost: number
}

/** The leader leaves the words on a shelf along their foot or head, or from their side, and bends once. */
function leaderFrom(box: Box, anchor: 'start' | 'end', at: Point): Point[] {
  const clear = 7
  const toTip = (elbow: Point): Point => {
    const distance = Math.hypot(at.x - elbow.x, at.y - elbow.y)
    const share = distance <= clear ? 0 : (distance - clear) / distance
    return { x: elbow.x + (at.x - elbow.x) * share, y: elbow.y + (at.y - elbow.y) * share }
  }
  const foot = at.y > box.bottom
  const shelf = foot ? box.bottom + 5 : box.top - 5
  const start = { x: anchor === 'start' ? box.left : box.right, y: shelf }
  const width = box.right - box.left
  const towards = Math.max(0, anchor === 'start' ? at.x - box.right : box.left - at.x)
  const run = Math.min(width + Math.min(24, towards * 0.5), Math.max(Math.abs(at.x - start.x) - 12, width * 0.6))
  const elbow = { x: anchor === 'start' ? start.x + run : start.x - run, y: shelf }
  return [start, elbow, toTip(elbow)]
}

function boxAt(x: number, top: number, width: number, height: number, anchor: 'start' | 'end'): Box {
  return anchor === 'start'
    ? { left: x, right: x + width, top, bottom: top + height }
    : { left: x - width, right: x, top, bottom: top + height }
}

interface Obstacles {
  strokes: [Point, Point][]
  points: Box[]
  taken: Box[]
  leaders: [Point, Point][]
}

function costOf(candidate: Omit<Candidate, 'cost'>, at: Point, obstacles: Obstacles): number {
  const { box, leader } = candidate
  const wide: Box = { left: box.left - 6, right: box.right + 6, top: box.top - 7, bottom: box.bottom + 7 }
  const [start, elbow, tip] = leader
  if (start === undefined || elbow === undefined || tip === undefined) return Number.POSITIVE_INFINITY
  const slanted: [Point, Point] = [elbow, tip]
  let cost = Math.hypot(tip.x - elbow.x, tip.y - elbow.y)
  cost += Math.max(0, SLANT - Math.abs(tip.y - elbow.y)) * 4
  cost += obstacles.strokes.filter(([a, b]) => crosses(wide, a, b)).length * 400
  cost += obstacles.points.filter((point) => overlap(wide, point)).length * 1200
  cost += obstacles.points.filter((point) => crosses(point, ...slanted) && !holds(point, at)).length * 300
  cost += obstacles.taken.filter((other) => overlap(wide, other)).length * 4000
  cost += obstacles.leaders.filter(([a, b]) => crosses(wide, a, b)).length * 1500
  cost += obstacles.taken.filter((other) => crosses(other, ...slanted)).length * 1500
  cost += obstacles.strokes.filter((stroke) => cross(slanted, stroke)).length * 70
  cost += obstacles.leaders.filter((leader) => cross(slanted, leader)).length * 900
  if (crosses(box, elbow, tip)) cost += 900
  if (overlap(wide, { left: at.x - 12, right: at.x + 12, top: at.y - 12, bottom: at.y + 12 })) cost += 1500
  return cost
}

function place(wanted: Wanted, spec: LineChartSpec, frame: LineFrame, obstacles: Obstacles): [PlacedNote, Candidate] {
  const small = spec.setting === 'alone'
  const rows = sizes(wanted, small)
  const mark = wanted.note.mark
  const widest = Math.max(
    ...rows.map(
      (row, index) => estimateTextWidth(row.text, row.size, row.weight, true) + (mark !== undefined && index === 0 ? MARK_WIDTH : 0),
    ),
  )
  const height = rows.reduce((sum, row) => sum + row.step, 0)
  let best: Candidate | null = null
  for (let top = frame.ceiling; top <= frame.zero - height - 8; top += 6) {
    for (const anchor of ['start', 'end'] as const) {
      for (const inset of anchor === 'start' ? [6] : [2, 30, 60, 90, 120]) {
        const x = anchor === 'start' ? frame.left + inset : frame.right - inset
        const box = boxAt(x, top, widest, height, anchor)
        if (box.left < frame.left + 4 || box.right > spec.width - 4) continue
        const candidate = { box, anchor, leader: leaderFrom(box, anchor, wanted.at) }
        const cost = costOf(candidate, wanted.at, obstacles) + inset * 0.3
        if (best === null || cost < best.cost) best = { ...candidate, cost }
      }
    }
  }
  const fallback = boxAt(frame.left + 6, frame.ceiling, widest, height, 'start')
  const chosen: Candidate = best ?? {
    box: fallback,
    anchor: 'start',
    leader: leaderFrom(fallback, 'start', wanted.at),
    cost: 0,
  }
  return [written(wanted, rows, chosen), chosen]
}

function written(wanted: Wanted, rows: Sized[], chosen: Candidate): PlacedNote {
  const { box, anchor } = chosen
  const mark = wanted.note.mark
  let y = box.top - 2
  const placed = rows.map((row, index): Row => {
    y += row.step
    const indent = anchor === 'start' && mark !== undefined && index === 0 ? MARK_WIDTH : 0
    const x = (anchor === 'start' ? box.left : box.right) + indent
    return { x, y, text: row.text, size: row.size, weight: row.weight, strong: row.strong }
  })
  const [first] = placed
  const firstSized = rows[0]
  const markAt =
    mark === undefined || first === undefined || firstSized === undefined
      ? null
      : {
          x:
            anchor === 'start'
              ? box.left
              : box.right - estimateTextWidth(first.text, firstSized.size, firstSized.weight, true) - MARK_WIDTH + 2,
          y: first.y - firstSized.size * 0.34,
        }
  return { tone: wanted.note.tone, mark: mark ?? 'wait', markAt, anchor, rows: placed, leader: chosen.leader }
}

/**
 * Finds a place for the words of at most three notes, the prediction's first: clear of the lines, of the readings and
 * of each other, as near to what they speak of as that allows.
 */
export function layOutNotes(spec: LineChartSpec, frame: LineFrame): PlacedNote[] {
  const wanted: Wanted[] = []
  const next = spec.prediction
  if (next !== null) {
    const tone = next.tone ?? 'chalk'
    wanted.push({
      captioned: next.caption !== undefined,
      // Once it has been read, a reading lies on the dimension: the leader goes to its free end.
      at: { x: frame.x(tone === 'scribe' ? next.from : (next.from + next.to) / 2), y: frame.y(next.y) },
      note: {
        at: { x: (next.from + next.to) / 2, y: next.y },
        tone,
        lines: next.caption === undefined ? [next.text] : [next.caption, next.text],
      },
    })
  }
  for (const note of spec.notes) wanted.push({ note, captioned: false, at: { x: frame.x(note.at.x), y: frame.y(note.at.y) } })
  const kept = wanted.slice(0, MOST_NOTES)
  let best: { notes: PlacedNote[]; cost: number } | null = null
  // Each note takes the best place that is left, so the order decides; three notes have six orders.
  for (const order of permutations(kept.map((_, index) => index))) {
    const tried = placeInOrder(kept, order, spec, frame)
    if (best === null || tried.cost < best.cost) best = tried
  }
  return best?.notes ?? []
}

function placeInOrder(wanted: Wanted[], order: number[], spec: LineChartSpec, frame: LineFrame): { notes: PlacedNote[]; cost: number } {
  const obstacles: Obstacles = {
    strokes: strokes(spec, frame),
    points: spec.points.map((point) => {
      const x = frame.x(point.x)
      const y = frame.y(point.y)
      return { left: x - 8, right: x + 8, top: y - 8, bottom: y + 8 }
    }),
    taken: [],
    leaders: [],
  }
  const notes = new Map<number, PlacedNote>()
  let cost = 0
  for (const index of order) {
    const item = wanted[index]
    if (item === undefined) continue
    const [note, candidate] = place(item, spec, frame, obstacles)
    notes.set(index, note)
    cost += candidate.cost
    obstacles.taken.push(candidate.box)
    const [, elbow, tip] = candidate.leader
    if (elbow !== undefined && tip !== undefined) obstacles.leaders.push([elbow, tip])
  }
  return { notes: wanted.flatMap((_, index) => notes.get(index) ?? []), cost }
}

function permutations(items: readonly number[]): number[][] {
  if (items.length < 2) return [[...items]]
  return items.flatMap((item, index) => permutations([...items.slice(0, index), ...items.slice(index + 1)]).map((rest) => [item, ...rest]))
}
