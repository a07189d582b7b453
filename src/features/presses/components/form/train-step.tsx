import { useFieldArray } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import { FORCE_UNITS, PRESSURE_UNITS } from '#shared/units'
import { Button } from '../../../../components/button'
import { ControlledQuantity } from '../../../../components/controlled'
import { TextField } from '../../../../components/field'
import { FormStep, WholeRow } from '../../../../components/form-steps'
import { SelectField } from '../../../../components/select-field'
import { trainChoices } from '../words'
import { newTrainPart, type FormUnits } from './draft'
import type { PressForm } from './use-press-form'

function PartFields({ form, index, onRemove }: { form: PressForm; index: number; onRemove: () => void }) {
  const { control, register, formState } = form
  const at = `description.train.${index}` as const
  const errors = formState.errors.description?.train?.[index]
  return (
    <fieldset className="grid min-w-0 grid-cols-1 items-start gap-x-4 gap-y-2 border-b border-hairline pb-4 tablet:col-span-2 tablet:grid-cols-2">
      <legend className="sr-only">Part {index + 1} of the train</legend>
      <SelectField label="Part" choices={trainChoices} message={errors?.kind?.message} {...register(`${at}.kind`)} />
      <TextField label="Name or mark" autoComplete="off" message={errors?.name?.message} {...register(`${at}.name`)} />
      <ControlledQuantity control={control} name={`${at}.ratedPressure`} label="Rated pressure" units={PRESSURE_UNITS} />
      <ControlledQuantity
        control={control}
        name={`${at}.ratedForce`}
        label="or rated force"
        units={FORCE_UNITS}
        askUnit="Which ton, or unit?"
      />
      <WholeRow>
        <Button size="line" onClick={onRemove}>
          Take this part out
        </Button>
      </WholeRow>
    </fieldset>
  )
}

/** Everything else that the force or its pressure passes through. */
export function TrainStep({ form, number, units }: { form: PressForm; number: number; units: FormUnits }) {
  const train = useFieldArray({ control: form.control, name: 'description.train', keyName: 'key' })
  return (
    <FormStep
      number={number}
      title="The train"
      note="Pump, hose, coupler, valve, relief, frame, tooling, stack: each with the rating marked on it or in its papers. A part without a rating cannot be in the train."
    >
      {train.fields.map((field, index) => (
        <PartFields key={field.key} form={form} index={index} onRemove={() => train.remove(index)} />
      ))}
      <WholeRow>
        <Button size="line" onClick={() => train.append(newTrainPart(newId(), 'coupler', '', units))}>
          Add a part
        </Button>
      </WholeRow>
    </FormStep>
  )
}
