import type { Workbook } from 'exceljs'
import { toSI, unitLabel } from '#shared/units'
import { momentText, type RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, put, putRow, type Column, type Content } from '../sheet'

export const PROTOCOL_SHEET = 'Protocol and limits'

const columns: Column[] = [
  { header: 'What', width: 44 },
  { header: 'Value', width: 22, align: 'left' },
  { header: 'Of what', width: 46, wrap: true },
  { header: 'Name in formulas', width: 20 },
]

export type ProtocolLine = [what: string, value: Content, of: string, name?: string]

const percent = (value: number): Content => ({ number: value / 100, format: '0.0%' })
const plain = (value: number): Content => ({ number: value, format: 'General' })

/** The plan a line each: what, its value, of what. */
export function protocolLines(record: RecordOfTest): ProtocolLine[] {
  const { opened } = record
  const { content } = opened.protocol
  const { limits } = content
  const most: ProtocolLine[] = limits.mostSet
    ? [
        [
          'Most set, whatever the deflection',
          { number: toSI(limits.mostSet), format: '0.00000' },
          `m; written as ${limits.mostSet.text} ${unitLabel(limits.mostSet.unit)}`,
          'most_set',
        ],
      ]
    : []
  return [
    ['Protocol', { words: opened.protocol.name, bold: true }, `version ${opened.protocol.version}, frozen when the test was opened`],
    ['Purpose', content.purpose, ''],
    ...opened.legs.map((leg, index): ProtocolLine => [`Leg ${index + 1}`, leg.label, `ram ${leg.ramPosition}, bed hole ${leg.bedHole}`]),
    ...content.stages.map((stage): ProtocolLine => [
      `Stage at ${stage.percent} %`,
      plain(stage.holdSeconds),
      stage.percent > 100 ? 's hold, in the second climb only' : 's hold in the first climb',
    ]),
    ['Hold in a repeat climb', plain(content.repeatHoldSeconds), 's at every stage up to rated load'],
    ['Repeat climb', content.repeatClimb, ''],
    ['Seating', percent(content.seatingPercent), 'of the rated load, on and off once'],
    ['Datum watched for', plain(content.datumWatchSeconds), 's'],
    ['Recovery before the set is read', plain(content.recoverySeconds), 's'],
    ['Stage reached from', percent(-limits.stageLowerPercent), 'of the stage'],
    ['Stage reached to', percent(limits.stageUpperPercent), 'of the stage; ends at the lowest rating in the train'],
    ['Softening at most', percent(limits.softeningPercent), 'against the stiffest step so far', 'limit_softening'],
    ['Pressure lost at most', percent(limits.pressureLossPercent), 'of the pressure at the start of a hold', 'limit_pressure_loss'],
    ['Creep at most', percent(limits.creepPercent), 'of the stage’s deflection, at least 2 increments', 'limit_creep'],
    ['Permanent set at most', percent(limits.setPercent), 'of the full-load deflection, at least 2 increments', 'limit_set'],
    ...most,
    ['Prediction allowance', percent(content.predictionAllowancePercent), 'of the predicted deflection, below three degrees of freedom'],
    ['Seal friction allowance', percent(content.frictionPercent), 'of the force: "delivered at least". It does not lower the clearance'],
    ['Decision rule', content.decisionRule === 'simple' ? 'simple acceptance' : 'guard band of U', 'k = 2; JCGM 106, ILAC-G8'],
    ['Margin', plain(content.marginDivisor), 'the lowest force less U is divided by this'],
    ['Examination due after', plain(content.examinationMonths), 'months, and after any repair, change, abnormal load or shock'],
    ...(content.aboveRatingRule === '' ? [] : [['Rule for a load above rating', content.aboveRatingRule, ''] satisfies ProtocolLine]),
    ['Walk-down holds for', plain(opened.walkDownHours), 'hours'],
  ]
}

/** The written plan as it was frozen into the test; limits that formulas use are named. */
export function protocolSheet(workbook: Workbook, record: RecordOfTest): void {
  const note = 'Limits without a named source are common practice, or the shop’s own.'
  const sheet = addSheet(workbook, PROTOCOL_SHEET, { title: 'Protocol and limits', note, record: record.title }, columns)
  protocolLines(record).forEach(([what, value, of, name], index) => {
    const row = FIRST_ROW + index
    putRow(sheet, row, columns, [what, value, of, name ?? null])
    if (name !== undefined) sheet.getCell(row, 2).names = [name]
  })
  const confirmed = setUpText(record)
  if (confirmed !== null) put(sheet.getCell(FIRST_ROW + protocolLines(record).length + 1, 1), confirmed)
}

/** What was confirmed before load, on one line; null while nothing was. */
export function setUpText({ state }: RecordOfTest): string | null {
  const { setUp } = state
  if (!setUp) return null
  const relief = setUp.reliefSet ? `relief set to ${setUp.reliefSet.text} ${setUp.reliefSet.unit}` : 'no relief setting noted'
  return `Set-up confirmed ${momentText(setUp.at)}: ${setUp.items.length} items; ${relief}; stroke at ${setUp.strokePercent} %.${setUp.note ? ` ${setUp.note}` : ''}`
}
