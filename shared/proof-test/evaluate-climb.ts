import { judge, type Verdict } from '../statistics/decision-rule'
import { creep, creepLimit, creepUncertainty, pressureLoss, pressureLossUncertainty } from '../statistics/hold'
import { fitLine, predictAt, type LineFit } from '../statistics/line'
import { setIsResolved, setLimit } from '../statistics/permanent-set'
import { stepStiffness, type StiffnessStep } from '../statistics/softening'
import { lowestLimit } from '../press/ratings'
import { decimalsOf, formatForce, formatQuantity, formatValue, toSI, toUnit } from '../units'
import { deflectionsOf, NET, type DeflectionFigure } from './deflection'
import type { Opened, Position } from './entries'
import { forceOf, instrumentOf, leadInstrument, stageTarget, type ForceFigure, type StageTarget } from './force'
import type { AttemptState, ClimbState, ProofTestState, Row, StageRow } from './state'

export type CriterionVerdict = Verdict | 'wait' | 'not-read'

/** One thing that was checked, with its evidence in figures and in words. */
export interface Criterion {
  id: string
  label: string
  verdict: CriterionVerdict
  value: number | null
  limit: number | null
  U: number | null
  reading: string
  limitText: string
  /** Where the limit comes from. */
  source: string
  stops: boolean
  /** A raw point's `undecided` is listed but holds nothing up: the net figure decides (decision 5). */
  leads: boolean
}

export interface RowFigures {
  row: Row
  force: ForceFigure | null
  deflections: DeflectionFigure[]
  lead: DeflectionFigure | null
}

/** Where the next reading should lie: deflection (m) at a force (N), and its half-width. */
export interface Prediction {
  force: number
  deflection: number
  halfWidth: number
  from: number
  to: number
}

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
  suggestion: 'not-read' | 'hold' | 'wait' | 'stop' | 'go-on'
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

export function figuresOf(opened: Opened, row: Row, datum: Row | null): RowFigures {
  const deflections = datum ? deflectionsOf(opened, row.readings, datum.readings) : []
  return { row, force: forceOf(opened, row.readings), deflections, lead: deflections[0] ?? null }
}

/** Length in the test's unit, with the digits of the indicator's increment. */
export function lengthText(opened: Opened, si: number, options: { unit?: boolean } = {}): string {
  const point = opened.points[0]
  const details = point ? instrumentOf(opened, point.instrumentId)?.details : undefined
  const unit = opened.lengthUnit
  const decimals = details?.kind === 'indicator' && details.increment.unit === unit ? decimalsOf(details.increment) : unit === 'mm' ? 2 : 4
  return options.unit === false ? formatValue(si, unit, decimals) : formatQuantity(si, unit, decimals)
}

const percentText = (fraction: number, decimals = 0): string => `${(fraction * 100).toFixed(decimals).replace('-', '−')} %`

/** The attempt whose readings count for a stage: the last one with a row. */
export function countingAttempt(attempts: readonly AttemptState[]): { attempt: AttemptState; index: number } | null {
  for (let index = attempts.length - 1; index >= 0; index -= 1) {
    const attempt = attempts[index]
    if (attempt && attempt.rows.length > 0) return { attempt, index }
  }
  const last = attempts.at(-1)
  return last ? { attempt: last, index: attempts.length - 1 } : null
}

interface Point {
  force: number
  deflection: number
  uForce: number
  uDeflection: number
}

function pointOf(figures: RowFigures | null, id: string): Point | null {
  const deflection = figures?.deflections.find((figure) => figure.id === id)
  if (!figures?.force || !deflection) return null
  return {
    force: figures.force.force,
    deflection: deflection.deflection,
    uForce: figures.force.uIndependent,
    uDeflection: deflection.uReading,
  }
}

/** Whether a line can be laid through the points at all: two or more, at different forces. */
function spread(points: readonly Point[]): boolean {
  const forces = points.map((point) => point.force)
  return points.length >= 2 && Math.max(...forces) - Math.min(...forces) > 1
}

/** The prediction for a force, from the datum and the stages before (DOMAIN 3.5). Null below two points. */
export function predict(opened: Opened, points: readonly Point[], force: number): Prediction | null {
  if (!spread(points)) return null
  const fit = fitLine(points.map((point) => ({ x: point.force, y: point.deflection })))
  const deflection = fit.intercept + fit.slope * force
  const reading = (point: Point): number => Math.hypot(point.uDeflection, fit.slope * point.uForce)
  const meanX = points.reduce((sum, point) => sum + point.force, 0) / points.length
  const sxx = points.reduce((sum, point) => sum + (point.force - meanX) ** 2, 0)
  const variance = points.reduce((sum, point) => {
    const weight = 1 / points.length + ((force - meanX) * (point.force - meanX)) / sxx
    return sum + (weight * reading(point)) ** 2
  }, 0)
  const last = points.at(-1)
  const own = 2 * Math.sqrt(variance + (last ? reading(last) ** 2 : 0))
  const allowance = (opened.protocol.content.predictionAllowancePercent / 100) * Math.abs(deflection)
  const width = Math.hypot(own, allowance)
  const halfWidth = fit.dof >= 3 ? Math.max(width, predictAt(fit, force).halfWidthPrediction) : width
  return { force, deflection, halfWidth, from: deflection - halfWidth, to: deflection + halfWidth }
}

const protocolSource = (opened: Opened): string => `${opened.protocol.name}, version ${opened.protocol.version}`

function stageReached(opened: Opened, percent: number, figures: RowFigures, target: StageTarget | null): Criterion {
  const force = figures.force
  const common = { id: 'stage-reached', label: 'Stage reached', stops: false, leads: true, limit: null, source: protocolSource(opened) }
  const { stageLowerPercent, stageUpperPercent } = opened.protocol.content.limits
  const limitText = `${percent - (percent * stageLowerPercent) / 100} to ${percent + (percent * stageUpperPercent) / 100} %`
  if (!force || !target) return { ...common, verdict: 'not-read', value: null, U: null, reading: '—', limitText }
  const fraction = force.force / target.force
  const inside =
    force.pressure === null
      ? force.force >= target.window.from && force.force <= target.window.to
      : force.pressure >= target.window.from - 1e-6 && force.pressure <= target.window.to + 1e-6
  return {
    ...common,
    verdict: inside ? 'within' : 'wait',
    value: fraction,
    U: force.U / target.force,
    reading: percentText((fraction * percent) / 100, 1),
    limitText,
  }
}

function ratingKept(opened: Opened, figures: RowFigures): Criterion {
  const lowest = lowestLimit(opened.press)
  const force = figures.force
  const beyond = lowest !== null && force !== null && force.force > lowest.force * 1.0005
  return {
    id: 'rating',
    label: 'Lowest rating in the train',
    verdict: force ? (beyond ? 'beyond' : 'within') : 'not-read',
    value: force?.force ?? null,
    limit: lowest?.force ?? null,
    U: force?.U ?? null,
    stops: true,
    leads: true,
    reading: force ? formatForce(force.force, opened.forceUnit) : '—',
    limitText: lowest ? `≤ ${formatForce(lowest.force, opened.forceUnit)}` : '—',
    source: lowest?.name ?? '',
  }
}

function asPredicted(opened: Opened, figures: RowFigures, prediction: Prediction | null): Criterion[] {
  if (!prediction || !figures.lead) return []
  const { deflection, label } = figures.lead
  const outside = deflection < prediction.from || deflection > prediction.to
  return [
    {
      id: 'prediction',
      label: `Deflection, ${label}`,
      verdict: outside ? 'wait' : 'within',
      value: deflection,
      limit: prediction.to,
      U: figures.lead.U,
      stops: false,
      leads: true,
      reading: lengthText(opened, deflection),
      limitText: `${lengthText(opened, prediction.from, { unit: false })} – ${lengthText(opened, prediction.to, { unit: false })}`,
      source: deflection < prediction.from ? 'the line so far; on the stiff side look for a stuck or fallen indicator' : 'the line so far',
    },
  ]
}

function softeningCriterion(
  opened: Opened,
  step: StiffnessStep | null,
  id: string,
  label: string,
  percents: readonly number[],
  leads: boolean,
): Criterion[] {
  if (!step || step.softening === null || step.U === null) return []
  const limit = opened.protocol.content.limits.softeningPercent / 100
  const verdict = judge({ value: step.softening, U: step.U, limit: { max: limit }, rule: opened.protocol.content.decisionRule })
  return [
    {
      id: leads ? 'softening' : `softening-${id}`,
      label: `Softening, ${percents[step.from] ?? 0} to ${percents[step.to] ?? 0} %${leads ? '' : `, ${label}`}`,
      verdict,
      value: step.softening,
      limit,
      U: step.U,
      stops: true,
      leads,
      reading: `${percentText(step.softening)} ± ${(step.U * 100).toFixed(0)}`,
      limitText: `≤ ${percentText(limit)}`,
      source: protocolSource(opened),
    },
  ]
}

function lossIncrement(opened: Opened): number {
  const details = leadInstrument(opened)?.details
  return details && details.kind !== 'indicator' ? toSI(details.increment) : 0
}

function heldCriteria(
  opened: Opened,
  rows: readonly RowFigures[],
  start: RowFigures | null,
  end: RowFigures | null,
  stiffness: number,
): Criterion[] {
  const { limits, decisionRule } = opened.protocol.content
  const lossLimit = limits.pressureLossPercent / 100
  const readings = rows.flatMap(({ row, force }) =>
    force ? [{ pressure: force.pressure ?? force.force, toppedUp: (row as StageRow).toppedUp }] : [],
  )
  const lossBase = {
    id: 'pressure-loss',
    label: 'Pressure lost in hold',
    limit: lossLimit,
    stops: true,
    leads: true,
    limitText: `≤ ${percentText(lossLimit)}`,
    source: protocolSource(opened),
  }
  if (!start || !end) {
    return [
      { ...lossBase, verdict: 'not-read', value: null, U: null, reading: '—' },
      {
        id: 'creep',
        label: 'Creep in hold',
        verdict: 'not-read',
        value: null,
        limit: null,
        U: null,
        reading: '—',
        limitText: `≤ ${percentText(limits.creepPercent / 100)}`,
        source: protocolSource(opened),
        stops: true,
        leads: true,
      },
    ]
  }
  const increment = lossIncrement(opened)
  const readable = (readings[0]?.pressure ?? 0) > 0
  const loss = readable ? pressureLoss(readings) : null
  const uLoss = readable ? pressureLossUncertainty(readings, increment) : null
  const lossVerdict =
    loss !== null && uLoss !== null ? judge({ value: loss, U: uLoss, limit: { max: lossLimit }, rule: decisionRule }) : 'not-read'
  const creeps = start.deflections.flatMap((first): Criterion[] => {
    const last = end.deflections.find((figure) => figure.id === first.id)
    if (!last || !start.force || !end.force) return []
    const leads = first.id === start.lead?.id
    const secant = start.force.force / first.deflection
    const own = leads ? stiffness : Number.isFinite(secant) && secant > 0 ? secant : Number.POSITIVE_INFINITY
    const value = creep({
      deflectionStart: first.deflection,
      deflectionEnd: last.deflection,
      forceStart: start.force.force,
      forceEnd: end.force.force,
      stiffness: own,
    })
    const limit = creepLimit({
      fraction: limits.creepPercent / 100,
      stageDeflection: Math.abs(first.deflection),
      increment: first.increment,
    })
    const U = creepUncertainty({ uDeflection: first.uReading, uForce: start.force.uIndependent, stiffness: own })
    return [
      {
        id: leads ? 'creep' : `creep-${first.id}`,
        label: leads ? 'Creep in hold' : `Creep, ${first.label}`,
        verdict: judge({ value, U, limit: { max: limit }, rule: decisionRule }),
        value,
        limit,
        U,
        stops: true,
        leads,
        reading: lengthText(opened, value),
        limitText: `≤ ${lengthText(opened, limit)}`,
        source: protocolSource(opened),
      },
    ]
  })
  return [{ ...lossBase, verdict: lossVerdict, value: loss, U: uLoss, reading: loss === null ? '—' : percentText(loss, 1) }, ...creeps]
}

function suggest(
  criteria: readonly Criterion[],
  rows: readonly StageRow[],
  held: boolean,
  topUpTooMany: boolean,
): StageEvaluation['suggestion'] {
  if (rows.length === 0) return 'not-read'
  if (topUpTooMany) return 'stop'
  if (criteria.some((criterion) => criterion.stops && criterion.verdict === 'beyond')) return 'stop'
  const again = rows.some((row) => row.occasion === 'again')
  if (criteria.some((criterion) => criterion.leads && criterion.verdict === 'undecided')) return again ? 'stop' : 'wait'
  const outside = criteria.some((criterion) => criterion.verdict === 'wait')
  if (outside && !again) return 'wait'
  if (!held) return 'hold'
  return outside ? 'wait' : 'go-on'
}

/** Everything that one climb's readings say, stage by stage, from the core alone. */
export function evaluateClimb(state: ProofTestState, legIndex: number, climbIndex: number): ClimbEvaluation | null {
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
    const prediction = start?.force
      ? predict(opened, leadPoints, start.force.force)
      : target
        ? predict(opened, leadPoints, target.readableForce)
        : null
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
    const again = climbIndex > 0
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
