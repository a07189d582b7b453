import { useController } from 'react-hook-form'
import { typedWords } from '#shared/instruments/words'
import { TextLink } from '../../../components/button'
import { CheckRow } from '../../../components/check-row'
import { FieldMessage } from '../../../components/field'
import { FormStep, WholeRow } from '../../../components/form-steps'
import { useShop } from '../../../lib/here'
import { paths } from '../../../paths'
import type { PlanRegisters } from '../api/get-plan-registers'
import type { PlanForm } from '../use-plan-form'

/** As many pieces as a test takes. */
const MOST = 6

type ToolingStepProps = {
  form: PlanForm
  number: number
  registers: PlanRegisters
  /** Sentences of the chosen pieces that carry too little. */
  weak: ReadonlyMap<string, string>
}

/** The loose pieces that the force passes through in this test. The weakest part of the train, tooling included, bounds it. */
export function ToolingStep({ form, number, registers, weak }: ToolingStepProps) {
  const shop = useShop()
  const { field } = useController({ control: form.control, name: 'toolingIds' })
  const { errors } = form.formState
  const { tooling } = registers
  const toggle = (id: string, on: boolean) => field.onChange(on ? [...field.value, id] : field.value.filter((one) => one !== id))
  const first = tooling.find(({ id }) => weak.has(id)) ?? tooling[0]
  return (
    <FormStep
      number={number}
      title="Tooling"
      note="Each loose piece between ram and bed. It joins the train with its rating, prints on the record, and stands on the clearance."
    >
      <WholeRow>
        {tooling.length === 0 ? (
          <p>
            No tooling is in the register. Where a piece lies between ram and bed, enter it with the load it carries:{' '}
            <TextLink to={paths.newTool.href({ shop: shop.id })}>Enter a piece</TextLink>
          </p>
        ) : (
          <fieldset>
            <legend className="sr-only">Tooling used in this test</legend>
            <div className="border-t border-hairline">
              {tooling.map(({ id, details }) => {
                const on = field.value.includes(id)
                return (
                  <CheckRow
                    key={id}
                    ref={id === first?.id ? field.ref : undefined}
                    className="border-b border-hairline pb-1"
                    name={`tooling.${id}`}
                    label={`${details.code}, ${details.name}`}
                    note={`Carries ${typedWords(details.ratedLoad)}. ${details.fit}`}
                    checked={on}
                    disabled={!on && field.value.length >= MOST}
                    message={weak.get(id)}
                    onBlur={field.onBlur}
                    onChange={(event) => toggle(id, event.target.checked)}
                  />
                )
              })}
            </div>
          </fieldset>
        )}
        {errors.toolingIds?.message && <FieldMessage id="tooling-message">{errors.toolingIds.message}</FieldMessage>}
      </WholeRow>
    </FormStep>
  )
}
