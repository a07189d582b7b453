import { execFile } from 'node:child_process'
import { mkdtemp, mkdir, readFile, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { promisify } from 'node:util'
import ExcelJS, { type CellFormulaValue, type Workbook } from 'exceljs'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { recordWorkbook } from '#server/records/record-workbook'
import { recordedTest, stoppedTest, storedEntries, twoLegTest, type RecordedTest } from '../factories/recorded-test'
import { comparedWith } from '../support/outside-values'

/**
 * The workbook of a record, recomputed by another program. LibreOffice trusts the results that a file brings along
 * unless it is told not to: OOXMLRecalcMode 0 makes it compute every cell itself.
 */
const run = promisify(execFile)

const PROFILE = `<?xml version="1.0" encoding="UTF-8"?>
<oor:items xmlns:oor="http://openoffice.org/2001/registry" xmlns:xs="http://www.w3.org/2001/XMLSchema" xmlns:xsi="http://www.w3.org/2001/XMLSchema-instance">
<item oor:path="/org.openoffice.Office.Calc/Formula/Load"><prop oor:name="OOXMLRecalcMode" oor:op="fuse"><value>0</value></prop></item>
</oor:items>`

/** Every sheet as text, numbers in full; the names of the options are LibreOffice's own. */
const EVERY_SHEET = 'csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,-1'

let folder = ''

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'recompute-'))
  await mkdir(join(folder, 'profile', 'user'), { recursive: true })
  await writeFile(join(folder, 'profile', 'user', 'registrymodifications.xcu'), PROFILE)
})
afterAll(() => rm(folder, { recursive: true, force: true }))

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

async function recompute(workbook: Workbook, name: string): Promise<Map<string, string[][]>> {
  const file = join(folder, `${name}.xlsx`)
  await workbook.xlsx.writeFile(file)
  const out = join(folder, name)
  await run('soffice', [`-env:UserInstallation=file://${join(folder, 'profile')}`, '--headless', '--convert-to', EVERY_SHEET, '--outdir', out, file])
  const sheets = new Map<string, string[][]>()
  for (const { name: sheet } of workbook.worksheets) {
    sheets.set(sheet, parseCsv(await readFile(join(out, `${name}-${sheet}.csv`), 'utf8')))
  }
  return sheets
}

async function workbookOf(recorded: RecordedTest): Promise<Workbook> {
  const source = { id: recorded.id, stored: storedEntries(recorded.entries), people: recorded.people, seals: [], writtenAt: '2026-09-21T08:00:00.000Z' }
  const workbook = new ExcelJS.Workbook()
  // exceljs declares a Buffer of its own; what it reads is any array buffer.
  await workbook.xlsx.load((await recordWorkbook(source)) as unknown as ArrayBuffer)
  return workbook
}

interface Computed {
  where: string
  cached: number | string
  again: string
}

function computedCells(workbook: Workbook, sheets: Map<string, string[][]>): Computed[] {
  const found: Computed[] = []
  for (const sheet of workbook.worksheets) {
    sheet.eachRow((row, rowNumber) =>
      row.eachCell((cell, column) => {
        if (cell.type !== ExcelJS.ValueType.Formula) return
        const { result } = cell.value as CellFormulaValue
        const again = sheets.get(sheet.name)?.[rowNumber - 1]?.[column - 1] ?? 'nothing'
        found.push({ where: `${sheet.name}!${cell.address}`, cached: typeof result === 'string' ? result : Number(result ?? 0), again })
      }),
    )
  }
  return found
}

/** "24.7%" as 0.247; anything else as the number it is. */
const numberOf = (text: string): number => (text.endsWith('%') ? Number(text.slice(0, -1)) / 100 : Number(text))

/** Lengths in inches, area from the maker, springs and a carried weight: the other branches of the formulas. */
function withSpringsInInches(): RecordedTest {
  const { opened } = recordedTest({ until: 'opened' }).state
  const ram = opened?.press.rams[0]
  if (!opened || !ram) throw new Error('The test was opened with a ram.')
  const changed = {
    ...ram,
    effectiveArea: { text: '3.045', unit: 'in2' as const },
    springReturn: { text: '120', unit: 'N' as const },
    carriedMass: { text: '22.5', unit: 'lb' as const },
    carriedComesDown: false,
  }
  return recordedTest({ opened: { lengthUnit: 'in', forceUnit: 'kN', press: { ...opened.press, rams: [changed] } } })
}

describe.each([
  ['countersigned', recordedTest],
  ['stopped', stoppedTest],
  ['of two legs', twoLegTest],
  ['read in inches against springs', withSpringsInInches],
] as const)('the record of a test that was %s', (name, make) => {
  test('comes out the same when LibreOffice computes every cell again', { timeout: 120_000 }, async () => {
    const workbook = await workbookOf(make())
    const cells = computedCells(workbook, await recompute(workbook, `same-${name.replaceAll(' ', '-')}`))
    expect(cells.length).toBeGreaterThan(100)
    const differing = cells.filter(({ cached, again }) => {
      if (typeof cached === 'string') return again !== cached
      const value = numberOf(again)
      comparedWith('LibreOffice Calc, cells recomputed', cached, value)
      return !(Math.abs(value - cached) <= 1e-9 * Math.max(1, Math.abs(cached)))
    })
    expect(differing).toEqual([])
  })
})

test('a reader who types another bore gets other forces: formulas are live, not pictures of numbers', { timeout: 120_000 }, async () => {
  const workbook = await workbookOf(recordedTest())
  const before = computedCells(workbook, await recompute(workbook, 'bore-50'))
  const bore = workbook.getWorksheet('Train')?.getCell('B5')
  expect(bore?.value).toBe(50)
  if (bore) bore.value = 60
  const after = computedCells(workbook, await recompute(workbook, 'bore-60'))
  const head = workbook.getWorksheet('Readings')?.getRow(4)
  let forceColumn = 0
  head?.eachCell((cell, column) => {
    if (cell.text === 'Force\nN') forceColumn = column
  })
  const letter = workbook.getWorksheet('Readings')?.getColumn(forceColumn).letter ?? ''
  const forces = (cells: Computed[]): number[] =>
    cells.filter(({ where }) => new RegExp(`^Readings!${letter}\\d+$`).test(where)).map(({ again }) => numberOf(again))
  expect(forces(before).filter((newton) => newton > 100_000).length).toBeGreaterThan(1)
  forces(after).forEach((newton, index) => expect(newton).toBeCloseTo((forces(before)[index] ?? 0) * (60 / 50) ** 2, 6))
})
