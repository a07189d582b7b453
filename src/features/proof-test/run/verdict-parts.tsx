import type { ReactElement, ReactNode } from 'react'
import type { StageEvaluation } from '#shared/proof-test/evaluate-climb'
import { setPercent } from '../../../components/typeset'
import { VerdictScale } from '../../../components/run/verdict-scale'
import { VerdictTable, type VerdictRow } from '../../../components/run/verdict-table'
import { Fit } from '../../../components/fit'
import { evidence, verdictRows } from '../verdict-model'
import { BenchScroll } from './head-band'

/** The softening of the step on a number line beside its limit, with the step before for comparison. */
function SofteningScale({ stage, before }: { stage: StageEvaluation; before: StageEvaluation | null }): ReactElement | null {
  const criterion = stage.criteria.find((one) => one.id === 'softening')
  if (
    !criterion ||
    criterion.value === null ||
    criterion.U === null ||
    criterion.limit === null ||
    criterion.verdict === 'not-read' ||
    criterion.value < 0
  )
    return null
  const { value, U, limit, verdict, label } = criterion
  const earlier = before?.criteria.find((one) => one.id === 'softening')
  const beforeAt =
    earlier && earlier.value !== null && earlier.value >= 0
      ? { value: earlier.value * 100, label: `${earlier.label.replace(/^Softening, /, '').replace(' %', '')}: ${earlier.reading}` }
      : undefined
  return (
    <Fit className="mt-2 h-[126px]" initial={{ width: 568, height: 126 }}>
      {({ width }) => (
        <VerdictScale
          about={label}
          unit="%"
          value={value * 100}
          uncertainty={U * 100}
          text={`${Math.round(value * 100)} % ± ${Math.round(U * 100)}`}
          limit={{ value: limit * 100, label: `limit ${Math.round(limit * 100)} %` }}
          verdict={verdict}
          before={width < 420 ? undefined : beforeAt}
          width={width}
        />
      )}
    </Fit>
  )
}

interface EvidenceProps {
  stage: StageEvaluation
  before: StageEvaluation | null
  more?: readonly VerdictRow[]
  children?: ReactNode
}

/** What stands behind a verdict: sentences, the number line, every criterion on its line. */
export function Evidence({ stage, before, more = [], children }: EvidenceProps): ReactElement {
  return (
    <BenchScroll>
      <div className="px-2 max-tablet:px-0">
        {evidence(stage).map((sentence) => (
          <p key={sentence} className="text-18 font-semibold tablet:text-22">
            {setPercent(sentence)}
          </p>
        ))}
        <SofteningScale stage={stage} before={before} />
        <div className="mt-2">
          <VerdictTable caption={`What was read at ${stage.percent} %`} rows={[...verdictRows(stage.criteria), ...more]} />
        </div>
        {children}
      </div>
    </BenchScroll>
  )
}

/** The stage before this one in its climb. */
export const stageBefore = (stages: readonly StageEvaluation[], stage: StageEvaluation): StageEvaluation | null =>
  stages.filter((one) => one.at.stage < stage.at.stage).at(-1) ?? null
