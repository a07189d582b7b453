import { v7 as newId } from 'uuid'
import { Button } from '../../../../components/button'
import { Form, FormActions, FormError } from '../../../../components/form'
import { FormSteps } from '../../../../components/form-steps'
import { PageHeading, PlateBesidePaper, inset } from '../../../../components/page'
import { classNames } from '../../../../lib/class-names'
import { ProblemError } from '../../../../lib/problem'
import { useOneAtATime } from '../../../../lib/use-one-at-a-time'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import { useTitle } from '../../../../lib/use-title'
import { useRegisterPress } from '../../api/register-press'
import { newPress, type FormUnits } from './draft'
import { FormPlacingProvider } from './form-placing'
import { FrameStep } from './frame-step'
import { JointsStep } from './joints-step'
import { LivePlate } from './live-plate'
import { MembersStep } from './members-step'
import { RamsStep } from './rams-step'
import { RatedLoadStep } from './rated-load-step'
import { TrainStep } from './train-step'
import { sayHowMany } from './say-how-many'
import { usePressForm } from './use-press-form'

type NewPressFormProps = { shopId: string; units: FormUnits; onEntered: (pressId: string) => void }

/** A press, entered whole: frame, rams, train, rated load, members and joints. */
export function NewPressForm({ shopId, units, onEntered }: NewPressFormProps) {
  useTitle('Enter a press')
  const { form, restored, finish, beginAnew, chooseKind } = usePressForm(`press.${shopId}`, () => newPress(newId, units))
  const register = useRegisterPress(shopId)
  const showProblem = useProblemFields(form)
  const taps = useOneAtATime()
  const { errors, submitCount } = form.formState
  const wrong = submitCount > 0 ? sayHowMany(errors) : null
  const submit = form.handleSubmit((payload) => {
    if (!taps.begin()) return
    const pressId = form.getValues('pressId')
    register.mutate(
      { pressId, payload },
      {
        onSuccess: () => {
          finish()
          onEntered(pressId)
        },
        // What was sent before got through after all, with what was typed then: it is changed on its own page.
        onError: (error) => {
          taps.end()
          if (error instanceof ProblemError && error.code === 'id-reused') onEntered(pressId)
          else showProblem(error)
        },
      },
    )
  })
  return (
    <FormPlacingProvider>
      <PlateBesidePaper plate={<LivePlate form={form} />}>
        <div className={classNames(inset, 'pt-5 pb-10 desktop:px-8')}>
          <div className="mb-5 flex flex-wrap items-center justify-between gap-x-6 gap-y-3">
            <PageHeading>Enter a press</PageHeading>
            {restored && (
              <p className="flex flex-wrap items-center gap-3 text-graphite">
                As you left it on this device.
                <Button size="line" onClick={beginAnew}>
                  Begin with an empty form
                </Button>
              </p>
            )}
          </div>
          <Form onSubmit={submit}>
            <FormError message={errors.root?.message} attempt={submitCount} />
            <FormSteps>
              <FrameStep form={form} number={1} onKind={chooseKind} />
              <RamsStep form={form} number={2} units={units} />
              <TrainStep form={form} number={3} units={units} />
              <RatedLoadStep form={form} number={4} />
              <MembersStep form={form} number={5} units={units} />
              <JointsStep form={form} number={6} units={units} />
            </FormSteps>
            <FormActions>
              <Button type="submit" kind="next" busy={register.isPending && 'Entering it'}>
                Enter this press
              </Button>
              <p role="status" className={wrong ? 'font-medium text-stop-ink' : 'text-graphite'}>
                {wrong ?? 'What you type is kept on this device until it is entered.'}
              </p>
            </FormActions>
          </Form>
        </div>
      </PlateBesidePaper>
    </FormPlacingProvider>
  )
}
