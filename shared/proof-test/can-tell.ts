import { indicatorTooCoarse } from '../statistics/permanent-set'
import { stepStiffness } from '../statistics/softening'
import { formatQuantity } from '../units'
import { deflectionsOf } from './deflection'
import type { Opened } from './entries'
import { expectedOf } from './expected'
import { lengthText } from './figures'
import { forceOf, leadInstrument, stageTarget } from './force'

/** The band (m) in which the figure that leads is expected at a stage, over all legs; null where there is no estimate. */
export function expectedAtStage(opened: Opened, percent: number): { low: number; high: number } | null {
  const bands = opened.legs.flatMap((_leg, index) => expectedOf(opened, index) ?? [])
  if (bands.length === 0 || bands.length < opened.legs.length) return null
  const share = percent / 100
  return { low: Math.min(...bands.map(({ low }) => low)) * share, high: Math.max(...bands.map(({ high }) => high)) * share }
}

/** The figure that leads as these indicators give it, whatever they read. */
function leadOf(opened: Opened) {
  const nothing = opened.points.map((point) => ({ sourceId: point.id, text: '0', unit: opened.lengthUnit }))
  return deflectionsOf(opened, nothing, nothing)[0] ?? null
}

function setSentence(opened: Opened, least: number, increment: number): string[] {
  const { setPercent } = opened.protocol.content.limits
  if (!indicatorTooCoarse({ fraction: setPercent / 100, fullDeflection: least, increment })) return []
  const limit = (setPercent / 100) * least
  const finest = formatQuantity(limit / 2, opened.lengthUnit, opened.lengthUnit === 'in' ? 5 : 4)
  return [
    `These indicators cannot tell a permanent set of ${setPercent} %: as little as ${lengthText(opened, least)} is expected at full load, and two of their increments are more than ${setPercent} % of it. Fit one that reads in steps of ${finest} or less.`,
  ]
}

/** The uncertainty that the softening of each stage would have, were the frame a spring that moves by `full` (m) at rated load. */
function softeningU(opened: Opened, full: number, uReading: number): { percent: number; U: number }[] {
  const lead = leadInstrument(opened)
  if (!lead || lead.details.kind === 'indicator') return []
  const { unit } = lead.details.increment
  const stages = opened.protocol.content.stages.flatMap(({ percent }) => {
    const target = stageTarget(opened, percent)
    const readings = target ? opened.forceInstrumentIds.map((sourceId) => ({ sourceId, text: target.text, unit })) : []
    const figure = target && forceOf(opened, readings)
    return figure ? [{ percent, force: figure.force, uForce: figure.uIndependent }] : []
  })
  const rated = stages.find(({ percent }) => percent === 100)
  if (!rated) return []
  const points = stages.map(({ force, uForce }) => ({ force, uForce, deflection: (full * force) / rated.force, uDeflection: uReading }))
  const datum = { force: 0, deflection: 0, uForce: stages[0]?.uForce ?? 0, uDeflection: uReading }
  return stepStiffness([datum, ...points]).flatMap(({ U }, index) => {
    const stage = stages[index]
    return stage && U !== null ? [{ percent: stage.percent, U }] : []
  })
}

/**
 * Which limits of the protocol these instruments cannot tell, by the expected deflection at its least: a limit that
 * lies inside the uncertainty comes out undecided though the frame were a perfect spring. Sentences; none where
 * nothing is expected.
 * Source: the decision rule of JCGM 106, with the expected band as the deflection; an estimate.
 */
export function cannotTell(opened: Opened): string[] {
  const full = expectedAtStage(opened, 100)
  const lead = leadOf(opened)
  if (!full || !lead || !(full.low > 0)) return []
  const { softeningPercent } = opened.protocol.content.limits
  const blind = softeningU(opened, full.low, lead.uReading).filter(({ U }) => U * 100 >= softeningPercent)
  return [
    ...setSentence(opened, full.low, lead.increment),
    ...blind.map(
      ({ percent, U }) =>
        `These indicators cannot tell ${softeningPercent} % softening at ${percent} %: by the least that is expected, its uncertainty is ± ${Math.round(U * 100)} %.`,
    ),
  ]
}
