import type { Workbook } from 'exceljs'
import { clocksApart } from '#shared/ledger/clocks'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, colours, put, putRow, type Column } from '../sheet'

export const LEDGER_SHEET = 'Ledger'

/** A cell holds 32,767 characters; longer texts go on in the cells beside it. */
const MOST_IN_A_CELL = 32_000

const columns: Column[] = [
  { header: 'Entry', width: 7, align: 'right' },
  { header: 'Kind', width: 20 },
  { header: 'Author', width: 20 },
  { header: 'Made, by the device’s clock (UTC)', width: 19, wrap: true },
  { header: 'Received, by the server’s clock (UTC)', width: 19, wrap: true },
  { header: 'Apart', width: 18, wrap: true },
  { header: 'Irregular', width: 12 },
  { header: 'Hash', width: 68 },
  { header: 'Hash before', width: 68 },
  { header: 'Canonical text, as stored and hashed (goes on to the right where it is long)', width: 60 },
]

/** Cuts a text into parts that fit into cells, never through the middle of a character. */
export function cellParts(text: string): string[] {
  const parts: string[] = []
  for (let start = 0; start < text.length;) {
    let end = Math.min(start + MOST_IN_A_CELL, text.length)
    const code = text.charCodeAt(end - 1)
    if (end < text.length && code >= 0xd800 && code <= 0xdbff) end -= 1
    parts.push(text.slice(start, end))
    start = end
  }
  return parts
}

/** The whole ledger: whoever doubts a figure can hash the text again. */
export function ledgerSheet(workbook: Workbook, record: RecordOfTest): void {
  const note = 'SHA-256 of a canonical text (RFC 8785, joined from left to right) is its hash; every text names the hash before it.'
  const sheet = addSheet(workbook, LEDGER_SHEET, { title: 'Ledger', note, record: record.title }, columns)
  record.entries.forEach((entry, index) => {
    const row = FIRST_ROW + index
    putRow(sheet, row, columns, [
      { number: entry.seq, format: '0' },
      entry.kind,
      record.nameOf(entry.authorId),
      { moment: entry.observedAt },
      { moment: entry.receivedAt },
      clocksApart(entry) === '' ? null : { words: clocksApart(entry), bold: true },
      entry.irregular.length > 0 ? { words: entry.irregular.join(', '), bold: true, colour: colours.stop } : null,
      entry.hash,
      entry.prevHash,
    ])
    cellParts(record.stored[index]?.canonical ?? '').forEach((part, at) => put(sheet.getCell(row, columns.length + at), part))
  })
  // A text of thousands of signs on paper helps nobody: the hashes print, the texts stay in the file.
  // exceljs writes the dollar before the column only.
  sheet.pageSetup.printArea = `A$1:I$${FIRST_ROW + record.entries.length - 1}`
}
