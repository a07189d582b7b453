import type { ReactElement } from 'react'
import type { Reading } from '#shared/proof-test/entries'
import { clockFigure } from '../../../components/run/hold-timer'
import { rowSources } from '../row-model'
import { atRest } from '../surprises'
import { useWaitFrom } from '../use-elapsed'
import { useRow } from '../use-row'
import { HeadBand } from './head-band'
import { RowBench } from './row-bench'
import type { StepProps } from './step-props'
import { typedTemperature } from './temperature-field'
import { TimerBand } from './timer-band'

function useDatumRow({ run, opened, step }: StepProps<'datum'> | StepProps<'datum-watch'>, before: readonly Reading[] | null) {
  const { leg, climb } = step
  const sources = rowSources(opened)
  const taken = run.state.legs[leg]?.climbs[climb]?.datum.length ?? 0
  const row = useRow({
    draftKey: `${run.testId}.datum.${leg}.${climb}.${taken}`,
    sources,
    surprise: atRest(opened, before),
    onEnter: (entered, temperature) =>
      run.record({
        kind: 'datum-read',
        payload: { leg, climb, ...entered, temperature: typedTemperature(temperature, opened.lengthUnit) },
      }),
  })
  return { sources, row }
}

/** The zero readings that deflection is measured from. */
export function DatumStep(props: StepProps<'datum'>): ReactElement {
  const { run, opened, step } = props
  const { sources, row } = useDatumRow(props, null)
  return (
    <>
      <HeadBand low step={step} title={step.climb > 0 ? 'Datum of the repeat climb' : 'Datum'}>
        Load off, ram clear of the stack. Everything is measured from this row.
      </HeadBand>
      <RowBench
        run={run}
        opened={opened}
        row={row}
        sources={sources}
        percent={null}
        bare
        temperature
        before={{ title: 'Zero the indicators, then mark.', hint: 'Tap each indicator lightly so that it does not stick.' }}
      />
    </>
  )
}

const watched = (step: StepProps<'datum-watch'>['step']): string => step.first.readings.map((reading) => reading.text).join(', ')

/** The datum is watched for drift, then read once more: it has to stand where it stood. */
export function DatumWatchStep(props: StepProps<'datum-watch'>): ReactElement {
  const { run, opened, step } = props
  const { sources, row } = useDatumRow(props, step.first.readings)
  const total = opened.protocol.content.datumWatchSeconds
  const { elapsed, left, over } = useWaitFrom(step.first.mark, total)
  return (
    <>
      <TimerBand
        step={step}
        total={total}
        elapsed={elapsed}
        label={step.drifted ? 'Drifted: again' : 'Datum watched'}
        sub="left, for drift"
        overText="Over: read again"
      />
      <RowBench
        run={run}
        opened={opened}
        row={row}
        sources={sources}
        percent={null}
        bare
        temperature
        shut={over ? undefined : `${clockFigure(left)} left. First row: ${watched(step)}.`}
        before={{
          title: over ? 'Mark, then read the same row again.' : 'Watch the indicators. Touch nothing.',
          hint: `First row: ${watched(step)}.`,
        }}
      />
    </>
  )
}
