import type { Opened } from '#shared/proof-test/entries'
import { evaluateTest } from '#shared/proof-test/evaluate'
import type { Criterion, StageEvaluation } from '#shared/proof-test/evaluate-climb'
import type { ProofTestState } from '#shared/proof-test/state'
import type { VerdictRow } from '../../components/run/verdict-table'

/** What is listed after a stage: whatever decides, and whatever else is not within. The worst stands first. */
export function verdictRows(criteria: readonly Criterion[]): VerdictRow[] {
  const rank = { beyond: 0, undecided: 1, wait: 2, 'not-read': 3, within: 4 }
  return criteria
    .filter((criterion) => criterion.leads || criterion.verdict === 'beyond')
    .toSorted((a, b) => rank[a.verdict] - rank[b.verdict])
    .map(({ id, verdict, label, reading, limitText }) => ({ id, verdict, what: label, reading, limit: limitText }))
}

const percent = (fraction: number): string => `${Math.round(fraction * 100)} %`

function softeningSentence(criterion: Criterion): string[] {
  const { value, U, limit, verdict } = criterion
  if (value === null || U === null || limit === null) return []
  const said =
    value < 0
      ? `This step is ${percent(-value)} stiffer than the stiffest step.`
      : `This step is ${percent(value)} softer than the stiffest step.`
  if (verdict === 'beyond') {
    const kindest = value - U
    return [said, kindest > limit ? `Even the kindest reading, ${percent(kindest)}, is past the limit.` : `The limit is ${percent(limit)}.`]
  }
  if (verdict === 'undecided') return [said, `Give or take ${percent(U)}, so the limit of ${percent(limit)} cannot be told from it.`]
  return [said]
}

function sentenceOf(criterion: Criterion): string[] {
  if (criterion.id === 'softening') return softeningSentence(criterion)
  switch (criterion.verdict) {
    case 'beyond':
      return [`${criterion.label} is ${criterion.reading}. The limit is ${criterion.limitText}.`]
    case 'undecided':
      return [`${criterion.label} is ${criterion.reading}, which cannot be told from the limit ${criterion.limitText}.`]
    case 'wait':
      return criterion.id === 'prediction'
        ? [`${criterion.label} is ${criterion.reading}. The line predicts ${criterion.limitText}.`, ...stiffSide(criterion)]
        : [`${criterion.label}: ${criterion.reading}. Expected: ${criterion.limitText}.`]
    default:
      return []
  }
}

function stiffSide(criterion: Criterion): string[] {
  return criterion.source.includes('stiff side') ? ['It is on the stiff side: look for a stuck or fallen indicator.'] : []
}

/** The evidence in one or two sentences, the weightiest criterion first. */
export function evidence(stage: StageEvaluation): string[] {
  const order = ['beyond', 'undecided', 'wait'] as const
  for (const verdict of order) {
    const found = stage.criteria.find(
      (criterion) => criterion.verdict === verdict && (criterion.leads || (verdict === 'beyond' && criterion.stops)),
    )
    if (found) return sentenceOf(found)
  }
  if (stage.suggestion === 'stop') return ['It was topped up twice at full load: the press does not hold its pressure.']
  const softening = stage.criteria.find((criterion) => criterion.id === 'softening')
  return softening ? softeningSentence(softening) : []
}

/** The lead's and the witness's gauge at full load, where they have been compared. */
export function independentCriterion(state: ProofTestState): Criterion | null {
  return evaluateTest(state).criteria.find((criterion) => criterion.id === 'independent') ?? null
}

/** The name of the stage after this one, or null after the last. */
export function nextPercent(opened: Opened, percentNow: number): number | null {
  return opened.protocol.content.stages.find((stage) => stage.percent > percentNow)?.percent ?? null
}
