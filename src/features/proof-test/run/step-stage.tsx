import type { ReactElement } from 'react'
import type { StageRow } from '#shared/proof-test/state'
import { energyAt } from '#shared/proof-test/energy'
import { leadInstrument, stageForce, stageTarget } from '#shared/proof-test/force'
import { groupDigits } from '#shared/units'
import { clockFigure } from '../../../components/run/hold-timer'
import { SoFar } from './so-far'
import { ActionPlate } from '../../../components/run/plates'
import { Button } from '../../../components/button'
import { readyAlarm } from '../../../lib/alarm'
import { useDraft } from '../drafts'
import { predictionFor, rangeText } from '../line-model'
import { duration, roundLoad } from '../names'
import { verdictRows } from '../verdict-model'
import { useWaitFrom } from '../use-elapsed'
import { Cautions } from './cautions'
import { BenchScroll, HeadBand } from './head-band'
import { energyFigure } from './run-aside'
import { Into } from './slots'
import { StageRowBench, useStageRow } from './stage-row'
import type { StepProps } from './step-props'
import { TimerBand } from './timer-band'

/** What to pump to, before the pump moves. */
export function BeginStageStep({ run, opened, step }: StepProps<'begin-stage'>): ReactElement {
  const { at, percent } = step
  const target = stageTarget(opened, percent)
  const next = predictionFor(opened, run.evaluation, percent)
  const energy =
    percent >= 100 && next && target
      ? energyAt(run.state, {
          force: target.readableForce,
          opening: next.deflection,
          pressure: leadInstrument(opened)?.details.kind === 'gauge' ? target.readable : null,
        })
      : null
  const hold = run.state.legs[at.leg]?.climbs[at.climb]?.stages[at.stage]?.holdSeconds ?? 0
  const pumpTo = target ? `${groupDigits(target.text)} ${target.unit}` : `${percent} %`
  const begin = (): void => {
    readyAlarm()
    run.record({ kind: 'stage-begun', payload: { at } })
  }
  return (
    <>
      <HeadBand step={step} title={`${percent} %: ${roundLoad(stageForce(opened, percent), opened.forceUnit)}`}>
        {at.climb > 0 ? 'Repeat climb. ' : ''}Approach from below. An overshoot is never bled back.
      </HeadBand>
      <BenchScroll>
        <p className="text-18 text-graphite">Pump to</p>
        <p className="text-54 font-semibold tablet:text-76">{pumpTo}</p>
        <dl className="mt-2 grid grid-cols-[auto_minmax(0,1fr)] gap-x-6 border-t border-hairline text-18">
          {target && (
            <>
              <dt className="border-b border-hairline py-2 text-graphite">Stage reached inside</dt>
              <dd className="border-b border-hairline py-2 font-semibold">
                {groupDigits(target.window.fromText)} to {groupDigits(target.window.toText)} {target.unit}
              </dd>
            </>
          )}
          <dt className="border-b border-hairline py-2 text-graphite">Held</dt>
          <dd className="border-b border-hairline py-2 font-semibold">{duration(hold)}, from the mark</dd>
          {next && (
            <>
              <dt className="border-b border-hairline py-2 text-graphite">The line predicts</dt>
              <dd className="border-b border-hairline py-2 font-semibold">{rangeText(opened, next.from, next.to)}</dd>
            </>
          )}
        </dl>
        {target?.sentence && <p className="mt-3 text-18 font-medium">{target.sentence}</p>}
        {energy && (
          <p className="mt-3 text-18">
            <strong className="font-semibold">At least {energyFigure(energy.total)} J will be stored</strong>, the same as{' '}
            {Math.max(1, Math.round(energy.massDroppedOneMetre))} kg dropped one metre.
          </p>
        )}
        {percent >= 100 && <Cautions className="mt-4" />}
      </BenchScroll>
      <Into slot="action">
        <ActionPlate
          title={`All behind the shield: pumping to ${pumpTo}`}
          note="stop pumping, wait ten seconds, then mark"
          onPress={begin}
        />
      </Into>
    </>
  )
}

/** The row at the start of a hold: the hold runs from its mark, also while the row is typed. */
export function ReadRowStep(props: StepProps<'read-row'>): ReactElement {
  const { run, opened, step } = props
  const row = useStageRow({ ...props, occasion: 'hold start' })
  const total = run.state.legs[step.at.leg]?.climbs[step.at.climb]?.stages[step.at.stage]?.holdSeconds ?? 0
  const { elapsed } = useWaitFrom(row.draft.mark, total)
  const target = stageTarget(opened, step.percent)
  return (
    <>
      {row.draft.mark ? (
        <TimerBand
          step={step}
          total={total}
          elapsed={elapsed}
          label={`Hold ${step.percent} %`}
          sub="left, from the mark"
          overText="Over: enter this row"
        />
      ) : (
        <HeadBand low step={step} title={`${step.percent} %: mark, then read`}>
          The mark starts the hold.
        </HeadBand>
      )}
      <StageRowBench
        {...props}
        row={row}
        before={{
          title: target ? `Pump to ${groupDigits(target.text)} ${target.unit}.` : 'Pump to the stage.',
          hint: 'Stop pumping, wait ten seconds, then mark.',
        }}
      />
    </>
  )
}

const lastStart = (rows: readonly StageRow[]): StageRow | undefined => rows.filter((row) => row.occasion === 'hold start').at(-1)

/** The hold runs; when it is over the row is read once more. */
export function HoldStep(props: StepProps<'hold'>): ReactElement {
  const { run, step } = props
  const { rows } = step.stage.attempt
  const start = lastStart(rows)
  const [{ topUp }, change] = useDraft(`${run.testId}.hold.${rows.at(-1)?.entryId ?? ''}`, { topUp: false })
  const row = useStageRow({ ...props, occasion: topUp ? 'top-up' : 'hold end' })
  const { elapsed, left, over } = useWaitFrom(start?.mark ?? null, step.stage.holdSeconds)
  const held = start?.readings.map((reading) => reading.text).join(', ')
  const shut = topUp || over ? undefined : `${clockFigure(left)} left. At the mark: ${held ?? ''}.`
  const words = topUp
    ? { title: 'Topped up: mark, then read the whole row.', hint: 'The hold starts again from this mark.' }
    : { title: over ? 'The hold is over: mark, then read.' : 'Hold. Watch the gauge, do not pump.', hint: `At the mark: ${held ?? ''}.` }
  return (
    <>
      <TimerBand
        step={step}
        total={step.stage.holdSeconds}
        elapsed={elapsed}
        label={`Hold ${step.percent} %`}
        sub="left, from the mark"
        overText="Over: read the row"
      />
      <StageRowBench
        {...props}
        row={row}
        standing={start?.readings}
        shut={shut}
        before={words}
        waiting={
          <div>
            <SoFar rows={verdictRows(step.stage.criteria)} percent={step.percent} />
            <Button size="line" className="mt-3 min-h-14 desktop:min-h-14" onClick={() => change({ topUp: true })}>
              The pressure was topped up
            </Button>
          </div>
        }
      />
    </>
  )
}
