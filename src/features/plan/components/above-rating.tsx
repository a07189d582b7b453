import { useWatch } from 'react-hook-form'
import { secondsWords } from '#shared/proof-test/protocol-words'
import { ControlledDecimal } from '../../../components/controlled'
import { TextField } from '../../../components/field'
import type { PlanRegisters } from '../api/get-plan-registers'
import type { PlanForm } from '../use-plan-form'

/** How far above the rated load, and by which rule: asked for each test anew, with nothing filled in. */
export function AboveRating({ form, registers }: { form: PlanForm; registers: PlanRegisters }) {
  const { control, register, formState } = form
  const protocolId = useWatch({ control, name: 'protocolId' })
  const above = registers.protocols.find((protocol) => protocol.id === protocolId)?.content.aboveRating
  if (!above) return null
  return (
    <>
      <ControlledDecimal
        control={control}
        name="aboveRating.percent"
        label="Last stage, % of the rated load"
        hint={`Above 100 %, held ${secondsWords(above.holdSeconds)} in a second climb. Never above the lowest rating in the train.`}
        unit="% of the rated load"
      />
      <TextField
        label="The rule that asks for it"
        hint="Its name and number: a standard, a law, a customer’s order. It prints on the record."
        autoComplete="off"
        message={formState.errors.aboveRating?.rule?.message}
        {...register('aboveRating.rule')}
      />
    </>
  )
}
