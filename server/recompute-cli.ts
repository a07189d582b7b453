import type { Sequelize } from 'sequelize'
import { readConfig } from './config'
import { inTransaction } from './context'
import { migrateUp } from './database/migrator'
import { openDatabase } from './database/open-database'
import { loadDemoShop } from './database/seeders/demo'
import { initModels, ProofTest } from './models'
import { recordOf, type RecordSource } from './records/record'
import { recordWorkbook } from './records/record-workbook'
import { differenceOf, numberOf, openRecomputing, workbookFrom, type ComputedCell } from './records/recompute'
import { recordSource } from './services/records'
import { openStorage } from './storage/open-storage'

/** The most that two programs may differ by in the same sum, relative to it: both compute with 15 to 16 digits. */
const MOST = 1e-9

/** The test with that number, or else the first one that was accepted; its record as the server would write it out. */
async function findRecord(database: Sequelize, number: string | undefined): Promise<RecordSource> {
  return inTransaction({ database }, async (transaction) => {
    const where = number === undefined ? { result: 'accepted' } : { number }
    const test = await ProofTest.findOne({ where, attributes: ['id'], order: [['openedAt', 'ASC']], raw: true, transaction })
    if (test === null) {
      throw new Error(
        number === undefined
          ? 'No test in this database was accepted yet. Name one: npm run recompute -- PT-0001'
          : `There is no test ${number} in this database. Its number stands at the head of its record.`,
      )
    }
    return recordSource(transaction, test.id, new Date())
  })
}

/** The record to recompute; an embedded database gets its tables and the demo shop first, as `npm start` gives it. */
async function readSource(number: string | undefined): Promise<RecordSource> {
  const config = readConfig(process.env)
  const database = await openDatabase(config, { shareRunning: true })
  try {
    initModels(database.sequelize)
    if (database.isEmbedded) {
      await migrateUp(database.sequelize)
      await loadDemoShop({ config, database: database.sequelize, storage: await openStorage(config, new Date()), now: () => new Date() })
    }
    return await findRecord(database.sequelize, number)
  } finally {
    await database.close()
  }
}

/** Words are cut at the column's width, so that figures stand under each other. */
const fit = (text: string, width: number): string => (text.length > width ? `${text.slice(0, width - 1)}…` : text.padEnd(width))

/** Twelve digits: more than any instrument of the record has, and enough to see that two results are the same. */
const digits = (value: number): string => (value === 0 ? '0' : Number(value.toPrecision(12)).toString())

function lineOf(cell: ComputedCell): string {
  const { where, row, column, ours, again } = cell
  const difference = differenceOf(cell)
  const figures = typeof ours === 'string' ? [ours, again] : [digits(ours), again === '' ? 'nothing' : digits(numberOf(again))]
  const [left = '', right = ''] = figures
  return [
    fit(where.slice(where.indexOf('!') + 1), 6),
    fit(row, 34),
    fit(column, 26),
    left.padStart(18),
    right.padStart(18),
    (difference === 0 ? '0' : difference.toExponential(1)).padStart(8),
  ].join('  ')
}

function print(title: string, cells: readonly ComputedCell[]): number {
  const out = [`${title}: each formula of its workbook, Quarterload beside LibreOffice.`]
  let sheet = ''
  for (const cell of cells) {
    if (cell.sheet !== sheet) {
      sheet = cell.sheet
      out.push(
        '',
        `${sheet}`,
        [fit('cell', 6), fit('row', 34), fit('column', 26), 'Quarterload'.padStart(18), 'LibreOffice'.padStart(18), 'differs'].join('  '),
      )
    }
    out.push(lineOf(cell))
  }
  const worst = cells.reduce((so, cell) => (differenceOf(cell) > differenceOf(so) ? cell : so), cells[0] as ComputedCell)
  const beyond = cells.filter((cell) => !(differenceOf(cell) <= MOST))
  out.push(
    '',
    `${cells.length} figures compared. The worst differs by ${differenceOf(worst).toExponential(1)} of itself: ${worst.where}, ${worst.row}, ${worst.column}.`,
    beyond.length === 0
      ? `None differs by more than ${MOST.toExponential(0)}.`
      : `${beyond.length} differ by more than ${MOST.toExponential(0)}: ${beyond.map(({ where }) => where).join(', ')}.`,
  )
  process.stdout.write(`${out.join('\n')}\n`)
  return beyond.length === 0 ? 0 : 1
}

/** `npm run recompute [-- PT-0042]`: each figure of a record beside what LibreOffice makes of the same formula. */
async function main(): Promise<number> {
  const source = await readSource(process.argv[2])
  const libreOffice = await openRecomputing()
  try {
    const cells = await libreOffice.recompute(await workbookFrom(await recordWorkbook(source)))
    if (cells.length === 0) throw new Error('That record has no formula: nothing was read in its test.')
    return print(recordOf(source).title, cells)
  } finally {
    await libreOffice.close()
  }
}

main().then(
  (code) => {
    process.exitCode = code
  },
  (error: unknown) => {
    process.stderr.write(`${error instanceof Error ? error.message : String(error)}\n`)
    process.exitCode = 1
  },
)
