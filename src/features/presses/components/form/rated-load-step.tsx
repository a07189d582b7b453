import { useController, useWatch } from 'react-hook-form'
import { FORCE_UNITS, formatForce, parseDecimal } from '#shared/units'
import { QuantityField } from '../../../../components/decimal-field'
import { FormStep, WholeRow } from '../../../../components/form-steps'
import { HowLinks } from '../../../../components/how-link'
import { Mark } from '../../../../components/marks'
import { ratingSoFar } from './checks'
import type { PressForm } from './use-press-form'

/** What the press is declared to carry; said at the field, while it is typed, when a component carries less. */
export function RatedLoadStep({ form, number }: { form: PressForm; number: number }) {
  const { control, formState } = form
  const { field } = useController({ control, name: 'description.ratedLoad' })
  const description = useWatch({ control, name: 'description' })
  const rating = ratingSoFar({ description })
  const typed = parseDecimal(field.value.text).ok && field.value.unit !== ''
  const errors = formState.errors.description?.ratedLoad
  const message = typed ? (rating?.refusal ?? undefined) : (errors?.text?.message ?? errors?.unit?.message ?? errors?.message)
  return (
    <FormStep number={number} title="Rated load" note="What you declare it to carry: never more than the lowest rating above.">
      <QuantityField {...field} label="Rated load" units={FORCE_UNITS} askUnit="Which ton, or unit?" message={message} />
      {rating && (
        <WholeRow>
          <p role="status" className="flex items-start gap-3 border-y border-hairline py-2">
            <span className="mt-0.5">
              <Mark name={rating.refusal ? 'beyond' : 'measuring-point'} size={20} />
            </span>
            <span>
              Lowest rating so far: <span className="font-semibold">{rating.lowest.name}</span>, {formatForce(rating.lowest.force, 'kN')}
              {field.value.unit !== '' && field.value.unit !== 'kN' && `, which is ${formatForce(rating.lowest.force, field.value.unit)}`}.
            </span>
          </p>
        </WholeRow>
      )}
      <WholeRow>
        <HowLinks
          beside
          topics={[
            ['units', 'the three tons'],
            ['ram-force', 'what a ram makes at its rated pressure'],
          ]}
        />
      </WholeRow>
    </FormStep>
  )
}
