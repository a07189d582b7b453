import type { Workbook, Worksheet } from 'exceljs'
import { creep, pressureLoss } from '#shared/statistics/hold'
import { correctionsOf } from '#shared/proof-test/corrections'
import type { ClimbEvaluation, Criterion, RowFigures, StageEvaluation } from '#shared/proof-test/evaluate-climb'
import { instrumentOf } from '#shared/proof-test/force'
import type { StageRow } from '#shared/proof-test/state'
import { FORCE_DECIMALS, toSI, toUnit, unitLabel } from '#shared/units'
import type { RecordOfTest } from '../record'
import { FIRST_ROW, addSheet, address, colours, decimals, putRow, type Column, type Content } from '../sheet'
import { verdictContent } from './criteria'
import type { ReadingsPlaces } from './readings'
import { setLimitContent } from './set-limit'
import { factorName } from './units'

export const STAGES_SHEET = 'Stages'

/** Columns that formulas name; the others are reached by their order only. */
type Key = 'net' | 'force' | 'stiffness'

interface Layout {
  columns: Column[]
  place: Record<Key, number>
}

function layOut(record: RecordOfTest): Layout {
  const { opened } = record
  const length = unitLabel(opened.lengthUnit)
  const load = unitLabel(opened.forceUnit, { plural: true })
  const lead = leadUnit(record)
  const columns: Column[] = [
    { header: 'Leg', width: 13 },
    { header: 'Climb', width: 7, align: 'right' },
    { header: 'Stage', width: 8 },
    { header: 'Attempt', width: 8, align: 'right' },
    { header: 'Mark\n(UTC)', width: 19 },
    { header: `Pump to\n${lead}`, width: 9, align: 'right' },
    { header: `Hold start\n${lead}`, width: 10, align: 'right' },
    { header: `Hold end\n${lead}`, width: 10, align: 'right' },
    { header: `Deflection, ${opened.net?.label ?? opened.points[0]?.label ?? ''}\n${length}`, width: 17, align: 'right' },
    { header: `U (k = 2)\n${length}`, width: 9, align: 'right' },
    { header: 'Force\nkN', width: 9, align: 'right' },
    { header: 'U (k = 2)\nkN', width: 9, align: 'right' },
    { header: `Force\n${load}`, width: 11, align: 'right' },
    { header: `U (k = 2)\n${load}`, width: 11, align: 'right' },
    { header: 'Of rated load', width: 8, align: 'right' },
    { header: 'Step stiffness\nkN/mm', width: 10, align: 'right' },
    { header: 'Stiffest before\nkN/mm', width: 10, align: 'right' },
    { header: 'Softening', width: 10, align: 'right' },
    { header: 'U (k = 2)', width: 9, align: 'right' },
    { header: 'Softening is', width: 11 },
    { header: 'Pressure lost', width: 9, align: 'right' },
    { header: 'Loss is', width: 10 },
    { header: `Creep\n${length}`, width: 9, align: 'right' },
    { header: 'Creep is', width: 10 },
    { header: `Set limit\n${length}`, width: 9, align: 'right' },
    { header: 'Set is', width: 10 },
    { header: 'Decision', width: 10 },
    { header: 'Corrected readings,\nsee Corrections', width: 34, wrap: true },
  ]
  return { columns, place: { net: 9, force: 11, stiffness: 16 } }
}

/** What the lead pumps to is in the unit of the instrument that leads. */
function leadUnit(record: RecordOfTest): string {
  const unit = firstTarget(record)?.unit
  return unit === undefined ? '' : unitLabel(unit)
}

function firstTarget(record: RecordOfTest) {
  return record.evaluation.climbs.flatMap((climb) => climb.stages).find((stage) => stage.target !== null)?.target ?? null
}

interface Drawing {
  sheet: Worksheet
  record: RecordOfTest
  layout: Layout
  readings: ReadingsPlaces
}

const find = (criteria: readonly Criterion[], id: string): Criterion | undefined => criteria.find((criterion) => criterion.id === id)

/** Net deflection, U, force in kN, U, force in the shop's unit, U, share of rated load: alike for every kind of row. */
function figureCells({ record, readings, layout }: Drawing, row: number, figures: RowFigures): Content[] {
  const { opened } = record
  const key = figures.row.entryId
  const net = readings.at(readings.lead, key)
  const force = readings.at(readings.force, key)
  const unit = opened.lengthUnit
  const digits = decimals(unit === 'in' ? 4 : 3)
  const load = decimals(FORCE_DECIMALS[opened.forceUnit])
  const here = address(layout.place.force, row)
  const lead = figures.lead
  const value = figures.force
  return [
    net && lead ? { formula: net, result: toUnit(lead.deflection, unit), format: digits } : null,
    lead ? { number: toUnit(lead.U, unit), format: digits } : null,
    force && value ? { formula: `${force}/1000`, result: value.force / 1000, format: '0.00' } : null,
    value ? { number: value.U / 1000, format: '0.00' } : null,
    value ? { formula: `${here}*1000/${factorName(opened.forceUnit)}`, result: toUnit(value.force, opened.forceUnit), format: load } : null,
    value ? { number: toUnit(value.U, opened.forceUnit), format: load } : null,
    value ? { formula: `${here}*1000/rated_load`, result: value.force / toSI(opened.press.ratedLoad), format: '0.0%' } : null,
  ]
}

/** A reading of the leading instrument back in the unit it is read in. */
function gaugeCell({ record, readings }: Drawing, figures: RowFigures | null): Content {
  const target = firstTarget(record)
  const id = record.opened.forceInstrumentIds[0]
  if (!figures || !target || id === undefined) return null
  const typed = figures.row.readings.find((reading) => reading.sourceId === id)
  const from = readings.at(readings.si.get(id) ?? 0, figures.row.entryId)
  if (!typed || from === null) return null
  return {
    formula: `${from}/${factorName(target.unit)}`,
    result: toUnit(toSI(typed), target.unit),
    format: decimals(decimalsOfText(target.text)),
  }
}

const decimalsOfText = (text: string): number => text.split('.')[1]?.length ?? 0

interface ClimbPlaces {
  /** Sheet rows of datum and of the stages that were read, in order. */
  points: number[]
  full: number | null
}

function stiffnessCells({ record, layout }: Drawing, row: number, stage: StageEvaluation, before: readonly number[]): Content[] {
  const step = stage.step
  const previous = before.at(-1)
  if (step === null || previous === undefined) return [null, null, null, null, verdictContent(find(stage.criteria, 'softening'))]
  const { net, force, stiffness } = layout.place
  const perMillimetre = record.opened.lengthUnit === 'mm' ? '' : `*${factorName(record.opened.lengthUnit)}*1000`
  const rise = `${address(force, row)}-${address(force, previous)}`
  const travel = `(${address(net, row)}-${address(net, previous)})${perMillimetre}`
  const own = address(stiffness, row)
  const first = before[1]
  const reference = first === undefined ? null : `${address(stiffness, first)}:${address(stiffness, previous)}`
  const best = address(stiffness + 1, row)
  const finite = Number.isFinite(step.stiffness)
  const stiffest = bestBefore(record, stage)
  return [
    {
      formula: `IF(${travel}>0,(${rise})/(${travel}),IF(${rise}>0,"stuck",""))`,
      result: finite ? step.stiffness / 1e6 : step.stuck ? 'stuck' : '',
      format: '0.0',
    },
    reference === null
      ? null
      : {
          formula: `IF(COUNTIF(${reference},">0")>0,MAX(${reference}),"")`,
          result: stiffest === null ? '' : stiffest / 1e6,
          format: '0.0',
        },
    reference === null
      ? { words: 'first step', colour: colours.graphite }
      : { formula: `IF(AND(ISNUMBER(${own}),ISNUMBER(${best})),1-${own}/${best},"")`, result: step.softening ?? '', format: '0.0%' },
    step.U === null ? null : { number: step.U, format: '0.0%' },
    verdictContent(find(stage.criteria, 'softening')),
  ]
}

/** The stiffest earlier step that moved (N/m), as the core takes it for reference. */
function bestBefore(record: RecordOfTest, stage: StageEvaluation): number | null {
  const climb = record.evaluation.climbs.find((candidate) => candidate.leg === stage.at.leg && candidate.climb === stage.at.climb)
  const earlier = (climb?.stages ?? []).filter((candidate) => candidate.at.stage < stage.at.stage)
  const usable = earlier.flatMap(({ step }) => (step && Number.isFinite(step.stiffness) && step.stiffness > 0 ? [step.stiffness] : []))
  return usable.length === 0 ? null : Math.max(...usable)
}

/** Pressure lost between top-ups, and creep at equal pressure, from the rows of the hold. */
function holdCells({ record, layout, readings }: Drawing, row: number, stage: StageEvaluation): Content[] {
  const loss = verdictContent(find(stage.criteria, 'pressure-loss'))
  const creepIs = verdictContent(find(stage.criteria, 'creep'))
  const rows = stage.rows.filter(({ force }) => force !== null)
  const column = readings.pressure ?? readings.force
  if (!stage.end || rows.length === 0) return [null, loss, null, creepIs]
  const stretches: { first: string; last: string }[] = []
  for (const { row: read } of rows) {
    const cell = readings.at(column, read.entryId) ?? ''
    const current = stretches.at(-1)
    if (!current || (read as StageRow).toppedUp) stretches.push({ first: cell, last: cell })
    else current.last = cell
  }
  const lost = stretches.map(({ first, last }) => `MAX(0,${first}-${last})`).join('+')
  const base = stretches[0]?.first ?? ''
  const held = rows.flatMap(({ row: read, force }) =>
    force ? [{ pressure: force.pressure ?? force.force, toppedUp: (read as StageRow).toppedUp }] : [],
  )
  const start = holdStart(stage)
  const result = held[0] && held[0].pressure > 0 ? pressureLoss(held) : null
  return [
    result === null ? null : { formula: `(${lost})/${base}`, result, format: '0.0%' },
    loss,
    start ? creepContent({ record, readings, own: address(layout.place.stiffness, row), start, end: stage.end, stage }) : null,
    creepIs,
  ]
}

/** The row from which the hold runs: the last "hold start", else the row that feeds the line. */
function holdStart(stage: StageEvaluation): RowFigures | null {
  return stage.rows.findLast(({ row }) => (row as StageRow).occasion === 'hold start') ?? stage.start
}

interface CreepInput {
  record: RecordOfTest
  readings: ReadingsPlaces
  own: string
  start: RowFigures
  end: RowFigures
  stage: StageEvaluation
}

function creepContent({ record, readings, own, start, end, stage }: CreepInput): Content {
  const unit = record.opened.lengthUnit
  const from = readings.at(readings.lead, start.row.entryId)
  const to = readings.at(readings.lead, end.row.entryId)
  const forceFrom = readings.at(readings.force, start.row.entryId)
  const forceTo = readings.at(readings.force, end.row.entryId)
  if (!from || !to || !forceFrom || !forceTo || !start.lead || !end.lead || !start.force || !end.force) return null
  const stiffness =
    stage.step && Number.isFinite(stage.step.stiffness) && stage.step.stiffness > 0 ? stage.step.stiffness : Number.POSITIVE_INFINITY
  const result = creep({
    deflectionStart: start.lead.deflection,
    deflectionEnd: end.lead.deflection,
    forceStart: start.force.force,
    forceEnd: end.force.force,
    stiffness,
  })
  const perUnit = unit === 'mm' ? '' : `/(${factorName(unit)}*1000)`
  const given = `IF(ISNUMBER(${own}),IF(${own}>0,(${forceFrom}-${forceTo})/1000/${own}${perUnit},0),0)`
  return { formula: `${to}-${from}+${given}`, result: toUnit(result, unit), format: decimals(unit === 'in' ? 4 : 3) }
}

/** Which readings of these rows count as they were corrected: "a: Right pin, hold start". */
function correctedContent(record: RecordOfTest, rows: readonly RowFigures[]): Content {
  const { opened, state } = record
  const words = rows.flatMap(({ row }) =>
    correctionsOf(state, [row.entryId]).map(({ letter, correction: { sourceId } }) => {
      const name = opened.points.find(({ id }) => id === sourceId)?.label ?? instrumentOf(opened, sourceId)?.details.code ?? ''
      return `${letter}: ${name}${'occasion' in row ? `, ${(row as StageRow).occasion}` : ''}`
    }),
  )
  return words.length === 0 ? null : words.join('; ')
}

const lead = (record: RecordOfTest, climb: ClimbEvaluation): Content[] => [
  record.opened.legs[climb.leg]?.label ?? `Leg ${climb.leg + 1}`,
  { number: climb.climb + 1, format: '0' },
]

function stageRow(drawing: Drawing, row: number, climb: ClimbEvaluation, stage: StageEvaluation, places: ClimbPlaces): void {
  const { record, sheet, layout } = drawing
  const { start, target } = stage
  const decided = stage.attempt.decided
  const cells: Content[] = [
    ...lead(record, climb),
    { words: `${stage.percent} %`, bold: true },
    { number: stage.at.attempt + 1, format: '0' },
    { moment: start?.row.mark.at ?? null },
    target ? { number: Number(target.text), format: decimals(decimalsOfText(target.text)) } : null,
    gaugeCell(drawing, holdStart(stage)),
    gaugeCell(drawing, stage.end),
    ...(start ? figureCells(drawing, row, start) : Array.from({ length: 7 }, () => null)),
    ...stiffnessCells(drawing, row, stage, places.points),
    ...holdCells(drawing, row, stage),
    null,
    null,
    decided ? { words: decided.decision.replace('-', ' '), bold: true } : null,
    correctedContent(record, stage.rows),
  ]
  putRow(sheet, row, layout.columns, cells)
  if (start?.lead && start.force) places.points.push(row)
}

function setRow(drawing: Drawing, row: number, climb: ClimbEvaluation, places: ClimbPlaces): void {
  const { record, sheet, layout } = drawing
  const { set } = climb
  if (!set) return
  const criterion = set.criteria.find((candidate) => candidate.leads)
  const blanks = Array.from({ length: 9 }, () => null)
  putRow(sheet, row, layout.columns, [
    ...lead(record, climb),
    { words: climb.climb > 0 ? 'Second set' : 'Set', bold: true },
    null,
    { moment: set.row.row.mark.at },
    null,
    gaugeCell(drawing, set.row),
    null,
    ...figureCells(drawing, row, set.row),
    ...blanks,
    setLimitContent({
      record,
      criterion,
      increment: set.row.lead?.increment ?? 0,
      full: places.full === null ? null : address(layout.place.net, places.full),
    }),
    verdictContent(criterion),
    null,
    correctedContent(record, [set.row]),
  ])
}

function climbRows(drawing: Drawing, top: number, climb: ClimbEvaluation): number {
  const { record, sheet, layout } = drawing
  const places: ClimbPlaces = { points: [], full: null }
  let row = top
  if (climb.datum) {
    putRow(sheet, row, layout.columns, [
      ...lead(record, climb),
      { words: 'Datum', bold: true },
      null,
      { moment: climb.datum.row.mark.at },
      null,
      gaugeCell(drawing, climb.datum),
      null,
      ...figureCells(drawing, row, climb.datum),
      ...Array.from({ length: 12 }, () => null),
      correctedContent(record, [climb.datum]),
    ])
    places.points.push(row)
    row += 1
  }
  for (const stage of climb.stages) {
    stageRow(drawing, row, climb, stage, places)
    if (stage === climb.stages.at(-1)) places.full = row
    row += 1
  }
  if (climb.set) {
    setRow(drawing, row, climb, places)
    row += 1
  }
  return row
}

/** Stage by stage what was read and what it came to. */
export function stagesSheet(workbook: Workbook, record: RecordOfTest, readings: ReadingsPlaces): void {
  const layout = layOut(record)
  const note =
    'Formulas run from the sheet Readings and the bore on the sheet Train. U and verdicts are the program’s, computed with the same readings.'
  const sheet = addSheet(workbook, STAGES_SHEET, { title: 'Stages', note, record: record.title, paper: 'A3' }, layout.columns)
  sheet.views = [{ state: 'frozen', xSplit: 3, ySplit: FIRST_ROW - 1, showGridLines: false }]
  const drawing = { sheet, record, layout, readings }
  let row = FIRST_ROW
  for (const climb of record.evaluation.climbs) row = climbRows(drawing, row, climb)
}
