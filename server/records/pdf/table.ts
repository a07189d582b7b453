import { leading, type Paper } from './paper'
import { GRAPHITE, HAIRLINE, RULE, plain, type Line, type Run, type Style } from './typesetter'

/** Tables that take the width they need, break over pages between rows, and repeat their heads. */

export interface TableColumn {
  head: string
  align?: 'left' | 'right'
  /** May be broken into several lines where the width is short. */
  wrap?: boolean
}

export type Cell = string | Run[] | null

export interface TableRow {
  cells: readonly Cell[]
  /** All of it in strong letters. */
  strong?: boolean
}

export interface TableSpec {
  columns: readonly TableColumn[]
  rows: readonly TableRow[]
  size?: number
}

interface Layout {
  x: number
  widths: number[]
  size: number
  gap: number
  heads: Line[][]
  rows: Line[][][]
}

const SMALLEST = 5.5
/** Wider gaps than this help nobody: what is left goes to the columns of words. */
const WIDEST_GAP = 26
/** A table that takes no more than this share of a page isn't broken over two. */
const KEPT_WHOLE = 0.34
const PAD = 2.2

const headStyle = (size: number): Style => ({ size: size * 0.94, family: 'condensed', weight: 500, ink: GRAPHITE })

/** A cell's words in the style of its table; runs keep what they bring along and take the table's size. */
function runsOf(cell: Cell, size: number, strong: boolean): Run[] {
  if (cell === null) return []
  const base: Style = { size, family: 'condensed', weight: strong ? 600 : 400 }
  if (typeof cell === 'string') return plain(cell, base)
  return cell.map(({ text, style }) => ({ text, style: { ...base, ...style, size } }))
}

function linesWidth(paper: Paper, runs: readonly Run[]): number {
  const lines: Run[][] = [[]]
  for (const { text, style } of runs) {
    text.split('\n').forEach((part, index) => {
      if (index > 0) lines.push([])
      lines.at(-1)?.push({ text: part, style })
    })
  }
  return Math.max(...lines.map((line) => paper.type.widthOf(line)))
}

interface Wanted {
  natural: number
  least: number
}

function wantedWidths(paper: Paper, { columns, rows }: TableSpec, size: number): Wanted[] {
  return columns.map(({ head, wrap = false }, column) => {
    const headWidth = paper.type.longestWord(plain(head, headStyle(size)))
    const cells = rows.map(({ cells, strong = false }) => runsOf(cells[column] ?? null, size, strong))
    const natural = Math.max(headWidth, ...cells.map((runs) => linesWidth(paper, runs)))
    if (!wrap) return { natural, least: natural }
    return {
      natural,
      least: Math.min(natural, Math.max(headWidth, 34, ...cells.map((runs) => Math.min(paper.type.longestWord(runs), 90)))),
    }
  })
}

/** Shares out what is missing among the columns that can give, those with most to give first. */
function shrink(wanted: readonly Wanted[], room: number): number[] {
  const missing = wanted.reduce((sum, { natural }) => sum + natural, 0) - room
  const give = wanted.reduce((sum, { natural, least }) => sum + (natural - least), 0)
  if (missing <= 0) return wanted.map(({ natural }) => natural)
  // The longest columns are cut to one common width first, so that a short one isn't broken for their sake.
  let [low, high] = [0, Math.max(...wanted.map(({ natural }) => natural))]
  if (give <= missing) return wanted.map(({ least }) => least)
  for (let step = 0; step < 40; step += 1) {
    const cap = (low + high) / 2
    const total = wanted.reduce((sum, { natural, least }) => sum + Math.max(least, Math.min(natural, cap)), 0)
    if (total > room) high = cap
    else low = cap
  }
  return wanted.map(({ natural, least }) => Math.max(least, Math.min(natural, low)))
}

/** Shares out what is left: to the gaps, then to the columns of words; returns the gap. */
function spread(columns: readonly TableColumn[], widths: number[], gap: number, left: number): number {
  const wordy = columns.filter(({ wrap }) => wrap === true).length
  const gaps = columns.length - 1
  const wider = wordy === 0 ? gap + left / gaps : Math.min(gap + left / gaps, WIDEST_GAP)
  const rest = left - (wider - gap) * gaps
  columns.forEach(({ wrap }, index) => {
    if (wrap === true) widths[index] = (widths[index] ?? 0) + rest / wordy
  })
  return wider
}

function layOut(paper: Paper, spec: TableSpec): Layout {
  const { left: x, width } = paper
  const { columns, rows } = spec
  let size = spec.size ?? 7.5
  let gap = 8
  let wanted = wantedWidths(paper, spec, size)
  const tooWide = (): boolean => wanted.reduce((sum, { least }) => sum + least, 0) + gap * (columns.length - 1) > width
  if (tooWide()) gap = 5
  while (tooWide() && size > SMALLEST) {
    size -= 0.25
    wanted = wantedWidths(paper, spec, size)
  }
  const room = width - gap * (columns.length - 1)
  const least = wanted.reduce((sum, one) => sum + one.least, 0)
  // Where even the smallest letters don't fit, every column gives its share and words are broken.
  const widths = least > room ? wanted.map((one) => (one.least * room) / least) : shrink(wanted, room)
  const left = room - widths.reduce((sum, one) => sum + one, 0)
  if (left > 0 && columns.length > 1) gap = spread(columns, widths, gap, left)
  return {
    x,
    widths,
    size,
    gap,
    heads: columns.map(({ head, align = 'left' }, index) => {
      const atEdge = align === 'left' ? index === columns.length - 1 : index === 0
      return paper.type.wrap(plain(head, headStyle(size)), (widths[index] ?? 0) + (atEdge ? 0.1 : gap * 0.45))
    }),
    rows: rows.map(({ cells, strong = false }) =>
      columns.map((_column, index) => paper.type.wrap(runsOf(cells[index] ?? null, size, strong), (widths[index] ?? 0) + 0.1)),
    ),
  }
}

function tableWidth({ widths, gap }: Layout): number {
  return widths.reduce((sum, width) => sum + width, 0) + gap * (widths.length - 1)
}

function headHeight({ heads, size }: Layout): number {
  return Math.max(1, ...heads.map((lines) => lines.length)) * leading(size * 0.94) + 3
}

const rowHeight = (lines: readonly (readonly Line[])[], size: number): number =>
  Math.max(1, ...lines.map((one) => one.length)) * leading(size) + 2 * PAD

interface Drawing {
  paper: Paper
  spec: TableSpec
  layout: Layout
}

function eachColumn({ spec, layout }: Drawing, draw: (index: number, x: number, width: number, align: 'left' | 'right') => void): void {
  let x = layout.x
  spec.columns.forEach(({ align = 'left' }, index) => {
    const width = layout.widths[index] ?? 0
    draw(index, x, width, align)
    x += width + layout.gap
  })
}

function drawHead(drawing: Drawing, repeated: boolean): void {
  const { paper, layout } = drawing
  const { heads, size } = layout
  const height = headHeight(layout)
  const small = size * 0.94
  const set = (index: number, x: number, width: number, align: 'left' | 'right'): void => {
    const lines = heads[index] ?? []
    const top = paper.y + height - 3 - lines.length * leading(small)
    paper.lines(lines, x, top, small, { to: align, width })
  }
  if (repeated) paper.artifact(() => eachColumn(drawing, set))
  else paper.within('TR', () => eachColumn(drawing, (index, x, width, align) => paper.tag('TH', () => set(index, x, width, align))))
  paper.down(height)
  paper.rule(paper.y, { from: layout.x, to: layout.x + tableWidth(layout), colour: RULE, width: 0.7 })
}

function drawRow(drawing: Drawing, cells: readonly (readonly Line[])[]): void {
  const { paper, layout } = drawing
  const { size } = layout
  paper.within('TR', () =>
    eachColumn(drawing, (index, x, width, align) =>
      paper.tag('TD', () => paper.lines(cells[index] ?? [], x, paper.y + PAD, size, { to: align, width })),
    ),
  )
  paper.down(rowHeight(cells, size))
  paper.rule(paper.y, { from: layout.x, to: layout.x + tableWidth(layout), colour: HAIRLINE, width: 0.4 })
}

/** A row cut into parts none of which is higher than a page. */
function parts(cells: readonly Line[][], size: number, most: number): Line[][][] {
  const fits = Math.max(1, Math.floor((most - 2 * PAD) / leading(size)))
  const longest = Math.max(1, ...cells.map((lines) => lines.length))
  return Array.from({ length: Math.ceil(longest / fits) }, (_part, index) =>
    cells.map((lines) => lines.slice(index * fits, (index + 1) * fits)),
  )
}

/** Sets a table where the pen is. Heads are repeated on every page it goes on to; a row is kept whole where a page can hold it. */
export function table(paper: Paper, spec: TableSpec): void {
  const layout = layOut(paper, spec)
  const drawing = { paper, spec, layout }
  const head = headHeight(layout)
  const [first = 0] = layout.rows.map((cells) => rowHeight(cells, layout.size))
  const whole = head + layout.rows.reduce((sum, cells) => sum + rowHeight(cells, layout.size), 0)
  paper.need(whole <= paper.whole * KEPT_WHOLE ? whole : head + Math.min(first, paper.whole - head))
  paper.within('Table', () => {
    drawHead(drawing, false)
    layout.rows.forEach((cells, index) => {
      // The last row never stands on a page alone.
      const last = layout.rows.length > 2 && index === layout.rows.length - 2 ? layout.rows[index + 1] : undefined
      for (const part of parts(cells, layout.size, paper.whole - head - 1)) {
        const next = last ? Math.min(rowHeight(last, layout.size), paper.whole / 2) : 0
        if (paper.y + rowHeight(part, layout.size) + next > paper.bottom) {
          paper.newPage()
          drawHead(drawing, true)
        }
        drawRow(drawing, part)
      }
    })
  })
}
