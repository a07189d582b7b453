import type { ReactElement } from 'react'
import { ActionPlate } from '../../../components/run/plates'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'
import type { StepProps } from './step-props'

/** A leg is begun where the plan says: the bed in its hole, the ram where the leg wants it. */
export function BeginLegStep({ run, opened, step }: StepProps<'begin-leg'>): ReactElement {
  const leg = opened.legs[step.leg]
  const hole = leg?.bedHole ?? ''
  const begin = (): void => run.record({ kind: 'leg-begun', payload: { leg: step.leg, bedHoleConfirmed: hole } })
  return (
    <>
      <HeadBand step={step} title={`Leg ${step.leg + 1} of ${opened.legs.length}: ${leg?.label ?? ''}`}>
        The datum, the climb and the set of this leg are its own.
      </HeadBand>
      <BenchScroll>
        <h2 className="text-22">Look at the bed before you go on.</h2>
        <dl className="mt-3 grid grid-cols-[auto_minmax(0,1fr)] gap-x-6 border-t border-hairline text-20">
          <dt className="border-b border-hairline py-3 text-graphite">Bed pinned in hole</dt>
          <dd className="border-b border-hairline py-3 text-34 font-semibold">{hole}</dd>
          <dt className="border-b border-hairline py-3 text-graphite">Ram</dt>
          <dd className="border-b border-hairline py-3 font-semibold">{leg?.ramPosition}</dd>
        </dl>
        <p className="mt-4 text-18">Count the holes on both uprights. A press proven in one hole is not proven in another.</p>
      </BenchScroll>
      <Into slot="action">
        <ActionPlate
          title={`The bed is pinned in hole ${hole}`}
          note={`ram ${leg?.ramPosition ?? ''}; next, the seating load`}
          onPress={begin}
        />
      </Into>
    </>
  )
}
