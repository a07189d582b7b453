import { useEffect, useState, type ReactElement } from 'react'
import type { Opened } from '#shared/proof-test/entries'
import { RunFrame, useRunShape } from '../../../components/run/run-frame'
import { RunTitleBlock } from '../../../components/run/run-title-block'
import { clockTime } from '../../../lib/dates'
import { rememberTestName } from '../../../lib/test-names'
import { useTitle } from '../../../lib/use-title'
import { useWakeLock } from '../../../lib/wake-lock'
import { dropDraftsOf } from '../drafts'
import { readyAlarm } from '../../../lib/alarm'
import { useOthersAlarm } from '../use-others-alarm'
import type { Run } from '../use-run'
import { useCover } from './cover'
import { IrregularPanel } from './irregular-panel'
import { NotePanel } from './note-panel'
import { Notices } from './notices'
import { PausePanel } from './pause-panel'
import { ReadingsPanel } from './readings-panel'
import { ReasonPanel } from './reason-panel'
import { RunAside, type Panel } from './run-aside'
import { RunLadder, RunPicture } from './run-drawings'
import { SlotFrame } from './slots'
import { StepView } from './step-view'
import { titleCells } from './title-cells'

interface Props {
  run: Run
  opened: Opened
}

/** What lies in the bench: the stop first, then what is asked, then what was opened, then the step. */
function Content({ run, opened, panel, onPanel }: Props & { panel: Panel; onPanel: (panel: Panel) => void }): ReactElement {
  const under = run.state.loaded !== null
  if (run.step.name === 'stopped-release') return <StepView run={run} opened={opened} />
  if (run.asking) return <ReasonPanel run={run} asking={run.asking} />
  if (run.irregular.length > 0) return <IrregularPanel run={run} />
  if (panel === 'note') return <NotePanel run={run} onLeave={() => onPanel('none')} onReadings={() => onPanel('readings')} />
  if (panel === 'readings') return <ReadingsPanel run={run} opened={opened} onLeave={() => onPanel('none')} />
  if (under && run.state.paused) return <PausePanel run={run} />
  return <StepView key={stepKey(run)} run={run} opened={opened} />
}

/** A step of the same name at another place starts afresh. */
function stepKey({ step, state }: Run): string {
  const at = state.position
  return [step.name, at?.leg, at?.climb, at?.stage, at?.attempt].join('.')
}

/** The run: title block, ladder, bench, line, and Stop in its corner whatever the step. */
export function RunScreen({ run, opened }: Props): ReactElement {
  const name = `${opened.number}, ${opened.press.name}`
  useTitle(name)
  const shape = useRunShape()
  const [panel, setPanel] = useState<Panel>('none')
  const [cover] = useCover(run.testId)
  const covered = cover && run.state.loaded !== null && run.state.stopped === null
  const { stopped } = run.state
  const over = run.state.conclusion !== null
  const pausedByOther = useOthersAlarm(run)
  // What somebody called out must not lie behind a note that is being written; its text is kept.
  useEffect(() => {
    if (pausedByOther) setPanel('none')
  }, [pausedByOther])
  useWakeLock(run.state.loaded !== null || run.step.name === 'datum-watch' || run.step.name === 'recovery')
  useEffect(() => {
    if (over) dropDraftsOf(run.testId)
  }, [over, run.testId])
  useEffect(() => rememberTestName(run.testId, name), [run.testId, name])
  const stop = (): void => {
    readyAlarm()
    setPanel('none')
    run.record({ kind: 'stopped', payload: { cause: 'called', why: `Called by ${run.me.name}` } })
  }
  const walking = run.step.name === 'walk-down' || run.step.name === 'after-walk-down'
  const energy = !covered && (run.step.name === 'stopped-release' || run.step.name === 'independent' || run.step.name === 'release')
  return (
    <SlotFrame
      frame={({ over: overSlot, ...slots }) => (
        <RunFrame
          title={
            <RunTitleBlock
              cells={titleCells(run, opened, shape === 'landscape')}
              kept={{ tablet: run.box.fault === null, server: run.counts.tablet === 0, sealed: run.counts.sealed }}
              waiting={run.counts.tablet}
            />
          }
          largePicture={walking}
          ladder={(size, shape) => <RunLadder run={run} opened={opened} size={size} shape={shape} covered={covered} />}
          line={(size, shape) => <RunPicture run={run} opened={opened} size={size} shape={shape} covered={covered} />}
          over={
            <>
              <Notices run={run} device="tablet" />
              {overSlot}
            </>
          }
          {...slots}
          stopped={stopped ? { at: clockTime(stopped.at, { seconds: true }) } : null}
          onStop={stop}
        />
      )}
    >
      <Content run={run} opened={opened} panel={panel} onPanel={setPanel} />
      <RunAside run={run} onPanel={setPanel} energy={energy} />
    </SlotFrame>
  )
}
