import type { ReactElement } from 'react'
import { nameJoints } from '#shared/press/joints'
import { jointReady } from '#shared/proof-test/steps'
import { energyAt } from '#shared/proof-test/energy'
import { QuietPlate, ShutPlate } from '../../../components/run/plates'
import { useRunShape } from '../../../components/run/run-frame'
import type { Run } from '../use-run'
import { Into } from './slots'

/** The least energy in frame and oil by the last row under load; null while nothing is loaded or read. */
function energyOf(run: Run) {
  const row = run.evaluation?.stages.flatMap((stage) => stage.rows).at(-1)
  if (!run.state.loaded || !row?.force || !row.lead) return null
  return energyAt(run.state, { force: row.force.force, opening: row.lead.deflection, pressure: row.force.pressure })
}

/** "290", "17": two figures are all that such an estimate carries. */
export const energyFigure = (value: number): string => String(value >= 100 ? Math.round(value / 10) * 10 : Math.round(value))

/** What would be let go at once if something broke. */
export function StoredEnergy({ run }: { run: Run }): ReactElement | null {
  const energy = energyOf(run)
  if (!energy) return null
  return (
    <div className="border-t border-ghost pt-3">
      <p className="text-20 font-semibold">At least {energyFigure(energy.total)} J is stored.</p>
      <p className="text-18">
        The same as {Math.max(1, Math.round(energy.massDroppedOneMetre))} kg dropped one metre. Release first, look after.
      </p>
    </div>
  )
}

export type Panel = 'none' | 'note' | 'readings'

interface RunAsideProps {
  run: Run
  onPanel: (panel: Panel) => void
  energy: boolean
}

/** Note and Pause, or what is stored in the frame. */
export function RunAside({ run, onPanel, energy }: RunAsideProps): ReactElement {
  const shape = useRunShape()
  if (energy && energyOf(run)) {
    return (
      <Into slot="aside">
        <StoredEnergy run={run} />
      </Into>
    )
  }
  const pause = (): void => run.record({ kind: 'paused', payload: { why: '' } })
  const shut =
    run.step.name === 'walk-down' ? run.state.joints.filter((joint) => !jointReady(joint)).map((joint) => joint.joint.number) : []
  const mayPause = run.state.loaded !== null && run.state.paused === null && run.state.stopped === null
  return (
    <>
      {!(shape === 'portrait' && shut.length > 0) && (
        <Into slot="note">
          <QuietPlate
            title="Note"
            note={mayPause ? 'noise, leak, readings so far' : 'noise, leak, movement'}
            onPress={() => onPanel('note')}
          />
        </Into>
      )}
      <Into slot="pause">
        {shut.length > 0 ? (
          <ShutPlate title="Seating load" note={`shut: ${nameJoints(shut)}`} />
        ) : mayPause ? (
          <QuietPlate title="Pause" note="release in 5:00 at most" onPress={pause} />
        ) : (
          <QuietPlate title="Rows" note="so far, and corrections" onPress={() => onPanel('readings')} />
        )}
      </Into>
    </>
  )
}
