import type { ReactElement } from 'react'
import { LONGEST_PAUSE_SECONDS } from '#shared/proof-test/clock'
import { ActionPlate } from '../../../components/run/plates'
import { Button } from '../../../components/button'
import { useWaitFrom } from '../use-elapsed'
import type { Run } from '../use-run'
import { BenchScroll } from './head-band'
import { ReleasePlate } from './release'
import { Into } from './slots'
import { TimerBand } from './timer-band'

/** Paused under load: five minutes at most, then there is only the release. */
export function PausePanel({ run }: { run: Run }): ReactElement {
  const { paused, loaded } = run.state
  const { elapsed, over } = useWaitFrom(paused?.mark ?? null, LONGEST_PAUSE_SECONDS)
  const release = (): void => run.record({ kind: 'released', payload: { gaugeZero: true, ramClear: true } })
  return (
    <>
      <TimerBand
        step={run.step}
        total={LONGEST_PAUSE_SECONDS}
        elapsed={elapsed}
        label="Paused"
        sub="left, then release"
        overText="Over: release"
      />
      <BenchScroll>
        <h1 tabIndex={-1} className="text-22 tablet:text-26">
          {over ? 'Open the release valve slowly.' : 'Paused. The press stays loaded.'}
        </h1>
        {paused && <p className="mt-1 text-18 font-semibold">{paused.why}.</p>}
        <p className="mt-1 text-18">
          {over
            ? 'A press is not kept loaded longer than five minutes without going on. The climb starts again from its first stage.'
            : 'Stay behind the shield. Go on, or release: five minutes at most.'}
        </p>
        {!over && loaded && (
          <Button className="mt-4 min-h-14" onClick={release}>
            Gauge zero, ram clear of the stack
          </Button>
        )}
      </BenchScroll>
      <Into slot="action">
        {over && loaded ? (
          <ReleasePlate run={run} note="load is off" />
        ) : (
          <ActionPlate title="The test goes on" note="the pause ends here" onPress={() => run.record({ kind: 'resumed', payload: {} })} />
        )}
      </Into>
    </>
  )
}
