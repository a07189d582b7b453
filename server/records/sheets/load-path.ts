import type { Workbook } from 'exceljs'
import { engineerText } from '#shared/proof-test/check-record'
import { checkOf } from '#shared/proof-test/expected'
import { CHECK_CAUTIONS, factorWords } from '#shared/structure/check-words'
import type { CheckResult } from '#shared/structure/load-path-check'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, address, colours, heading, put, putRow, type Column, type Content } from '../sheet'

export const LOAD_PATH_SHEET = 'Load path check'

const columns: Column[] = [
  { header: 'Member or joint', width: 30 },
  { header: 'Check', width: 30 },
  { header: 'Demand', width: 14, align: 'right' },
  { header: 'Capacity ÷ factor', width: 17, align: 'right' },
  { header: 'Unit', width: 7 },
  { header: 'Utilisation', width: 12, align: 'right' },
  { header: 'Verdict', width: 14 },
  { header: 'Carries', width: 34, wrap: true },
  { header: 'Source, or why it is not checked', width: 78, wrap: true },
]
const [DEMAND, CAPACITY] = [3, 4]

const FORMATS = { N: '0', 'N·m': '0', Pa: '0' } as const

function used(result: CheckResult, row: number): Content {
  const { utilisation } = result
  if (utilisation === null) return null
  return { formula: `${address(DEMAND, row)}/${address(CAPACITY, row)}`, result: utilisation, format: '0.0%' }
}

function verdictOf({ verdict }: CheckResult): Content {
  if (verdict === 'not checked') return { words: 'NOT CHECKED', bold: true }
  return { words: verdict, bold: true, colour: verdict === 'beyond' ? colours.stop : colours.sound }
}

/** Every check of every member and joint as the test was opened with them: demand, capacity, utilisation, source. */
export function loadPathSheet(workbook: Workbook, record: RecordOfTest): void {
  const { opened } = record
  const check = checkOf(opened)
  const sheet = addSheet(
    workbook,
    LOAD_PATH_SHEET,
    { title: 'Load path check, an estimate', note: check.sentence, record: record.title },
    columns,
  )
  check.results.forEach((result, index) => {
    const row = FIRST_ROW + index
    const { unit } = result
    const figure = (value: number | null): Content => (value === null || unit === null ? null : { number: value, format: FORMATS[unit] })
    putRow(sheet, row, columns, [
      { words: result.name, bold: true },
      result.check,
      figure(result.demand),
      figure(result.capacity),
      unit,
      used(result, row),
      verdictOf(result),
      result.carries,
      result.notChecked ?? result.source,
    ])
  })
  let row = FIRST_ROW + check.results.length + 1
  const say = (words: string, more: string | null = null): void => {
    put(sheet.getCell(row, 1), words)
    if (more !== null) put(sheet.getCell(row, 2), more)
    row += 1
  }
  if (opened.engineer) say('Engineer’s document', engineerText(opened.engineer))
  const { band, missing } = check.expected
  say(
    'Expected opening, mm',
    band
      ? `${(band.low * 1000).toFixed(2)} to ${(band.high * 1000).toFixed(2)} at ${(check.load / 1000).toFixed(1)} kN`
      : `not estimated: ${missing}`,
  )
  heading(sheet, row, 'Factors')
  row += 1
  for (const [name, value] of factorWords()) say(name, value)
  heading(sheet, row, 'What it leaves out')
  row += 1
  for (const caution of CHECK_CAUTIONS) say(caution)
}
