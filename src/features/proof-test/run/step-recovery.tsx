import type { ReactElement } from 'react'
import { clockFigure } from '../../../components/run/hold-timer'
import { rowSources } from '../row-model'
import { atRest } from '../surprises'
import { useWaitFrom } from '../use-elapsed'
import { useRow } from '../use-row'
import { RowBench } from './row-bench'
import type { StepProps } from './step-props'
import { typedTemperature } from './temperature-field'
import { TimerBand } from './timer-band'

/** The frame is given time, then read in the datum's condition: what is left is permanent set. */
export function RecoveryStep({ run, opened, step }: StepProps<'recovery'>): ReactElement {
  const { leg, climb } = step
  const here = run.state.legs[leg]?.climbs[climb]
  const sources = rowSources(opened)
  const total = opened.protocol.content.recoverySeconds
  const { elapsed, left, over } = useWaitFrom(here?.released?.mark ?? null, total)
  const row = useRow({
    draftKey: `${run.testId}.set.${leg}.${climb}.${here?.set.length ?? 0}`,
    sources,
    surprise: atRest(opened, null),
    onEnter: (entered, temperature) =>
      run.record({ kind: 'set-read', payload: { leg, climb, ...entered, temperature: typedTemperature(temperature, opened.lengthUnit) } }),
  })
  const datum = here?.datum
    .at(-1)
    ?.readings.map((reading) => reading.text)
    .join(', ')
  return (
    <>
      <TimerBand step={step} total={total} elapsed={elapsed} label="Recovery" sub="left, from the release" overText="Over: read the set" />
      <RowBench
        run={run}
        opened={opened}
        row={row}
        sources={sources}
        percent={null}
        bare
        temperature
        shut={over ? undefined : `${clockFigure(left)} left. Keep the ram clear of the stack.`}
        before={{
          title: over ? 'Mark, then read what is left.' : 'Let the frame come back.',
          hint: `Read as the datum was read: ${datum ?? ''}.`,
        }}
      />
    </>
  )
}
