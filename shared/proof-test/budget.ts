import { toUnit } from '../units'
import type { TestEvaluation } from './evaluate'
import type { ForceFigure } from './force'

/** The force of the fullest stage of a test: the row at its mark, whose budget stands for the others. */
export function fullestForce(evaluation: Pick<TestEvaluation, 'climbs'>): { percent: number; force: ForceFigure } | null {
  const stages = evaluation.climbs.flatMap((climb) => climb.stages)
  return stages.reduce<{ percent: number; force: ForceFigure } | null>((fullest, stage) => {
    const force = stage.start?.force
    return force && stage.percent > (fullest?.percent ?? 0) ? { percent: stage.percent, force } : fullest
  }, null)
}

export interface BudgetText {
  name: string
  /** Half-width of the rectangle, or the certificate's U, in kN. */
  value: string
  distribution: string
  /** Standard uncertainty, kN. */
  u: string
  share: string
}

/** The uncertainty budget of a force in words and kN, the largest line first (JCGM 100 5). */
export function budgetTexts(figure: ForceFigure): BudgetText[] {
  const kN = (si: number): string => toUnit(si, 'kN').toFixed(3)
  return [...figure.budget]
    .sort((a, b) => b.u - a.u)
    .map(({ name, value, distribution, u, share }) => ({
      name,
      value: kN(value),
      distribution,
      u: kN(u),
      share: `${(share * 100).toFixed(0)} %`,
    }))
}
