import type { ReactElement } from 'react'
import type { Opened } from '#shared/proof-test/entries'
import { QuietPlate } from '../../../components/run/plates'
import { RunTitleBlock } from '../../../components/run/run-title-block'
import { readyAlarm } from '../../../lib/alarm'
import { clockTime } from '../../../lib/dates'
import { useTitle } from '../../../lib/use-title'
import { useWakeLock } from '../../../lib/wake-lock'
import { FaultNotice, Notices } from '../run/notices'
import { ReasonPanel } from '../run/reason-panel'
import { SlotFrame } from '../run/slots'
import { useOthersAlarm } from '../use-others-alarm'
import type { Run } from '../use-run'
import { AttendFrame } from './attend-frame'
import { AttendView } from './attend-view'
import { Unconnected } from './unconnected'

function PausePart({ run }: { run: Run }): ReactElement {
  const { connected } = run.connection
  if (!connected) {
    return (
      <div className="flex min-h-[76px] flex-col items-center justify-center rounded-key border-2 border-dashed border-faint-scribe px-2 text-center text-scribe">
        <span className="text-20 font-medium">Pause</span>
        <span className="text-16/5 text-balance text-faint-scribe">not connected</span>
      </div>
    )
  }
  const may = run.state.loaded !== null && run.state.paused === null && run.state.stopped === null
  if (may)
    return (
      <QuietPlate
        title="Pause"
        note="release in 5:00 at most"
        onPress={() => run.record({ kind: 'paused', payload: { why: `Called by ${run.me.name}` } })}
      />
    )
  return (
    <div className="flex min-h-[76px] flex-col items-center justify-center rounded-key border-2 border-dashed border-faint-scribe px-2 text-center text-scribe">
      <span className="text-20 font-medium">{run.state.paused ? 'Paused' : 'Pause'}</span>
      <span className="text-16/5 text-balance text-faint-scribe">
        {run.state.paused ? 'until the lead goes on' : run.state.loaded ? 'the load comes off' : 'once under load'}
      </span>
    </div>
  )
}

/** What the witness sees of a test under way, and what only the witness may do. */
export function AttendScreen({ run, opened }: { run: Run; opened: Opened }): ReactElement {
  useTitle(`Attend ${opened.number}`)
  useWakeLock(run.state.loaded !== null)
  const { stopped } = run.state
  const { connected } = run.connection
  useOthersAlarm(run)
  const stop = (): void => {
    readyAlarm()
    run.record({ kind: 'stopped', payload: { cause: 'called', why: `Called by ${run.me.name}` } })
  }
  return (
    <SlotFrame
      frame={({ over, bench, action }) => (
        <AttendFrame
          title={
            <RunTitleBlock
              cells={[
                { value: opened.number, strong: true },
                { value: opened.press.name },
                { label: 'You are', value: run.me.part === 'witness' ? 'the witness' : `the ${run.me.part ?? ''}` },
              ]}
            />
          }
          over={
            <>
              {connected ? <Notices run={run} device="phone" /> : <FaultNotice run={run} />}
              {over}
            </>
          }
          bench={bench}
          action={action}
          pause={<PausePart run={run} />}
          stopped={stopped && connected ? { at: clockTime(stopped.at, { seconds: true }) } : null}
          onStop={stop}
          connected={connected}
        />
      )}
    >
      {!connected ? (
        <Unconnected run={run} opened={opened} />
      ) : run.asking ? (
        <ReasonPanel run={run} asking={run.asking} />
      ) : (
        <AttendView run={run} opened={opened} />
      )}
    </SlotFrame>
  )
}
