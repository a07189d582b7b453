import type { ClimbEvaluation, StageEvaluation } from '../proof-test/evaluate-climb'
import { lengthText } from '../proof-test/evaluate-climb'
import { correctionLetters } from '../proof-test/corrections'
import type { Opened } from '../proof-test/entries'
import { stageForce } from '../proof-test/force'
import type { ProofTestState } from '../proof-test/state'
import { fitLine, type LineFit } from '../statistics/line'
import { FORCE_DECIMALS, formatNumber, formatQuantity, toSI, toUnit, unitLabel } from '../units'
import { chartBand } from './expected-band'
import type { LineChartSpec, LineNote, LinePoint } from './line-spec'
import { topOfScale } from './line-frame'

interface Size {
  width: number
  height: number
}

const isBeyond = (stage: StageEvaluation): boolean => stage.criteria.some((criterion) => criterion.stops && criterion.verdict === 'beyond')

/** The line through the datum and the stages before one that is beyond a limit: what the frame did while it was a spring. */
function trustedFit(climb: ClimbEvaluation): LineFit | null {
  const bad = climb.stages.findIndex(isBeyond)
  if (bad < 0) return climb.fit
  const points = climb.stages.slice(0, bad).flatMap(({ start }) => {
    return start?.lead && start.force ? [{ x: start.force.force, y: start.lead.deflection }] : []
  })
  return points.length >= 2 ? fitLine([{ x: climb.datum?.force?.force ?? 0, y: 0 }, ...points]) : null
}

/** Stiffness (N/m) as shops write it: kN/mm, or lbf/in where lengths are read in inches. */
export function stiffnessText(opened: Opened, stiffness: number): string {
  if (opened.lengthUnit === 'in') return formatQuantityOf(toUnit(stiffness, 'lbf') * 0.0254, 0, 'lbf/in')
  return formatQuantityOf(stiffness / 1e6, 1, 'kN/mm')
}

function formatQuantityOf(value: number, decimals: number, unit: string): string {
  return `${formatNumber(value, decimals)}\u00a0${unit}`
}

/**
 * The line of one leg as the record draws it: the first climb's readings with their uncertainty and fit, the
 * repeat climb dotted beside them, the set on the axis. `climbs` are the leg's, in order; readings that `state` has
 * corrections of bear their letters. Null before a stage was read. Deflections in the test's unit, loads in percent of rated load.
 */
export function recordLine(
  opened: Opened,
  climbs: readonly ClimbEvaluation[],
  size: Size,
  state: Pick<ProofTestState, 'corrections'>,
): LineChartSpec | null {
  const [first, repeat] = climbs
  const rated = toSI(opened.press.ratedLoad)
  const unit = opened.lengthUnit
  if (!first || !first.stages.some((stage) => stage.start?.lead && stage.start.force)) return null
  const lettered = (...entryIds: string[]): { corrected?: string } => {
    const corrected = correctionLetters(state, entryIds)
    return corrected === '' ? {} : { corrected }
  }
  const pointsOf = (climb: ClimbEvaluation): LinePoint[] =>
    climb.stages.flatMap((stage): LinePoint[] => {
      const { start } = stage
      if (!start?.lead || !start.force) return []
      const point: LinePoint = {
        x: toUnit(start.lead.deflection, unit),
        y: (start.force.force / rated) * 100,
        ux: toUnit(start.lead.U, unit),
        uy: (start.force.U / rated) * 100,
        ...lettered(start.row.entryId),
      }
      return [isBeyond(stage) ? { ...point, mark: 'stop' } : point]
    })
  const datum: LinePoint = {
    x: 0,
    y: ((first.datum?.force?.force ?? 0) / rated) * 100,
    ux: 0,
    uy: 0,
    ...(first.datum ? lettered(first.datum.row.entryId) : {}),
  }
  const points = [datum, ...pointsOf(first)]
  const comparison = repeat ? [{ x: 0, y: 0 }, ...pointsOf(repeat).map(({ ux: _ux, uy: _uy, mark: _mark, ...point }) => point)] : undefined
  const stages = opened.protocol.content.stages.map(({ percent }, index, all) => {
    const load = toUnit(stageForce(opened, percent), opened.forceUnit).toFixed(FORCE_DECIMALS[opened.forceUnit])
    const last = index === all.length - 1
    return { percent, label: `${percent}\u202f%`, load: last ? `${load} ${unitLabel(opened.forceUnit, { plural: true })}` : load }
  })
  const set = first.set?.row.lead
  const setPoint =
    first.set && set ? { x: toUnit(set.deflection, unit), ux: toUnit(set.U, unit), ...lettered(first.set.row.row.entryId) } : null
  const trusted = trustedFit(first)
  const fit = trusted ? { slope: (toUnit(trusted.slope, unit) * rated) / 100, intercept: toUnit(trusted.intercept, unit) } : null
  const band = chartBand(opened, first.leg)
  const widest = Math.max(band?.high ?? 0, ...points.map((point) => point.x + point.ux), ...(comparison ?? []).map((point) => point.x))
  const isCorrected = [...points, ...(comparison ?? []), ...(setPoint ? [setPoint] : [])].some((point) => 'corrected' in point)
  return {
    ...size,
    stages: [{ percent: 0, label: '0\u202f%', load: 'datum' }, ...stages],
    points,
    fit,
    band,
    prediction: null,
    notes: notesOf(opened, first, points),
    ...(setPoint ? { setPoint } : {}),
    ...(comparison && comparison.length > 1 ? { comparison } : {}),
    xLabel: 'deflection',
    xUnit: unitLabel(unit),
    xMax: Math.max(widest, 1e-6),
    yMax: topOfScale(opened.protocol.content.stages),
    title: 'Deflection against load',
    // A narrow chart has room for its title only.
    ...(size.width < 480 ? {} : { aside: opened.net?.label ?? opened.points[0]?.label ?? '' }),
    ...(isCorrected ? { footnote: 'Letter: corrected, see Corrections' } : {}),
    setting: 'alone',
  }
}

function notesOf(opened: Opened, climb: ClimbEvaluation, points: readonly LinePoint[]): LineNote[] {
  const notes: LineNote[] = []
  const last = climb.stages.findLast((stage) => stage.start !== null)
  const tip = points.at(-1)
  const before = points.at(-2)
  if (last?.step && last.step.softening !== null && last.step.U !== null && tip && before) {
    const percent = last.step.softening * 100
    const beyond = isBeyond(last)
    const words = percent < 0 ? `${Math.round(-percent)}\u202f% stiffer` : `${Math.round(percent)}\u202f% softer`
    notes.push({
      at: { x: (tip.x + before.x) / 2, y: (tip.y + before.y) / 2 },
      tone: beyond ? 'stop' : 'scribe',
      lines: [`${words} ± ${Math.round(last.step.U * 100)}`, 'than the stiffest step'],
      ...(beyond ? { mark: 'stop' as const } : {}),
    })
  }
  const fit = trustedFit(climb)
  if (fit && fit.slope > 0) {
    const rated = toSI(opened.press.ratedLoad)
    const y = Math.min(46, (tip?.y ?? 100) / 2)
    const x = toUnit(fit.intercept + (fit.slope * rated * y) / 100, opened.lengthUnit)
    const upTo = last && isBeyond(last) ? 'fitted before the stop' : 'fitted'
    const fitted = fit.r2 === null ? upTo : `${upTo}, r² ${fit.r2.toFixed(4)}`
    notes.push({ at: { x, y }, tone: 'scribe', lines: [stiffnessText(opened, 1 / fit.slope), fitted] })
  }
  const set = climb.set
  const lead = set?.row.lead
  const criterion = set?.criteria.find((candidate) => candidate.leads)
  if (set && lead && criterion) {
    notes.push({
      at: { x: toUnit(lead.deflection, opened.lengthUnit), y: 0 },
      tone: criterion.verdict === 'beyond' ? 'stop' : 'scribe',
      lines: [`set ${lengthText(opened, lead.deflection)}, released`, `limit ${limitOf(opened, criterion.limit)}`],
    })
  }
  return notes
}

function limitOf(opened: Opened, limit: number | null): string {
  return limit === null ? '—' : formatQuantity(limit, opened.lengthUnit, opened.lengthUnit === 'in' ? 4 : 2)
}
