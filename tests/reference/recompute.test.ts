import type { Workbook } from 'exceljs'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { recordWorkbook } from '#server/records/record-workbook'
import { differenceOf, numberOf, openRecomputing, workbookFrom, type ComputedCell, type Recomputing } from '#server/records/recompute'
import { recordedTest, stoppedTest, storedEntries, twoLegTest, type RecordedTest } from '../factories/recorded-test'
import { comparedWith } from '../support/outside-values'

/** The workbook of a record, recomputed by another program with recalculation forced. */
let libreOffice: Recomputing

beforeAll(async () => {
  libreOffice = await openRecomputing()
})
afterAll(() => libreOffice.close())

async function workbookOf(recorded: RecordedTest): Promise<Workbook> {
  const source = {
    id: recorded.id,
    stored: storedEntries(recorded.entries),
    people: recorded.people,
    seals: [],
    writtenAt: '2026-09-21T08:00:00.000Z',
  }
  return workbookFrom(await recordWorkbook(source))
}

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
] as const)('the record of a test that was %s', (_name, make) => {
  test('comes out the same when LibreOffice computes every cell again', { timeout: 120_000 }, async () => {
    const cells = await libreOffice.recompute(await workbookOf(make()))
    expect(cells.length).toBeGreaterThan(100)
    for (const { ours, again } of cells) {
      if (typeof ours === 'number') comparedWith('LibreOffice Calc, cells recomputed', ours, numberOf(again))
    }
    expect(cells.filter((cell) => !(differenceOf(cell) <= 1e-9))).toEqual([])
  })
})

test('a result that LibreOffice does not share is found, be it a number, words or nothing at all', () => {
  expect(differenceOf({ ours: 2, again: '2.000000004' })).toBeCloseTo(2e-9, 12)
  expect(differenceOf({ ours: 0.247, again: '24.7%' })).toBeLessThan(1e-15)
  expect(differenceOf({ ours: 0, again: '0.0000001' })).toBeCloseTo(0.001, 12)
  expect(differenceOf({ ours: 0.00002, again: '0.0000200001' })).toBeCloseTo(1e-6, 12)
  expect(differenceOf({ ours: 'within', again: 'beyond' })).toBe(Infinity)
  expect(differenceOf({ ours: 0, again: '' })).toBe(Infinity)
  expect(differenceOf({ ours: 0, again: '0' })).toBe(0)
})

test('a reader who types another bore gets other forces: formulas are live, not pictures of numbers', { timeout: 120_000 }, async () => {
  const workbook = await workbookOf(recordedTest())
  const before = await libreOffice.recompute(workbook)
  const bore = workbook.getWorksheet('Train')?.getCell('B5')
  expect(bore?.value).toBe(50)
  if (bore) bore.value = 60
  const after = await libreOffice.recompute(workbook)
  const head = workbook.getWorksheet('Readings')?.getRow(4)
  let forceColumn = 0
  head?.eachCell((cell, column) => {
    if (cell.text === 'Force\nN') forceColumn = column
  })
  const letter = workbook.getWorksheet('Readings')?.getColumn(forceColumn).letter ?? ''
  const forces = (cells: ComputedCell[]): number[] =>
    cells.filter(({ where }) => new RegExp(`^Readings!${letter}\\d+$`).test(where)).map(({ again }) => numberOf(again))
  expect(forces(before).filter((newton) => newton > 100_000).length).toBeGreaterThan(1)
  forces(after).forEach((newton, index) => expect(newton).toBeCloseTo((forces(before)[index] ?? 0) * (60 / 50) ** 2, 6))
})
