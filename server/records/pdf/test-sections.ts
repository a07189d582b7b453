import { correctionLetter } from '#shared/proof-test/corrections'
import { protocolSource } from '#shared/proof-test/criteria'
import { marginWords, uncertaintyWords } from '#shared/proof-test/criterion-words'
import type { ClimbEvaluation } from '#shared/proof-test/evaluate-climb'
import { leadInstrument } from '#shared/proof-test/force'
import { UTC_DATES } from '#shared/proof-test/print-dates'
import { repeatHeading, shownStages, type ShownReading, type ShownStage } from '#shared/proof-test/record-stages'
import { correctedReadings, correctionsHeading, whichReading } from '#shared/proof-test/record-words'
import { groupDigits, unitLabel } from '#shared/units'
import type { RecordOfTest } from '../record'
import { forceInstruments, recordRows, type RecordRow } from '../rows'
import { normal, quiet, readingCell, strong, stopped, verdictCell } from './cells'
import type { Paper } from './paper'
import { table, type Cell, type TableColumn, type TableRow } from './table'
import { plain } from './typesetter'

const right = (head: string): TableColumn => ({ head, align: 'right' })

function stageColumns({ opened }: RecordOfTest): TableColumn[] {
  const gauge = leadInstrument(opened)?.details
  const pressure = gauge && gauge.kind !== 'indicator' ? unitLabel(gauge.increment.unit) : ''
  const length = unitLabel(opened.lengthUnit)
  return [
    { head: 'Stage' },
    { head: 'Reached' },
    right(`Target\n${pressure}`),
    right(`Hold start\n${pressure}`),
    right(`Hold end\n${pressure}`),
    ...opened.points.map(({ label }) => right(`${label}\n${length}`)),
    right(`${opened.net ? 'Net' : (opened.points[0]?.label ?? 'Net')}\n${length}`),
    right('Force\nkN'),
    right(`Force\n${unitLabel(opened.forceUnit, { plural: true })}`),
    right(`Step\n${opened.lengthUnit === 'in' ? 'lbf/in' : 'kN/mm'}`),
    right('Softening'),
    right(`Creep\n${length}`),
    { head: 'Decision' },
  ]
}

function stageCells(stage: ShownStage): Cell[] {
  const force = stage.target === null ? null : stage.force
  return [
    strong(stage.name),
    stage.at === null ? null : UTC_DATES.clockTime(stage.at),
    stage.target,
    readingCell(stage.start),
    readingCell(stage.end),
    ...stage.points.map(({ reading }) => readingCell(reading)),
    stage.net === null ? null : strong(stage.net),
    force && [...strong(force.kN), ...normal(`\u00a0±\u00a0${force.U}`)],
    force && force.own.split('\u00a0')[0],
    stage.step,
    stage.softening,
    stage.creep,
    stage.decision === null ? null : stage.decision.mark === 'stop' ? stopped(stage.decision.words) : stage.decision.words,
  ].map((cell) => cell ?? null)
}

function climbHeading(record: RecordOfTest, climb: ClimbEvaluation): string {
  const { opened } = record
  const leg = opened.legs.length > 1 ? (opened.legs[climb.leg]?.label ?? '') : ''
  if (climb.climb === 0) return leg
  return `${leg === '' ? '' : `${leg}. `}${repeatHeading(record, climb)}, from the datum taken after the first set`
}

/** Every stage as it was read, each leg and climb under its own heading. */
export function stages(paper: Paper, record: RecordOfTest): void {
  const { climbs } = record.evaluation
  paper.heading('Stages as read', {
    note: 'Times are UTC. ± is U, k = 2. Struck: typed first, and corrected by the entry with that letter.',
  })
  if (climbs.length === 0) paper.paragraph('No load was put on.')
  for (const climb of climbs) {
    const words = climbHeading(record, climb)
    if (words !== '') paper.subheading(words)
    table(paper, { columns: stageColumns(record), rows: shownStages(record, climb).map((stage) => ({ cells: stageCells(stage) })) })
  }
}

/** Each correction with both readings, who made it, when and why. */
export function corrections(paper: Paper, record: RecordOfTest): void {
  const { state } = record
  if (state.corrections.length === 0) {
    paper.heading('Corrections')
    paper.paragraph('No reading was corrected.')
    return
  }
  paper.heading(correctionsHeading(state.corrections.length), {
    note: 'A reading is never edited: a correction is an entry of its own, and both print.',
  })
  const rows = state.corrections.map((correction, index): TableRow => {
    const { first, counts, unit } = correctedReadings(correction)
    const again = `${correction.readAgainByBoth ? 'by both' : 'not by both'}, ${correction.underLoad ? 'under load' : 'after release'}`
    return {
      cells: [
        strong(correctionLetter(index)),
        `Entry ${correction.seq} corrects ${correction.correctsSeq}`,
        whichReading(record, correction, UTC_DATES),
        [...plain(first, { size: 0, family: 'condensed', struck: true }), ...normal(` ${counts} ${unit}`)],
        correction.why,
        again,
        `${record.nameOf(correction.by)}\n${UTC_DATES.dateAndTime(correction.at)}`,
      ],
    }
  })
  table(paper, {
    columns: [
      { head: '' },
      { head: 'Entries' },
      { head: 'Reading', wrap: true },
      { head: 'Typed, counts' },
      { head: 'Why', wrap: true },
      { head: 'Read again', wrap: true },
      { head: 'By, at (UTC)', wrap: true },
    ],
    rows,
  })
}

interface Source {
  id: string
  head: string
}

function sourcesOf({ opened }: RecordOfTest): Source[] {
  return [
    ...forceInstruments(opened).map(({ id, details }) => ({
      id,
      head: `${details.code}\n${details.kind === 'indicator' ? '' : unitLabel(details.increment.unit)}`,
    })),
    ...opened.points.map(({ id, label }) => ({ id, head: `${label}\n${unitLabel(opened.lengthUnit)}` })),
  ]
}

/** One reading of a row with what was struck on the way; its unit where it isn't the column's. */
function typedReading({ state, opened }: RecordOfTest, row: RecordRow, id: string): Cell {
  const counts = row.readings.find((reading) => reading.sourceId === id)
  if (!counts) return null
  const struck = state.corrections.flatMap((correction, index) =>
    correction.correctsEntryId === row.key && correction.sourceId === id
      ? [{ text: groupDigits(correction.from.text), letter: correctionLetter(index) }]
      : [],
  )
  const instrument = forceInstruments(opened).find((one) => one.id === id)?.details
  const usual = instrument && instrument.kind !== 'indicator' ? instrument.increment.unit : opened.lengthUnit
  const unit = counts.unit === usual ? '' : `\u00a0${unitLabel(counts.unit)}`
  const shown: ShownReading = { text: `${groupDigits(counts.text)}${unit}`, struck }
  return readingCell(shown)
}

/** So many readings stand side by side; a test with more points has its table in parts. */
const MOST_SOURCES = 8

/** Every row of readings in the order of its course, as typed, with who entered it. */
export function readings(paper: Paper, record: RecordOfTest): void {
  const rows = recordRows(record)
  if (rows.length === 0) return
  const several = record.opened.legs.length > 1
  paper.heading('Every reading', { note: 'As typed, in the order of the test. Times are UTC.' })
  const sources = sourcesOf(record)
  for (let from = 0; from < sources.length; from += MOST_SOURCES) {
    const some = sources.slice(from, from + MOST_SOURCES)
    if (from > 0) paper.subheading('Further points')
    table(paper, {
      columns: [
        right('Entry'),
        ...(several ? [{ head: 'Leg', wrap: true }] : []),
        right('Climb'),
        { head: 'Row', wrap: true },
        right('Attempt'),
        { head: 'Mark' },
        ...some.map(({ head }) => right(head)),
        { head: 'Entered by', wrap: true },
      ],
      rows: rows.map((row) => ({
        cells: [
          row.seq === null ? null : String(row.seq),
          ...(several ? [row.leg] : []),
          row.climb === null ? null : String(row.climb),
          row.what,
          row.attempt === null ? null : String(row.attempt),
          row.at.slice(11, 19),
          ...some.map(({ id }) => typedReading(record, row, id)),
          quiet(record.nameOf(row.by)),
        ],
      })),
    })
  }
}

/** Every criterion of every stage with what was read, how sure, the limit, what is left of it, and where it comes from. */
export function criteria(paper: Paper, record: RecordOfTest): void {
  const { opened, evaluation } = record
  const several = opened.legs.length > 1
  const plan = protocolSource(opened)
  const rows = evaluation.climbs.flatMap((climb) => {
    const leg = several ? `${opened.legs[climb.leg]?.label ?? `Leg ${climb.leg + 1}`}, ` : ''
    const again = climb.climb > 0 ? `climb ${climb.climb + 1}, ` : ''
    const listed = [
      ...climb.stages.flatMap((stage) => stage.criteria.map((criterion) => ({ where: `${stage.percent} %`, criterion }))),
      ...(climb.set?.criteria ?? []).map((criterion) => ({ where: 'set', criterion })),
    ]
    return listed.map(({ where, criterion }): TableRow => ({
      cells: [
        quiet(`${leg}${again}${where}`),
        criterion.label,
        strong(criterion.reading),
        uncertaintyWords(opened, criterion),
        criterion.limitText,
        marginWords(opened, criterion),
        verdictCell(criterion.verdict),
        quiet(criterion.source === plan ? 'the protocol' : criterion.source),
      ],
    }))
  })
  if (rows.length === 0) return
  paper.heading(`Every criterion, ${rows.length} in all`, {
    note: `The protocol is ${plan}. Left: limit less reading. A raw point that is undecided holds nothing up by itself: the figure that leads decides. One that is beyond its limit stops.`,
  })
  table(paper, {
    size: 7,
    columns: [
      { head: 'Where', wrap: true },
      { head: 'Criterion', wrap: true },
      right('Read'),
      right('U, k = 2'),
      right('Limit'),
      right('Left'),
      { head: 'Verdict', wrap: true },
      { head: 'Limit from', wrap: true },
    ],
    rows,
  })
}
