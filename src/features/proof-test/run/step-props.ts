import type { Opened } from '#shared/proof-test/entries'
import type { Step } from '#shared/proof-test/steps'
import type { Run } from '../use-run'

/** What every step's screen is given. */
export interface StepProps<Name extends Step['name'] = Step['name']> {
  run: Run
  opened: Opened
  step: Extract<Step, { name: Name }>
}
