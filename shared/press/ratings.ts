import { pistonArea, type RamInput } from '../hydraulics/ram'
import { toSI, weightOf } from '../units'
import type { PressDescription, Ram } from './model'

/** The most force a component may carry (N) and the pressure of the manifold that makes it (Pa), if it goes by pressure. */
export interface ComponentLimit {
  name: string
  force: number
  by: 'force' | 'pressure'
}

/** Half-width of a bore's tolerance where none is written down: 0.05 mm, common practice, no source. */
const UNSTATED_BORE_TOLERANCE = 0.00005

/** A ram's areas (m²), springs and carried weight (N), in SI, as the force arithmetic takes them. */
export function ramInput(ram: Ram): RamInput {
  const bore = ram.bore ? toSI(ram.bore) : null
  const area = ram.effectiveArea ? toSI(ram.effectiveArea) : pistonArea(bore ?? 0)
  const tolerance = ram.boreTolerance ? toSI(ram.boreTolerance) : UNSTATED_BORE_TOLERANCE
  const width = bore ?? Math.sqrt((4 * area) / Math.PI)
  const weight = ram.carriedMass ? weightOf(toSI(ram.carriedMass)) : 0
  const spring = ram.springReturn ? toSI(ram.springReturn) : 0
  return {
    area,
    relativeAreaTolerance: (2 * tolerance) / width,
    rodArea: ram.acting === 'double' && ram.rodDiameter ? area - pistonArea(toSI(ram.rodDiameter)) : 0,
    springReturn: spring,
    springReturnTolerance: spring * 0.1,
    carriedWeight: ram.carriedComesDown ? weight : -weight,
    carriedWeightTolerance: weight * 0.05,
  }
}

/** Total area (m²) of the rams that press together. */
export function totalArea(description: Pick<PressDescription, 'rams'>): number {
  return description.rams.reduce((sum, ram) => sum + ramInput(ram).area, 0)
}

/**
 * The rating of every component of the train as a force (N), lowest first. A rated pressure becomes the
 * force that the rams make at it; rams that share a manifold stop at the lowest rated pressure among them.
 */
export function componentLimits(description: Pick<PressDescription, 'rams' | 'train'>): ComponentLimit[] {
  const area = totalArea(description)
  const limits: ComponentLimit[] = description.rams.flatMap((ram): ComponentLimit[] => {
    const share = area > 0 ? ramInput(ram).area / area : 1
    return [
      { name: `${ram.name}, rated capacity`, force: toSI(ram.ratedCapacity) / share, by: 'force' },
      { name: `${ram.name}, rated pressure`, force: toSI(ram.ratedPressure) * area, by: 'pressure' },
    ]
  })
  for (const part of description.train) {
    if (part.ratedForce) limits.push({ name: part.name, force: toSI(part.ratedForce), by: 'force' })
    if (part.ratedPressure) limits.push({ name: part.name, force: toSI(part.ratedPressure) * area, by: 'pressure' })
  }
  return limits.sort((a, b) => a.force - b.force)
}

/** The lowest rating in the train; a press without rams has none. */
export function lowestLimit(description: Pick<PressDescription, 'rams' | 'train'>): ComponentLimit | null {
  return componentLimits(description)[0] ?? null
}

/** How far above a component's rating still counts as at it: rounding of a converted mark, not a margin. */
const SAME_RATING = 1.0005

/** Whether a component of `rating` (N) carries less than `force` (N), apart from the rounding of a converted mark. */
export function carriesLess(rating: number, force: number): boolean {
  return force > rating * SAME_RATING
}

/** A sentence when the rated load passes the lowest rating in the train, else null. */
export function ratedLoadRefusal(description: Pick<PressDescription, 'rams' | 'train' | 'ratedLoad'>): string | null {
  const lowest = description.rams.length > 0 ? lowestLimit(description) : null
  if (!lowest) return 'A press needs a ram before it can have a rated load.'
  const rated = toSI(description.ratedLoad)
  if (rated <= 0) return 'The rated load is more than zero.'
  if (!carriesLess(lowest.force, rated)) return null
  return `The rated load is ${(rated / 1000).toFixed(1)} kN, and ${lowest.name} carries no more than ${(lowest.force / 1000).toFixed(1)} kN. Rate the press no higher than that.`
}
