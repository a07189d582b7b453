import { headlineOf } from '#shared/proof-test/record'
import { hashLines } from '#shared/proof-test/record-words'
import { NO_FILES, type RecordFiles } from '../files'
import { recordOf, type RecordOfTest, type RecordSource } from '../record'
import { legDrawing, paintLeg } from './drawings'
import { Paper, type PaperSize } from './paper'
import { cautions, conclusion, photos, seals, signatures } from './people-sections'
import { drawing, instruments, joints, loadPathCheck, protocol, train } from './press-sections'
import { summaryPage } from './summary-page'
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

function furtherCharts(paper: Paper, record: RecordOfTest, legs: readonly number[]): void {
  if (legs.length === 0) return
  const width = Math.min(paper.width, 380)
  legs.forEach((leg, index) => {
    const chart = legDrawing(record, leg, { width: 560, height: 420 })
    if (chart === null) return
    const height = (chart.height * width) / chart.width
    if (index === 0) paper.heading('Deflection against load', { keep: height + 24 })
    paper.subheading(record.opened.legs[leg]?.label ?? `Leg ${leg + 1}`, height)
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
  const { legs } = summaryPage(paper, record, checkAddress)
  furtherCharts(paper, record, legs)
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
