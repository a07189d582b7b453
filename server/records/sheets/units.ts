import type { Workbook } from 'exceljs'
import {
  AREA_UNITS,
  FORCE_UNITS,
  LENGTH_UNITS,
  MASS_UNITS,
  PRESSURE_UNITS,
  STANDARD_GRAVITY,
  toSI,
  unitLabel,
  type Unit,
} from '#shared/units'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, putRow, type Column } from '../sheet'

export const UNITS_SHEET = 'Units'

const columns: Column[] = [
  { header: 'Unit', width: 22 },
  { header: 'Measures', width: 14 },
  { header: 'One of it in SI', width: 22, align: 'right' },
  { header: 'SI unit', width: 10 },
  { header: 'Name in formulas', width: 24 },
]

const quantities = [
  { what: 'force', si: 'N', units: FORCE_UNITS },
  { what: 'pressure', si: 'Pa', units: PRESSURE_UNITS },
  { what: 'length', si: 'm', units: LENGTH_UNITS },
  { what: 'area', si: 'm²', units: AREA_UNITS },
  { what: 'mass', si: 'kg', units: MASS_UNITS },
] as const

/** The named cell that holds a unit's factor: `unit_psi`. */
export function factorName(unit: Unit): string {
  return `unit_${unit.replaceAll('-', '_')}`
}

/** Every factor that the formulas use, each in a named cell. */
export function unitsSheet(workbook: Workbook, record: RecordOfTest): void {
  const note = 'Exact by definition: 1 in = 0.0254 m, 1 lb = 0.45359237 kg, g = 9.80665 m/s². "Ton" never stands alone: there are three.'
  const sheet = addSheet(workbook, UNITS_SHEET, { title: 'Units', note, record: record.title }, columns)
  let row = FIRST_ROW
  const add = (words: string, what: string, value: number, si: string, name: string): void => {
    putRow(sheet, row, columns, [words, what, { number: value, format: 'General' }, si, name])
    sheet.getCell(row, 3).names = [name]
    row += 1
  }
  for (const { what, si, units } of quantities) {
    for (const unit of units) add(unitLabel(unit), what, toSI({ text: '1', unit }), si, factorName(unit))
  }
  add('standard gravity', 'acceleration', STANDARD_GRAVITY, 'm/s²', 'standard_gravity')
}
