import { formatNumber, groupDigits, toUnit, unitLabel } from '../units'
import { correctionLetter } from './corrections'
import type { Reading } from './entries'
import { forceTexts, lengthText, type ClimbEvaluation, type RowFigures, type StageEvaluation } from './evaluate-climb'
import { leadInstrument } from './force'
import type { RecordParts } from './record-words'
import type { Correction, Row, StageRow } from './state'

/** A climb as a table of a record shows it, stage by stage. */

export type StageParts = Pick<RecordParts, 'state' | 'opened' | 'evaluation'>

/** The shape of a decision. */
export type DecisionMark = 'stop' | 'wait' | 'within' | 'go-on'

export interface ShownReading {
  text: string
  /** What was typed before, oldest first, with the letter of the correction that replaced it. */
  struck: { text: string; letter: string }[]
}

/** A reading of a row as it counts, and what was struck through on the way to it. */
export function shownReading(row: Row, sourceId: string, corrections: readonly Correction[]): ShownReading | null {
  const counts: Reading | undefined = row.readings.find((reading) => reading.sourceId === sourceId)
  if (!counts) return null
  const struck = corrections.flatMap((correction, index) =>
    correction.correctsEntryId === row.entryId && correction.sourceId === sourceId
      ? [{ text: correction.from.text, letter: correctionLetter(index) }]
      : [],
  )
  return { text: counts.text, struck }
}

/** One line of the stages as the sheet shows it. */
export interface ShownStage {
  key: string
  name: string
  at: string | null
  target: string | null
  start: ShownReading | null
  end: ShownReading | null
  points: { id: string; label: string; reading: ShownReading | null }[]
  net: string | null
  force: { kN: string; U: string; own: string } | null
  step: string | null
  softening: string | null
  creep: string | null
  decision: { mark: DecisionMark; words: string } | null
}

const grouped = (reading: ShownReading | null): ShownReading | null =>
  reading && { text: groupDigits(reading.text), struck: reading.struck.map((one) => ({ ...one, text: groupDigits(one.text) })) }

function base(record: StageParts, name: string, figures: RowFigures | null, key: string): ShownStage {
  const { opened, state } = record
  const gauge = leadInstrument(opened)
  const force = figures?.force ? forceTexts(opened, figures.force) : null
  return {
    key,
    name,
    at: figures?.row.mark.at ?? null,
    target: null,
    start: figures && gauge ? grouped(shownReading(figures.row, gauge.id, state.corrections)) : null,
    end: null,
    points: opened.points.map(({ id, label }) => ({ id, label, reading: figures && shownReading(figures.row, id, state.corrections) })),
    net: figures?.lead ? lengthText(opened, figures.lead.deflection, { unit: false }) : null,
    force: force && { kN: force.kN, U: force.kNU, own: `${force.own}\u00a0${unitLabel(opened.forceUnit, { plural: true })}` },
    step: null,
    softening: null,
    creep: null,
    decision: null,
  }
}

function heldFor(stage: StageEvaluation): string {
  const minutes = stage.holdSeconds / 60
  return Number.isInteger(minutes) ? `Held ${minutes} min` : `Held ${stage.holdSeconds} s`
}

function decisionOf(stage: StageEvaluation, last: boolean): ShownStage['decision'] {
  const decision = stage.attempt.decided?.decision
  const again = stage.at.attempt > 0 ? `, attempt ${stage.at.attempt + 1}` : ''
  if (decision === 'stop') return { mark: 'stop', words: `Stop${again}` }
  if (decision === 'wait') return { mark: 'wait', words: `Wait${again}` }
  if (decision === undefined) return null
  return last ? { mark: 'within', words: `${heldFor(stage)}${again}` } : { mark: 'go-on', words: `Went on${again}` }
}

function stiffness(record: StageParts, stage: StageEvaluation): string | null {
  const { step } = stage
  if (!step) return null
  if (step.stuck) return 'stuck'
  if (!Number.isFinite(step.stiffness)) return null
  return record.opened.lengthUnit === 'in' ? formatNumber(toUnit(step.stiffness, 'lbf') * 0.0254, 0) : formatNumber(step.stiffness / 1e6, 1)
}

function shownStage(record: StageParts, stage: StageEvaluation, last: boolean): ShownStage {
  const { opened, state } = record
  const gauge = leadInstrument(opened)
  const { step, start, end, target } = stage
  const creep = stage.criteria.find((criterion) => criterion.id === 'creep')
  const hold = stage.rows.findLast(({ row }) => (row as StageRow).occasion === 'hold start') ?? start
  return {
    ...base(record, `${stage.percent}\u202f%`, start, `stage ${stage.at.stage}`),
    target: target ? groupDigits(target.exactText) : null,
    start: hold && gauge ? grouped(shownReading(hold.row, gauge.id, state.corrections)) : null,
    end: end && gauge ? grouped(shownReading(end.row, gauge.id, state.corrections)) : null,
    step: stiffness(record, stage),
    softening:
      step === null
        ? null
        : step.softening === null || step.U === null
          ? 'first step'
          : `${formatNumber(step.softening * 100, 0)}\u202f% ± ${(step.U * 100).toFixed(0)}`,
    creep: creep?.value === undefined || creep.value === null ? null : lengthText(opened, creep.value, { unit: false }),
    decision: decisionOf(stage, last),
  }
}

/** A climb's lines in the order they were read: datum, stages, set. */
export function shownStages(record: StageParts, climb: ClimbEvaluation): ShownStage[] {
  const last = record.opened.protocol.content.stages.length - 1
  return [
    ...(climb.datum ? [base(record, 'Datum', climb.datum, 'datum')] : []),
    ...climb.stages.map((stage) => shownStage(record, stage, stage.at.stage === last)),
    ...(climb.set ? [base(record, climb.climb > 0 ? 'Second set' : 'Set', climb.set.row, 'set')] : []),
  ]
}

/** "Repeat climb to 100 %: second set 0.00 mm", or what there is of it yet. */
export function repeatHeading(record: StageParts, climb: ClimbEvaluation): string {
  const reached = climb.stages.at(-1)?.percent
  const lead = climb.set?.row.lead
  const to = reached === undefined ? 'Repeat climb' : `Repeat climb to ${reached}\u202f%`
  return lead ? `${to}: second set ${lengthText(record.opened, lead.deflection)}` : `${to}: second set not read`
}
