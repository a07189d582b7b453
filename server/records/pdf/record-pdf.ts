import type { PaperSize } from '#shared/api/records'
import { headlineOf } from '#shared/proof-test/record'
import { hashLines } from '#shared/proof-test/record-words'
import { NO_FILES, type RecordFiles } from '../files'
import { recordOf, type RecordOfTest, type RecordSource } from '../record'
import { legDrawing, paintLeg } from './drawings'
import { Paper } from './paper'
import { cautions, conclusion, photos, seals, signatures } from './people-sections'
import { drawing, instruments, joints, loadPathCheck, protocol, train } from './press-sections'
import { strong, verdictCell } from './cells'
import { summaryPage, type LeftOver } from './summary-page'
import { table } from './table'
import { corrections, criteria, readings, stages } from './test-sections'

export interface PdfOptions {
  paper: PaperSize
  /** Where anybody can check the ledger file: the QR code leads there. */
  checkAddress: string
  files?: RecordFiles
}

/** The moment of the last thing that happened to a record: what it says is so as of then, whenever it is printed. */
function asOf({ entries, seals: sealed, writtenAt }: RecordOfTest): string {
  const moments = [...entries.map(({ receivedAt }) => receivedAt), ...sealed.map(({ sealedAt }) => sealedAt)].sort()
  return moments.at(-1) ?? writtenAt
}

/** What belongs on page one and has no room there. */
function further(paper: Paper, { criteria: more, facts }: LeftOver): void {
  if (more.length > 0) {
    paper.heading('Further criteria at their worst')
    table(paper, {
      columns: [
        { head: 'Criterion', wrap: true },
        { head: 'Read', align: 'right', wrap: true },
        { head: 'Limit', align: 'right', wrap: true },
        { head: 'Verdict' },
      ],
      rows: more.map(({ label, reading, limitText, verdict }) => ({ cells: [label, strong(reading), limitText, verdictCell(verdict)] })),
    })
  }
  if (facts.length === 0) return
  paper.heading('What the figures rest on')
  table(paper, {
    columns: [{ head: 'What' }, { head: 'As recorded', wrap: true }],
    rows: facts.map(([name, value]) => ({ cells: [name, value] })),
  })
}

function furtherCharts(paper: Paper, record: RecordOfTest, legs: readonly number[]): void {
  if (legs.length === 0) return
  const width = Math.min(paper.width, 380)
  legs.forEach((leg, index) => {
    const chart = legDrawing(record, leg, { width: 560, height: 420 })
    if (chart === null) return
    const height = (chart.height * width) / chart.width
    if (index === 0) paper.heading('Deflection against load')
    paper.subheading(record.opened.legs[leg]?.label ?? `Leg ${leg + 1}`)
    paper.need(height + 4)
    paper.down(paintLeg(paper, record, leg, chart, { x: paper.left, y: paper.y, width }) + 4)
  })
}

/**
 * The record of a proof test as a customer or insurer gets it: an ended document, to be piped. The same record makes
 * the same bytes.
 * @throws RangeError when the ledger doesn't begin with the opening of a test.
 */
export function recordPdf(source: RecordSource, { paper: size, checkAddress, files = NO_FILES }: PdfOptions): PDFKit.PDFDocument {
  const record = recordOf(source)
  const { opened, state, evaluation } = record
  const headline = headlineOf(state, evaluation)
  const hash = hashLines(record.seals.at(-1)?.headHash ?? state.headHash)[0] ?? ''
  const paper = new Paper({
    size,
    title: `Record of ${record.title}`,
    author: opened.shop.name,
    asOf: asOf(record),
    head: { left: `Record of ${record.title}`, middle: headline, right: opened.shop.name },
    foot: { left: record.title, middle: `last hash ${hash}` },
  })
  const rest = summaryPage(paper, record, checkAddress)
  further(paper, rest)
  furtherCharts(paper, record, rest.legs)
  stages(paper, record)
  corrections(paper, record)
  conclusion(paper, record)
  readings(paper, record)
  drawing(paper, record)
  joints(paper, record)
  criteria(paper, record)
  train(paper, record)
  instruments(paper, record)
  loadPathCheck(paper, record)
  protocol(paper, record)
  photos(paper, record, files)
  signatures(paper, record)
  seals(paper, record, checkAddress)
  cautions(paper, record)
  return paper.end()
}
