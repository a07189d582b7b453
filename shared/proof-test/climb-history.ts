import type { ClimbHistory } from '../api/press-history'
import { studentTQuantile } from '../statistics/student-t'
import type { ClimbEvaluation } from './evaluate-climb'
import { evaluateTest } from './evaluate'
import type { Criterion } from './figures'
import type { ProofTestState } from './state'

const leading = (criteria: readonly Criterion[], id: string): Criterion | undefined =>
  criteria.find((criterion) => criterion.id === id && criterion.leads)

/** Below this a line's scatter says nothing of how well it is known (DOMAIN 3.5). */
const LEAST_DEGREES_OF_FREEDOM = 3

/**
 * Stiffness (N/m) of the line with its expanded uncertainty at 95 %, from the slope's standard error (DOMAIN 3.5); no
 * uncertainty below three degrees of freedom, where the fit's own scatter can be nothing by chance.
 */
function stiffnessOf({ fit }: ClimbEvaluation): { stiffness: number | null; stiffnessU: number | null } {
  if (!fit || !(fit.slope > 0)) return { stiffness: null, stiffnessU: null }
  const stiffness = 1 / fit.slope
  // u(1/b) = u(b)/b² (JCGM 100, 5.1.2).
  const stiffnessU =
    fit.seSlope === null || fit.dof < LEAST_DEGREES_OF_FREEDOM ? null : (studentTQuantile(0.975, fit.dof) * fit.seSlope) / fit.slope ** 2
  return { stiffness, stiffnessU }
}

function climbHistory(state: ProofTestState, climb: ClimbEvaluation): ClimbHistory[] {
  const { opened, conclusion } = state
  const full = climb.stages.filter((stage) => stage.percent >= 100 && stage.start !== null).at(-1)
  if (!opened || !climb.datum) return []
  const set = leading(climb.set?.criteria ?? [], 'set')
  const loss = full && leading(full.criteria, 'pressure-loss')
  const line = climb.stages.flatMap(({ percent, start }) =>
    start?.force && start.lead ? [{ percent, force: start.force.force, deflection: start.lead.deflection }] : [],
  )
  if (line.length === 0) return []
  return [
    {
      proofTestId: state.id,
      number: opened.number,
      on: climb.datum.row.mark.at,
      result: conclusion?.conclusion ?? null,
      repeats: opened.repeats?.number ?? null,
      leg: opened.legs[climb.leg]?.label ?? '',
      climb: climb.climb,
      of: climb.datum.lead?.label ?? '',
      ...stiffnessOf(climb),
      set: set?.value ?? null,
      setLimit: set?.limit ?? null,
      pressureLoss: loss?.value ?? null,
      pressureLossLimit: loss?.limit ?? null,
      line: [{ percent: 0, force: climb.datum.force?.force ?? 0, deflection: 0 }, ...line],
    },
  ]
}

/** What a test adds to the history of its press: a line for each climb that was read at a stage at least. SI. */
export function historyOf(state: ProofTestState): ClimbHistory[] {
  return evaluateTest(state).climbs.flatMap((climb) => climbHistory(state, climb))
}
