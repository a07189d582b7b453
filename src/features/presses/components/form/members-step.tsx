import { useFieldArray, useWatch } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import { Button } from '../../../../components/button'
import { FieldMessage, TextField } from '../../../../components/field'
import { FormStep, WholeRow } from '../../../../components/form-steps'
import { SelectField } from '../../../../components/select-field'
import { memberChoices } from '../words'
import type { JointDraft } from './draft'
import type { FormUnits } from './draft'
import { MemberStrengthFields } from './strength/member-strength'
import type { PressForm } from './use-press-form'

/** The parts that the force passes through, from the ram round to the bed. */
export function MembersStep({ form, number, units }: { form: PressForm; number: number; units: FormUnits }) {
  const { control, register, formState } = form
  const members = useFieldArray({ control, name: 'description.members', keyName: 'key' })
  const kind = useWatch({ control, name: 'description.kind' })
  const errors = formState.errors.description?.members
  const held = useWatch({ control, name: 'joints', compute: (joints: JointDraft[]) => joints.map((joint) => joint.between) })
  const holds = (id: string) => held.filter((between) => between.includes(id)).length
  return (
    <FormStep
      number={number}
      title="Members"
      note="Every part the force passes through, from the ram round the frame to the bed."
      aside={members.fields.length > 0 ? `${members.fields.length} members` : undefined}
    >
      {members.fields.length === 0 && kind === '' && (
        <WholeRow>
          <p>Choose the kind of frame first: its usual members stand here then.</p>
        </WholeRow>
      )}
      <WholeRow>
        <ul>
          {members.fields.map((field, index) => (
            <li key={field.key} className="border-b border-hairline py-3">
              <div className="grid grid-cols-1 items-end gap-x-4 gap-y-1 tablet:grid-cols-[1fr_13rem_auto]">
                <TextField
                  label={`Member ${index + 1}`}
                  autoComplete="off"
                  message={errors?.[index]?.name?.message}
                  {...register(`description.members.${index}.name`)}
                />
                <SelectField label="Kind" choices={memberChoices} {...register(`description.members.${index}.kind`)} />
                {holds(field.id) > 0 ? (
                  <p className="flex min-h-14 w-28 items-center text-graphite max-tablet:min-h-6 desktop:min-h-12">
                    {holds(field.id) === 1 ? 'in one joint' : `in ${holds(field.id)} joints`}
                  </p>
                ) : (
                  <Button aria-label={`Take out ${field.name}`} className="tablet:w-28" onClick={() => members.remove(index)}>
                    Take out
                  </Button>
                )}
              </div>
              <MemberStrengthFields form={form} index={index} name={field.name} units={units} />
            </li>
          ))}
        </ul>
      </WholeRow>
      <WholeRow>
        {errors?.root?.message && <FieldMessage id="members-message">{errors.root.message}</FieldMessage>}
        <Button size="line" onClick={() => members.append({ id: newId(), kind: 'other', name: '', strength: null })}>
          Add a member
        </Button>
      </WholeRow>
    </FormStep>
  )
}
