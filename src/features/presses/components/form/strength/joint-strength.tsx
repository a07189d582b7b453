import { useController, useWatch } from 'react-hook-form'
import { DecimalField } from '../../../../../components/decimal-field'
import type { FormUnits } from '../draft'
import type { PressForm } from '../use-press-form'
import { KIND_OF_STRENGTH, blankJointStrength, type JointStrengthDraft } from './draft'
import { FoldedStrength } from './folded-strength'
import { BearingFields, PinFields, ThreadFields, WeldFields } from './joint-fields'
import { held, type Part } from './part'

const FIELDS = { weld: WeldFields, pin: PinFields, thread: ThreadFields, bearing: BearingFields }

/** The optional part of a joint: its measures and materials, asked by the way it is made. */
export function JointStrengthFields({ form, index, number, units }: { form: PressForm; index: number; number: number; units: FormUnits }) {
  const at = `joints.${index}.strength` as const
  const { field, fieldState } = useController({ control: form.control, name: at })
  const kind = KIND_OF_STRENGTH[useWatch({ control: form.control, name: `joints.${index}.kind` })]
  const value = field.value ?? null
  const part: Part<JointStrengthDraft> | null = value && { value, onChange: field.onChange, at, errors: form.formState.errors, units }
  const Fields = FIELDS[kind]
  return (
    <FoldedStrength
      ref={field.ref}
      of={`joint ${number}`}
      given={value !== null}
      wrong={fieldState.invalid}
      give="Give its measures"
      summary={`Checked as a ${kind === 'bearing' ? 'bearing face' : kind}.`}
      onGive={() => field.onChange(blankJointStrength(units))}
      onTakeOut={() => field.onChange(null)}
    >
      {part && (
        <>
          <Fields part={part} />
          <DecimalField
            label="Its share of the force"
            hint="In percent, where it isn’t what the check works out by itself."
            optional
            unit="%"
            {...held(part, 'loadShare')}
          />
        </>
      )}
    </FoldedStrength>
  )
}
