import type { Workbook, Worksheet } from 'exceljs'
import {
  cautionsOf,
  clearanceArithmetic,
  clearedLoad,
  criteriaHeading,
  energyText,
  headlineOf,
  inPrint,
  placesTested,
  staticLoadsText,
} from '#shared/proof-test/record'
import { momentText, type RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, colours, header, heading, put, putRow, type Column, type Content } from '../sheet'
import { verdictContent } from './criteria'

export const SUMMARY_SHEET = 'Summary'

const columns: Column[] = [
  { header: 'What', width: 30 },
  { header: 'As recorded', width: 64, wrap: true },
  { header: '', width: 20 },
  { header: '', width: 32 },
]

const criteriaColumns: Column[] = [
  { header: 'Criterion', width: 30 },
  { header: 'From', width: 64 },
  { header: 'Read', width: 20, align: 'right' },
  { header: 'Limit', width: 32, align: 'right' },
  { header: 'Verdict', width: 18 },
]

function facts(record: RecordOfTest): [string, Content][] {
  const { opened, state, evaluation } = record
  const cleared = clearedLoad(state, evaluation)
  const { stopped, conclusion } = state
  return [
    [
      'Result',
      {
        words: headlineOf(state, evaluation),
        bold: true,
        colour: conclusion?.conclusion === 'accepted' ? colours.sound : stopped ? colours.stop : colours.ink,
      },
    ],
    ['Shop', opened.shop.name],
    ['Press', `${opened.press.name}${opened.press.whatFor ? `, ${opened.press.whatFor}` : ''}; rated ${inPrint(opened.press.ratedLoad)}`],
    ['Protocol', `${opened.protocol.name}, version ${opened.protocol.version}`],
    ['Loaded at', placesTested(opened)],
    ...(cleared
      ? ([
          ['Load', `${cleared.load} (${cleared.newton})${cleared.gauge ? `; ${cleared.gauge}` : ''}`],
          ['Until', `${cleared.until}, and only until any repair, change, abnormal load or shock`],
          ['By', `${cleared.by}, after ${staticLoadsText(cleared.staticLoads)}. No other bed hole was tested.`],
          ['Arithmetic of the load', clearanceArithmetic(opened, evaluation) ?? ''],
        ] satisfies [string, Content][])
      : []),
    ...(stopped
      ? ([
          ['Stopped', { words: `${momentText(stopped.at)} by ${record.nameOf(stopped.by)}: ${stopped.why}`, colour: colours.stop }],
        ] satisfies [string, Content][])
      : []),
    ['Opened', state.openedAt ? momentText(state.openedAt) : ''],
    [
      'Concluded',
      conclusion ? `${momentText(conclusion.at)}: ${conclusion.conclusion}${conclusion.why ? `. ${conclusion.why}` : ''}` : 'not concluded',
    ],
    ...(opened.repeats ? ([['Repeats', opened.repeats.number]] satisfies [string, Content][]) : []),
    ['Not measured', opened.notMeasured.length > 0 ? opened.notMeasured.join(', ') : 'every member has a point'],
    ...(evaluation.energy ? ([['Energy', energyText(evaluation.energy)]] satisfies [string, Content][]) : []),
    [
      'Ledger',
      record.chain.whole
        ? `Chain whole over ${record.chain.entries} entries, checked ${momentText(record.writtenAt)}`
        : { words: `BROKEN at entry ${record.chain.brokenAt}: ${record.chain.why}`, colour: colours.stop, bold: true },
    ],
    ['Last hash', state.headHash],
    ...(state.lateFacts > 0
      ? ([
          [
            'After the seal',
            { words: `${state.lateFacts} entries arrived after the countersignature. Read the ledger.`, colour: colours.stop },
          ],
        ] satisfies [string, Content][])
      : []),
  ]
}

function criteria(sheet: Worksheet, top: number, record: RecordOfTest): number {
  heading(sheet, top, criteriaHeading(record.evaluation))
  header(sheet, top + 1, criteriaColumns)
  let row = top + 2
  for (const criterion of record.evaluation.criteria) {
    putRow(sheet, row, criteriaColumns, [
      criterion.label,
      criterion.source,
      { words: criterion.reading, bold: true },
      criterion.limitText,
      verdictContent(criterion),
    ])
    row += 1
  }
  return row
}

/** What a reader needs first: the result, what it rests on, and what it does not say. */
export function summarySheet(workbook: Workbook, record: RecordOfTest): void {
  const { state, evaluation } = record
  const note = `Written ${momentText(record.writtenAt)} from the ledger, which the sheet Ledger holds in full.`
  const sheet = addSheet(workbook, SUMMARY_SHEET, { title: 'Record of a proof test', note, record: record.title }, columns)
  sheet.getColumn(5).width = 18
  let row = FIRST_ROW
  for (const [what, content] of facts(record)) {
    putRow(sheet, row, columns, [what, content])
    row += 1
  }
  row = criteria(sheet, row + 1, record)
  row = lines(sheet, row + 1, 'Against "accepted"', evaluation.against)
  row = lines(
    sheet,
    row,
    'Today’s arithmetic differs from the evaluation frozen at the conclusion',
    record.differences.map(({ what, frozen, today }) => `${what}: frozen ${frozen}; today ${today}`),
  )
  row = lines(
    sheet,
    row,
    'Irregular entries',
    state.irregular.map(({ seq, kind, rules }) => `Entry ${seq}, ${kind}: against ${rules.join(', ')}`),
  )
  row = lines(
    sheet,
    row,
    'Reasons given',
    state.reasons.map(({ seq, rule, reason, by }) => `Entry ${seq}, ${rule}: ${reason} (${record.nameOf(by)})`),
  )
  row = lines(
    sheet,
    row,
    'Observations',
    state.observations.map(
      ({ seq, what, note: said, by, at }) => `Entry ${seq}, ${what}: ${said} (${record.nameOf(by)}, ${momentText(at)})`,
    ),
  )
  lines(sheet, row, 'Cautions', cautionsOf(state, evaluation))
}

function lines(sheet: Worksheet, top: number, title: string, sentences: readonly string[]): number {
  if (sentences.length === 0) return top
  heading(sheet, top, title)
  sentences.forEach((sentence, index) => {
    const cell = sheet.getCell(top + 1 + index, 1)
    sheet.mergeCells(top + 1 + index, 1, top + 1 + index, 5)
    put(cell, sentence)
    cell.alignment = { wrapText: true, vertical: 'top' }
    sheet.getRow(top + 1 + index).height = 14 * Math.ceil(sentence.length / 150)
  })
  return top + sentences.length + 2
}
