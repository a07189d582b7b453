import ExcelJS, { type CellFormulaValue, type Workbook, type Worksheet } from 'exceljs'
import { beforeAll, describe, expect, test, vi } from 'vitest'
import {
  countersignedLater,
  firstClimb,
  recordedTest,
  repeatClimb,
  stoppedTest,
  storedEntries,
  twoLegTest,
  type RecordedTest,
} from '../../tests/factories/recorded-test'
import type { MemberStrength } from '#shared/structure/member-data'
import { openedPayload } from '../../tests/factories/test-press'
import { recordFileName } from './record'
import { recordWorkbook } from './record-workbook'
import { cellParts } from './sheets/ledger'

/**
 * The arithmetic here is written out once more, on its own: nothing of shared/ computes an expected value.
 * psi: 1 lbf / in² with 1 lbf = 4.4482216152605 N and 1 in = 0.0254 m (NIST SP 811, appendix B.8).
 */
const PSI = 4.4482216152605 / 0.0254 ** 2
const SHORT_TON = 2000 * 4.4482216152605
const AREA = (Math.PI * 0.05 ** 2) / 4
const force = (psi: number): number => psi * PSI * AREA
const net = ([middle, left, right]: readonly number[]): number => (middle ?? 0) - ((left ?? 0) + (right ?? 0)) / 2

/** Gauge, middle, left pin, right pin that count at every stage of the first climb, corrections in. */
const counted = [
  [0, 0, 0, 0],
  [1950, 0.54, 0.12, 0.1],
  [3900, 1.08, 0.23, 0.19],
  [5900, 1.64, 0.33, 0.31],
  [7850, 2.2, 0.44, 0.42],
] as const

// Writing and reading back a workbook takes its time on a busy machine.
vi.setConfig({ testTimeout: 60_000, hookTimeout: 60_000 })

async function open(recorded: RecordedTest): Promise<Workbook> {
  const source = {
    id: recorded.id,
    stored: storedEntries(recorded.entries),
    people: recorded.people,
    seals: [],
    writtenAt: '2026-09-21T08:00:00.000Z',
  }
  const workbook = new ExcelJS.Workbook()
  // exceljs declares a Buffer of its own; what it reads is any array buffer.
  await workbook.xlsx.load((await recordWorkbook(source)) as unknown as ArrayBuffer)
  return workbook
}

function sheetOf(workbook: Workbook, name: string): Worksheet {
  const sheet = workbook.getWorksheet(name)
  if (!sheet) throw new Error(`There is no sheet ${name}.`)
  return sheet
}

/** The rows of a sheet's first table, by the first line of each column's head; a second of a name gets a 2. */
function table(sheet: Worksheet): Record<string, ExcelJS.Cell>[] {
  const heads: string[] = []
  sheet.getRow(4).eachCell({ includeEmpty: true }, (cell, column) => {
    const base = cell.text.replace('\n', ' | ')
    const again = heads.filter((head) => head?.replace(/ #\d+$/, '') === base).length
    heads[column] = again === 0 ? base : `${base} #${again + 1}`
  })
  const rows: Record<string, ExcelJS.Cell>[] = []
  for (let row = 5; row <= sheet.rowCount; row += 1) {
    if (sheet.getCell(row, 1).value === null && sheet.getCell(row, 4).value === null) break
    rows.push(Object.fromEntries(heads.flatMap((head, column) => (head ? [[head, sheet.getCell(row, column)]] : []))))
  }
  return rows
}

function live(cell: ExcelJS.Cell | undefined): { formula: string; result: unknown } {
  const value = cell?.value as CellFormulaValue | null
  if (!value || typeof value !== 'object' || !('formula' in value)) throw new Error(`No formula stands in ${cell?.address ?? 'no cell'}.`)
  return { formula: value.formula, result: value.result ?? 0 }
}

const pick = (rows: Record<string, ExcelJS.Cell>[], climb: number, head: string, text: string): Record<string, ExcelJS.Cell> => {
  const found = rows.find((row) => row[head]?.text === text && row['Climb']?.value === climb)
  if (!found) throw new Error(`No row ${text} in climb ${climb}.`)
  return found
}

describe('the workbook of a countersigned test', () => {
  let workbook: Workbook
  beforeAll(async () => {
    workbook = await open(recordedTest())
  })

  test('holds every part of the record', () => {
    expect(workbook.worksheets.map((sheet) => sheet.name)).toEqual([
      'Summary',
      'People and signatures',
      'Stages',
      'Readings',
      'Criteria',
      'Uncertainty',
      'Joints',
      'Load path check',
      'Train',
      'Instruments',
      'Protocol and limits',
      'Corrections',
      'Photos',
      'Ledger',
      'Chart',
      'Units',
    ])
    expect(sheetOf(workbook, 'Chart').getImages()).toHaveLength(1)
  })

  test('names the witness’s relation to the shop, and how late a countersignature came', async () => {
    const words = (book: Workbook) => sheetOf(book, 'People and signatures').getSheetValues().flat().map(String).join(' ')
    expect(words(workbook)).toContain('works next door, no part in the build')
    expect(words(workbook)).not.toContain('hours after the lead')
    expect(words(await open(countersignedLater(recordedTest(), 26)))).toContain('26 hours after the lead')
  })

  test('computes every force from the reading and the bore, by formula', () => {
    const readings = table(sheetOf(workbook, 'Readings'))
    const rows = readings.filter((row) => row['Row']?.text.includes('hold start') && row['Climb']?.value === 1)
    expect(rows).toHaveLength(4)
    rows.forEach((row, index) => {
      const [psi = 0] = counted[index + 1] ?? []
      const inPascal = live(row['G-02 | Pa'])
      expect(inPascal.formula).toMatch(/^IF\(ISBLANK\(I\d+\),H\d+,I\d+\)\*unit_psi$/)
      expect(inPascal.result).toBeCloseTo(psi * PSI, 4)
      const newton = live(row['Force | N'])
      expect(newton.formula).toMatch(/^K\d+\*ram_area-spring_return\+carried_weight$/)
      expect(newton.result).toBeCloseTo(force(psi), 6)
      expect(live(row['Force | short tons']).result).toBeCloseTo(force(psi) / SHORT_TON, 10)
    })
  })

  test('takes the area from the bore and the factors from named cells', () => {
    const train = sheetOf(workbook, 'Train')
    expect(train.getCell('B5').value).toBe(50)
    expect(train.getCell('B5').names).toContain('ram_1_bore')
    expect(live(train.getCell('F5')).formula).toBe('PI()*(B5*unit_mm)^2/4')
    expect(live(train.getCell('F5')).result).toBeCloseTo(AREA, 15)
    expect(train.getCell('F6').names).toContain('ram_area')
    const psi = table(sheetOf(workbook, 'Units')).find((row) => row['Unit']?.text === 'psi')
    expect(psi?.['One of it in SI']?.value).toBeCloseTo(PSI, 9)
    expect(psi?.['One of it in SI']?.names).toContain('unit_psi')
  })

  test('computes deflection, step stiffness and softening from the readings', () => {
    const stages = table(sheetOf(workbook, 'Stages'))
    const deflection = 'Deflection, bed middle less mean of pins | mm'
    const stiffnesses: number[] = []
    ;['25 %', '50 %', '75 %', '100 %'].forEach((stage, index) => {
      const row = pick(stages, 1, 'Stage', stage)
      const [psi = 0, ...points] = counted[index + 1] ?? []
      const [psiBefore = 0, ...pointsBefore] = counted[index] ?? []
      expect(live(row[deflection]).result).toBeCloseTo(net(points), 10)
      expect(live(row['Force | kN']).result).toBeCloseTo(force(psi) / 1000, 9)
      const stiffness = (force(psi) - force(psiBefore)) / 1000 / (net(points) - net(pointsBefore))
      expect(live(row['Step stiffness | kN/mm']).result).toBeCloseTo(stiffness, 8)
      if (stiffnesses.length > 0) {
        const softening = live(row['Softening'])
        expect(softening.formula).toContain('1-')
        expect(softening.result).toBeCloseTo(1 - stiffness / Math.max(...stiffnesses), 9)
      } else {
        expect(row['Softening']?.text).toBe('first step')
      }
      stiffnesses.push(stiffness)
    })
  })

  test('computes pressure loss, creep at equal pressure, and the set against its limit', () => {
    const stages = table(sheetOf(workbook, 'Stages'))
    const full = pick(stages, 1, 'Stage', '100 %')
    expect(live(full['Pressure lost']).result).toBeCloseTo((7850 - 7750) / 7850, 12)
    const stiffness = (force(7850) - force(5900)) / 1000 / (1.77 - 1.32)
    expect(live(full['Creep | mm']).result).toBeCloseTo(1.78 - 1.77 + (force(7850) - force(7750)) / 1000 / stiffness, 8)
    const set = pick(stages, 1, 'Stage', 'Set')
    expect(live(set['Deflection, bed middle less mean of pins | mm']).result).toBeCloseTo(0.03 - 0.01, 10)
    expect(live(set['Set limit | mm']).result).toBeCloseTo(0.05 * 1.77, 10)
    expect(set['Set is']?.text).toBe('within')
    const second = pick(stages, 2, 'Stage', 'Second set')
    expect(live(second['Deflection, bed middle less mean of pins | mm']).result).toBeCloseTo(0, 10)
  })

  test('shows a correction beside what was typed, and computes with it', () => {
    const row = pick(table(sheetOf(workbook, 'Readings')), 1, 'Row', '50 %, hold start')
    expect(row['Right pin | as typed']?.value).toBe(0.91)
    expect(row['Right pin | as typed']?.font.strike).toBe(true)
    expect(row['Right pin | corrected to']?.value).toBe(0.19)
    expect(live(row['Right pin | m']).result).toBeCloseTo(0.00019, 12)
    const corrections = table(sheetOf(workbook, 'Corrections'))
    expect(corrections.map((one) => [one['Typed first']?.value, one['Corrected to']?.value])).toEqual([
      [0.91, 0.19],
      [5580, 5850],
    ])
    expect(corrections[1]?.['Why']?.text).toBe('Digits swapped when typed. Witness saw 5850.')
    expect(corrections.map((one) => one['Letter']?.text)).toEqual(['a', 'b'])
    const stages = table(sheetOf(workbook, 'Stages'))
    const marked = ['Datum', '25 %', '50 %', '75 %', '100 %', 'Set'].map(
      (stage) => pick(stages, 1, 'Stage', stage)['Corrected readings, | see Corrections']?.text,
    )
    expect(marked).toEqual(['', '', 'a: Right pin, hold start', 'b: G-02, hold end', '', ''])
  })

  test('prints who signed, when with the zone, and what the signature means', () => {
    const words = textOf(sheetOf(workbook, 'People and signatures'))
    expect(words).toContain('Marit Sandoval')
    expect(words).toContain('15 September 2026, 12:11:00 UTC')
    expect(words).toContain('I was present and read the gauge myself.')
    expect(words).toContain('signed with password')
  })

  test('says what was cleared, by whom and after what, and never that it is safe', () => {
    const words = textOf(sheetOf(workbook, 'Summary'))
    expect(words).toContain('Accepted. Cleared up to 11.7\u00a0short tons')
    expect(words).toContain('after two static loads. No other bed hole was tested.')
    expect(words).toContain('an aid, not a design approval')
    expect(words).toContain('Head beam, Left upright, Right upright')
    const all = workbook.worksheets.map(textOf).join('\n')
    expect(all).not.toMatch(/\bsafe\b|\byes\b|\bapproved\b/i)
    // Outside the ledger's own texts every ton says which one it is.
    const printed = workbook.worksheets
      .filter((sheet) => sheet.name !== 'Ledger')
      .map(textOf)
      .join('\n')
    expect(
      printed.replace(/(short|long)[\s-]tons?|metric tons?-force|metric ton-force/gi, '').replace(/"Ton" never stands alone/, ''),
    ).not.toMatch(/\btons?\b/i)
  })

  test('keeps the ledger whole: hashes, and texts joined from their cells', () => {
    const { entries } = recordedTest()
    const stored = storedEntries(entries)
    const sheet = sheetOf(workbook, 'Ledger')
    stored.forEach((entry, index) => {
      const row = sheet.getRow(5 + index)
      let text = ''
      for (let column = 10; row.getCell(column).value !== null; column += 1) text += row.getCell(column).text
      expect(text).toBe(entry.canonical)
      expect(row.getCell(8).value).toBe(entry.hash)
      expect(row.getCell(4).value).toBeTruthy()
      expect(row.getCell(5).value).toBeTruthy()
    })
  })

  test('is set up for paper: landscape, heads repeated, panes frozen', () => {
    for (const sheet of workbook.worksheets) {
      expect(sheet.pageSetup.orientation).toBe('landscape')
      expect(sheet.pageSetup.printTitlesRow).toBe('1:4')
      expect(sheet.views[0]).toMatchObject({ state: 'frozen', ySplit: 4 })
    }
  })
})

function textOf(sheet: Worksheet): string {
  const words: string[] = []
  sheet.eachRow((row) => row.eachCell((cell) => words.push(cell.text)))
  return words.join('\n')
}

describe('what begins like a formula', () => {
  test.each(['=1+1', '+1', '-1', '@SUM(A1)', '\t=1', '=HYPERLINK("http://x.example","look")'])(
    'stays words, formatted as text: %s',
    async (words) => {
      const { opened } = recordedTest({ until: 'opened' }).state
      const part = opened?.press.train[0]
      if (!opened || !part) throw new Error('The test was opened with a train.')
      const workbook = await open(
        recordedTest({ until: 'opened', opened: { press: { ...opened.press, train: [{ ...part, name: words }] } } }),
      )
      const cells: ExcelJS.Cell[] = []
      for (const sheet of workbook.worksheets) sheet.eachRow((row) => row.eachCell((cell) => cells.push(cell)))
      const found = cells.filter((cell) => cell.text === words)
      expect(found.map(({ type, numFmt }) => ({ type, numFmt }))).toEqual([{ type: ExcelJS.ValueType.String, numFmt: '@' }])
      expect(cells.filter((cell) => cell.type === ExcelJS.ValueType.Formula && live(cell).formula === words.replace(/^=/, ''))).toEqual([])
    },
  )
})

test('tooling of the register stands in the train with its rating, beside the force that its formula makes of it', async () => {
  const { opened } = recordedTest({ until: 'opened' }).state
  const [part] = opened?.press.train ?? []
  if (!opened || !part) throw new Error('The test was opened with a train.')
  const nose = {
    ...part,
    kind: 'tooling' as const,
    name: 'T-01 Flat nose',
    ratedForce: { text: '20', unit: 'short-ton' as const },
    ratedPressure: null,
  }
  const workbook = await open(
    recordedTest({ until: 'opened', opened: { press: { ...opened.press, train: [...opened.press.train, nose] } } }),
  )
  const cells: ExcelJS.Cell[] = []
  sheetOf(workbook, 'Train').eachRow((row) => row.eachCell((cell) => cells.push(cell)))
  const named = cells.find((cell) => cell.text === 'T-01 Flat nose')
  if (!named) throw new Error('The piece is not in the train.')
  const beside = cells.filter((cell) => cell.row === named.row)
  expect(beside.map((cell) => cell.text)).toContain('20')
  const newton = beside.flatMap((cell) => (cell.type === ExcelJS.ValueType.Formula ? [live(cell).result] : []))
  expect(newton).toContainEqual(expect.closeTo(20 * SHORT_TON, 3))
})

test('a stopped test says so, and its softening is beyond', async () => {
  const workbook = await open(stoppedTest())
  expect(textOf(sheetOf(workbook, 'Summary'))).toContain('Rejected. Stopped at 75\u202f%')
  const row = pick(table(sheetOf(workbook, 'Stages')), 1, 'Stage', '75 %')
  expect(row['Softening is']?.text).toBe('beyond')
  const last = (force(5900) - force(3900)) / 1000 / (1.82 - 0.32 - 0.87)
  const best = force(1950) / 1000 / 0.43
  expect(live(row['Softening']).result).toBeCloseTo(1 - last / best, 8)
})

test('two legs stand under each other, each with a picture', async () => {
  const workbook = await open(twoLegTest())
  const legs = new Set(table(sheetOf(workbook, 'Stages')).map((row) => row['Leg']?.text))
  expect([...legs]).toEqual(['Ram far left', 'Ram far right'])
  expect(sheetOf(workbook, 'Chart').getImages()).toHaveLength(2)
})

test('readings, once typed, are what the record shows: nothing is filled in', async () => {
  const rows = table(sheetOf(await open(recordedTest()), 'Readings'))
  const typed = [firstClimb, repeatClimb].flatMap((climb) => climb.stages.flatMap(({ start, end }) => [start, end]))
  const shown = rows.filter((row) => /hold (start|end)/.test(row['Row']?.text ?? ''))
  expect(
    shown.map((row) =>
      [row['G-02 | as typed'], row['Middle | as typed'], row['Left pin | as typed'], row['Right pin | as typed']].map(
        (cell) => cell?.value,
      ),
    ),
  ).toEqual(typed.map((row) => row.map(Number)))
})

test('a long text is cut between characters, and joins again', () => {
  const text = 'a'.repeat(31_999) + '😀'.repeat(20_000)
  const parts = cellParts(text)
  expect(parts.every((part) => part.length <= 32_000 && part.isWellFormed())).toBe(true)
  expect(parts.join('')).toBe(text)
})

test('the file is named after the number and the press, without what a file name cannot hold', () => {
  const opened = recordedTest().state.opened
  if (!opened) throw new Error('The test was opened.')
  expect(recordFileName(opened)).toBe('PT-0043 Press 2.xlsx')
  const named = (name: string) => recordFileName({ number: 'PT-0001', press: { ...opened.press, name } })
  expect(named('..\\bed/3: "old"\r\n')).toBe('PT-0001 bed 3 old.xlsx')
  expect(named('Presse à épauler')).toBe('PT-0001 Presse à épauler.xlsx')
})

describe('the sheet of the load path check', () => {
  const mm = (text: string) => ({ text, unit: 'mm' as const })
  const known = openedPayload()
  const bed: MemberStrength = {
    role: 'beam',
    section: { shape: 'flat', height: mm('160'), width: mm('20'), sideBySide: 2, plates: [] },
    material: { grade: 'S355JR' },
    support: 'both ends',
    span: mm('640'),
    ramOffset: null,
    hole: null,
    loadShare: null,
  }
  const opened = {
    press: {
      ...known.press,
      members: known.press.members.map((member) => (member.kind === 'bed-beam' ? { ...member, strength: bed } : member)),
    },
    engineer: { name: 'P. Lindqvist', document: 'Calculation 26-118', on: '2026-09-01' },
  }

  test('holds demand, capacity, source and a live utilisation, and says NOT CHECKED where there is no figure', async () => {
    const rows = table(sheetOf(await open(recordedTest({ opened })), 'Load path check'))
    const bending = rows.find((row) => row['Member or joint']?.text === 'Bed' && row['Check']?.text.includes('bending'))
    // M = P·L/4 of 0.5·345 MPa·S, S = 2·b·h²/6, by hand.
    const demand = (12 * SHORT_TON * 0.64) / 4
    const capacity = (0.5 * 345e6 * 2 * 0.02 * 0.16 ** 2) / 6
    expect(bending?.['Demand']?.value).toBeCloseTo(demand, 6)
    expect(bending?.['Capacity ÷ factor']?.value).toBeCloseTo(capacity, 6)
    expect(bending?.['Unit']?.text).toBe('N·m')
    expect(live(bending?.['Utilisation']).formula).toMatch(/^C\d+\/D\d+$/)
    expect(live(bending?.['Utilisation']).result).toBeCloseTo(demand / capacity, 10)
    expect(bending?.['Source, or why it is not checked']?.text).toContain('EN 10025-2')
    const head = rows.find((row) => row['Member or joint']?.text === 'Head beam')
    expect(head?.['Verdict']?.text).toBe('NOT CHECKED')
    expect(head?.['Utilisation']?.value).toBeNull()
    expect(head?.['Source, or why it is not checked']?.text).toContain('No section')
  })

  test('names the engineer’s document, the factors and what is left out', async () => {
    const words = textOf(sheetOf(await open(recordedTest({ opened })), 'Load path check'))
    expect(words).toContain('P. Lindqvist, Calculation 26-118, of 2026-09-01')
    expect(words).toContain('0.5 of yield, common practice, no source')
    expect(words).toContain('Fatigue, cold, shock')
  })
})
