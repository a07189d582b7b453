import type { ReactElement } from 'react'
import { Mark } from '../../../components/marks'
import { ActionPlate } from '../../../components/run/plates'
import type { Run } from '../use-run'
import { BenchScroll, HeadBand } from './head-band'
import { Into } from './slots'
import type { StepProps } from './step-props'

/** Load is off when the gauge reads zero and the ram is seen clear of the stack: both, or it is not. */
export function ReleasePlate({ run, note }: { run: Run; note: string }): ReactElement {
  return (
    <ActionPlate
      title="Gauge zero, ram clear of the stack"
      note={note}
      focusHint
      onPress={() => run.record({ kind: 'released', payload: { gaugeZero: true, ramClear: true } })}
    />
  )
}

export function ReleaseParts({ run, note, says }: { run: Run; note: string; says: string }): ReactElement {
  return (
    <>
      <BenchScroll>
        <div className="flex gap-4">
          <Mark name="datum" size={40} />
          <div>
            <h2 className="text-22 tablet:text-26">Open the release valve slowly.</h2>
            <p className="mt-1 text-18">{says}</p>
            <p className="mt-2 text-18">Stay behind the shield. Look at the frame only when the load is off.</p>
          </div>
        </div>
      </BenchScroll>
      <Into slot="action">
        <ReleasePlate run={run} note={note} />
      </Into>
    </>
  )
}

/** Full load was held: the climb comes down in one go. */
export function ReleaseStep({ run, step }: StepProps<'release'>): ReactElement {
  return (
    <>
      <HeadBand step={step} title="Release the press">
        The climb is done.
      </HeadBand>
      <ReleaseParts
        run={run}
        note="load is off, go to recovery"
        says="Until the gauge reads zero and the ram is seen clear of the stack, the press counts as loaded."
      />
    </>
  )
}
