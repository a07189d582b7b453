import { useWatch } from 'react-hook-form'
import { calibrationState } from '#shared/instruments/model'
import type { Opened } from '#shared/proof-test/entries'
import { Button } from '../../../components/button'
import { FormStep, WholeRow } from '../../../components/form-steps'
import { SelectField, type Choice } from '../../../components/select-field'
import type { PlanRegisters } from '../api/get-plan-registers'
import { instrumentLabel } from '../preview'
import type { PlanForm } from '../use-plan-form'
import { Targets } from './targets'

const STATES = {
  'in-date': '',
  'out-of-date': ', out of date',
  'out-of-tolerance': ', out of tolerance',
  never: ', never calibrated',
} as const

/** Instruments of some kinds as a list, each with what stands against it. */
export function instrumentChoices(registers: PlanRegisters, today: string, kinds: readonly string[]): Choice[] {
  return registers.instruments
    .filter((instrument) => kinds.includes(instrument.details.kind))
    .map((instrument) => ({
      value: instrument.id,
      label: `${instrumentLabel(instrument)}${STATES[calibrationState(instrument.calibration, today)]}`,
    }))
}

type ForceStepProps = { form: PlanForm; number: number; registers: PlanRegisters; today: string; rams: number; opened: Opened | null }

/** What reads the force, and what it shows at each stage. */
export function ForceStep({ form, number, registers, today, rams, opened }: ForceStepProps) {
  const { control, setValue, register, formState } = form
  const chosen = useWatch({ control, name: 'forceInstrumentIds' })
  const choices = instrumentChoices(registers, today, ['gauge', 'load-cell'])
  const { errors } = formState
  return (
    <FormStep
      number={number}
      title="What reads the force"
      note="A gauge on the ram’s side of every valve and coupler, or a load cell under the ram."
    >
      {chosen.map((_id, index) => (
        <WholeRow key={index}>
          <SelectField
            label={index === 0 ? 'Gauge or load cell' : `Gauge of ram ${index + 1}`}
            nothing="Choose an instrument"
            choices={choices}
            message={errors.forceInstrumentIds?.[index] && 'Choose what reads the force.'}
            {...register(`forceInstrumentIds.${index}`)}
          />
        </WholeRow>
      ))}
      {rams > chosen.length && (
        <WholeRow>
          <Button size="line" onClick={() => setValue('forceInstrumentIds', [...chosen, ''])}>
            The next ram has a gauge of its own
          </Button>
        </WholeRow>
      )}
      <WholeRow>
        {opened ? <Targets opened={opened} /> : <p className="text-graphite">Press, protocol and instrument say what to pump to.</p>}
      </WholeRow>
    </FormStep>
  )
}
