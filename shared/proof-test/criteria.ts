import { judge } from '../statistics/decision-rule'
import { creep, creepLimit, creepUncertainty, pressureLoss, pressureLossUncertainty } from '../statistics/hold'
import type { StiffnessStep } from '../statistics/softening'
import { lowestLimit } from '../press/ratings'
import { formatForce, toSI } from '../units'
import type { Opened } from './entries'
import { lengthText, percentText, type Criterion, type Prediction, type RowFigures } from './figures'
import { leadInstrument, type StageTarget } from './force'
import type { StageRow } from './state'

export type Suggestion = 'not-read' | 'hold' | 'wait' | 'stop' | 'go-on'

export const protocolSource = (opened: Opened): string => `${opened.protocol.name}, version ${opened.protocol.version}`

export function stageReached(opened: Opened, percent: number, figures: RowFigures, target: StageTarget | null): Criterion {
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

export function ratingKept(opened: Opened, figures: RowFigures): Criterion {
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

export function asPredicted(opened: Opened, figures: RowFigures, prediction: Prediction | null): Criterion[] {
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

export function softeningCriterion(
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

export function lossIncrement(opened: Opened): number {
  const details = leadInstrument(opened)?.details
  return details && details.kind !== 'indicator' ? toSI(details.increment) : 0
}

export function heldCriteria(
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

export function suggest(criteria: readonly Criterion[], rows: readonly StageRow[], held: boolean, topUpTooMany: boolean): Suggestion {
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
