import type { ClimbHistory } from '../api/press-history'
import type { Opened } from '../proof-test/entries'
import { toSI, toUnit } from '../units'
import type { LineChartSpec } from './line-spec'

/** What the lead figure of a test is called, as its history names it. */
const figureOf = ({ net, points }: Opened): string => net?.label ?? points[0]?.label ?? ''

/**
 * The first climb of the test that `opened` repeats, in the same position and of the same figure, as the chart of the
 * new one draws it: deflections in its length unit, loads in percent of its rated load. Null where nothing is repeated
 * or the earlier test measured something else. `climbs` is the press's history (SI).
 */
export function earlierLine(
  opened: Opened,
  leg: number,
  climbs: readonly ClimbHistory[],
  label: (climb: ClimbHistory) => string,
): LineChartSpec['earlier'] {
  const { repeats, legs, press, lengthUnit } = opened
  const earlier = climbs.find(
    (climb) => climb.proofTestId === repeats?.id && climb.climb === 0 && climb.leg === legs[leg]?.label && climb.of === figureOf(opened),
  )
  if (!earlier) return undefined
  const rated = toSI(press.ratedLoad)
  const points = earlier.line.map(({ force, deflection }) => ({ x: toUnit(deflection, lengthUnit), y: (force / rated) * 100 }))
  return points.length > 1 ? { label: label(earlier), points } : undefined
}

/** A chart with the line of an earlier test laid under its own; the axis takes both in. */
export function withEarlier(spec: LineChartSpec, earlier: LineChartSpec['earlier']): LineChartSpec {
  if (!earlier) return spec
  return { ...spec, earlier, xMax: Math.max(spec.xMax, ...earlier.points.map((point) => point.x)) }
}
