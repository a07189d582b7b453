import type { Opened } from './entries'
import { evaluateTest } from './evaluate'
import type { Criterion } from './figures'
import type { ProofTestState } from './state'

/** The members that a criterion's point tells of: the middle point's for the net figure, else the point named in it. */
function membersBehind(opened: Opened, criterion: Criterion): string[] {
  const { net, points } = opened
  const lead = net ? points.find((point) => point.id === net.plus) : points[0]
  const named = points.find((point) => criterion.label.endsWith(point.label))
  const memberId = (named ?? (criterion.leads ? lead : undefined))?.memberId
  return memberId ? [memberId] : []
}

/** Criteria that speak of how the frame moved, not of gauge or time. */
const OF_THE_FRAME = ['softening', 'creep', 'set'] as const

const isOfTheFrame = ({ id }: Criterion): boolean => OF_THE_FRAME.some((kind) => id === kind || id.startsWith(`${kind}-`))

/** The members whose points went beyond a limit in a test, by id: where its repair begins to look. */
export function membersConcerned(state: ProofTestState): string[] {
  const { opened } = state
  if (!opened) return []
  const { climbs, criteria } = evaluateTest(state)
  const all = [
    ...criteria,
    ...climbs.flatMap((climb) => [...climb.stages.flatMap((stage) => stage.criteria), ...(climb.set?.criteria ?? [])]),
  ]
  const beyond = all.filter((criterion) => criterion.verdict === 'beyond' && isOfTheFrame(criterion))
  return [...new Set(beyond.flatMap((criterion) => membersBehind(opened, criterion)))]
}
