import type { Criterion } from '#shared/proof-test/evaluate-climb'
import { UTC_DATES } from '#shared/proof-test/print-dates'
import { cautionsOf, criteriaHeading, headlineOf, standingOf, verdictWord } from '#shared/proof-test/record'
import { recordFacts, type RecordFact } from '#shared/proof-test/record-facts'
import { courseText, notMeasuredText, resultLines, standingMark, verdictMark } from '#shared/proof-test/record-words'
import type { RecordOfTest } from '../record'
import { legDrawing, legsRead, paintLeg } from './drawings'
import { drawMark, type PaperMark } from './marks'
import { BODY, SMALL, leading, type Paper } from './paper'
import { signatureStrip, stripHeight } from './signature-strip'
import { GRAPHITE, INK, RULE, STOP, plain, type Line, type Run, type Style } from './typesetter'

/** Page one: what the test came to, on one sheet that stands for all the others. */

/** A column of the page: where it stands and how far down it has come. */
interface Column {
  x: number
  width: number
  y: number
}

function head(paper: Paper, { opened, state }: RecordOfTest): void {
  const quiet: Style = { size: 9, ink: GRAPHITE }
  const shop = paper.type.fit(opened.shop.name, quiet, paper.width * 0.6)
  paper.tag('P', () => {
    paper.type.set('Record of a proof test', paper.left, paper.y + 8, quiet)
    paper.type.set(shop, paper.right - paper.type.width(shop, quiet), paper.y + 8, quiet)
  })
  const day = state.conclusion?.at ?? state.openedAt
  const date = day === null ? '' : UTC_DATES.longDate(day)
  const dated: Style = { size: 10.5, weight: 500 }
  const dateWidth = paper.type.width(date, dated)
  const name = `${opened.press.name}${opened.press.whatFor ? `, ${opened.press.whatFor}` : ''}`
  const titled = (size: number): Line[] =>
    paper.type.wrap(plain(`${opened.number}\u2002${name}`, { size, weight: 600 }), paper.width - dateWidth - 18)
  // A long name is set smaller, so that the page keeps room for what it is about.
  const size = titled(21).length <= 2 ? 21 : 14
  const lines = titled(size)
  paper.y += 13
  paper.tag('H1', () => paper.lines(lines, paper.left, paper.y, size))
  paper.down(lines.length * leading(size))
  paper.tag('P', () => paper.type.set(date, paper.right - dateWidth, paper.y - 7, dated))
  paper.down(3)
  paper.rule(paper.y, { width: 1.1, colour: INK })
}

function result(paper: Paper, record: RecordOfTest): void {
  const { state, evaluation } = record
  const standing = standingOf(state)
  const red = standing === 'rejected' || standing === 'stopped'
  const size = 46
  const [x, width] = [paper.left + size + 14, paper.width - size - 14]
  const headline: Style = { size: 23, weight: 600, ink: red ? STOP : INK }
  const lines = paper.type.wrap(plain(headlineOf(state, evaluation), headline), width)
  paper.y += 10
  const top = paper.y
  paper.artifact(() => drawMark(paper.doc, standingMark(standing), paper.left, top + 2, size))
  paper.tag('H1', () => paper.lines(lines, x, paper.y, 23))
  paper.down(lines.length * leading(23) + 1)
  const said: Style = { size: 9 }
  for (const line of resultLines(record, UTC_DATES).filter((one) => one !== '')) paper.down(paper.textAt(line, x, paper.y, width, said))
  paper.y = Math.max(paper.y, top + size + 4) + 8
  paper.rule(paper.y)
  paper.y += 5
  paper.down(paper.textAt(`${courseText(record, UTC_DATES)} Times are UTC.`, paper.left, paper.y, paper.width, { ...SMALL, size: 8.5 }) + 8)
}

interface CriterionLine {
  mark: PaperMark
  word: string
  label: Line[]
  read: Line[]
  limit: Line[]
}

const CRITERION: Style = { size: 8, family: 'condensed' }

interface Shares {
  label: number
  read: number
  limit: number
}

const GAP = 6
/** Room for a mark before each criterion. */
const MARKED = 14

/** The figures take what they need up to a share; the names of the criteria have the rest. */
function sharesOf(paper: Paper, criteria: readonly Criterion[], width: number): Shares {
  const widest = (text: (criterion: Criterion) => string, style: Style, most: number): number =>
    Math.min(most, Math.max(24, ...criteria.map((criterion) => paper.type.width(text(criterion), style))) + 0.2)
  const read = widest(({ reading }) => reading, { ...CRITERION, weight: 600 }, width * 0.34)
  const limit = widest(({ limitText }) => limitText, CRITERION, width * 0.27)
  return { label: width - MARKED - read - limit - 2 * GAP, read, limit }
}

function criterionLine(paper: Paper, { verdict, label, reading, limitText }: Criterion, shares: Shares): CriterionLine {
  const away: Run[] =
    verdict === 'within'
      ? []
      : plain(`, ${verdictWord(verdict)}`, { ...CRITERION, weight: 500, ink: verdict === 'beyond' ? STOP : GRAPHITE })
  return {
    mark: verdictMark(verdict),
    word: verdictWord(verdict),
    label: paper.type.wrap([...plain(label, CRITERION), ...away], shares.label),
    read: paper.type.wrap(plain(reading, { ...CRITERION, weight: 600 }), shares.read),
    limit: paper.type.wrap(plain(limitText, { ...CRITERION, ink: GRAPHITE }), shares.limit),
  }
}

/** The criteria at their worst, and what nobody measured; those that don't fit above `bottom` are given back. */
function criteria(paper: Paper, record: RecordOfTest, column: Column, bottom: number): Criterion[] {
  const { evaluation, opened } = record
  const { x, width } = column
  column.y += paper.textAt(criteriaHeading(evaluation), x, column.y, width, { size: 10.5, weight: 600 }, 'H2') + 2
  const right = (edge: number, lines: Line[], y: number): void =>
    void paper.lines(lines, x, y, CRITERION.size, { to: 'right', width: edge })
  const shares = sharesOf(paper, evaluation.criteria, width)
  const ends = { read: width - shares.limit - GAP, limit: width }
  const rest: Criterion[] = []
  const unmeasured = notMeasuredText(opened)
  const measuring = unmeasured === '' ? 0 : 18
  const heads: Style = { size: 7, family: 'condensed', weight: 500, ink: GRAPHITE }
  paper.within('Table', () => {
    paper.within('TR', () => {
      paper.tag('TH', () => paper.type.set('Criterion', x + MARKED, column.y + 7, heads))
      paper.tag('TH', () => paper.type.set('Read', x + ends.read - paper.type.width('Read', heads), column.y + 7, heads))
      paper.tag('TH', () => paper.type.set('Limit', x + ends.limit - paper.type.width('Limit', heads), column.y + 7, heads))
    })
    column.y += 10
    paper.rule(column.y, { from: x, to: x + width, colour: RULE, width: 0.7 })
    for (const criterion of evaluation.criteria) {
      const line = criterionLine(paper, criterion, shares)
      const rows = Math.max(line.label.length, line.read.length, line.limit.length)
      if (rest.length > 0 || column.y + rows * leading(CRITERION.size) + 4.8 + measuring > bottom) {
        rest.push(criterion)
        continue
      }
      const y = column.y + 2.4
      paper.artifact(() => drawMark(paper.doc, line.mark, x, y + 0.6, 8.6))
      paper.within('TR', () => {
        paper.tag('TD', () => paper.lines(line.label, x + MARKED, y, CRITERION.size))
        paper.tag('TD', () => right(ends.read, line.read, y))
        paper.tag('TD', () => right(ends.limit, line.limit, y))
      })
      column.y += rows * leading(CRITERION.size) + 4.8
      paper.rule(column.y, { from: x, to: x + width, width: 0.4 })
    }
  })
  if (unmeasured !== '') {
    paper.artifact(() => drawMark(paper.doc, 'not-read', x, column.y + 3, 8.6))
    column.y += 2.4
    column.y += paper.textAt(unmeasured, x + MARKED, column.y, width - MARKED, { ...CRITERION, weight: 600 }) + 2.4
    paper.rule(column.y, { from: x, to: x + width, width: 0.4 })
  }
  column.y += 8
  return rest
}

const FACT: Style = { size: 7.5, family: 'condensed' }
const NAME_WIDTH = 44

interface FactLine {
  name: string
  value: Line[]
  height: number
}

function factLines(paper: Paper, record: RecordOfTest, width: number): FactLine[] {
  return recordFacts(record, UTC_DATES).map(([name, value]) => {
    const lines = paper.type.wrap(plain(value, FACT), width - NAME_WIDTH)
    return { name, value: lines, height: lines.length * leading(FACT.size) + 3 }
  })
}

/** What the figures rest on; those that don't fit above `bottom` are given back. */
function facts(paper: Paper, lines: readonly FactLine[], column: Column, bottom: number): FactLine[] {
  const { x, width } = column
  const fitting: FactLine[] = []
  let y = column.y
  for (const line of lines) {
    if (y + line.height > bottom) break
    y += line.height
    fitting.push(line)
  }
  paper.within('Table', () => {
    for (const { name, value, height } of fitting) {
      paper.within('TR', () => {
        paper.tag('TH', () => paper.type.set(name, x, column.y + 1.5 + FACT.size * 0.98, { ...FACT, ink: GRAPHITE }))
        paper.tag('TD', () => paper.lines(value, x + NAME_WIDTH, column.y + 1.5, FACT.size))
      })
      column.y += height
      paper.rule(column.y, { from: x, to: x + width, width: 0.4 })
    }
  })
  return lines.slice(fitting.length)
}

const QUIET: Style = { ...FACT, ink: GRAPHITE }
const cautionWords = (record: RecordOfTest): string => cautionsOf(record.state, record.evaluation).join(' ')
const cautionsHeight = (paper: Paper, record: RecordOfTest, width: number): number =>
  paper.heightOf(plain(cautionWords(record), QUIET), width, QUIET.size)

/** The cautions where there is room for them; they stand in full at the end too. */
function cautionsFit(paper: Paper, record: RecordOfTest, column: Column, bottom: number): void {
  if (column.y + cautionsHeight(paper, record, column.width) > bottom) return
  column.y += paper.textAt(cautionWords(record), column.x, column.y, column.width, QUIET)
}

/** What page one has no room for. */
export interface LeftOver {
  /** Whose charts are still to come. */
  legs: number[]
  criteria: Criterion[]
  facts: readonly RecordFact[]
}

const MOST_CHARTS = 2
/** px of a chart's width, which its letters are measured in. */
const CHART = 500

/** The first page, from its title to the signatures at its foot; says what is still to come. */
export function summaryPage(paper: Paper, record: RecordOfTest, checkAddress: string): LeftOver {
  paper.doc.outline.addItem('Summary')
  head(paper, record)
  result(paper, record)
  const strip = stripHeight(paper, record)
  const bottom = paper.bottom + 8 - strip - 6
  const drawn = legsRead(record)
  const share = drawn.length > 0 ? 0.53 : 0.46
  const leftColumn: Column = { x: paper.left, width: paper.width * share - 9, y: paper.y }
  const rightColumn: Column = { x: paper.left + paper.width * share + 9, width: paper.width * (1 - share) - 9, y: paper.y }
  const placed = paintCharts(paper, record, drawn, leftColumn, bottom)
  const furtherCriteria = criteria(paper, record, rightColumn, bottom)
  const rest = facts(paper, factLines(paper, record, rightColumn.width), rightColumn, bottom)
  const again = factLines(paper, record, leftColumn.width).filter(({ name }) => rest.some((one) => one.name === name))
  const lost = facts(paper, again, leftColumn, bottom)
  if (again.length > lost.length) leftColumn.y += 6
  cautionsFit(paper, record, leftColumn, bottom)
  signatureStrip(paper, record, { top: paper.bottom + 8 - strip, height: strip, checkAddress })
  paper.y = paper.bottom
  paper.down(0)
  return {
    legs: drawn.filter((leg) => !placed.includes(leg)),
    criteria: furtherCriteria,
    facts: recordFacts(record, UTC_DATES).filter(([name]) => lost.some((one) => one.name === name)),
  }
}

/** Charts as high as the column has room for beside the cautions, two at most. */
function paintCharts(paper: Paper, record: RecordOfTest, legs: readonly number[], column: Column, bottom: number): number[] {
  const several = record.opened.legs.length > 1
  const shown = legs.slice(0, MOST_CHARTS)
  const label = several ? 12 : 0
  const free = bottom - column.y - cautionsHeight(paper, record, column.width) - 8
  const wanted = free / Math.max(1, shown.length) - label - 8
  const height = Math.max(column.width * 0.56, Math.min(column.width * (several ? 0.9 : 1.1), wanted))
  const placed: number[] = []
  for (const leg of shown) {
    const drawing = legDrawing(record, leg, { width: CHART, height: Math.floor((height * CHART) / column.width) })
    if (drawing === null || column.y + height + label > bottom) break
    if (several)
      column.y += paper.textAt(record.opened.legs[leg]?.label ?? '', column.x, column.y, column.width, { ...BODY, weight: 600 }, 'H3')
    column.y += paintLeg(paper, record, leg, drawing, { x: column.x, y: column.y, width: column.width }) + 8
    placed.push(leg)
  }
  return placed
}
