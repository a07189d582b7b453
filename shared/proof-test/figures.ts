import { fitLine, predictAt } from '../statistics/line'
import type { Verdict } from '../statistics/decision-rule'
import { decimalsOf, formatQuantity, formatValue } from '../units'
import { deflectionsOf, type DeflectionFigure } from './deflection'
import type { Opened } from './entries'
import { forceOf, instrumentOf, type ForceFigure } from './force'
import type { Row } from './state'

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

export const percentText = (fraction: number, decimals = 0): string => `${(fraction * 100).toFixed(decimals).replace('-', '−')} %`

export interface Point {
  force: number
  deflection: number
  uForce: number
  uDeflection: number
}

export function pointOf(figures: RowFigures | null, id: string): Point | null {
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
export function spread(points: readonly Point[]): boolean {
  const forces = points.map((point) => point.force)
  return points.length >= 2 && Math.max(...forces) - Math.min(...forces) > 1
}

/** The prediction for a force, from the datum and the stages before (DOMAIN 3.5). Null below two points. */
export function predict(
  opened: { protocol: { content: Pick<Opened['protocol']['content'], 'predictionAllowancePercent'> } },
  points: readonly Point[],
  force: number,
): Prediction | null {
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
