/** One point of a climb, the datum first. */
export type ClimbPoint = {
  /** Force, N. */
  force: number
  /** Deflection from the datum in the direction of loading, m. */
  deflection: number
  /** Standard uncertainty of the force that differs from reading to reading, N (resolution only). */
  uForce: number
  /** Standard uncertainty of this one indicator reading (or combination of readings), m. */
  uDeflection: number
}

export type StiffnessStep = {
  /** Indices of the points the step runs between. */
  from: number
  to: number
  /** Step stiffness ΔF/Δδ, N/m; Infinity when the indicator didn't move up though the force did. */
  stiffness: number
  /** 1 − K/K_reference; null without an earlier stiffer or softer step to compare with. */
  softening: number | null
  /** Expanded uncertainty of the softening (k = 2); null with it. */
  U: number | null
  /** Index of the step compared with, the stiffest earlier one; null without. */
  reference: number | null
  /** The force rose and the indicator didn't: stuck, or fallen. */
  stuck: boolean
}

type Step = { rise: number; travel: number; stiffness: number; stuck: boolean }

function stepBetween(before: ClimbPoint, after: ClimbPoint): Step {
  const rise = after.force - before.force
  const travel = after.deflection - before.deflection
  if (travel > 0) return { rise, travel, stiffness: rise / travel, stuck: false }
  // Load and deflection both fell: a step down, which says nothing of stiffness on the way up.
  if (rise <= 0) return { rise, travel, stiffness: Number.NaN, stuck: false }
  return { rise, travel, stiffness: Infinity, stuck: true }
}

/** The stiffest step before `end` that rose and moved; a stuck indicator is no reference. */
function stiffestBefore(steps: readonly Step[], end: number): number | null {
  let best: number | null = null
  for (let index = 0; index < end; index += 1) {
    const stiffness = steps[index]?.stiffness ?? Number.NaN
    if (!Number.isFinite(stiffness) || stiffness <= 0) continue
    if (best === null || stiffness > (steps[best]?.stiffness ?? 0)) best = index
  }
  return best
}

/**
 * Expanded uncertainty of 1 − K_i/K_r. The sensitivities are gathered by reading, so that a reading
 * which enters both steps is counted once, with its sign.
 */
function softeningUncertainty(
  points: readonly ClimbPoint[],
  step: { index: number; of: Step },
  reference: { index: number; of: Step },
): number {
  const sensitivities = new Map<number, { force: number; deflection: number }>()
  const add = (point: number, force: number, deflection: number) => {
    const sofar = sensitivities.get(point) ?? { force: 0, deflection: 0 }
    sensitivities.set(point, { force: sofar.force + force, deflection: sofar.deflection + deflection })
  }
  const gather = ({ index, of }: { index: number; of: Step }, weight: number) => {
    const byForce = weight / of.travel
    const byDeflection = (-weight * of.rise) / of.travel ** 2
    add(index + 1, byForce, byDeflection)
    add(index, -byForce, -byDeflection)
  }
  gather(step, -1 / reference.of.stiffness)
  gather(reference, step.of.stiffness / reference.of.stiffness ** 2)
  let variance = 0
  for (const [index, { force, deflection }] of sensitivities) {
    const point = points[index]
    if (!point) continue
    variance += (force * point.uForce) ** 2 + (deflection * point.uDeflection) ** 2
  }
  return 2 * Math.sqrt(variance)
}

/**
 * Stiffness of every step of a climb, and its loss against the stiffest earlier step:
 * 1 − K_i/max(K_1…K_{i−1}). The first step, soft from slack, is thereby no reference once a later one
 * is stiffer. Neighbouring steps share a reading: the uncertainty carries the full covariance.
 * What is common to all readings (the gauge's gain, the bore, springs, weight) cancels in the ratio,
 * which is why `uForce` holds the independent part only.
 *
 * A step in which the force rose and the indicator didn't is `stuck`: stiffness Infinity, no
 * softening, no reference for later steps. A step in which the force fell while the deflection grew
 * has a stiffness below zero and a softening above one. A step in which both fell has no stiffness
 * (NaN) and no softening.
 * Source: JCGM 100:2008, 5.1.2 and 5.2.2 (correlated inputs); the definition of softening is common
 * practice, no source.
 */
export function stepStiffness(points: readonly ClimbPoint[]): StiffnessStep[] {
  const steps: Step[] = []
  for (let index = 1; index < points.length; index += 1) {
    const before = points[index - 1]
    const after = points[index]
    if (before && after) steps.push(stepBetween(before, after))
  }
  return steps.map((step, index) => {
    const plain = { from: index, to: index + 1, stiffness: step.stiffness, stuck: step.stuck }
    const best = stiffestBefore(steps, index)
    const stiffest = best === null ? undefined : steps[best]
    if (best === null || !stiffest || !Number.isFinite(step.stiffness)) {
      return { ...plain, softening: null, U: null, reference: null }
    }
    return {
      ...plain,
      softening: 1 - step.stiffness / stiffest.stiffness,
      U: softeningUncertainty(points, { index, of: step }, { index: best, of: stiffest }),
      reference: best,
    }
  })
}
