import type { Workbook, Worksheet } from 'exceljs'
import { lowestLimit, ramInput, totalArea } from '#shared/press/ratings'
import type { Ram } from '#shared/press/model'
import { parseDecimal, toSI, unitLabel, type Unit } from '#shared/units'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, address, decimals, header, heading, putRow, type Column, type Content } from '../sheet'
import { factorName } from './units'

export const TRAIN_SHEET = 'Train'

const columns: Column[] = [
  { header: 'Ram', width: 24 },
  { header: 'Bore\nas given', width: 10, align: 'right' },
  { header: 'Unit', width: 8 },
  { header: 'Effective area\nas given', width: 13, align: 'right' },
  { header: 'Unit', width: 8 },
  { header: 'Area\nm²', width: 15, align: 'right' },
  { header: 'Return springs\nas given', width: 13, align: 'right' },
  { header: 'Unit', width: 14 },
  { header: 'Springs\nN', width: 11, align: 'right' },
  { header: 'Carried mass\nas given', width: 12, align: 'right' },
  { header: 'Unit', width: 7 },
  { header: 'Comes down\n1 or −1', width: 11, align: 'right' },
  { header: 'Weight\nN', width: 11, align: 'right' },
  { header: 'Stroke', width: 12, align: 'right' },
]

const ratingColumns: Column[] = [
  { header: 'Part', width: 24 },
  { header: 'Rating\nas given', width: 10, align: 'right' },
  { header: 'Unit', width: 8 },
  { header: 'Carries\nN', width: 13, align: 'right' },
  { header: 'Carries\nkN', width: 8, align: 'right' },
]

/** A number as typed: its value, shown with the decimals that were typed. */
export function asTyped(typed: { text: string } | null): Content {
  if (typed === null) return null
  const parsed = parseDecimal(typed.text, { signed: true })
  return parsed.ok ? { number: parsed.value, format: decimals(parsed.decimals) } : typed.text
}

export function unitText(typed: { unit: Unit } | null): Content {
  return typed === null ? null : unitLabel(typed.unit)
}

function areaOf(ram: Ram, row: number): Content {
  const result = ramInput(ram).area
  if (ram.effectiveArea) return { formula: `${address(4, row)}*${factorName(ram.effectiveArea.unit)}`, result, format: '0.00000000' }
  const bore = `(${address(2, row)}*${factorName(ram.bore?.unit ?? 'mm')})`
  return { formula: `PI()*${bore}^2/4`, result, format: '0.00000000' }
}

function ramRow(sheet: Worksheet, row: number, ram: Ram, index: number): void {
  const { springReturn, carriedWeight } = ramInput(ram)
  const springs = ram.springReturn ? `${address(7, row)}*${factorName(ram.springReturn.unit)}` : '0'
  const mass = ram.carriedMass ? `${address(10, row)}*${factorName(ram.carriedMass.unit)}*standard_gravity*${address(12, row)}` : '0'
  putRow(sheet, row, columns, [
    ram.name,
    asTyped(ram.bore),
    unitText(ram.bore),
    asTyped(ram.effectiveArea),
    unitText(ram.effectiveArea),
    areaOf(ram, row),
    asTyped(ram.springReturn),
    unitText(ram.springReturn),
    { formula: springs, result: springReturn, format: '0.0' },
    asTyped(ram.carriedMass),
    unitText(ram.carriedMass),
    { number: ram.carriedComesDown ? 1 : -1, format: '0' },
    { formula: mass, result: carriedWeight, format: '0.0' },
    `${ram.stroke.text} ${unitLabel(ram.stroke.unit)}`,
  ])
  sheet.getCell(row, 2).names = [`ram_${index + 1}_bore`]
  sheet.getCell(row, 6).names = [`ram_${index + 1}_area`]
  sheet.getCell(row, 9).names = [`ram_${index + 1}_springs`]
  sheet.getCell(row, 13).names = [`ram_${index + 1}_weight`]
}

/** What one part of the train may carry: as given, and the force (N) it comes to. */
export interface Rating {
  name: string
  typed: { text: string; unit: Unit }
  newton: number
  formula: (cell: string) => string
}

/** The rating of every part of the train in the order in which a record lists them. */
export function ratingsOf(record: RecordOfTest): Rating[] {
  const { rams, train } = record.opened.press
  const area = totalArea(record.opened.press)
  const byPressure = (name: string, typed: Rating['typed']): Rating => ({
    name,
    typed,
    newton: toSI(typed) * area,
    formula: (cell) => `${cell}*${factorName(typed.unit)}*ram_area`,
  })
  const byForce = (name: string, typed: Rating['typed']): Rating => ({
    name,
    typed,
    newton: toSI(typed),
    formula: (cell) => `${cell}*${factorName(typed.unit)}`,
  })
  const capacity = (ram: Ram, index: number): Rating => {
    const one = byForce(`${ram.name}, rated capacity`, ram.ratedCapacity)
    if (rams.length === 1) return one
    // Rams that share a manifold: the weakest one limits what all of them may make together.
    const share = ramInput(ram).area / area
    return { ...one, newton: one.newton / share, formula: (cell) => `${one.formula(cell)}*ram_area/ram_${index + 1}_area` }
  }
  return [
    ...rams.flatMap((ram, index) => [capacity(ram, index), byPressure(`${ram.name}, rated pressure`, ram.ratedPressure)]),
    ...train.flatMap((part) => [
      ...(part.ratedForce ? [byForce(part.name, part.ratedForce)] : []),
      ...(part.ratedPressure ? [byPressure(part.name, part.ratedPressure)] : []),
    ]),
  ]
}

/** Rams with the bore that every force is computed from, and the rating of each part of the train. */
export function trainSheet(workbook: Workbook, record: RecordOfTest): void {
  const { press } = record.opened
  const note = 'Force = pressure × area − springs + weight. Area = π × bore² ÷ 4, or the maker’s effective area where one is given.'
  const sheet = addSheet(workbook, TRAIN_SHEET, { title: 'Train', note, record: record.title }, columns)
  press.rams.forEach((ram, index) => ramRow(sheet, FIRST_ROW + index, ram, index))
  const last = FIRST_ROW + press.rams.length - 1
  const totals = last + 1
  const inputs = press.rams.map(ramInput)
  const sum = (column: number, pick: (input: (typeof inputs)[number]) => number, format: string): Content => ({
    formula: `SUM(${address(column, FIRST_ROW)}:${address(column, last)})`,
    result: inputs.reduce((total, input) => total + pick(input), 0),
    format,
  })
  const total: Content[] = Array.from({ length: columns.length }, () => null)
  total[0] = { words: 'Together', bold: true }
  total[5] = sum(6, (input) => input.area, '0.00000000')
  total[8] = sum(9, (input) => input.springReturn, '0.0')
  total[12] = sum(13, (input) => input.carriedWeight, '0.0')
  putRow(sheet, totals, columns, total)
  sheet.getCell(totals, 6).names = ['ram_area']
  sheet.getCell(totals, 9).names = ['spring_return']
  sheet.getCell(totals, 13).names = ['carried_weight']

  let row = totals + 2
  heading(sheet, row, 'What each part may carry')
  header(sheet, row + 1, ratingColumns)
  row += 2
  const first = row
  for (const rating of ratingsOf(record)) {
    const carries = rating.newton
    putRow(sheet, row, ratingColumns, [
      rating.name,
      asTyped(rating.typed),
      unitText(rating.typed),
      { formula: rating.formula(address(2, row)), result: carries, format: '0' },
      { formula: `${address(4, row)}/1000`, result: carries / 1000, format: '0.0' },
    ])
    row += 1
  }
  const lowest = lowestLimit(press)?.force ?? 0
  putRow(sheet, row, ratingColumns, [
    { words: 'Lowest rating in the train', bold: true },
    null,
    null,
    { formula: `MIN(${address(4, first)}:${address(4, row - 1)})`, result: lowest, format: '0' },
    { formula: `${address(4, row)}/1000`, result: lowest / 1000, format: '0.0' },
  ])
  sheet.getCell(row, 4).names = ['lowest_rating']
  putRow(sheet, row + 1, ratingColumns, [
    { words: 'Rated load of the press', bold: true },
    asTyped(press.ratedLoad),
    unitText(press.ratedLoad),
    { formula: `${address(2, row + 1)}*${factorName(press.ratedLoad.unit)}`, result: toSI(press.ratedLoad), format: '0' },
    { formula: `${address(4, row + 1)}/1000`, result: toSI(press.ratedLoad) / 1000, format: '0.0' },
  ])
  sheet.getCell(row + 1, 4).names = ['rated_load']
}
