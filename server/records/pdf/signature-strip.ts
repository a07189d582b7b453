import { create } from 'qrcode'
import type { Signature } from '#shared/proof-test/entries'
import { UTC_DATES } from '#shared/proof-test/print-dates'
import { hashLines, lateness } from '#shared/proof-test/record-words'
import type { RecordOfTest } from '../record'
import { leading, type Paper } from './paper'
import { GRAPHITE, INK, STOP, plain, type Run, type Style } from './typesetter'

/** The foot of page one: who signed, the seal over it, and the way to check it. */

const TITLE: Style = { size: 7.5 }
const NAME: Style = { size: 11, weight: 600 }
const WORDS: Style = { size: 7.5, family: 'condensed' }
const MONO: Style = { size: 7, family: 'mono' }
const PAD = 7
const QR = 66
/** White round the code that ISO/IEC 18004 asks for, in modules. */
const QUIET = 4

interface Row {
  runs: Run[]
  size: number
}

interface Signed {
  title: string
  name: string
  relation: string
  signature: Signature | null
  waiting: string
  late: string | null
}

function signedRows({ title, name, relation, signature, waiting, late }: Signed): Row[] {
  const row = (text: string, style: Style): Row => ({ runs: plain(text, style), size: style.size })
  return [
    row(title, TITLE),
    row(signature?.printedName ?? name, NAME),
    ...(relation === '' ? [] : [row(relation, { ...WORDS, ink: GRAPHITE })]),
    ...(signature
      ? [
          row(`${UTC_DATES.dateAndTime(signature.signedAt)} UTC, signed with password`, WORDS),
          ...(late === null ? [] : [row(late, { ...WORDS, weight: 600, ink: STOP })]),
          row(signature.meaning, WORDS),
        ]
      : [row(waiting, { ...WORDS, weight: 600 })]),
  ]
}

function sealRows({ state, seals, chain }: RecordOfTest): Row[] {
  const seal = seals.at(-1)
  const row = (text: string, style: Style): Row => ({ runs: plain(text, style), size: style.size })
  return [
    row(seal ? `Seal over ${seal.seq} entries` : `No seal yet; ${state.headSeq} entries`, TITLE),
    ...hashLines(seal?.headHash ?? state.headHash).map((line) => row(line, MONO)),
    chain.whole
      ? row(`Chain whole over ${chain.entries} entries`, WORDS)
      : row(`BROKEN at entry ${chain.brokenAt}: ${chain.why}`, { ...WORDS, weight: 600, ink: STOP }),
    ...(seal ? [row(`Sealed ${UTC_DATES.dateAndTime(seal.sealedAt)} UTC`, WORDS), row(`key ${seal.kid}`, MONO)] : []),
  ]
}

function blocks(record: RecordOfTest): Row[][] {
  const { opened, state } = record
  const { lead, witness } = opened.people
  const notYet = state.conclusion === null ? 'Not concluded yet' : 'Not signed yet'
  return [
    signedRows({ title: 'Lead, who ran the test', name: lead.name, relation: '', signature: state.signed, waiting: notYet, late: null }),
    signedRows({
      title: 'Witness, who was there',
      name: witness.name,
      relation: witness.relation,
      signature: state.countersigned,
      waiting: state.signed ? 'Not countersigned yet' : notYet,
      late: lateness(state),
    }),
    sealRows(record),
  ]
}

function widths(paper: Paper): number[] {
  const rest = paper.width - QR - 3 * PAD
  return [rest * 0.34, rest * 0.36, rest * 0.3]
}

const heightOf = (paper: Paper, rows: readonly Row[], width: number): number =>
  rows.reduce((sum, { runs, size }) => sum + paper.heightOf(runs, width, size) + 1, 0)

/** Height of the strip with the longest of its blocks, pt. */
export function stripHeight(paper: Paper, record: RecordOfTest): number {
  const room = widths(paper)
  const tallest = blocks(record).map((rows, index) => heightOf(paper, rows, (room[index] ?? 0) - PAD))
  return Math.max(QR + 14, ...tallest) + 2 * PAD
}

/** An address as a QR code, `side` pt wide with its white. */
function paintQr(paper: Paper, address: string, x: number, y: number, side: number): void {
  // Q: a quarter of it may be scratched or under grease, and it is still read.
  const { modules } = create(address, { errorCorrectionLevel: 'Q' })
  const { size } = modules
  const one = side / (size + 2 * QUIET)
  paper.tag(
    'Figure',
    () => {
      for (let row = 0; row < size; row += 1) {
        for (let column = 0; column < size; column += 1) {
          if (modules.get(row, column) !== 1) continue
          const from = column
          while (column + 1 < size && modules.get(row, column + 1) === 1) column += 1
          paper.doc.rect(x + (from + QUIET) * one, y + (row + QUIET) * one, (column - from + 1) * one, one)
        }
      }
      paper.doc.fill('#000000')
    },
    { alt: `QR code of ${address}` },
  )
}

interface Place {
  top: number
  height: number
  checkAddress: string
}

/** Signatures and seal side by side, ruled off as a title block is. */
export function signatureStrip(paper: Paper, record: RecordOfTest, { top, height, checkAddress }: Place): void {
  const room = widths(paper)
  const frame = paper.left - 13
  paper.rule(top, { from: frame, to: paper.right + 13, width: 0.9, colour: INK })
  let x = paper.left
  blocks(record).forEach((rows, index) => {
    const width = room[index] ?? 0
    if (index > 0)
      paper.artifact(() =>
        paper.doc
          .moveTo(x - PAD, top)
          .lineTo(x - PAD, top + height)
          .lineWidth(0.6)
          .strokeColor(INK)
          .stroke(),
      )
    let y = top + PAD
    for (const { runs, size } of rows) {
      const lines = paper.type.wrap(runs, width - PAD)
      paper.tag('P', () => paper.lines(lines, x, y, size))
      y += lines.length * leading(size) + 1
    }
    x += width + PAD
  })
  paper.artifact(() =>
    paper.doc
      .moveTo(x - PAD, top)
      .lineTo(x - PAD, top + height)
      .lineWidth(0.6)
      .strokeColor(INK)
      .stroke(),
  )
  paintQr(paper, checkAddress, x - 3, top + 3, QR)
  const words = paper.type.wrap(plain('Check the ledger file', WORDS), QR + PAD)
  paper.tag('P', () => paper.lines(words, x, top + 3 + QR, WORDS.size))
}
