import { answerOfRow } from '#shared/press/may-it-be-used'
import { typedWords } from '#shared/instruments/words'
import { FormStep } from '../../../components/form-steps'
import { SelectField } from '../../../components/select-field'
import type { PlannedPress } from '../api/get-planned-press'
import type { PlanRegisters } from '../api/get-plan-registers'
import type { PlanForm } from '../use-plan-form'
import type { pressRefuses } from '../preview'
import { repeatableTests } from '../use-repeated'
import { AboveRating } from './above-rating'
import { Repeated } from './repeated'

type PressStepProps = {
  form: PlanForm
  number: number
  registers: PlanRegisters
  planned: PlannedPress | undefined
  /** What the press's own ledger has against this plan, at the field it is about. */
  refused: ReturnType<typeof pressRefuses>
  today: string
  onPress: (pressId: string) => void
  onProtocol: (protocolId: string) => void
}

/** Which press, by which protocol, and which test it repeats. */
export function PressStep({ form, number, registers, planned, refused, today, onPress, onProtocol }: PressStepProps) {
  const { errors } = form.formState
  const presses = registers.presses.map((press) => {
    const tested = answerOfRow(press, today).answer === 'under test'
    const label = `${[press.name, press.whatFor].filter(Boolean).join(', ')}, ${typedWords(press.ratedLoad)}`
    return { value: press.id, label: tested ? `${label} (under test)` : label, disabled: tested }
  })
  const protocols = registers.protocols.map((protocol) => ({ value: protocol.id, label: `${protocol.name}, version ${protocol.version}` }))
  const repeatable = repeatableTests(planned)
  const press = form.register('pressId')
  const protocol = form.register('protocolId')
  return (
    <FormStep number={number} title="Press and protocol" note="What is known of both now is frozen into the test when it opens.">
      <SelectField
        label="Press"
        nothing="Choose a press"
        choices={presses}
        message={(errors.pressId && 'Choose a press.') ?? refused.repair ?? undefined}
        {...press}
        onChange={(event) => {
          void press.onChange(event)
          onPress(event.target.value)
        }}
      />
      <SelectField
        label="Protocol"
        nothing="Choose a protocol"
        choices={protocols}
        message={errors.protocolId && 'Choose a protocol.'}
        {...protocol}
        onChange={(event) => {
          void protocol.onChange(event)
          onProtocol(event.target.value)
        }}
      />
      <AboveRating form={form} registers={registers} />
      {repeatable.length > 0 && (
        <SelectField
          label="Repeats an earlier test"
          optional={planned?.state.toRepeat === null}
          nothing="None"
          choices={repeatable.map(({ id, label }) => ({ value: id, label }))}
          message={errors.repeatsId?.message ?? refused.repeats ?? undefined}
          {...form.register('repeatsId')}
        />
      )}
      <Repeated form={form} press={planned?.state} repairOpen={refused.repair !== null} />
    </FormStep>
  )
}
