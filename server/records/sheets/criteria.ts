import type { Workbook } from 'exceljs'
import type { Criterion } from '#shared/proof-test/evaluate-climb'
import { uncertaintyWords } from '#shared/proof-test/criterion-words'
import { verdictWord } from '#shared/proof-test/record'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, colours, putRow, type Column, type Content } from '../sheet'

export const CRITERIA_SHEET = 'Criteria'

const columns: Column[] = [
  { header: 'Leg', width: 14 },
  { header: 'Climb', width: 7, align: 'right' },
  { header: 'Stage', width: 9 },
  { header: 'Criterion', width: 48 },
  { header: 'Read', width: 22, align: 'right' },
  { header: 'U, k = 2', width: 18, align: 'right' },
  { header: 'Limit', width: 28, align: 'right' },
  { header: 'Verdict', width: 20 },
  { header: 'From', width: 44, wrap: true },
]

/** A verdict's word, coloured too. */
export function verdictContent(criterion: Criterion | undefined): Content {
  if (criterion === undefined) return null
  const { verdict } = criterion
  const colour = verdict === 'within' ? colours.sound : verdict === 'beyond' ? colours.stop : colours.graphite
  return { words: verdictWord(verdict), bold: verdict !== 'within', colour }
}

/** Every criterion of every stage, raw points among them. */
export function criteriaSheet(workbook: Workbook, record: RecordOfTest): void {
  const note =
    'A raw point that is undecided holds nothing up by itself: the figure that leads decides. One that is beyond its limit stops.'
  const sheet = addSheet(workbook, CRITERIA_SHEET, { title: 'Criteria', note, record: record.title }, columns)
  let row = FIRST_ROW
  for (const climb of record.evaluation.climbs) {
    const leg = record.opened.legs[climb.leg]?.label ?? `Leg ${climb.leg + 1}`
    const listed = [
      ...climb.stages.flatMap((stage) => stage.criteria.map((criterion) => ({ where: `${stage.percent} %`, criterion }))),
      ...(climb.set?.criteria ?? []).map((criterion) => ({ where: 'Set', criterion })),
    ]
    for (const { where, criterion } of listed) {
      putRow(sheet, row, columns, [
        leg,
        { number: climb.climb + 1, format: '0' },
        { words: where, bold: true },
        criterion.label,
        criterion.reading,
        uncertaintyWords(record.opened, criterion),
        criterion.limitText,
        verdictContent(criterion),
        criterion.source,
      ])
      row += 1
    }
  }
}
