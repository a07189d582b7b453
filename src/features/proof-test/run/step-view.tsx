import type { ReactElement } from 'react'
import type { Opened } from '#shared/proof-test/entries'
import type { Run } from '../use-run'
import { IndependentStep } from './independent'
import { ReleaseStep } from './release'
import { ConcludeStep } from './step-conclude'
import { DatumStep, DatumWatchStep } from './step-datum'
import { BeginLegStep } from './step-leg'
import { RecoveryStep } from './step-recovery'
import { SeatingReleaseStep, SeatingStep } from './step-seating'
import { SetUpStep } from './step-set-up'
import { SignedStep } from './step-signed'
import { BeginStageStep, HoldStep, ReadRowStep } from './step-stage'
import { StoppedReleaseStep } from './step-stopped'
import { DecideStep, StopNowStep, WaitStep } from './step-verdict'
import { WalkDownStep } from './step-walk-down'

/** The screen of the step at hand. */
export function StepView({ run, opened }: { run: Run; opened: Opened }): ReactElement {
  const { step } = run
  const props = { run, opened }
  switch (step.name) {
    case 'walk-down':
      return <WalkDownStep {...props} step={step} />
    case 'after-walk-down':
      return <WalkDownStep {...props} step={step} />
    case 'set-up':
      return <SetUpStep {...props} step={step} />
    case 'begin-leg':
      return <BeginLegStep {...props} step={step} />
    case 'seating':
      return <SeatingStep {...props} step={step} />
    case 'seating-release':
      return <SeatingReleaseStep {...props} step={step} />
    case 'datum':
      return <DatumStep {...props} step={step} />
    case 'datum-watch':
      return <DatumWatchStep {...props} step={step} />
    case 'begin-stage':
      return <BeginStageStep {...props} step={step} />
    case 'read-row':
      return <ReadRowStep {...props} step={step} />
    case 'hold':
      return <HoldStep {...props} step={step} />
    case 'wait':
      return <WaitStep {...props} step={step} />
    case 'decide':
      return <DecideStep {...props} step={step} />
    case 'stop-now':
      return <StopNowStep {...props} step={step} />
    case 'stopped-release':
      return <StoppedReleaseStep {...props} step={step} />
    case 'independent':
      return <IndependentStep {...props} step={step} />
    case 'release':
      return <ReleaseStep {...props} step={step} />
    case 'recovery':
      return <RecoveryStep {...props} step={step} />
    case 'conclude':
      return <ConcludeStep {...props} step={step} />
    case 'sign':
      return <SignedStep {...props} step={step} />
    case 'countersign':
      return <SignedStep {...props} step={step} />
    case 'sealed':
      return <SignedStep {...props} step={step} />
  }
}
