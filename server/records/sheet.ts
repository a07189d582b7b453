import type { Cell, CellFormulaValue, Fill, Workbook, Worksheet } from 'exceljs'

/** How a record's sheets look, and the few ways in which a cell is filled. */
const FONT = 'Arial'
const INK = 'FF0B1733'
const GRAPHITE = 'FF364459'
const DYE = 'FF142A66'
const PAPER = 'FFF8FAFA'
const BAND = 'FFE7ECEF'
const HAIRLINE = { style: 'thin', color: { argb: 'FFA9B5C0' } } as const
const EDGE = { style: 'medium', color: { argb: INK } } as const

export const colours = { sound: 'FF085039', stop: 'FF960B15', graphite: GRAPHITE, ink: INK } as const

export interface Column {
  header: string
  width: number
  /** Numbers stand right, words left. */
  align?: 'left' | 'right' | 'center'
  wrap?: boolean
}

export interface SheetWords {
  /** A3 for the widest tables. */
  paper?: 'A4' | 'A3'
  title: string
  note: string
  /** Number and press, at the right of the title band. */
  record: string
}

/** Numbers of paper sizes in a workbook; A3 is missing among exceljs's own names for them. */
const A4: number = 9
const A3: number = 8

const fill = (argb: string): Fill => ({ type: 'pattern', pattern: 'solid', fgColor: { argb } })

/** Header row of every sheet's first table. */
export const HEADER_ROW = 4
export const FIRST_ROW = HEADER_ROW + 1

/** Opens a sheet: title band, a line that says what it holds, headers that stay and repeat on every printed page. */
export function addSheet(workbook: Workbook, name: string, words: SheetWords, columns: readonly Column[]): Worksheet {
  const sheet = workbook.addWorksheet(name, {
    views: [{ state: 'frozen', ySplit: HEADER_ROW, showGridLines: false }],
    properties: { defaultRowHeight: 15, tabColor: { argb: DYE } },
    pageSetup: {
      orientation: 'landscape',
      paperSize: words.paper === 'A3' ? A3 : A4,
      fitToPage: true,
      fitToWidth: 1,
      fitToHeight: 0,
      margins: { left: 0.5, right: 0.5, top: 0.6, bottom: 0.6, header: 0.3, footer: 0.3 },
      printTitlesRow: `1:${HEADER_ROW}`,
    },
    headerFooter: { oddFooter: `&L${words.record.replaceAll('&', '&&')}&C&A&RPage &P of &N` },
  })
  sheet.columns = columns.map(({ width }) => ({ width }))
  const last = Math.max(columns.length, 2)
  for (let column = 1; column <= last; column += 1) {
    sheet.getCell(1, column).fill = fill(DYE)
  }
  const title = sheet.getCell(1, 1)
  title.value = words.title
  title.font = { name: FONT, size: 15, bold: true, color: { argb: 'FFF2F6FC' } }
  title.alignment = { vertical: 'middle' }
  sheet.getRow(1).height = 27
  const record = sheet.getCell(2, 1)
  setText(record, words.record)
  record.font = { name: FONT, size: 10, bold: true, color: { argb: INK } }
  const note = sheet.getCell(3, 1)
  setText(note, words.note)
  note.font = { name: FONT, size: 9, color: { argb: GRAPHITE } }
  header(sheet, HEADER_ROW, columns)
  return sheet
}

/** A row of column heads; also for a second table further down. */
export function header(sheet: Worksheet, row: number, columns: readonly Column[]): void {
  columns.forEach(({ header: words, align }, index) => {
    const cell = sheet.getCell(row, index + 1)
    cell.value = words
    cell.font = { name: FONT, size: 9, bold: true, color: { argb: INK } }
    cell.fill = fill(BAND)
    cell.border = { bottom: EDGE, top: HAIRLINE }
    cell.alignment = { wrapText: true, vertical: 'bottom', horizontal: align ?? 'left', ...indent(index, align) }
  })
  const lines = Math.max(
    ...columns.map(({ header: words, width }) =>
      words.split('\n').reduce((sum, line) => sum + Math.max(1, Math.ceil(line.length / width)), 0),
    ),
  )
  sheet.getRow(row).height = 5 + 12.5 * lines
}

/** Words stand off from the number that ends right before them. */
function indent(index: number, align: Column['align']): { indent?: number } {
  return index > 0 && (align === undefined || align === 'left') ? { indent: 1 } : {}
}

/** A heading above a further table. */
export function heading(sheet: Worksheet, row: number, words: string): void {
  const cell = sheet.getCell(row, 1)
  cell.value = words
  cell.font = { name: FONT, size: 11, bold: true, color: { argb: INK } }
}

/** What may stand in a cell: words, a number with its format, a live formula with the core's own result, or a moment. */
export type Content =
  | string
  | null
  | { number: number | null; format: string }
  | { formula: string; result: number | string; format: string }
  | { moment: string | null }
  | { words: string; bold?: boolean; colour?: string; strike?: boolean }

/** Signs that spreadsheet programs take for the beginning of a formula. */
const TAKEN_FOR_A_FORMULA = /^[=+\-@\t\r]/

/**
 * Puts words into a cell as words. What begins like a formula is stored as a string and formatted as text, so that
 * it isn't taken for one when somebody edits the cell either.
 */
export function setText(cell: Cell, words: string): void {
  cell.value = words
  if (TAKEN_FOR_A_FORMULA.test(words)) cell.numFmt = '@'
}

export function put(cell: Cell, content: Content): void {
  cell.font = { name: FONT, size: 10, color: { argb: INK } }
  if (content === null) return
  if (typeof content === 'string') return setText(cell, content)
  if ('words' in content) {
    setText(cell, content.words)
    cell.font = {
      name: FONT,
      size: 10,
      bold: content.bold ?? false,
      strike: content.strike ?? false,
      color: { argb: content.colour ?? INK },
    }
    return
  }
  if ('moment' in content) {
    if (content.moment === null) return
    cell.value = new Date(content.moment)
    cell.numFmt = 'yyyy-mm-dd hh:mm:ss'
    cell.alignment = { horizontal: 'left' }
    return
  }
  cell.numFmt = content.format
  if ('formula' in content) {
    const value: CellFormulaValue = { formula: content.formula, result: content.result, date1904: false }
    cell.value = value
    return
  }
  cell.value = content.number
}

/** Fills a row and rules it off. */
export function putRow(sheet: Worksheet, row: number, columns: readonly Column[], contents: readonly Content[]): void {
  columns.forEach(({ align, wrap }, index) => {
    const cell = sheet.getCell(row, index + 1)
    put(cell, contents[index] ?? null)
    cell.border = { bottom: HAIRLINE }
    cell.alignment = {
      ...cell.alignment,
      horizontal: align ?? 'left',
      ...indent(index, align),
      ...(wrap ? { wrapText: true } : {}),
      vertical: 'middle',
    }
  })
}

/** Shades a row that was typed in error or counts for nothing further. */
export function shade(sheet: Worksheet, row: number, columns: number): void {
  for (let column = 1; column <= columns; column += 1) sheet.getCell(row, column).fill = fill(PAPER)
}

/** "C7" for a place on a sheet; column counted from 1. */
export function address(column: number, row: number): string {
  let letters = ''
  for (let rest = column; rest > 0; rest = Math.floor((rest - 1) / 26)) letters = String.fromCharCode(65 + ((rest - 1) % 26)) + letters
  return `${letters}${row}`
}

/** A place as another sheet's formula names it: 'Readings'!C7. */
export function onSheet(sheet: string, column: number, row: number): string {
  return `'${sheet}'!${address(column, row)}`
}

/** A number format with fixed decimals. */
export function decimals(count: number): string {
  return count === 0 ? '0' : `0.${'0'.repeat(count)}`
}
