import { useWatch } from 'react-hook-form'
import { can } from '#shared/policy'
import { TextField } from '../../../components/field'
import { FormStep } from '../../../components/form-steps'
import { SelectField } from '../../../components/select-field'
import { useOutside } from '../api/outside-witness'
import type { PlanRegisters } from '../api/get-plan-registers'
import { SOMEBODY_ELSE } from '../draft'
import type { PlanForm } from '../use-plan-form'
import { OutsideWitness } from './outside-witness'

type PeopleStepProps = { form: PlanForm; number: number; registers: PlanRegisters; shopId: string; lead: { id: string; name: string } }

/** Who leads, who works the pump and who witnesses. The witness is neither of the two. */
export function PeopleStep({ form, number, registers, shopId, lead }: PeopleStepProps) {
  const { control, register, formState } = form
  const pumpHand = useWatch({ control, name: 'pumpHand.id' })
  const pressId = useWatch({ control, name: 'pressId' })
  const { waiting, accepted } = useOutside(shopId, pressId)
  const { errors } = formState
  const others = registers.people.filter((person) => person.userId !== lead.id && person.userId !== pumpHand)
  const witnesses = others.filter((person) =>
    can({ userId: person.userId, shopId, role: person.role }, 'proof-test:be-witness', { shopId }),
  )
  return (
    <FormStep number={number} title="People" note="Named here, printed on the record. Anyone of the three can stop the test at any time.">
      <TextField label="Lead" value={`${lead.name}, you`} readOnly />
      <div className="grid gap-4">
        <SelectField
          label="Pump hand"
          nothing="Choose who works the pump"
          choices={[
            ...registers.people.map((person) => ({
              value: person.userId,
              label: person.userId === lead.id ? `${person.name}, you` : person.name,
            })),
            { value: SOMEBODY_ELSE, label: 'Somebody without an account' },
          ]}
          message={errors.pumpHand?.id && 'Choose who works the pump.'}
          {...register('pumpHand.id')}
        />
        {pumpHand === SOMEBODY_ELSE && (
          <TextField
            label="Name of the pump hand"
            autoComplete="off"
            message={errors.pumpHand?.name?.message}
            {...register('pumpHand.name')}
          />
        )}
      </div>
      <SelectField
        label="Witness"
        nothing="Choose a witness"
        hint="Never the lead or the pump hand. Attends, reads the gauge independently and countersigns."
        choices={[
          ...witnesses.map((person) => ({ value: person.userId, label: person.name })),
          ...accepted.map((guest) => ({ value: guest.userId, label: `${guest.name}, from outside` })),
        ]}
        message={errors.witness?.id && 'Choose a witness.'}
        {...register('witness.id')}
      />
      <TextField
        label="How the witness stands to the shop"
        hint="It prints beside the signature."
        placeholder="works next door, no part in the build"
        autoComplete="off"
        message={errors.witness?.relation?.message}
        {...register('witness.relation')}
      />
      <div className="tablet:col-span-full">
        <OutsideWitness shopId={shopId} pressId={pressId} waiting={waiting} />
      </div>
    </FormStep>
  )
}
