import type { ReactElement } from 'react'
import type { Step } from '#shared/proof-test/steps'
import { HoldTimer } from '../../../components/run/hold-timer'
import { useRunShape } from '../../../components/run/run-frame'
import { StepTrail } from './head-band'
import { Into } from './slots'

interface TimerBandProps {
  step: Step
  total: number
  elapsed: number
  label: string
  sub: string
  /** What to do when it is over, as it is written and spoken. */
  overText: string
}

/** What is left of a wait, over the bench; when it is over the word is there besides the sound. */
export function TimerBand({ step, total, elapsed, label, sub, overText }: TimerBandProps): ReactElement {
  const shape = useRunShape()
  const over = elapsed >= total
  return (
    <Into slot="over">
      <HoldTimer
        total={total}
        elapsed={Math.min(elapsed, total)}
        label={label}
        sub={over ? overText : sub}
        size={shape === 'phone' ? 'phone' : 'tablet'}
      />
      <StepTrail step={step} shown={false} />
      <p aria-live="assertive" className="sr-only">
        {over ? overText : ''}
      </p>
    </Into>
  )
}
