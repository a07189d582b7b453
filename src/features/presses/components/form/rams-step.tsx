import { useFieldArray, useWatch } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import { AREA_UNITS, FORCE_UNITS, LENGTH_UNITS, MASS_UNITS, PRESSURE_UNITS } from '#shared/units'
import { Button } from '../../../../components/button'
import { ControlledQuantity, ControlledRadios } from '../../../../components/controlled'
import { FieldMessage, TextField } from '../../../../components/field'
import { FormStep, WholeRow } from '../../../../components/form-steps'
import { Mark } from '../../../../components/marks'
import { ramCheck } from './checks'
import { newRam, type FormUnits } from './draft'
import type { PressForm } from './use-press-form'

const WHICH_TON = 'Which ton, or unit?'

function CrossCheck({ form, index }: { form: PressForm; index: number }) {
  const ram = useWatch({ control: form.control, name: `description.rams.${index}` })
  const check = ram && ramCheck(ram)
  if (!check) return null
  return (
    <WholeRow>
      <p role="status" className="flex items-start gap-3 border-y border-hairline py-2 font-medium">
        <span className="mt-0.5">
          <Mark name={check.fits ? 'within' : 'undecided'} size={20} />
        </span>
        {check.sentence}
      </p>
    </WholeRow>
  )
}

type RamFieldsProps = { form: PressForm; index: number; onRemove: (() => void) | undefined }

function RamFields({ form, index, onRemove }: RamFieldsProps) {
  const { control, register, formState } = form
  const at = `description.rams.${index}` as const
  const areaBy = useWatch({ control, name: `${at}.areaBy` })
  const acting = useWatch({ control, name: `${at}.acting` })
  const carried = useWatch({ control, name: `${at}.carriedMass.text` })
  const errors = formState.errors.description?.rams?.[index]
  return (
    <fieldset className="grid min-w-0 grid-cols-1 items-start gap-4 border-b border-hairline pb-5 tablet:col-span-2 tablet:grid-cols-2">
      <legend className="sr-only">Ram {index + 1}</legend>
      <TextField label="Name of the ram" autoComplete="off" message={errors?.name?.message} {...register(`${at}.name`)} />
      <ControlledRadios
        control={control}
        name={`${at}.areaBy`}
        label="Its area is known by"
        choices={[
          { value: 'bore', label: 'Bore' },
          { value: 'effectiveArea', label: 'Maker’s effective area' },
        ]}
      />
      {areaBy === 'bore' ? (
        <>
          <ControlledQuantity control={control} name={`${at}.bore`} label="Bore, piston diameter" units={LENGTH_UNITS} />
          <ControlledQuantity control={control} name={`${at}.boreTolerance`} label="Bore known to within" optional units={LENGTH_UNITS} />
        </>
      ) : (
        <ControlledQuantity control={control} name={`${at}.effectiveArea`} label="Effective area" units={AREA_UNITS} />
      )}
      <ControlledQuantity
        control={control}
        name={`${at}.ratedCapacity`}
        label="Rated capacity, as marked"
        hint="A mark of 12 ton may be 106.8, 119.6 or 117.7 kN. Unless it is known, take short tons: the smallest."
        units={FORCE_UNITS}
        askUnit={WHICH_TON}
      />
      <ControlledQuantity
        control={control}
        name={`${at}.ratedPressure`}
        label="Rated pressure"
        hint="Of the ram itself, from its plate or its maker’s papers, not of the pump."
        units={PRESSURE_UNITS}
      />
      <CrossCheck form={form} index={index} />
      <ControlledQuantity control={control} name={`${at}.stroke`} label="Stroke" units={LENGTH_UNITS} />
      <ControlledRadios
        control={control}
        name={`${at}.acting`}
        label="Oil pushes"
        choices={[
          { value: 'single', label: 'One way' },
          { value: 'double', label: 'Both ways' },
        ]}
      />
      {acting === 'double' && <ControlledQuantity control={control} name={`${at}.rodDiameter`} label="Rod diameter" units={LENGTH_UNITS} />}
      <ControlledQuantity control={control} name={`${at}.springReturn`} label="Pull of return springs" optional units={FORCE_UNITS} />
      <ControlledQuantity control={control} name={`${at}.carriedMass`} label="Mass that moves with it" optional units={MASS_UNITS} />
      {carried !== '' && (
        <ControlledRadios
          control={control}
          name={`${at}.carriedComesDown`}
          label="Under load that mass"
          choices={[
            { value: 'down', label: 'Comes down' },
            { value: 'up', label: 'Is lifted' },
          ]}
        />
      )}
      {onRemove && (
        <WholeRow>
          <Button size="line" onClick={onRemove}>
            Take this ram out
          </Button>
        </WholeRow>
      )}
    </fieldset>
  )
}

export function RamsStep({ form, number, units }: { form: PressForm; number: number; units: FormUnits }) {
  const { control, formState } = form
  const rams = useFieldArray({ control, name: 'description.rams', keyName: 'key' })
  const message = formState.errors.description?.rams?.root?.message ?? formState.errors.description?.rams?.message
  return (
    <FormStep number={number} title="Rams" note="Cylinder or jack. Its area turns gauge pressure into force, so measure rather than guess.">
      {rams.fields.map((field, index) => (
        <RamFields key={field.key} form={form} index={index} onRemove={rams.fields.length > 1 ? () => rams.remove(index) : undefined} />
      ))}
      <WholeRow>
        {message && <FieldMessage id="rams-message">{message}</FieldMessage>}
        <Button size="line" onClick={() => rams.append(newRam(newId(), `Ram ${rams.fields.length + 1}`, units))}>
          Add another ram
        </Button>
      </WholeRow>
    </FormStep>
  )
}
