import { useFieldArray } from 'react-hook-form'
import { RAM_POSITIONS } from '#shared/press/model'
import { TextField } from '../../../components/field'
import { FormStep, WholeRow } from '../../../components/form-steps'
import { SelectField } from '../../../components/select-field'
import { capital } from '../../../lib/words'
import type { PlanForm } from '../use-plan-form'

const positions = RAM_POSITIONS.map((position) => ({ value: position, label: capital(position) }))

/** Where bed and ram stand in each leg. The clearance names them, and no others. */
export function LegsStep({ form, number }: { form: PlanForm; number: number }) {
  const { control, register, formState } = form
  const legs = useFieldArray({ control, name: 'legs', keyName: 'key' })
  const errors = formState.errors.legs
  return (
    <FormStep number={number} title="Bed and ram" note="The press is cleared for these positions and no others.">
      {legs.fields.length === 0 && (
        <WholeRow>
          <p>Choose a protocol first: it says how many legs there are.</p>
        </WholeRow>
      )}
      {legs.fields.map((leg, index) => (
        <WholeRow key={leg.key} className="grid items-start gap-4 tablet:grid-cols-2">
          <TextField
            label={legs.fields.length > 1 ? `Bed hole, ${leg.label.toLowerCase()}` : 'Bed hole'}
            placeholder="4"
            autoComplete="off"
            message={errors?.[index]?.bedHole?.message}
            {...register(`legs.${index}.bedHole`)}
          />
          <SelectField label="Ram stands" choices={positions} {...register(`legs.${index}.ramPosition`)} />
        </WholeRow>
      ))}
    </FormStep>
  )
}
