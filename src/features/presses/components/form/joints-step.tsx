import { useState } from 'react'
import { useFieldArray, useWatch } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import { FRAME_KINDS } from '#shared/press/model'
import { jointPlaces } from '#shared/press/places'
import { Button } from '../../../../components/button'
import { DateField, TextField } from '../../../../components/field'
import { FormStep, WholeRow } from '../../../../components/form-steps'
import { JointBalloon } from '../../../../components/marks'
import { SelectField } from '../../../../components/select-field'
import { jointChoices, makeUpChoices } from '../words'
import { newJoint, type FormUnits, type JointDraft } from './draft'
import { useFormPlacing } from './form-placing'
import { JointStrengthFields } from './strength/joint-strength'
import type { PressForm } from './use-press-form'

/** What of a joint is asked once: how it is made, what it holds together, where it is drawn. */
function Details({ form, index }: { form: PressForm; index: number }) {
  const { control, register, formState } = form
  const members = useWatch({ control, name: 'description.members' })
  const kind = useWatch({ control, name: 'description.kind' })
  const jointKind = useWatch({ control, name: `joints.${index}.kind` })
  const id = useWatch({ control, name: `joints.${index}.id` })
  const placing = useFormPlacing()
  const errors = formState.errors.joints?.[index]
  const memberChoices = members.map((member) => ({ value: member.id, label: member.name || 'a member without a name' }))
  const frame = FRAME_KINDS.find((one) => one === kind)
  const places = frame ? jointPlaces[frame].map(({ place, label }) => ({ value: place, label })) : []
  const [from, to] = [errors?.between?.[0]?.message, errors?.between?.[1]?.message]
  return (
    <div className="grid grid-cols-1 items-start gap-x-4 gap-y-3 pb-4 tablet:grid-cols-2">
      <SelectField
        label="Holds"
        nothing="Choose a member"
        choices={memberChoices}
        message={from && 'Choose a member.'}
        {...register(`joints.${index}.between.0`)}
      />
      <SelectField
        label="to"
        nothing="Choose a member"
        choices={memberChoices}
        message={(to && 'Choose a member.') ?? errors?.between?.root?.message ?? errors?.between?.message}
        {...register(`joints.${index}.between.1`)}
      />
      <SelectField label="By" choices={jointChoices} {...register(`joints.${index}.kind`)} />
      <TextField
        label="Size and form"
        optional
        placeholder={jointKind === 'weld' ? 'fillet 8 mm, both sides' : jointKind === 'pin' ? '34 mm, double shear' : 'M30, bottomed'}
        message={errors?.detail?.message}
        {...register(`joints.${index}.detail`)}
      />
      <TextField label="Made by" optional autoComplete="off" message={errors?.madeBy?.message} {...register(`joints.${index}.madeBy`)} />
      <DateField label="Made on" optional message={errors?.madeOn?.message} {...register(`joints.${index}.madeOn`)} />
      <TextField
        label={jointKind === 'weld' ? 'Filler' : 'Fastener'}
        optional
        placeholder={jointKind === 'weld' ? 'E7018, 3.2 mm' : 'property class 10.9'}
        message={errors?.filler?.message}
        {...register(`joints.${index}.filler`)}
      />
      <SelectField label="Drawn at" nothing="Beside the drawing" choices={places} {...register(`joints.${index}.place`)} />
      {frame && (
        <Button
          className="self-end"
          aria-pressed={placing.jointId === id}
          onClick={() => (placing.jointId === id ? placing.end() : placing.begin(id))}
        >
          {placing.jointId === id ? 'Tap a cross on the drawing' : 'Show on the drawing where'}
        </Button>
      )}
    </div>
  )
}

type JointRowProps = { form: PressForm; index: number; units: FormUnits; onRemove: () => void; wrong: boolean }

function JointRow({ form, index, units, onRemove, wrong }: JointRowProps) {
  const { control, register, formState } = form
  // Only what is drawn here: a letter typed into one joint's name draws no other row again.
  const joint = useWatch({
    control,
    name: `joints.${index}`,
    compute: (one: JointDraft | undefined) => one && { number: one.number, makeUp: one.makeUp },
  })
  const [asked, setAsked] = useState(() => form.getValues(`joints.${index}.name`) === '')
  const errors = formState.errors.joints?.[index]
  if (!joint) return null
  const open = asked || wrong
  return (
    <li className="border-b border-hairline">
      <div className="grid grid-cols-[2.5rem_minmax(0,1fr)] items-end gap-x-3 gap-y-1 py-3 tablet:grid-cols-[2.5rem_minmax(0,1fr)_11rem_auto]">
        <span className="mb-2">
          <JointBalloon number={joint.number} state={joint.makeUp} size={34} />
        </span>
        <TextField
          label={`Joint ${joint.number}`}
          autoComplete="off"
          message={errors?.name?.message ?? errors?.number?.message}
          {...register(`joints.${index}.name`)}
        />
        <div className="max-tablet:col-start-2">
          <SelectField label="Made up" choices={makeUpChoices} {...register(`joints.${index}.makeUp`)} />
        </div>
        <div className="flex gap-3 max-tablet:col-start-2 max-tablet:py-1">
          <Button aria-expanded={open} aria-label={`More of joint ${joint.number}`} onClick={() => setAsked(!open)}>
            {open ? 'Less' : 'More'}
          </Button>
          <Button aria-label={`Take out joint ${joint.number}`} onClick={onRemove}>
            Take out
          </Button>
        </div>
      </div>
      {open && (
        <div className="tablet:pl-13">
          <Details form={form} index={index} />
          <JointStrengthFields form={form} index={index} number={joint.number} units={units} />
        </div>
      )}
    </li>
  )
}

/** Every place where two members are held together, and how far each is really made. */
export function JointsStep({ form, number, units }: { form: PressForm; number: number; units: FormUnits }) {
  const { control, formState, getValues, register } = form
  const joints = useFieldArray({ control, name: 'joints', keyName: 'key' })
  const finished = useWatch({
    control,
    name: 'joints',
    compute: (all: JointDraft[]) => all.filter((joint) => joint.makeUp === 'finished').length,
  })
  const count = joints.fields.length
  return (
    <FormStep
      number={number}
      title="Joints"
      note="A tack counts as no weld. Say of each what is so now: nothing loads before all of them are finished and examined."
      aside={count > 0 ? `${finished} of ${count} finished` : undefined}
    >
      <WholeRow>
        <ul>
          {joints.fields.map((field, index) => (
            <JointRow
              key={field.key}
              form={form}
              index={index}
              units={units}
              onRemove={() => joints.remove(index)}
              wrong={formState.errors.joints?.[index] !== undefined}
            />
          ))}
        </ul>
      </WholeRow>
      <WholeRow>
        <Button size="line" onClick={() => joints.append(newJoint(newId(), getValues('joints')))}>
          Add a joint
        </Button>
      </WholeRow>
      <DateField
        label="Last worked on"
        optional
        hint="A build that stood still for long is walked down as if new."
        message={formState.errors.lastWorkedOn?.message}
        {...register('lastWorkedOn')}
      />
    </FormStep>
  )
}
