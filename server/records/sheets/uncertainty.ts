import type { Workbook } from 'exceljs'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, putRow, type Column } from '../sheet'

export const UNCERTAINTY_SHEET = 'Uncertainty'

const columns: Column[] = [
  { header: 'Leg', width: 14 },
  { header: 'Climb', width: 7, align: 'right' },
  { header: 'Stage', width: 9 },
  { header: 'Entry', width: 8, align: 'right' },
  { header: 'Source', width: 46 },
  { header: 'Half-width or U, N', width: 18, align: 'right' },
  { header: 'Distribution', width: 14 },
  { header: 'Standard uncertainty, N', width: 22, align: 'right' },
  { header: 'Share of the variance', width: 20, align: 'right' },
]

/** The uncertainty budget of the force of every row of every stage. */
export function uncertaintySheet(workbook: Workbook, record: RecordOfTest): void {
  const note =
    'JCGM 100 (GUM) 5: standard uncertainties add as squares; U = 2u. A certificate’s U/k stands in place of the class where there is one.'
  const sheet = addSheet(workbook, UNCERTAINTY_SHEET, { title: 'Uncertainty of every force', note, record: record.title }, columns)
  let row = FIRST_ROW
  for (const climb of record.evaluation.climbs) {
    const leg = record.opened.legs[climb.leg]?.label ?? `Leg ${climb.leg + 1}`
    for (const stage of climb.stages) {
      for (const { row: read, force } of stage.rows) {
        for (const line of force?.budget ?? []) {
          putRow(sheet, row, columns, [
            leg,
            { number: climb.climb + 1, format: '0' },
            { words: `${stage.percent} %`, bold: true },
            { number: read.seq, format: '0' },
            line.name,
            { number: line.value, format: '0.0' },
            line.distribution,
            { number: line.u, format: '0.0' },
            { number: line.share, format: '0.0%' },
          ])
          row += 1
        }
      }
    }
  }
}
