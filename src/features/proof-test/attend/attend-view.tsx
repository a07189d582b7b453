import { useEffect, useRef, type ReactElement } from 'react'
import type { Opened } from '#shared/proof-test/entries'
import type { StageRow } from '#shared/proof-test/state'
import { currentAttempt } from '#shared/proof-test/current-attempt'
import { unitLabel } from '#shared/units'
import { Fit } from '../../../components/fit'
import { JointBalloon, Mark } from '../../../components/marks'
import { HoldTimer } from '../../../components/run/hold-timer'
import { ButtonLink } from '../../../components/button'
import { LoadLadder } from '../../../components/instruments/load-ladder'
import { clockTime } from '../../../lib/dates'
import { paths } from '../../../paths'
import { jointMark, jointSays, type Occasion } from '../joint-words'
import { ladderStages, levelPercent } from '../ladder-model'
import { RowCorrections, Struck } from '../row-corrections'
import { rowSources } from '../row-model'
import { rowsSoFar } from '../rows-so-far'
import { setPercent } from '../../../components/typeset'
import { capital } from '../../../lib/words'
import { ConfirmLoadPath } from '../run/confirm-load-path'
import { JointPhotos } from '../run/entry-photos'
import { Into } from '../run/slots'
import { useElapsed } from '../use-elapsed'
import type { Run } from '../use-run'
import { keptFromWitness, whatToDo, whereItIs } from './attend-model'
import { OwnReadingStep } from './own-reading-step'

interface Props {
  run: Run
  opened: Opened
}

function HoldLeft({ run }: { run: Run }): ReactElement | null {
  const current = currentAttempt(run.state)
  const start = current?.attempt.rows.filter((row: StageRow) => row.occasion === 'hold start').at(-1)
  const running =
    run.state.loaded !== null && run.state.stopped === null && start !== undefined && current?.attempt.decided?.decision !== 'go-on'
  const elapsed = useElapsed(running ? start.mark : null)
  if (!running || elapsed === null || !current) return null
  const total = current.stage.holdSeconds
  return (
    <HoldTimer
      size="phone"
      total={total}
      elapsed={Math.min(elapsed, total)}
      label={`Hold ${current.stage.percent} %`}
      sub={elapsed >= total ? 'the hold is over' : `hold left, of ${Math.floor(total / 60)}:${String(total % 60).padStart(2, '0')}`}
    />
  )
}

/** Where the run is: the strip of the ladder and what is left of the hold. */
function Where({ run, opened, hidden }: Props & { hidden: boolean }): ReactElement {
  return (
    <Into slot="over">
      <div className="ground-dye shrink-0">
        <p className="px-5 pt-2 text-20 font-semibold" aria-live="polite">
          {whereItIs(run, opened)}
        </p>
        <Fit className="h-24 border-b border-ghost" initial={{ width: 390, height: 96 }}>
          {(size) => (
            <LoadLadder
              scale="strip"
              words={false}
              stages={ladderStages(run.state, opened, run.step)}
              levelPercent={hidden ? null : levelPercent(run.state, opened, run.evaluation)}
              {...size}
            />
          )}
        </Fit>
        <HoldLeft run={run} />
      </div>
    </Into>
  )
}

function Rows({ run, opened }: Props): ReactElement | null {
  const rows = rowsSoFar(run.state).slice(0, 3)
  if (rows.length === 0) return null
  const label = (id: string): string => rowSources(opened).find((source) => source.id === id)?.label ?? ''
  return (
    <section aria-label="Last rows" className="mt-4">
      <h2 className="text-18">Last rows, as read</h2>
      <ul className="border-t border-hairline">
        {rows.map(({ row, name }) => (
          <li key={row.entryId} className="border-b border-hairline py-2">
            <p className="flex justify-between text-16">
              <span className="font-medium">{setPercent(capital(name))}</span>
              <span className="text-graphite">{clockTime(row.mark.at, { seconds: true })}</span>
            </p>
            <dl className="mt-1 grid grid-cols-[repeat(auto-fill,minmax(7rem,1fr))] gap-x-2 gap-y-1">
              {row.readings.map((reading) => (
                <div key={reading.sourceId} className="min-w-0">
                  <dt className="font-condensed text-16 text-graphite">{label(reading.sourceId)}</dt>
                  <dd className="text-18 font-semibold">
                    <Struck state={run.state} row={row} reading={reading} />
                    {reading.text} <span className="text-16 font-normal text-graphite">{unitLabel(reading.unit)}</span>
                  </dd>
                </div>
              ))}
            </dl>
            <RowCorrections state={run.state} row={row} opened={opened} />
          </li>
        ))}
      </ul>
    </section>
  )
}

function Joints({ run, occasion }: { run: Run; occasion: Occasion }): ReactElement {
  return (
    <ul aria-label="Joints of the load path" className="mt-4 border-t border-hairline">
      {run.state.joints.map((joint) => (
        <li key={joint.joint.id} className="border-b border-hairline">
          <div className="flex min-h-14 items-center gap-3">
            <JointBalloon number={joint.joint.number} state={jointMark(joint, occasion)} size={36} decorative />
            <span>
              <span className="block text-16 leading-[21px] font-semibold">
                <span className="sr-only">Joint {joint.joint.number}, </span>
                {joint.joint.name}
              </span>
              <span className="block font-condensed text-16 leading-[20px] text-graphite">{jointSays(joint, occasion)}</span>
            </span>
          </div>
          <JointPhotos run={run} jointId={joint.joint.id} number={joint.joint.number} className="mb-3" />
        </li>
      ))}
    </ul>
  )
}

const MARK = { wait: 'wait', decide: 'go-on', 'stop-now': 'stop', 'stopped-release': 'stop' } as const

/** The step in the witness's words, and what is the witness's to do. */
export function AttendView({ run, opened }: Props): ReactElement {
  const { step, state } = run
  const hidden = keptFromWitness(run)
  const heading = useRef<HTMLHeadingElement>(null)
  useEffect(() => heading.current?.focus({ preventScroll: true }), [step.name])
  const mine = run.me.part === 'witness'
  if (hidden && step.name === 'independent') {
    return (
      <>
        <Where run={run} opened={opened} hidden />
        <OwnReadingStep run={run} opened={opened} at={step.at} />
      </>
    )
  }
  const says = hidden
    ? {
        title: 'Full load. Your reading comes next.',
        body: 'Until it is in, the lead’s figures and the verdict stay hidden here. Look and listen: if anything cracks, moves or leaks, Stop.',
      }
    : whatToDo(run)
  const confirm = step.name === 'walk-down' && step.remaining === 0 && state.loadPathConfirmed === null
  const mark = step.name in MARK ? MARK[step.name as keyof typeof MARK] : null
  const record = step.name === 'countersign' || step.name === 'sealed' || step.name === 'sign'
  return (
    <>
      <Where run={run} opened={opened} hidden={hidden} />
      <Into slot="bench">
        {confirm && mine ? (
          <ConfirmLoadPath run={run} opened={opened} />
        ) : (
          <div className="flex gap-3">
            {mark && !hidden && <Mark name={mark} size={36} />}
            <div aria-live="assertive">
              <h1 ref={heading} tabIndex={-1} className="text-22">
                {says.title}
              </h1>
              <p className="text-18">{says.body}</p>
            </div>
          </div>
        )}
        {(step.name === 'walk-down' || step.name === 'after-walk-down') && (
          <Joints run={run} occasion={step.name === 'walk-down' ? 'before load' : 'after load'} />
        )}
        {!hidden && step.name !== 'walk-down' && <Rows run={run} opened={opened} />}
      </Into>
      {record && (
        <Into slot="action">
          <ButtonLink kind={step.name === 'countersign' && mine ? 'next' : 'plain'} wide to={paths.proofTest.href(run.testId)}>
            {step.name === 'countersign' && mine ? 'Read the record, then countersign' : 'Read the record'}
          </ButtonLink>
        </Into>
      )}
    </>
  )
}
