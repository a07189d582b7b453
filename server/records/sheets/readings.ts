import type { Workbook } from 'exceljs'
import { NET } from '#shared/proof-test/deflection'
import type { Reading } from '#shared/proof-test/entries'
import { FORCE_DECIMALS, parseDecimal, toSI, toUnit, unitLabel } from '#shared/units'
import type { RecordOfTest } from '../record'
import { forceInstruments, leadPoints, loadCellOf, ramsOfGauge, recordRows, type RecordRow } from '../rows'
import { FIRST_ROW, addSheet, address, decimals, onSheet, putRow, shade, type Column, type Content } from '../sheet'
import { pointDirectionName } from './instruments'
import { asTyped } from './train'
import { factorName } from './units'

export const READINGS_SHEET = 'Readings'

/** Where the readings of a test stand, so that other sheets can compute from them. */
export interface ReadingsPlaces {
  /** Columns: SI value by gauge, load cell or point; deflection by point. */
  si: ReadonlyMap<string, number>
  deflection: ReadonlyMap<string, number>
  pressure: number | null
  force: number
  lead: number
  /** A cell of this sheet, as another sheet names it. */
  at(column: number, key: string): string | null
}

interface Source {
  id: string
  name: string
  si: string
  point: boolean
}

const BEFORE = 7

function sourcesOf(record: RecordOfTest): Source[] {
  const { opened } = record
  return [
    ...forceInstruments(opened).map(({ id, details }) => ({
      id,
      name: details.code,
      si: details.kind === 'gauge' ? 'Pa' : 'N',
      point: false,
    })),
    ...opened.points.map(({ id, label }) => ({ id, name: label, si: 'm', point: true })),
  ]
}

function layOut(record: RecordOfTest) {
  const { opened } = record
  const sources = sourcesOf(record)
  const length = unitLabel(opened.lengthUnit)
  const columns: Column[] = [
    { header: 'Entry', width: 7, align: 'right' },
    { header: 'Leg', width: 14 },
    { header: 'Climb', width: 7, align: 'right' },
    { header: 'Row', width: 18 },
    { header: 'Attempt', width: 8, align: 'right' },
    { header: 'Mark\n(UTC)', width: 19 },
    { header: 'Entered by', width: 18 },
  ]
  const si = new Map<string, number>()
  const deflection = new Map<string, number>()
  for (const source of sources) {
    columns.push(
      { header: `${source.name}\nas typed`, width: 10, align: 'right' },
      { header: `${source.name}\ncorrected to`, width: 11, align: 'right' },
      { header: 'Unit', width: source.point ? 6 : 7 },
      { header: `${source.name}\n${source.si}`, width: source.point ? 11 : 14, align: 'right' },
    )
    si.set(source.id, columns.length)
  }
  for (const source of sources.filter(({ point }) => point)) {
    columns.push({ header: `${source.name}, deflection\n${length}`, width: 13, align: 'right' })
    deflection.set(source.id, columns.length)
  }
  columns.push({ header: `${opened.net?.label ?? opened.points[0]?.label ?? 'Deflection'}\n${length}`, width: 16, align: 'right' })
  const lead = columns.length
  columns.push({ header: `U (k = 2)\n${length}`, width: 9, align: 'right' })
  const pressure = loadCellOf(opened) ? null : columns.push({ header: 'Pressure that counts\nPa', width: 14, align: 'right' })
  columns.push(
    { header: 'Force\nN', width: 11, align: 'right' },
    { header: `Force\n${unitLabel(opened.forceUnit, { plural: true })}`, width: 11, align: 'right' },
    { header: 'U (k = 2)\nN', width: 9, align: 'right' },
  )
  return { sources, columns, si, deflection, lead, pressure, force: columns.length - 2 }
}

type Layout = ReturnType<typeof layOut>

/** Force from the gauges' pressures and the train's named cells, or the load cell's own reading. */
function forceFormula(record: RecordOfTest, { si }: Layout, row: number): string {
  const cell = loadCellOf(record.opened)
  if (cell) return address(si.get(cell.id) ?? 1, row)
  const parts = forceInstruments(record.opened).map(({ id }, index) => {
    const pressure = address(si.get(id) ?? 1, row)
    const rams = ramsOfGauge(record.opened, index)
    if (rams === 'all') return `${pressure}*ram_area-spring_return+carried_weight`
    return `${pressure}*ram_${rams}_area-ram_${rams}_springs+ram_${rams}_weight`
  })
  return parts.join('+')
}

function reading(readings: readonly Reading[], id: string): Reading | null {
  const found = readings.find((candidate) => candidate.sourceId === id)
  return found && parseDecimal(found.text, { signed: true }).ok ? found : null
}

function sourceCells(row: RecordRow, source: Source, column: number, sheetRow: number): Content[] {
  const typed = reading(row.typed, source.id)
  const counts = reading(row.readings, source.id)
  if (!typed || !counts) return [null, null, null, null]
  const corrected = typed.text !== counts.text || typed.unit !== counts.unit
  const first = address(column - 3, sheetRow)
  const second = address(column - 2, sheetRow)
  const format = source.point ? '0.000000' : '0'
  return [
    asTyped(typed),
    corrected ? asTyped(counts) : null,
    typed.unit === counts.unit ? unitLabel(counts.unit) : `${unitLabel(counts.unit)} (first typed in ${unitLabel(typed.unit)})`,
    { formula: `IF(ISBLANK(${second}),${first},${second})*${factorName(counts.unit)}`, result: toSI(counts), format },
  ]
}

function derivedCells(record: RecordOfTest, layout: Layout, row: RecordRow, sheetRow: number, datumRow: number | null): Content[] {
  const { opened } = record
  const { figures } = row
  const unit = opened.lengthUnit
  const digits = `${decimals(unit === 'in' ? 4 : 3)}`
  const place = (column: number | undefined, at: number): string => address(column ?? 1, at)
  const deflections = opened.points.map((point, index): Content => {
    const figure = figures?.deflections.find((candidate) => candidate.id === point.id)
    if (!figure || datumRow === null) return null
    const column = layout.si.get(point.id)
    const difference = `(${place(column, sheetRow)}-${place(column, datumRow)})`
    return {
      formula: `${difference}*${pointDirectionName(index)}/${factorName(unit)}`,
      result: toUnit(figure.deflection, unit),
      format: digits,
    }
  })
  const points = leadPoints(opened)
  const leadId = opened.net && figures?.deflections[0]?.id === NET ? NET : null
  const lead = figures?.lead ?? null
  let net: Content = null
  if (points && lead && datumRow !== null) {
    const plus = place(layout.deflection.get(leadId === null ? lead.id : points.plus.id), sheetRow)
    const minus = points.minus.map((point) => place(layout.deflection.get(point.id), sheetRow))
    const formula = leadId === null || minus.length === 0 ? plus : `${plus}-AVERAGE(${minus.join(',')})`
    net = { formula, result: toUnit(lead.deflection, unit), format: digits }
  }
  const force = figures?.force ?? null
  const pressures = forceInstruments(opened).map(({ id }) => place(layout.si.get(id), sheetRow))
  const pressure: Content =
    force?.pressure === null || !force
      ? null
      : { formula: pressures.length > 1 ? `MAX(${pressures.join(',')})` : (pressures[0] ?? ''), result: force.pressure, format: '0' }
  return [
    ...deflections,
    net,
    lead && datumRow !== null ? { number: toUnit(lead.U, unit), format: digits } : null,
    ...(layout.pressure === null ? [] : [pressure]),
    force ? { formula: forceFormula(record, layout, sheetRow), result: force.force, format: '0' } : null,
    force
      ? {
          formula: `${place(layout.force, sheetRow)}/${factorName(opened.forceUnit)}`,
          result: toUnit(force.force, opened.forceUnit),
          format: decimals(FORCE_DECIMALS[opened.forceUnit]),
        }
      : null,
    force ? { number: force.U, format: '0' } : null,
  ]
}

function sheetRows(rows: readonly RecordRow[]): Map<string, number> {
  return new Map(rows.map((row, index) => [row.key, FIRST_ROW + index]))
}

/** Where everything stands on this sheet, for formulas of other sheets. */
export function placesOfReadings(record: RecordOfTest): ReadingsPlaces {
  const { si, deflection, pressure, force, lead } = layOut(record)
  const rowOf = sheetRows(recordRows(record))
  return {
    si,
    deflection,
    pressure,
    force,
    lead,
    at: (column, key) => {
      const row = rowOf.get(key)
      return row === undefined ? null : onSheet(READINGS_SHEET, column, row)
    },
  }
}

/** All readings as typed, what they were corrected to, in SI, and the force and deflection computed from them. */
export function readingsSheet(workbook: Workbook, record: RecordOfTest): void {
  const layout = layOut(record)
  const rows = recordRows(record)
  const note =
    'A correction stands beside what was typed first; formulas take it where there is one. Deflection is measured from the climb’s last datum, in the direction of loading.'
  const sheet = addSheet(workbook, READINGS_SHEET, { title: 'Readings', note, record: record.title, paper: 'A3' }, layout.columns)
  sheet.views = [{ state: 'frozen', xSplit: 4, ySplit: FIRST_ROW - 1, showGridLines: false }]
  const rowOf = sheetRows(rows)
  rows.forEach((row, index) => {
    const sheetRow = FIRST_ROW + index
    const datumRow = row.datum === null ? null : (rowOf.get(row.datum) ?? null)
    const cells: Content[] = [
      row.seq === null ? null : { number: row.seq, format: '0' },
      row.leg,
      row.climb === null ? null : { number: row.climb, format: '0' },
      row.what,
      row.attempt === null ? null : { number: row.attempt, format: '0' },
      { moment: row.at },
      record.nameOf(row.by),
      ...layout.sources.flatMap((source, at) => sourceCells(row, source, BEFORE + 4 * (at + 1), sheetRow)),
      ...derivedCells(record, layout, row, sheetRow, datumRow),
    ]
    putRow(sheet, sheetRow, layout.columns, cells)
    layout.sources.forEach((_source, at) => {
      const typed = sheet.getCell(sheetRow, BEFORE + 4 * at + 1)
      const corrected = sheet.getCell(sheetRow, BEFORE + 4 * at + 2)
      if (corrected.value !== null) typed.font = { ...typed.font, strike: true, color: { argb: 'FF960B15' } }
    })
    if (row.figures === null || row.what.startsWith('Datum,') || row.what === 'Seating') shade(sheet, sheetRow, layout.columns.length)
  })
}
