import type { Workbook } from 'exceljs'
import { chartPicture } from '../chart-picture'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, heading, put } from '../sheet'

export const CHART_SHEET = 'Chart'

const ROW_HEIGHT = 20

/** Deflection against load, one picture a leg: solid the first climb, dotted its repeat. */
export function chartSheet(workbook: Workbook, record: RecordOfTest): void {
  const { opened, evaluation, state } = record
  const note =
    'Bars are U (k = 2), at least as wide as the line. Solid: first climb. Dotted: repeat climb. Ring: what stayed after release. Letter: corrected, see the sheet Corrections.'
  const sheet = addSheet(workbook, CHART_SHEET, { title: 'Deflection against load', note, record: record.title }, [
    { header: 'Figures are on the sheet Stages', width: 100 },
  ])
  let row = FIRST_ROW
  opened.legs.forEach((leg, index) => {
    const picture = chartPicture(
      opened,
      evaluation.climbs.filter((climb) => climb.leg === index),
      state,
    )
    if (opened.legs.length > 1) {
      heading(sheet, row, leg.label)
      row += 1
    }
    if (picture === null) {
      put(sheet.getCell(row, 1), 'No stage was read.')
      row += 2
      return
    }
    const image = workbook.addImage({ base64: picture.png.toString('base64'), extension: 'png' })
    sheet.addImage(image, { tl: { col: 0.1, row: row - 0.6 }, ext: { width: picture.width, height: picture.height }, editAs: 'absolute' })
    row += Math.ceil(picture.height / ROW_HEIGHT) + 2
  })
}
