import { useFieldArray, type Control, type UseFormReturn } from 'react-hook-form'
import type { ProtocolRequest } from '#shared/api/protocols'
import { RAM_POSITIONS } from '#shared/press/model'
import { Button } from '../../../components/button'
import { ControlledDecimal } from '../../../components/controlled'
import { TextField } from '../../../components/field'
import { SelectField } from '../../../components/select-field'
import { capital } from '../../../lib/words'
import type { ProtocolDraft } from './protocol-draft'

export type ProtocolControl = Control<ProtocolDraft, unknown, ProtocolRequest>
type ProtocolForm = UseFormReturn<ProtocolDraft, unknown, ProtocolRequest>

const beds = ['where it is used most', 'lowest', 'highest'] as const
const choicesOf = (values: readonly string[]) => values.map((value) => ({ value, label: capital(value) }))

/** The rungs, lowest first; each takes a percentage and a hold. */
export function StageRows({ control }: { control: ProtocolControl }) {
  const { fields, append, remove } = useFieldArray({ control, name: 'content.stages' })
  return (
    <div className="tablet:col-span-2">
      <ol className="border-t border-hairline">
        {fields.map((field, index) => (
          <li
            key={field.id}
            className="grid grid-cols-2 gap-x-4 border-b border-hairline py-3 tablet:grid-cols-[1fr_1fr_auto] tablet:items-start"
          >
            <ControlledDecimal
              control={control}
              name={`content.stages.${index}.percent`}
              label={`Stage ${index + 1}, % of rated load`}
              unit="% of rated load"
            />
            <ControlledDecimal control={control} name={`content.stages.${index}.holdSeconds`} label="Held, seconds" unit="s" />
            <Button
              size="line"
              className="max-tablet:col-span-2 tablet:mt-8"
              disabled={fields.length <= 2}
              aria-label={`Take out stage ${index + 1}`}
              onClick={() => remove(index)}
            >
              Take out
            </Button>
          </li>
        ))}
      </ol>
      <Button className="mt-3" disabled={fields.length >= 10} onClick={() => append({ percent: '', holdSeconds: '' })}>
        Add a stage
      </Button>
    </div>
  )
}

/** Positions of the press, in the order they are tested. */
export function LegRows({ form }: { form: ProtocolForm }) {
  const { control, register, formState } = form
  const { fields, append, remove } = useFieldArray({ control, name: 'content.legs' })
  const wrong = formState.errors.content?.legs
  return (
    <div className="tablet:col-span-2">
      <ol className="border-t border-hairline">
        {fields.map((field, index) => (
          <li
            key={field.id}
            className="grid gap-x-4 gap-y-3 border-b border-hairline py-3 tablet:grid-cols-[1.2fr_1fr_1.2fr_auto] tablet:items-start"
          >
            <TextField label={`Leg ${index + 1}`} message={wrong?.[index]?.label?.message} {...register(`content.legs.${index}.label`)} />
            <SelectField
              label="Ram"
              choices={choicesOf(RAM_POSITIONS)}
              message={wrong?.[index]?.ramPosition?.message}
              {...register(`content.legs.${index}.ramPosition`)}
            />
            <SelectField
              label="Bed"
              choices={choicesOf(beds)}
              message={wrong?.[index]?.bed?.message}
              {...register(`content.legs.${index}.bed`)}
            />
            <Button
              size="line"
              className="tablet:mt-8"
              disabled={fields.length <= 1}
              aria-label={`Take out leg ${index + 1}`}
              onClick={() => remove(index)}
            >
              Take out
            </Button>
          </li>
        ))}
      </ol>
      <Button
        className="mt-3"
        disabled={fields.length >= 6}
        onClick={() => append({ label: '', ramPosition: 'central', bed: 'where it is used most' })}
      >
        Add a leg
      </Button>
    </div>
  )
}
