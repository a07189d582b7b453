import ExcelJS from 'exceljs'
import { NO_FILES, type RecordFiles } from './files'
import { recordOf, type RecordSource } from './record'
import { chartSheet } from './sheets/chart'
import { correctionsSheet } from './sheets/corrections'
import { criteriaSheet } from './sheets/criteria'
import { uncertaintySheet } from './sheets/uncertainty'
import { instrumentsSheet } from './sheets/instruments'
import { jointsSheet } from './sheets/joints'
import { ledgerSheet } from './sheets/ledger'
import { loadPathSheet } from './sheets/load-path'
import { photosSheet } from './sheets/photos'
import { peopleSheet } from './sheets/people'
import { protocolSheet } from './sheets/protocol'
import { placesOfReadings, readingsSheet } from './sheets/readings'
import { stagesSheet } from './sheets/stages'
import { summarySheet } from './sheets/summary'
import { trainSheet } from './sheets/train'
import { unitsSheet } from './sheets/units'

/**
 * The record of a proof test as a workbook. Forces, deflections, softening and set are live formulas that run from
 * the readings as typed and the bore, each with the core's own result beside it, so that a reader can recompute.
 * @throws RangeError when the ledger doesn't begin with the opening of a test.
 */
export async function recordWorkbook(source: RecordSource, files: RecordFiles = NO_FILES): Promise<Buffer> {
  const record = recordOf(source)
  const workbook = new ExcelJS.Workbook()
  workbook.creator = 'Quarterload'
  workbook.title = `Record of ${record.title}`
  workbook.company = record.opened.shop.name
  workbook.created = new Date(source.writtenAt)
  workbook.modified = workbook.created
  // Programs that heed it recompute on opening; those that don't show the core's own results.
  workbook.calcProperties.fullCalcOnLoad = true
  summarySheet(workbook, record)
  peopleSheet(workbook, record)
  stagesSheet(workbook, record, placesOfReadings(record))
  readingsSheet(workbook, record)
  criteriaSheet(workbook, record)
  uncertaintySheet(workbook, record)
  jointsSheet(workbook, record)
  loadPathSheet(workbook, record)
  trainSheet(workbook, record)
  instrumentsSheet(workbook, record)
  protocolSheet(workbook, record)
  correctionsSheet(workbook, record)
  photosSheet(workbook, record, files)
  ledgerSheet(workbook, record)
  chartSheet(workbook, record)
  unitsSheet(workbook, record)
  return Buffer.from(await workbook.xlsx.writeBuffer())
}
