import { useState } from 'react'
import type { PressDescription } from '#shared/press/model'
import type { PressState } from '#shared/press/state'
import { Button } from '../../../../components/button'
import { TextArea } from '../../../../components/field'
import { Form, FormActions, FormError } from '../../../../components/form'
import { FormStep, FormSteps, WholeRow } from '../../../../components/form-steps'
import { PageHeading, PlateBesidePaper, inset } from '../../../../components/page'
import { classNames } from '../../../../lib/class-names'
import { useOneAtATime } from '../../../../lib/use-one-at-a-time'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import { useTitle } from '../../../../lib/use-title'
import { useAppendToPress } from '../../api/append-to-press'
import type { FormUnits } from './draft'
import { draftOfPress, editsOf } from './edits'
import { EditsEffectNote } from './edits-effect'
import { FormPlacingProvider } from './form-placing'
import { FrameStep } from './frame-step'
import { JointsStep } from './joints-step'
import { LivePlate } from './live-plate'
import { MembersStep } from './members-step'
import { RamsStep } from './rams-step'
import { RatedLoadStep } from './rated-load-step'
import { sayHowMany } from './say-how-many'
import { TrainStep } from './train-step'
import { usePressForm } from './use-press-form'

type EditPressFormProps = { state: PressState; description: PressDescription; units: FormUnits; onDone: () => void }

const LEAST = 3

/** What is written down about a press, to be put right. What it was stays in its history. */
export function EditPressForm({ state, description, units, onDone }: EditPressFormProps) {
  useTitle(`Change ${description.name}`)
  // A draft belongs to the press as it stood when the form was opened.
  const { form, finish } = usePressForm(`press.${state.id}.${state.headSeq}`, () => draftOfPress(state, description, units))
  const [why, setWhy] = useState('')
  const [said, setSaid] = useState<string | undefined>()
  const append = useAppendToPress(state.id, state.headSeq, 'edit')
  const showProblem = useProblemFields(form)
  const taps = useOneAtATime()
  const { errors, submitCount } = form.formState
  const wrong = submitCount > 0 ? sayHowMany(errors) : null
  const submit = form.handleSubmit(({ description: next, joints }) => {
    const edits = editsOf(state, { description: next, joints }, why.trim())
    if (edits.length === 0) return setSaid('Nothing is different from what is written down.')
    if (why.trim().length < LEAST) return setSaid('Say why in a few words.')
    setSaid(undefined)
    if (!taps.begin()) return
    append.mutate(edits, {
      onSuccess: () => {
        finish()
        onDone()
      },
      onError: (error) => {
        taps.end()
        showProblem(error)
      },
    })
  })
  return (
    <FormPlacingProvider>
      <PlateBesidePaper plate={<LivePlate form={form} />}>
        <div className={classNames(inset, 'pt-5 pb-10 desktop:px-8')}>
          <PageHeading className="mb-5">Change {description.name}</PageHeading>
          <Form onSubmit={submit}>
            <FormError message={errors.root?.message} attempt={submitCount} />
            <FormSteps>
              <FrameStep form={form} number={1} onKind={() => false} />
              <RamsStep form={form} number={2} units={units} />
              <TrainStep form={form} number={3} units={units} />
              <RatedLoadStep form={form} number={4} />
              <MembersStep form={form} number={5} units={units} />
              <JointsStep form={form} number={6} units={units} />
              <FormStep number={7} title="Why" note="What was written down before stays in the history of the press.">
                <WholeRow>
                  <EditsEffectNote form={form} state={state} />
                </WholeRow>
                <WholeRow>
                  <TextArea label="Why it is changed" value={why} message={said} onChange={(event) => setWhy(event.target.value)} />
                </WholeRow>
              </FormStep>
            </FormSteps>
            <FormActions>
              <Button type="submit" kind="next" busy={append.isPending && 'Writing it down'}>
                Write this down
              </Button>
              <Button onClick={onDone}>Leave it as it was</Button>
              {wrong && (
                <p role="status" className="font-medium text-stop-ink">
                  {wrong}
                </p>
              )}
            </FormActions>
          </Form>
        </div>
      </PlateBesidePaper>
    </FormPlacingProvider>
  )
}
