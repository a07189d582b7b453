import { chartBand } from '#shared/chart/expected-band'
import type { LineChartSpec, LineNote, LinePoint, LinePrediction } from '#shared/chart/line-spec'
import { topOfScale } from '#shared/chart/line-geometry'
import type { Opened } from '#shared/proof-test/entries'
import { lengthText, predict, type ClimbEvaluation, type RowFigures, type StageEvaluation } from '#shared/proof-test/evaluate-climb'
import { predictFromBand } from '#shared/proof-test/expected'
import { stageTarget } from '#shared/proof-test/force'
import { fitLine } from '#shared/statistics/line'
import { toSI, toUnit, unitLabel } from '#shared/units'
import { capital } from '../../lib/words'

const beyond = (stage: StageEvaluation): boolean =>
  stage.criteria.some((criterion) => criterion.id === 'softening' && criterion.verdict === 'beyond')

function chartPoint(opened: Opened, row: RowFigures | null, mark?: 'stop'): LinePoint[] {
  if (!row?.force || !row.lead) return []
  const rated = toSI(opened.press.ratedLoad)
  const length = (si: number): number => toUnit(si, opened.lengthUnit)
  return [
    { x: length(row.lead.deflection), y: (row.force.force / rated) * 100, ux: length(row.lead.U), uy: (row.force.U / rated) * 100, mark },
  ]
}

/** The points that carry the line, in the order they were read: datum first. */
export function linePoints(opened: Opened, climb: ClimbEvaluation | null): LinePoint[] {
  if (!climb?.datum) return []
  return [
    { x: 0, y: 0, ux: 0, uy: 0 },
    ...climb.stages.flatMap((stage) => chartPoint(opened, stage.start, beyond(stage) ? 'stop' : undefined)),
  ]
}

function fitOf(points: readonly LinePoint[]): LineChartSpec['fit'] {
  const trusted = points.filter((point) => point.mark !== 'stop')
  if (trusted.length < 2) return null
  const { slope, intercept } = fitLine(trusted.map((point) => ({ x: point.y, y: point.x })))
  return { slope, intercept }
}

/**
 * What the readings so far predict for a stage that has not been read, at the load that is pumped to; before there
 * is a line, what the members' sections let expect.
 */
export function predictionFor(opened: Opened, climb: ClimbEvaluation | null, percent: number) {
  const target = stageTarget(opened, percent)
  if (!climb?.datum || !target) return null
  const rows = [climb.datum, ...climb.stages.filter((stage) => stage.percent < percent).map((stage) => stage.start)]
  const points = rows.flatMap((row) =>
    row?.force && row.lead
      ? [{ force: row.force.force, deflection: row.lead.deflection, uForce: row.force.uIndependent, uDeflection: row.lead.uReading }]
      : [],
  )
  const uReading = points[0]?.uDeflection ?? 0
  return predict(opened, points, target.readableForce) ?? predictFromBand(opened, climb.leg, target.readableForce, uReading)
}

/** "1.25 to 1.44 mm". */
export function rangeText(opened: Opened, from: number, to: number): string {
  return `${lengthText(opened, from, { unit: false })} to ${lengthText(opened, to, { unit: false })} ${unitLabel(opened.lengthUnit)}`
}

function expected(opened: Opened, climb: ClimbEvaluation | null, percent: number | null): LinePrediction | null {
  if (percent === null) return null
  const stage = climb?.stages.find((candidate) => candidate.percent === percent)
  const read = stage?.start ?? null
  const prediction = read ? stage?.prediction : predictionFor(opened, climb, percent)
  if (!prediction) return null
  const outside = stage?.criteria.some((criterion) => criterion.id === 'prediction' && criterion.verdict === 'wait')
  if (read && !outside) return null
  return {
    y: (prediction.force / toSI(opened.press.ratedLoad)) * 100,
    from: toUnit(prediction.from, opened.lengthUnit),
    to: toUnit(prediction.to, opened.lengthUnit),
    text: rangeText(opened, prediction.from, prediction.to),
    caption: read ? 'expected' : 'Next: expect',
    tone: read ? 'scribe' : 'chalk',
  }
}

/** "2 % softer ± 8", or stiffer. */
export function softeningWords(value: number, U: number): string {
  const percent = Math.round(Math.abs(value) * 100)
  return `${percent} % ${value < 0 ? 'stiffer' : 'softer'} ± ${Math.round(U * 100)}`
}

function notesOf(opened: Opened, climb: ClimbEvaluation | null, points: readonly LinePoint[]): LineNote[] {
  const read = climb?.stages.filter((stage) => stage.start) ?? []
  const last = read.at(-1)
  const [before, here] = points.slice(-2)
  if (!last?.start?.lead || !before || !here || points.length < 2) return []
  const notes: LineNote[] = []
  const waits = last.criteria.some((criterion) => criterion.id === 'prediction' && criterion.verdict === 'wait')
  if (waits) notes.push({ at: here, tone: 'scribe', lines: [`read ${lengthText(opened, last.start.lead.deflection)}`], mark: 'wait' })
  const { step } = last
  if (!step || step.softening === null || step.U === null) return notes
  const stop = here.mark === 'stop'
  const limit = opened.protocol.content.limits.softeningPercent
  notes.push({
    at: { x: (before.x + here.x) / 2, y: (before.y + here.y) / 2 },
    tone: stop ? 'stop' : 'scribe',
    lines: [softeningWords(step.softening, step.U), 'than the stiffest step', `limit ${limit} %`],
  })
  return notes
}

interface LineOptions {
  width: number
  height: number
  /** The stage that is being read, or comes next. */
  percent: number | null
  alone: boolean
  /** Whose expected band is drawn. */
  leg: number
  /** The climb before, for a repeat. */
  before: ClimbEvaluation | null
}

/** The chart of deflection against load of the climb that is under way. */
export function lineSpec(opened: Opened, climb: ClimbEvaluation | null, options: LineOptions): LineChartSpec {
  const points = linePoints(opened, climb)
  const fit = fitOf(points)
  const prediction = expected(opened, climb, options.percent)
  const band = chartBand(opened, options.leg)
  const yMax = topOfScale(opened.protocol.content.stages)
  const comparison = linePoints(opened, options.before)
  const reach = [
    ...points.map((point) => point.x + point.ux),
    ...comparison.map((point) => point.x),
    prediction?.to ?? 0,
    band?.high ?? 0,
    fit ? fit.intercept + fit.slope * yMax : 0,
  ]
  const set = climb?.set?.row.lead
  return {
    width: options.width,
    height: options.height,
    stages: opened.protocol.content.stages.map(({ percent }) => ({ percent, label: `${percent} %` })),
    points,
    fit,
    band,
    prediction,
    notes: notesOf(opened, climb, points),
    setPoint: set ? { x: toUnit(set.deflection, opened.lengthUnit), ux: toUnit(set.U, opened.lengthUnit) } : undefined,
    comparison: comparison.length > 1 ? comparison : undefined,
    xLabel: capital(opened.net?.label ?? opened.points[0]?.label ?? 'Deflection'),
    xUnit: unitLabel(opened.lengthUnit),
    xMax: Math.max(...reach) > 0 ? Math.max(...reach) : opened.lengthUnit === 'in' ? 0.04 : 1,
    yMax,
    title: 'The line',
    aside: 'load up, deflection right',
    setting: options.alone ? 'alone' : 'beside',
  }
}
