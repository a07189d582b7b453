import { useState } from 'react'
import { useWatch } from 'react-hook-form'
import { FRAME_KINDS, type FrameKind } from '#shared/press/model'
import { LENGTH_UNITS } from '#shared/units'
import { ControlledQuantity, ControlledRadios } from '../../../../components/controlled'
import { TextField } from '../../../../components/field'
import { FormStep, WholeRow } from '../../../../components/form-steps'
import { frameChoices } from '../words'
import { isProposal } from './draft'
import type { PressForm } from './use-press-form'

type FrameStepProps = { form: PressForm; number: number; onKind: (before: FrameKind | '', kind: FrameKind) => boolean }

/** Name, kind and measures. The kind proposes the members and joints of the steps after. */
export function FrameStep({ form, number, onKind }: FrameStepProps) {
  const { control, register, getValues, formState } = form
  const kind = useWatch({ control, name: 'description.kind' })
  const [listKind, setListKind] = useState<FrameKind | ''>(() => {
    const { description, joints } = getValues()
    return FRAME_KINDS.find((one) => isProposal(one, { members: description.members, joints })) ?? description.kind
  })
  const { errors } = formState
  const cFrame = kind === 'c-frame'
  return (
    <FormStep number={number} title="The frame" note="What it is called in the shop, and what it is built like.">
      <TextField
        label="Name"
        placeholder="Press 2"
        autoComplete="off"
        message={errors.description?.name?.message}
        {...register('description.name')}
      />
      <TextField
        label="What it is for"
        optional
        placeholder="straightening press"
        autoComplete="off"
        message={errors.description?.whatFor?.message}
        {...register('description.whatFor')}
      />
      <WholeRow>
        <ControlledRadios
          control={control}
          name="description.kind"
          label="Kind of frame"
          hint="Choosing one proposes its members and joints below. Take out what yours does not have."
          choices={frameChoices}
          onClick={(event) => {
            const chosen = FRAME_KINDS.find((one) => one === event.currentTarget.value)
            if (chosen && onKind(listKind, chosen)) setListKind(chosen)
          }}
        />
      </WholeRow>
      <ControlledQuantity control={control} name="description.dimensions.height" label="Height over all" optional units={LENGTH_UNITS} />
      <ControlledQuantity
        control={control}
        name="description.dimensions.opening"
        label={cFrame ? 'Opening, ram face to bed' : 'Between upright centres'}
        optional
        units={LENGTH_UNITS}
      />
      {cFrame && (
        <ControlledQuantity
          control={control}
          name="description.dimensions.throat"
          label="Throat, ram centre to column"
          optional
          units={LENGTH_UNITS}
        />
      )}
      {kind === 'h-frame' && (
        <>
          <TextField
            label="Bed holes in each upright"
            optional
            inputMode="numeric"
            autoComplete="off"
            message={errors.description?.dimensions?.holes && 'Enter whole holes, 0 to 40.'}
            {...register('description.dimensions.holes')}
          />
          <ControlledQuantity
            control={control}
            name="description.dimensions.holePitch"
            label="Hole to hole"
            optional
            units={LENGTH_UNITS}
          />
        </>
      )}
    </FormStep>
  )
}
