import { judge } from '../statistics/decision-rule'
import { fitLine, type LineFit } from '../statistics/line'
import { setIsResolved, setLimit } from '../statistics/permanent-set'
import { stepStiffness, type StiffnessStep } from '../statistics/softening'
import { toSI, toUnit } from '../units'
import {
  asPredicted,
  heldCriteria,
  protocolSource,
  ratingKept,
  softeningCriterion,
  stageReached,
  suggest,
  type Suggestion,
} from './criteria'
import { NET } from './deflection'
import { withoutLifting } from './corrections'
import type { Opened, Position } from './entries'
import { predictFromBand } from './expected'
import { figuresOf, lengthText, pointOf, predict, spread, type Criterion, type Point, type Prediction, type RowFigures } from './figures'
import { stageTarget, type ForceFigure, type StageTarget } from './force'
import type { AttemptState, ClimbState, ProofTestState, Row, StageRow } from './state'

export { figuresOf, lengthText, predict, type Criterion, type CriterionVerdict, type Prediction, type RowFigures } from './figures'

export interface StageEvaluation {
  at: Position
  percent: number
  holdSeconds: number
  target: StageTarget | null
  attempt: AttemptState
  rows: RowFigures[]
  /** The row that feeds the line. */
  start: RowFigures | null
  end: RowFigures | null
  prediction: Prediction | null
  step: StiffnessStep | null
  criteria: Criterion[]
  suggestion: Suggestion
}

export interface SetEvaluation {
  row: RowFigures
  criteria: Criterion[]
  visible: boolean
}

export interface ClimbEvaluation {
  leg: number
  climb: number
  datum: RowFigures | null
  stages: StageEvaluation[]
  fit: LineFit | null
  set: SetEvaluation | null
}

/** The attempt whose readings count for a stage: the last one with a row. */
export function countingAttempt(attempts: readonly AttemptState[]): { attempt: AttemptState; index: number } | null {
  for (let index = attempts.length - 1; index >= 0; index -= 1) {
    const attempt = attempts[index]
    if (attempt && attempt.rows.length > 0) return { attempt, index }
  }
  const last = attempts.at(-1)
  return last ? { attempt: last, index: attempts.length - 1 } : null
}

/** From what may go on to what may not. */
const GRAVITY = { within: 0, 'not-read': 0, wait: 1, undecided: 2, beyond: 3 } satisfies Record<Criterion['verdict'], number>
const URGENCY = { 'not-read': 0, 'go-on': 0, hold: 1, wait: 2, stop: 3 } satisfies Record<Suggestion, number>

function graver(criteria: readonly Criterion[], before: readonly Criterion[]): Criterion[] {
  return criteria.map((criterion) => {
    const was = before.find(({ id }) => id === criterion.id)
    return was && GRAVITY[was.verdict] > GRAVITY[criterion.verdict] ? was : criterion
  })
}

/**
 * Everything that one climb's readings say, stage by stage, from the core alone. A correction that brings a value
 * beyond its limit counts; one that would bring it back leaves the verdict as it was, unless lead and witness read it
 * again at that load (DOMAIN §4).
 */
export function evaluateClimb(state: ProofTestState, legIndex: number, climbIndex: number): ClimbEvaluation | null {
  const climb = evaluateReadings(state, legIndex, climbIndex)
  const unlifted = climb && withoutLifting(state)
  const before = unlifted && evaluateReadings(unlifted, legIndex, climbIndex)
  if (!climb || !before) return climb
  return {
    ...climb,
    stages: climb.stages.map((stage, index) => {
      const was = before.stages[index]
      if (!was) return stage
      const suggestion = URGENCY[was.suggestion] > URGENCY[stage.suggestion] ? was.suggestion : stage.suggestion
      return { ...stage, criteria: graver(stage.criteria, was.criteria), suggestion }
    }),
    set: climb.set && {
      ...climb.set,
      criteria: graver(climb.set.criteria, before.set?.criteria ?? []),
      visible: climb.set.visible || (before.set?.visible ?? false),
    },
  }
}

function evaluateReadings(state: ProofTestState, legIndex: number, climbIndex: number): ClimbEvaluation | null {
  const opened = state.opened
  const climb: ClimbState | undefined = state.legs[legIndex]?.climbs[climbIndex]
  if (!opened || !climb) return null
  const datumRow = climb.datum.at(-1) ?? null
  const datum = datumRow ? figuresOf(opened, datumRow, datumRow) : null
  const seriesIds = datum ? datum.deflections.map((figure) => ({ id: figure.id, label: figure.label })) : []
  const percents: number[] = [0]
  const series = new Map<string, Point[]>(
    seriesIds.map(({ id }) => {
      const zero = datum?.deflections.find((figure) => figure.id === id)
      return [
        id,
        zero
          ? [{ force: datum?.force?.force ?? 0, deflection: 0, uForce: datum?.force?.uIndependent ?? 0, uDeflection: zero.uReading }]
          : [],
      ]
    }),
  )
  const leadId = seriesIds[0]?.id ?? NET
  const stages: StageEvaluation[] = []
  const fullPercent = opened.protocol.content.stages.at(-1)?.percent ?? 100
  climb.stages.forEach((stage, stageIndex) => {
    const counting = countingAttempt(stage.attempts)
    if (!counting) return
    const { attempt } = counting
    const rows = attempt.rows.map((row) => figuresOf(opened, row, datumRow))
    const start = rows.filter(({ row }) => (row as StageRow).occasion !== 'hold end').at(-1) ?? null
    const lastStart = rows.findLastIndex(({ row }) => (row as StageRow).occasion === 'hold start')
    const holdFrom = rows[lastStart] ?? null
    const end = rows.filter(({ row }, index) => (row as StageRow).occasion === 'hold end' && index > lastStart).at(-1) ?? null
    const target = stageTarget(opened, stage.percent)
    percents.push(stage.percent)
    const leadPoints = series.get(leadId) ?? []
    const at = start?.force?.force ?? target?.readableForce
    const uReading = leadPoints[0]?.uDeflection ?? 0
    // Before there is a line, the estimate from the members' sections says where the first reading should lie.
    const prediction = at === undefined ? null : (predict(opened, leadPoints, at) ?? predictFromBand(opened, legIndex, at, uReading))
    const criteria: Criterion[] = []
    let step: StiffnessStep | null = null
    if (start) {
      for (const { id } of seriesIds) {
        const point = pointOf(start, id)
        if (point) series.get(id)?.push(point)
      }
      const latest = holdFrom ?? start
      criteria.push(
        stageReached(opened, stage.percent, start, target),
        ratingKept(opened, highest(rows) ?? start),
        ...asPredicted(opened, start, prediction),
      )
      for (const { id, label } of seriesIds) {
        const steps = stepStiffness(series.get(id) ?? [])
        const last = steps.at(-1) ?? null
        if (id === leadId) step = last
        criteria.push(...softeningCriterion(opened, last, id, label, percents, id === leadId))
      }
      const stiffness = step && Number.isFinite(step.stiffness) && step.stiffness > 0 ? step.stiffness : Number.POSITIVE_INFINITY
      criteria.push(...heldCriteria(opened, rows, latest, end, stiffness))
    }
    const tooMany = attempt.topUps >= 2 && stage.percent >= Math.min(100, fullPercent)
    stages.push({
      at: { leg: legIndex, climb: climbIndex, stage: stageIndex, attempt: counting.index },
      percent: stage.percent,
      holdSeconds: stage.holdSeconds,
      target,
      attempt,
      rows,
      start,
      end,
      prediction,
      step,
      criteria,
      suggestion: suggest(criteria, attempt.rows, end !== null, tooMany),
    })
  })
  const leadPoints = series.get(leadId) ?? []
  const fit =
    leadPoints.length >= 3 && spread(leadPoints) ? fitLine(leadPoints.map((point) => ({ x: point.force, y: point.deflection }))) : null
  return {
    leg: legIndex,
    climb: climbIndex,
    datum,
    stages,
    fit,
    set: evaluateSet(opened, climb, datumRow, stages.at(-1) ?? null, climbIndex),
  }
}

function highest(rows: readonly RowFigures[]): RowFigures | null {
  return rows.reduce<RowFigures | null>((top, row) => ((row.force?.force ?? 0) > (top?.force?.force ?? -1) ? row : top), null)
}

function evaluateSet(
  opened: Opened,
  climb: ClimbState,
  datumRow: Row | null,
  full: StageEvaluation | null,
  climbIndex: number,
): SetEvaluation | null {
  const row = climb.set.at(-1)
  if (!row || !datumRow) return null
  const figures = figuresOf(opened, row, datumRow)
  const { limits, decisionRule } = opened.protocol.content
  let visible = false
  const criteria = figures.deflections.map((figure): Criterion => {
    const leads = figure.id === figures.lead?.id
    const fullDeflection = Math.abs(full?.start?.deflections.find((candidate) => candidate.id === figure.id)?.deflection ?? 0)
    const shop = setLimit({ fraction: limits.setPercent / 100, fullDeflection, increment: figure.increment })
    const most = limits.mostSet ? Math.min(shop, toSI(limits.mostSet)) : shop
    const value = Math.abs(figure.deflection)
    const seen = setIsResolved({ set: value, U: figure.U })
    if (leads && seen) visible = true
    // After a proof climb the frame is judged by the limits again; after a repeat of the same load nothing may be left.
    const again = climbIndex > 0 && !climb.stages.some((stage) => stage.percent > 100)
    const verdict = again ? (seen ? 'beyond' : 'within') : judge({ value, U: figure.U, limit: { max: most }, rule: decisionRule })
    return {
      id: leads ? 'set' : `set-${figure.id}`,
      label: `${again ? 'Second set' : 'Permanent set'}, ${figure.label}`,
      verdict,
      value,
      limit: again ? figure.U : most,
      U: figure.U,
      stops: false,
      leads,
      reading: lengthText(opened, figure.deflection),
      limitText: again ? `within its U, ${lengthText(opened, figure.U)}` : `≤ ${lengthText(opened, most)}`,
      source: protocolSource(opened),
    }
  })
  return { row: figures, criteria, visible }
}

/** A force as the shop reads it and in kN, each with its uncertainty: "8.98 short tons ± 0.08". */
export function forceTexts(opened: Opened, figure: ForceFigure): { own: string; ownU: string; kN: string; kNU: string } {
  const unit = opened.forceUnit
  const decimals = unit === 'kN' ? 1 : unit === 'N' || unit === 'lbf' ? 0 : 2
  return {
    own: toUnit(figure.force, unit).toFixed(decimals),
    ownU: toUnit(figure.U, unit).toFixed(decimals),
    kN: toUnit(figure.force, 'kN').toFixed(1),
    kNU: toUnit(figure.U, 'kN').toFixed(1),
  }
}
