import { useEffect, useRef, type ReactElement } from 'react'
import { VerdictBanner } from '../../../components/run/verdict-banner'
import { clockTime } from '../../../lib/dates'
import { BenchScroll } from './head-band'
import { ReleasePlate } from './release'
import { Into } from './slots'
import type { StepProps } from './step-props'
import { Evidence, stageBefore } from './verdict-parts'

function StopsFor(): ReactElement {
  return (
    <p className="mt-4 border-t-2 border-ink pt-2 text-18">
      <strong className="font-semibold">This test cannot go back under load.</strong> Conclude it, find the joint, repair, then start again
      from the walk-down.
    </p>
  )
}

/** Stopped under load: one thing to do, with the evidence under it. */
export function StoppedReleaseStep({ run }: StepProps<'stopped-release'>): ReactElement {
  const heading = useRef<HTMLHeadingElement>(null)
  const { stopped } = run.state
  const stage = run.evaluation?.stages.at(-1)
  const byCriterion = stopped?.cause === 'criterion' && stage !== undefined
  useEffect(() => {
    heading.current?.focus({ preventScroll: true })
  }, [])
  return (
    <>
      <Into slot="over">
        <h1 className="sr-only">Stopped under load</h1>
        <VerdictBanner
          decision="stop"
          title="Stop"
          instruction="Open the release valve slowly, now."
          caution="Stay behind the shield until the gauge reads zero."
          headingRef={heading}
        />
        <p aria-live="assertive" className="sr-only">
          Stop. {stopped?.why}. Open the release valve slowly, now.
        </p>
      </Into>
      {byCriterion ? (
        <Evidence stage={stage} before={stageBefore(run.evaluation?.stages ?? [], stage)}>
          <StopsFor />
        </Evidence>
      ) : (
        <BenchScroll>
          <div className="px-2">
            <p className="text-22 font-semibold">{stopped?.why}.</p>
            {stopped && (
              <p className="text-18">
                At {clockTime(stopped.at, { seconds: true })}
                {stopped.atPercent === null ? '' : `, at ${stopped.atPercent} % of the rated load`}.
              </p>
            )}
            <StopsFor />
          </div>
        </BenchScroll>
      )}
      <Into slot="action">
        <ReleasePlate run={run} note="load is off, go to the conclusion" />
      </Into>
    </>
  )
}
