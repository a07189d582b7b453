import type { Workbook } from 'exceljs'
import { ASME_B40_GRADES, type GaugeAccuracy } from '#shared/hydraulics/gauge'
import { calibrationState, type FrozenInstrument } from '#shared/instruments/model'
import type { RecordOfTest } from '../record'
import { leadFigureIncrement, leadPoints } from '../rows'
import { FIRST_ROW, addSheet, address, header, heading, putRow, type Column, type Content } from '../sheet'
import { toSI, unitLabel } from '#shared/units'
import { asTyped, unitText } from './train'
import { factorName } from './units'

export const INSTRUMENTS_SHEET = 'Instruments'

const columns: Column[] = [
  { header: 'Code', width: 12 },
  { header: 'Kind', width: 16 },
  { header: 'Description', width: 26 },
  { header: 'Full scale\nor range', width: 11, align: 'right' },
  { header: 'Unit', width: 12 },
  { header: 'Reads in\nsteps of', width: 10, align: 'right' },
  { header: 'Unit', width: 8 },
  { header: 'Accuracy', width: 26, wrap: true },
  { header: 'Calibrated on', width: 13 },
  { header: 'Due on', width: 12 },
  { header: 'State on the day\nof the test', width: 16 },
  { header: 'Certificate', width: 16 },
  { header: 'Compared with', width: 26, wrap: true },
  { header: 'U of certificate', width: 11, align: 'right' },
  { header: 'Unit', width: 8 },
  { header: 'k', width: 5, align: 'right' },
]

const pointColumns: Column[] = [
  { header: 'Letter', width: 12 },
  { header: 'Point', width: 16 },
  { header: 'Read by', width: 26 },
  { header: 'Rises with load\n1 or −1', width: 11, align: 'right' },
  { header: 'In the net figure', width: 12 },
  { header: 'Increment\nm', width: 10, align: 'right' },
]

/** How a calibration stood on the day of the test, in words. */
export const CALIBRATION_STATES = {
  'in-date': 'in date',
  'out-of-date': 'out of date',
  'out-of-tolerance': 'out of tolerance',
  never: 'never calibrated',
} as const

/** The named cell that turns a point's reading into the direction of loading. */
export function pointDirectionName(index: number): string {
  return `point_${index + 1}_direction`
}

/** A gauge's accuracy in words: "ASME B40.100 grade 2A, 0.5 % of span". */
export function accuracyText(accuracy: GaugeAccuracy): string {
  if (accuracy.standard === 'en-837-1') return `EN 837-1 class ${accuracy.class}, ${accuracy.class} % of span`
  if (accuracy.standard === 'stated') return `stated, ${accuracy.percentOfSpan} % of span`
  const { outer, middle } = ASME_B40_GRADES[accuracy.grade]
  const zones = outer === middle ? `${middle} % of span` : `${middle} % of span in the middle half, ${outer} % outside`
  return `ASME B40.100 grade ${accuracy.grade}, ${zones}`
}

/** Kind, description, range with its unit, increment with its unit, accuracy. */
export function detailCells({ details }: FrozenInstrument): Content[] {
  switch (details.kind) {
    case 'gauge':
      return [
        `gauge, ${details.style}`,
        details.description,
        asTyped(details.fullScale),
        unitText(details.fullScale),
        asTyped(details.increment),
        unitText(details.increment),
        accuracyText(details.accuracy),
      ]
    case 'load-cell':
      return [
        'load cell',
        details.description,
        asTyped(details.fullScale),
        unitText(details.fullScale),
        asTyped(details.increment),
        unitText(details.increment),
        `${details.errorPercentOfSpan} % of span`,
      ]
    case 'indicator': {
      const limit = details.errorLimit ? `± ${details.errorLimit.text} ${unitLabel(details.errorLimit.unit)}` : 'one increment'
      return [
        `indicator, ${details.style}`,
        details.description,
        asTyped(details.range),
        unitText(details.range),
        asTyped(details.increment),
        unitText(details.increment),
        limit,
      ]
    }
  }
}

/** Instruments as they were when the test opened, with the calibration then in force, and the points they read. */
export function instrumentsSheet(workbook: Workbook, record: RecordOfTest): void {
  const { opened, state } = record
  const note = opened.instrumentOverride
    ? `Used out of calibration, with this reason: ${opened.instrumentOverride}`
    : 'As they were when the test was opened, with the calibration then in force.'
  const sheet = addSheet(workbook, INSTRUMENTS_SHEET, { title: 'Instruments', note, record: record.title }, columns)
  const day = (state.openedAt ?? record.writtenAt).slice(0, 10)
  opened.instruments.forEach((instrument, index) => {
    const { calibration } = instrument
    const uncertainty = calibration?.uncertainty ?? null
    putRow(sheet, FIRST_ROW + index, columns, [
      { words: instrument.details.code, bold: true },
      ...detailCells(instrument),
      calibration?.calibratedOn ?? null,
      calibration?.dueOn ?? null,
      CALIBRATION_STATES[calibrationState(calibration, day)],
      calibration?.certificate ?? null,
      calibration?.comparedWith ?? null,
      asTyped(uncertainty?.value ?? null),
      unitText(uncertainty?.value ?? null),
      uncertainty ? { number: uncertainty.k, format: 'General' } : null,
    ])
  })
  pointsTable(sheet, FIRST_ROW + opened.instruments.length + 1, record)
}

function pointsTable(sheet: ReturnType<typeof addSheet>, top: number, record: RecordOfTest): void {
  const { opened } = record
  heading(sheet, top, 'Measuring points')
  header(sheet, top + 1, pointColumns)
  const lead = leadPoints(opened)
  const leading = lead ? [lead.plus, ...lead.minus] : []
  const rows: number[] = []
  opened.points.forEach((point, index) => {
    const row = top + 2 + index
    const instrument = opened.instruments.find((candidate) => candidate.id === point.instrumentId)
    const details = instrument?.details.kind === 'indicator' ? instrument.details : null
    if (details && leading.includes(point)) rows.push(row)
    const increment: Content = details
      ? {
          formula: `${details.increment.text.replace(',', '.')}*${factorName(details.increment.unit)}`,
          result: toSI(details.increment),
          format: '0.000000',
        }
      : null
    const part = !lead ? '' : point === lead.plus ? 'plus' : lead.minus.includes(point) ? 'less the mean' : ''
    putRow(sheet, row, pointColumns, [
      point.letter,
      point.label,
      instrument?.details.code ?? '',
      { number: point.risesWithLoad ? 1 : -1, format: '0' },
      part,
      increment,
    ])
    sheet.getCell(row, 4).names = [pointDirectionName(index)]
  })
  const last = top + 2 + opened.points.length
  putRow(sheet, last, pointColumns, [
    { words: 'Coarsest increment of the figure that leads', bold: true },
    null,
    null,
    null,
    null,
    {
      formula: rows.length > 0 ? `MAX(${rows.map((row) => address(6, row)).join(',')})` : '0',
      result: leadFigureIncrement(opened),
      format: '0.000000',
    },
  ])
  sheet.getCell(last, 6).names = ['lead_increment']
  if (opened.notMeasured.length > 0) {
    sheet.getCell(last + 1, 1).value = {
      richText: [{ text: `Not measured: ${opened.notMeasured.join(', ')}`, font: { name: 'Arial', size: 10, bold: true } }],
    }
  }
}
