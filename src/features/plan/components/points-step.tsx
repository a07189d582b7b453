import { useFieldArray, useWatch } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import type { PressDescription } from '#shared/press/model'
import { measuringPlaces } from '#shared/press/places'
import type { Opened } from '#shared/proof-test/entries'
import { Button } from '../../../components/button'
import { ControlledRadios } from '../../../components/controlled'
import { FieldMessage, TextField } from '../../../components/field'
import { FormStep, WholeRow } from '../../../components/form-steps'
import { SelectField, type Choice } from '../../../components/select-field'
import { setPercent } from '../../../components/typeset'
import { capital } from '../../../lib/words'
import { netOf } from '../draft'
import { tellsSetFrom } from '../preview'
import type { PlanForm } from '../use-plan-form'

const places = measuringPlaces.map(({ place, label }) => ({ value: place, label }))

type PointFieldsProps = {
  form: PlanForm
  index: number
  press: PressDescription
  indicators: Choice[]
  /** What opening would freeze, as far as it is chosen. */
  opened: Opened | null
  onRemove: (() => void) | undefined
}

function PointFields({ form, index, press, indicators, opened, onRemove }: PointFieldsProps) {
  const { control, register, formState } = form
  const instrumentId = useWatch({ control, name: `points.${index}.instrumentId` })
  const errors = formState.errors.points?.[index]
  const tells = tellsSetFrom(opened, instrumentId)
  return (
    <fieldset className="grid min-w-0 grid-cols-1 items-start gap-x-4 gap-y-3 border-b border-hairline pb-4 tablet:col-span-2 tablet:grid-cols-[4.5rem_minmax(0,1fr)_minmax(0,1fr)]">
      <legend className="sr-only">Measuring point {index + 1}</legend>
      <TextField label="Letter" maxLength={2} message={errors?.letter && 'One or two.'} {...register(`points.${index}.letter`)} />
      <TextField label="Where it reads" message={errors?.label?.message} {...register(`points.${index}.label`)} />
      <SelectField
        label="Indicator"
        nothing="Choose an indicator"
        hint={tells === null ? undefined : setPercent(tells)}
        choices={indicators}
        message={errors?.instrumentId && 'Choose an indicator.'}
        {...register(`points.${index}.instrumentId`)}
      />
      <div className="grid gap-x-4 gap-y-3 tablet:col-start-2 tablet:col-end-4 tablet:grid-cols-2">
        <ControlledRadios
          control={control}
          name={`points.${index}.reads`}
          label="Under load its reading"
          choices={[
            { value: 'rises', label: 'Rises' },
            { value: 'falls', label: 'Falls' },
          ]}
        />
        <SelectField
          label="Tells of"
          nothing="No one member"
          choices={press.members.map((member) => ({ value: member.id, label: member.name }))}
          {...register(`points.${index}.memberId`)}
        />
        <SelectField label="Drawn at" nothing="Not drawn" choices={places} {...register(`points.${index}.place`)} />
        {onRemove && (
          <div className="flex items-end">
            <Button onClick={onRemove}>Take this point out</Button>
          </div>
        )}
      </div>
    </fieldset>
  )
}

type PointsStepProps = { form: PlanForm; number: number; press: PressDescription | null; indicators: Choice[]; opened: Opened | null }

/** Where the frame's movement is read, by what, and which way counts as load. */
export function PointsStep({ form, number, press, indicators, opened }: PointsStepProps) {
  const { control, formState } = form
  const points = useFieldArray({ control, name: 'points', keyName: 'key' })
  const values = useWatch({ control, name: 'points' })
  const net = netOf({ points: values, combine: 'yes' })
  const message = formState.errors.points?.root?.message ?? formState.errors.points?.message
  const unread = press?.members.filter((member) => !values.some((point) => point.memberId === member.id)) ?? []
  return (
    <FormStep
      number={number}
      title="Measuring points"
      note="Each indicator on a stand of its own, not on the frame. A member that no point tells of prints as not measured."
    >
      {press === null && (
        <WholeRow>
          <p>Choose a press first: its usual points stand here then.</p>
        </WholeRow>
      )}
      {press !== null &&
        points.fields.map((field, index) => (
          <PointFields
            key={field.key}
            form={form}
            index={index}
            press={press}
            indicators={indicators}
            opened={opened}
            onRemove={points.fields.length > 1 ? () => points.remove(index) : undefined}
          />
        ))}
      {message && (
        <WholeRow>
          <FieldMessage id="points-message">{message}</FieldMessage>
        </WholeRow>
      )}
      {press !== null && (
        <WholeRow>
          <Button
            size="line"
            onClick={() => points.append({ id: newId(), letter: '', label: '', place: '', instrumentId: '', reads: 'rises', memberId: '' })}
          >
            Add a point
          </Button>
        </WholeRow>
      )}
      {net && (
        <WholeRow>
          <ControlledRadios
            control={control}
            name="combine"
            label="The figure that limits go by"
            stacked
            choices={[
              {
                value: 'yes',
                label: capital(net.label),
                note: 'so that slack at the ends is not taken for bending',
              },
              { value: 'no', label: 'Each point by itself' },
            ]}
          />
        </WholeRow>
      )}
      {press !== null && unread.length > 0 && (
        <WholeRow>
          <p className="text-graphite">Not measured: {unread.map((member) => member.name.toLowerCase()).join(', ')}.</p>
        </WholeRow>
      )}
    </FormStep>
  )
}
