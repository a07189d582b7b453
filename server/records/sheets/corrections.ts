import type { Workbook } from 'exceljs'
import { correctionLetter } from '#shared/proof-test/corrections'
import { unitLabel } from '#shared/units'
import type { RecordOfTest } from '../record'
import { recordRows } from '../rows'
import { FIRST_ROW, addSheet, colours, put, putRow, type Column } from '../sheet'
import { asTyped } from './train'

export const CORRECTIONS_SHEET = 'Corrections'

const columns: Column[] = [
  { header: 'Letter', width: 7 },
  { header: 'Entry', width: 8, align: 'right' },
  { header: 'Corrects\nentry', width: 9, align: 'right' },
  { header: 'Row', width: 26 },
  { header: 'Reading of', width: 14 },
  { header: 'Typed first', width: 11, align: 'right' },
  { header: 'Corrected to', width: 11, align: 'right' },
  { header: 'Unit', width: 12 },
  { header: 'Why', width: 56, wrap: true },
  { header: 'By', width: 20 },
  { header: 'At (UTC)', width: 19 },
  { header: 'Read again by both,\nunder load', width: 18 },
]

/** Every correction; the reading that it names stays as it was typed. */
export function correctionsSheet(workbook: Workbook, record: RecordOfTest): void {
  const { state, opened } = record
  const note = 'A reading is never edited: a correction is an entry of its own, and both print.'
  const sheet = addSheet(workbook, CORRECTIONS_SHEET, { title: 'Corrections', note, record: record.title }, columns)
  if (state.corrections.length === 0) {
    put(sheet.getCell(FIRST_ROW, 1), 'No reading was corrected.')
    return
  }
  const rows = recordRows(record)
  const sources = new Map([
    ...opened.points.map(({ id, label }) => [id, label] as const),
    ...opened.instruments.map(({ id, details }) => [id, details.code] as const),
  ])
  state.corrections.forEach((correction, index) => {
    const row = FIRST_ROW + index
    const { from, to } = correction
    const units = from.unit === to.unit ? unitLabel(to.unit) : `${unitLabel(from.unit)}, then ${unitLabel(to.unit)}`
    putRow(sheet, row, columns, [
      { words: correctionLetter(index), bold: true },
      { number: correction.seq, format: '0' },
      { number: correction.correctsSeq, format: '0' },
      rows.find((candidate) => candidate.key === correction.correctsEntryId)?.what ?? '',
      sources.get(correction.sourceId) ?? correction.sourceId,
      asTyped(from),
      asTyped(to),
      units,
      correction.why,
      record.nameOf(correction.by),
      { moment: correction.at },
      `${correction.readAgainByBoth ? 'by both' : 'not by both'}, ${correction.underLoad ? 'under load' : 'after release'}`,
    ])
    const first = sheet.getCell(row, 6)
    first.font = { ...first.font, strike: true, color: { argb: colours.stop } }
  })
}
