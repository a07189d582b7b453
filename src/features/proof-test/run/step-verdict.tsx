import { useEffect, useRef, type ReactElement, type ReactNode } from 'react'
import { snapshotsOf } from '#shared/proof-test/decide'
import type { StageEvaluation } from '#shared/proof-test/evaluate-climb'
import { Button } from '../../../components/button'
import { ActionPlate } from '../../../components/run/plates'
import { VerdictBanner } from '../../../components/run/verdict-banner'
import { useDraft } from '../drafts'
import { evidence, independentCriterion, nextPercent, verdictRows } from '../verdict-model'
import type { Draft, Run } from '../use-run'
import { HeadBand } from './head-band'
import { IndependentParts } from './independent'
import { Into } from './slots'
import { StageRowBench, useStageRow, type StageOccasion } from './stage-row'
import type { StepProps } from './step-props'
import { Evidence, stageBefore } from './verdict-parts'

type Mode = StageOccasion | 'witness' | 'none'

/** What is being done about a verdict: nothing yet, or a row being read once more. It ends when a row comes in. */
function useMode(run: Run, stage: StageEvaluation): [Mode, (mode: Mode) => void] {
  const { attempt } = stage
  const [draft, change] = useDraft<{ mode: Mode }>(
    `${run.testId}.mode.${attempt.rows.at(-1)?.entryId ?? ''}.${attempt.independent?.at ?? ''}`,
    { mode: 'none' },
  )
  return [draft.mode, (mode) => change({ mode })]
}

const decided = (stage: StageEvaluation, decision: 'go-on' | 'wait' | 'stop'): Draft => ({
  kind: 'decided',
  payload: { at: stage.at, decision, criteria: snapshotsOf(stage) },
})

function RowAgain(props: StepProps<'wait' | 'decide'> & { occasion: StageOccasion }): ReactElement {
  const { step, occasion } = props
  const row = useStageRow(props)
  const title = {
    again: 'Mark, then read the row again.',
    'hold end': 'Mark, then read the end of the hold.',
    'hold start': 'Pumped on: mark, then read the row.',
    'top-up': 'Topped up: mark, then read.',
  }[occasion]
  return (
    <>
      <HeadBand
        low
        step={step}
        title={`${step.percent} %: ${occasion === 'hold start' ? 'read after pumping on' : occasion === 'again' ? 'read again' : 'end of the hold'}`}
      >
        Every value is read afresh.
      </HeadBand>
      <StageRowBench {...props} row={row} before={{ title, hint: 'Stop pumping, wait ten seconds, then mark.' }} />
    </>
  )
}

interface VerdictProps {
  run: Run
  stage: StageEvaluation
  decision: 'go-on' | 'wait' | 'stop'
  title: string
  instruction: string
  caution?: string
  /** What else one may do, under the evidence. */
  children?: ReactNode
}

function Verdict({ run, stage, decision, title, instruction, caution, children }: VerdictProps): ReactElement {
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus({ preventScroll: true }), [decision])
  const independent = stage.attempt.independent ? independentCriterion(run.state) : null
  return (
    <>
      <Into slot="over">
        <h1 className="sr-only">Stage at {stage.percent} %</h1>
        <VerdictBanner decision={decision} title={title} instruction={instruction} caution={caution} headingRef={heading} />
        <p aria-live="assertive" className="sr-only">
          {[title, instruction, ...evidence(stage)].join('. ')}
        </p>
      </Into>
      <Evidence
        stage={stage}
        before={stageBefore(run.evaluation?.stages ?? [], stage)}
        more={independent ? verdictRows([independent]) : []}
      >
        {children !== undefined && <div className="mt-3 flex flex-wrap gap-3">{children}</div>}
      </Evidence>
    </>
  )
}

/** Something lies outside: read again, then go on only with a reason; where the rules allow no reason, release. */
export function WaitStep(props: StepProps<'wait'>): ReactElement {
  const { run, opened, step } = props
  const { stage } = step
  const [mode, setMode] = useMode(run, stage)
  if (mode !== 'none' && mode !== 'witness') return <RowAgain {...props} occasion={mode} />
  const again = stage.attempt.rows.some((row) => row.occasion === 'again')
  const low = stage.criteria.some((one) => one.id === 'stage-reached' && one.verdict === 'wait' && (one.value ?? 1) < 1)
  const next = nextPercent(opened, step.percent)
  const goOn = decided(stage, 'go-on')
  const mayGoOn = run.decide(goOn).outcome !== 'refused'
  const readAgain = (): void => {
    if (!stage.attempt.decided) run.record(decided(stage, 'wait'))
    setMode('again')
  }
  return (
    <>
      <Verdict
        run={run}
        stage={stage}
        decision="wait"
        title="Wait"
        instruction={again ? 'Go on only with a reason, or stop.' : 'Read the row again.'}
        caution="Keep the pressure, stay behind the shield."
      >
        {(mayGoOn || low) && (
          <Button className="min-h-14 desktop:min-h-14" onClick={readAgain}>
            Read the row again
          </Button>
        )}
      </Verdict>
      <Into slot="action">
        {mayGoOn ? (
          <ActionPlate
            title={next === null ? 'Full load was held: go on with a reason' : `Go on to ${next} % with a reason`}
            note="the reason prints in the record"
            onPress={() => run.record(goOn)}
          />
        ) : low ? (
          <ActionPlate title="Pumped on: read a new row" note="the hold starts again from its mark" onPress={() => setMode('hold start')} />
        ) : (
          <ActionPlate title="Wait: read the row again" note="mark, then every value afresh" onPress={readAgain} />
        )}
      </Into>
    </>
  )
}

/** Everything that was checked is within: go on, or look again first. Stop stays where it is. */
export function DecideStep(props: StepProps<'decide'>): ReactElement {
  const { run, opened, step } = props
  const { stage } = step
  const [mode, setMode] = useMode(run, stage)
  if (mode === 'witness') return <IndependentParts {...props} onLeave={() => setMode('none')} />
  if (mode !== 'none') return <RowAgain {...props} occasion={mode} />
  const next = nextPercent(opened, step.percent)
  const differ = stage.attempt.independent !== null && independentCriterion(run.state)?.verdict === 'beyond'
  const goOn = (): void => run.record(decided(stage, 'go-on'))
  const held = `${step.percent} %: within every limit checked.`
  return (
    <>
      <Verdict
        run={run}
        stage={stage}
        decision={differ ? 'wait' : 'go-on'}
        title={differ ? 'Wait' : 'Go on'}
        instruction={differ ? 'Lead and witness read the gauge differently. Both read again.' : held}
        caution={next === null ? undefined : `Next: ${next} %. Look and listen first.`}
      >
        <Button className="min-h-14 desktop:min-h-14" onClick={() => setMode('again')}>
          Read the row again
        </Button>
        {differ ? (
          <Button className="min-h-14 desktop:min-h-14" onClick={goOn}>
            Go on all the same
          </Button>
        ) : (
          <Button className="min-h-14 desktop:min-h-14" onClick={() => run.record(decided(stage, 'wait'))}>
            {stage.attempt.decided?.decision === 'wait' ? 'Waiting, as decided' : 'Wait'}
          </Button>
        )}
      </Verdict>
      <Into slot="action">
        {differ ? (
          <ActionPlate title="The witness reads again" note="after the lead has read the row again" onPress={() => setMode('witness')} />
        ) : (
          <ActionPlate
            title={next === null ? 'Full load was held' : `Go on to ${next} %`}
            note={next === null ? 'next, release the press' : 'every limit checked is kept'}
            onPress={goOn}
            focusHint
          />
        )}
      </Into>
    </>
  )
}

/** A limit is passed: the stop is written down at once, and once. */
export function StopNowStep({ run, step }: StepProps<'stop-now'>): ReactElement {
  const written = useRef(false)
  const { record } = run
  const { stage } = step
  useEffect(() => {
    if (written.current) return
    written.current = true
    record(decided(stage, 'stop'))
  }, [record, stage])
  return (
    <Verdict
      run={run}
      stage={stage}
      decision="stop"
      title="Stop"
      instruction="Open the release valve slowly, now."
      caution="Stay behind the shield until the gauge reads zero."
    />
  )
}
