import PDFDocument from 'pdfkit'
import type { PaperSize } from '#shared/api/records'
import { drawMark, type PaperMark } from './marks'
import { GRAPHITE, HAIRLINE, INK, RULE, Typesetter, plain, type Line, type Run, type Style } from './typesetter'

/** The sheets a record is printed on: a zoned frame, a head and a foot that repeat, and a pen that goes down the page. */

const PAPERS: Record<PaperSize, string> = { a4: 'A4', letter: 'LETTER' }

export interface PaperWords {
  size: PaperSize
  title: string
  author: string
  /** The moment the record is as of; the file's own date, so that the same record makes the same bytes. */
  asOf: string
  /** In the head of every page but the first. */
  head: { left: string; middle: string; right: string }
  foot: { left: string; middle: string }
}

type Element = PDFKit.PDFStructureElement

/** pt from the edge of the sheet to the outer frame, width of the zone band, and of the white inside it. */
const EDGE = 18
const BAND = 11
const INSET = 13
const FOOT = 20
const HEAD = 20
const ZONES = { columns: 8, rows: 8 }

export const BODY: Style = { size: 8.5 }
export const SMALL: Style = { size: 7.5, family: 'condensed' }
export const leading = (size: number): number => size * 1.32

export class Paper {
  readonly doc: PDFKit.PDFDocument
  readonly type: Typesetter
  readonly left: number
  readonly right: number
  readonly bottom: number
  /** Where the next thing goes. */
  y: number
  /** Whether anything stands on the page below its head. */
  #fresh = true
  /** Set together with what follows them, so that none ends a page. */
  #headings: { height: number; set: () => void }[] = []
  #parent: Element
  readonly #root: Element

  constructor(private readonly words: PaperWords) {
    const date = new Date(words.asOf)
    this.doc = new PDFDocument({
      size: PAPERS[words.size],
      margin: 0,
      bufferPages: true,
      autoFirstPage: true,
      pdfVersion: '1.7',
      lang: 'en-GB',
      tagged: true,
      displayTitle: true,
      info: {
        Title: words.title,
        Author: words.author,
        Subject: 'Record of a proof test of a hydraulic press',
        Creator: 'Quarterload',
        Producer: 'Quarterload, pdfkit',
        CreationDate: date,
        ModDate: date,
      },
    })
    this.type = new Typesetter(this.doc)
    const { width, height } = this.doc.page
    this.left = EDGE + BAND + INSET
    this.right = width - this.left
    this.bottom = height - EDGE - BAND - FOOT - 8
    this.y = EDGE + BAND + INSET
    this.#root = this.doc.struct('Document')
    this.doc.addStructure(this.#root)
    this.#parent = this.#root
  }

  get width(): number {
    return this.right - this.left
  }

  /** Height of a page's free part, pt. */
  get whole(): number {
    return this.bottom - (EDGE + BAND + HEAD + 10)
  }

  newPage(): void {
    this.doc.addPage()
    this.y = EDGE + BAND + HEAD + 10
    this.#fresh = true
  }

  /** Goes on to a new page unless so much is left of this one, and sets the headings that waited for what they head. */
  need(height: number): void {
    const waiting = this.#headings.reduce((sum, one) => sum + one.height, 0)
    if (this.y + waiting + height > this.bottom && !this.#fresh) this.newPage()
    const headings = this.#headings
    this.#headings = []
    for (const { set } of headings) set()
  }

  /** Moves the pen down; what was set counts as standing on this page. */
  down(height: number): void {
    this.y += height
    this.#fresh = false
  }

  /** Everything set inside belongs to one element of the document's structure. */
  within<T>(tag: string, draw: () => T): T {
    const before = this.#parent
    const element = this.doc.struct(tag)
    before.add(element)
    this.#parent = element
    const result = draw()
    element.end()
    this.#parent = before
    return result
  }

  /** Sets what `draw` draws on this page as one element, which readers that speak find by its tag. */
  tag(tag: string, draw: () => void, options: { alt?: string } = {}): void {
    const element = this.doc.struct(tag, options)
    this.#parent.add(element)
    const content = this.doc.markStructureContent(tag)
    draw()
    this.doc.endMarkedContent()
    element.add(content)
    element.end()
  }

  /** What says nothing by itself: rules, frames, heads that repeat. */
  artifact(draw: () => void): void {
    this.doc.markContent('Artifact', { type: 'Layout' })
    draw()
    this.doc.endMarkedContent()
  }

  rule(y: number, options: { from?: number; to?: number; width?: number; colour?: string } = {}): void {
    const { from = this.left, to = this.right, width = 0.5, colour = HAIRLINE } = options
    this.artifact(() => this.doc.moveTo(from, y).lineTo(to, y).lineWidth(width).strokeColor(colour).undash().stroke())
  }

  /** Sets lines one under the other from `x`, their tops at `y`; returns the height they take. */
  lines(
    lines: readonly Line[],
    x: number,
    y: number,
    size: number,
    align: { to: 'left' | 'right'; width: number } = { to: 'left', width: 0 },
  ): number {
    lines.forEach((line, index) => {
      const at = align.to === 'right' ? x + align.width - line.width : x
      this.type.setLine(line, at, y + size * 0.98 + index * leading(size))
    })
    return lines.length * leading(size)
  }

  /** Height of a text set in a width, pt. */
  heightOf(runs: readonly Run[], width: number, size: number): number {
    return this.type.wrap(runs, width).length * leading(size)
  }

  /** A paragraph at a place of its own; returns the height it takes. */
  textAt(text: string | Run[], x: number, y: number, width: number, style: Style = BODY, tag = 'P'): number {
    const lines = this.type.wrap(typeof text === 'string' ? plain(text, style) : text, width)
    let height = 0
    this.tag(tag, () => {
      height = this.lines(lines, x, y, style.size)
    })
    return height
  }

  /** A paragraph where the pen is, over the whole width, on to the next page where it must. */
  paragraph(text: string | Run[], style: Style = BODY, after = 3): void {
    const lines = this.type.wrap(typeof text === 'string' ? plain(text, style) : text, this.width)
    const step = leading(style.size)
    this.need(Math.min(lines.length, 3) * step)
    let rest = lines
    while (rest.length > 0) {
      const room = Math.max(1, Math.floor((this.bottom - this.y) / step))
      const now = rest.slice(0, room)
      this.tag('P', () => this.lines(now, this.left, this.y, style.size))
      this.down(now.length * step)
      rest = rest.slice(room)
      if (rest.length > 0) this.newPage()
    }
    this.y += after
  }

  /** A heading in the outline; it stands on the page on which what follows begins. */
  heading(words: string, { note = '' }: { note?: string } = {}): void {
    const lines = note === '' ? [] : this.type.wrap(plain(note, { ...SMALL, ink: GRAPHITE }), this.width)
    const noted = lines.length === 0 ? 0 : lines.length * leading(SMALL.size) + 3
    const set = (): void => {
      if (!this.#fresh) this.y += 14
      // Measured from the right edge: without it a reader would scroll sideways.
      this.doc.outline.addItem(words, { top: this.y - 6, left: this.doc.page.width } as Parameters<PDFKit.PDFOutline['addItem']>[1])
      this.tag('H2', () => this.type.set(words, this.left, this.y + 10, { size: 12, weight: 600 }))
      this.down(16)
      if (lines.length === 0) return
      this.tag('P', () => this.lines(lines, this.left, this.y, SMALL.size))
      this.down(noted)
    }
    this.#headings.push({ height: 14 + 16 + noted, set })
  }

  /** A smaller heading, a mark before it where it has one. */
  subheading(words: string, mark: PaperMark | null = null): void {
    const style: Style = { size: 9.5, weight: 600 }
    const indent = mark === null ? 0 : 15
    const lines = this.type.wrap(plain(words, style), this.width - indent)
    const height = lines.length * leading(style.size) + 2
    const set = (): void => {
      if (!this.#fresh) this.y += 7
      if (mark !== null) this.artifact(() => drawMark(this.doc, mark, this.left, this.y + 1.4, 9.5))
      this.tag('H3', () => this.lines(lines, this.left + indent, this.y, style.size))
      this.down(height)
    }
    this.#headings.push({ height: 7 + height, set })
  }

  #zones(): void {
    const { doc } = this
    const { width, height } = doc.page
    const [inner, outer] = [EDGE + BAND, EDGE]
    doc.undash().lineWidth(0.5).strokeColor(RULE)
    doc.rect(outer, outer, width - 2 * outer, height - 2 * outer).stroke()
    doc.lineWidth(0.9).strokeColor(INK)
    doc.rect(inner, inner, width - 2 * inner, height - 2 * inner).stroke()
    const style: Style = { size: 6, family: 'condensed', ink: RULE }
    const [across, along] = [(width - 2 * inner) / ZONES.columns, (height - 2 * inner) / ZONES.rows]
    const tick = (x1: number, y1: number, x2: number, y2: number): void => {
      doc.moveTo(x1, y1).lineTo(x2, y2).lineWidth(0.5).strokeColor(RULE).stroke()
    }
    const put = (text: string, x: number, y: number): void => {
      this.type.set(text, x - this.type.width(text, style) / 2, y + 2.1, style)
    }
    for (let column = 0; column < ZONES.columns; column += 1) {
      const x = inner + across * column
      if (column > 0) for (const y of [outer, height - inner]) tick(x, y, x, y + BAND)
      for (const y of [outer + BAND / 2, height - outer - BAND / 2]) put(String(column + 1), x + across / 2, y)
    }
    for (let row = 0; row < ZONES.rows; row += 1) {
      const y = inner + along * row
      if (row > 0) for (const x of [outer, width - inner]) tick(x, y, x + BAND, y)
      for (const x of [outer + BAND / 2, width - outer - BAND / 2]) put(String.fromCharCode(65 + row), x, y + along / 2)
    }
  }

  #head(): void {
    const { left, middle, right } = this.words.head
    const y = EDGE + BAND + 13
    const strong: Style = { size: 7.5, weight: 600, family: 'condensed' }
    const quiet: Style = { ...SMALL, ink: GRAPHITE }
    const third = this.width / 3
    this.type.set(this.type.fit(left, strong, third - 6), this.left, y, strong)
    const shown = this.type.fit(middle, quiet, third - 6)
    this.type.set(shown, this.left + (this.width - this.type.width(shown, quiet)) / 2, y, quiet)
    const shop = this.type.fit(right, quiet, third - 6)
    this.type.set(shop, this.right - this.type.width(shop, quiet), y, quiet)
    const [edge, top] = [EDGE + BAND, EDGE + BAND + HEAD]
    this.doc
      .moveTo(edge, top)
      .lineTo(this.doc.page.width - edge, top)
      .lineWidth(0.5)
      .strokeColor(RULE)
      .stroke()
  }

  #foot(page: number, pages: number): void {
    const { left, middle } = this.words.foot
    const { width, height } = this.doc.page
    const top = height - EDGE - BAND - FOOT
    this.doc
      .moveTo(EDGE + BAND, top)
      .lineTo(width - EDGE - BAND, top)
      .lineWidth(0.5)
      .strokeColor(RULE)
      .stroke()
    const y = top + 13
    const quiet: Style = { ...SMALL, ink: GRAPHITE }
    const strong: Style = { ...SMALL, weight: 600 }
    const mono: Style = { size: 6.5, family: 'mono', ink: GRAPHITE }
    this.type.set(this.type.fit(left, quiet, this.width * 0.34), this.left, y, quiet)
    this.type.set(middle, this.left + (this.width - this.type.width(middle, mono)) / 2, y, mono)
    const count = `Page ${page} of ${pages}`
    this.type.set(count, this.right - this.type.width(count, strong), y, strong)
  }

  /** Frames, heads and feet on every page, now that it is known how many there are; then closes the file. */
  end(): PDFKit.PDFDocument {
    const { start, count } = this.doc.bufferedPageRange()
    for (let index = 0; index < count; index += 1) {
      this.doc.switchToPage(start + index)
      this.doc.markContent('Artifact', { type: 'Pagination' })
      this.#zones()
      if (index > 0) this.#head()
      this.#foot(index + 1, count)
      this.doc.endMarkedContent()
    }
    this.#root.end()
    this.doc.end()
    return this.doc
  }
}
