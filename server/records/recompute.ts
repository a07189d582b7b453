import { execFile } from 'node:child_process'
import { mkdir, mkdtemp, readFile, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'
import ExcelJS, { type CellFormulaValue, type Workbook, type Worksheet } from 'exceljs'
import { HEADER_ROW } from './sheet'

/**
 * A record's workbook recomputed by another program, so that nobody has to take this program's word for its figures.
 * LibreOffice trusts the results that a file brings along unless it is told not to: OOXMLRecalcMode 0 makes it
 * compute every cell itself.
 */
const PROFILE = `<?xml version="1.0" encoding="UTF-8"?>
<oor:items xmlns:oor="http://openoffice.org/2001/registry" xmlns:xs="http://www.w3.org/2001/XMLSchema" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">
<item oor:path="/org.openoffice.Office.Calc/Formula/Load"><prop oor:name="OOXMLRecalcMode" oor:op="fuse"><value>0</value></prop></item>
</oor:items>`

/** Every sheet as text, numbers in full; the names of the options are LibreOffice's own. */
const EVERY_SHEET = 'csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,-1'

/** Debian's package without its windows: it converts, and that is all that is asked of it here. */
const INSTALL = 'apt-get install --no-install-recommends -y libreoffice-calc-nogui'

/** What a person reads when LibreOffice is not there. */
export class LibreOfficeMissing extends Error {
  constructor() {
    const asRoot = process.getuid?.() === 0 ? INSTALL : `sudo ${INSTALL}`
    super(`LibreOffice is not installed here, and it is the one that recomputes. Install it with:\n  ${asRoot}`)
    this.name = 'LibreOfficeMissing'
  }
}

/** One formula of the workbook: what this program put beside it, and what LibreOffice made of it. */
export interface ComputedCell {
  /** "Readings!K7" */
  where: string
  sheet: string
  /** What its row and column are called on the sheet. */
  row: string
  column: string
  ours: number | string
  again: string
}

const run = promisify(execFile)

/** Fields of a comma-separated text with quotes (RFC 4180). */
function parseCsv(text: string): string[][] {
  const rows: string[][] = [[]]
  let field = ''
  let quoted = false
  for (let index = 0; index < text.length; index += 1) {
    const sign = text[index]
    if (quoted && sign === '"' && text[index + 1] === '"') {
      field += '"'
      index += 1
    } else if (sign === '"') quoted = !quoted
    else if (!quoted && (sign === ',' || sign === '\n')) {
      rows.at(-1)?.push(field)
      field = ''
      if (sign === '\n') rows.push([])
    } else if (sign !== '\r' || quoted) field += sign
  }
  rows.at(-1)?.push(field)
  return rows
}

const oneLine = (text: string): string => text.replace(/\s+/g, ' ').trim()

/** The words that lead a row: its first cells that hold words or a count, no formulas. */
function rowName(sheet: Worksheet, rowNumber: number): string {
  const words: string[] = []
  for (let column = 1; column <= 4 && words.length < 3; column += 1) {
    const cell = sheet.getCell(rowNumber, column)
    if (cell.type === ExcelJS.ValueType.Formula || cell.type === ExcelJS.ValueType.Date) continue
    const text = oneLine(cell.text)
    if (text !== '') words.push(text)
  }
  return words.join(', ')
}

function computedCells(workbook: Workbook, again: ReadonlyMap<string, string[][]>): ComputedCell[] {
  const found: ComputedCell[] = []
  for (const sheet of workbook.worksheets) {
    sheet.eachRow((row, rowNumber) =>
      row.eachCell((cell, column) => {
        if (cell.type !== ExcelJS.ValueType.Formula) return
        const { result } = cell.value as CellFormulaValue
        found.push({
          where: `${sheet.name}!${cell.address}`,
          sheet: sheet.name,
          row: rowName(sheet, rowNumber),
          column: oneLine(sheet.getCell(HEADER_ROW, column).text),
          ours: typeof result === 'string' ? result : Number(result ?? 0),
          again: again.get(sheet.name)?.[rowNumber - 1]?.[column - 1] ?? 'nothing',
        })
      }),
    )
  }
  return found
}

async function convert(folder: string, workbook: Workbook, name: string): Promise<Map<string, string[][]>> {
  const file = join(folder, `${name}.xlsx`)
  await workbook.xlsx.writeFile(file)
  const out = join(folder, name)
  const profile = `-env:UserInstallation=file://${join(folder, 'profile')}`
  try {
    await run('soffice', [profile, '--headless', '--convert-to', EVERY_SHEET, '--outdir', out, file])
  } catch (error) {
    throw (error as NodeJS.ErrnoException).code === 'ENOENT' ? new LibreOfficeMissing() : error
  }
  const sheets = new Map<string, string[][]>()
  for (const { name: sheet } of workbook.worksheets) {
    sheets.set(sheet, parseCsv(await readFile(join(out, `${name}-${sheet}.csv`), 'utf8')))
  }
  return sheets
}

export interface Recomputing {
  /**
   * Every formula cell with LibreOffice's own result.
   * @throws LibreOfficeMissing when there is none to ask.
   */
  recompute(workbook: Workbook): Promise<ComputedCell[]>
  /** Takes away the files that were made on the way. */
  close(): Promise<void>
}

/** Opens a folder and a LibreOffice profile of its own, so that nobody's settings change what comes out. */
export async function openRecomputing(): Promise<Recomputing> {
  const folder = await mkdtemp(join(tmpdir(), 'recompute-'))
  await mkdir(join(folder, 'profile', 'user'), { recursive: true })
  await writeFile(join(folder, 'profile', 'user', 'registrymodifications.xcu'), PROFILE)
  let count = 0
  return {
    recompute: async (workbook) => {
      count += 1
      return computedCells(workbook, await convert(folder, workbook, `record-${count}`))
    },
    close: () => rm(folder, { recursive: true, force: true }),
  }
}

/** Reads a workbook back from the bytes that a reader would download. */
export async function workbookFrom(bytes: Buffer): Promise<Workbook> {
  const workbook = new ExcelJS.Workbook()
  // exceljs declares a Buffer of its own; what it reads is any array buffer.
  await workbook.xlsx.load(bytes as unknown as ArrayBuffer)
  return workbook
}

/** "24.7%" as 0.247; anything else as the number it is. */
export const numberOf = (text: string): number => (text.endsWith('%') ? Number(text.slice(0, -1)) / 100 : Number(text))

/**
 * The difference of two equal readings carries the last bits of both, and nothing to be relative to. Below this it is
 * measured absolutely: a billionth of it is far under what any instrument of a record can tell.
 */
const LEAST_SCALE = 1e-4

/**
 * How far LibreOffice's result lies from ours, relative to ours, or to 0.0001 where ours is less; 0 for the same
 * words, Infinity for other words and for what is no number.
 */
export function differenceOf({ ours, again }: Pick<ComputedCell, 'ours' | 'again'>): number {
  if (typeof ours === 'string') return ours === again ? 0 : Infinity
  const value = again === '' ? Number.NaN : numberOf(again)
  return Number.isNaN(value) ? Infinity : Math.abs(value - ours) / Math.max(Math.abs(ours), LEAST_SCALE)
}
