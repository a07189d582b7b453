import type { ReactElement } from 'react'
import { stageTarget } from '#shared/proof-test/force'
import { groupDigits } from '#shared/units'
import { rowSources } from '../row-model'
import { atSeating } from '../surprises'
import { useRow } from '../use-row'
import { HeadBand } from './head-band'
import { ReleaseParts } from './release'
import { RowBench } from './row-bench'
import type { StepProps } from './step-props'

/** A small load, put on and taken off once to take up slack. It obeys every rule of load. */
export function SeatingStep({ run, opened, step }: StepProps<'seating'>): ReactElement {
  const sources = rowSources(opened, 'force')
  const percent = opened.protocol.content.seatingPercent
  const target = stageTarget(opened, percent)
  const row = useRow({
    draftKey: `${run.testId}.seated.${step.leg}`,
    sources,
    surprise: atSeating(opened),
    onEnter: (entered) => run.record({ kind: 'seated', payload: { leg: step.leg, ...entered } }),
  })
  const pumpTo = target ? `${groupDigits(target.text)} ${target.unit}` : `${percent} %`
  return (
    <>
      <HeadBand low step={step} title="Seating load">
        {percent} % of the rated load, once on and once off, to take up slack.
      </HeadBand>
      <RowBench
        run={run}
        opened={opened}
        row={row}
        sources={sources}
        percent={percent}
        anywhere
        before={{ title: `Pump to about ${pumpTo}.`, hint: 'Stop pumping, wait ten seconds, then mark.' }}
      />
    </>
  )
}

/** The seating load comes off again before the datum. */
export function SeatingReleaseStep({ run, step }: StepProps<'seating-release'>): ReactElement {
  return (
    <>
      <HeadBand step={step} title="Take the seating load off">
        The slack is taken up. What follows is measured from the datum.
      </HeadBand>
      <ReleaseParts
        run={run}
        note="load is off, go to the datum"
        says="Open the release valve slowly until the gauge reads zero and the ram is clear of the stack."
      />
    </>
  )
}
