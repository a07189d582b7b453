import { useDeferredValue, useEffect, useMemo } from 'react'
import { useWatch } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import { Button } from '../../../components/button'
import { Form, FormActions, FormError } from '../../../components/form'
import { FormSteps } from '../../../components/form-steps'
import { drawnPress, jointState } from '#shared/drawing/drawn-press'
import { PressPlate } from '../../../components/instruments/press-plate'
import { PageHeading, PlateBesidePaper, inset } from '../../../components/page'
import { classNames } from '../../../lib/class-names'
import { calendarDate } from '../../../lib/dates'
import { bootId, monotonicMs } from '../../../lib/entry'
import { useShop, useUser } from '../../../lib/here'
import { useOneAtATime } from '../../../lib/use-one-at-a-time'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { useTitle } from '../../../lib/use-title'
import { usePlannedPress } from '../api/get-planned-press'
import type { PlanRegisters } from '../api/get-plan-registers'
import { useOpenTest } from '../api/open-test'
import { legsOf, usualPoints, type PlanDraft } from '../draft'
import { beforeLoad, pressRefuses, previewOpened, wouldRefuse } from '../preview'
import { tooWeak } from '../tooling'
import { usePlanForm, type Asked } from '../use-plan-form'
import { useRepeated } from '../use-repeated'
import { BeforeStep } from './before-step'
import { CheckStep } from './check-step'
import { ForceStep, instrumentChoices } from './force-step'
import { LegsStep } from './legs-step'
import { PeopleStep } from './people-step'
import { PointsStep } from './points-step'
import { PressStep } from './press-step'
import { ToolingStep } from './tooling-step'

type PlanFormProps = { registers: PlanRegisters; asked: Asked; onOpened: (testId: string) => void }

const NOT_REFUSED = { repair: null, repeats: null }

/** The plan of a test: opening it freezes what it says and suspends the press's clearance. */
export function PlanForm({ registers, asked, onOpened }: PlanFormProps) {
  useTitle('Plan a test')
  const shop = useShop()
  const user = useUser()
  const lead = { id: user.id, name: user.name }
  const today = calendarDate(new Date())
  const { form, finish } = usePlanForm(shop.id, asked, {
    nameOf: (userId) => registers.people.find((person) => person.userId === userId)?.name ?? '',
    contentOf: (protocolId) => registers.protocols.find((protocol) => protocol.id === protocolId)?.content,
  })
  const open = useOpenTest(shop.id)
  const showProblem = useProblemFields(form)
  const taps = useOneAtATime()
  // The fields answer first; targets, findings and the drawing follow when there is time.
  const draft = useDeferredValue(useWatch({ control: form.control }) as PlanDraft)
  const planned = usePlannedPress(shop.id, draft.pressId)
  const press = planned.data?.state.id === draft.pressId ? planned.data.state : undefined
  const description = press?.description ?? null
  const { getValues, setFocus, setValue } = form

  useEffect(() => {
    // The usual points of the press come once it is here, unless the draft has points of this press already.
    if (description !== null && getValues('points').length === 0) setValue('points', usualPoints(description, newId))
  }, [description, getValues, setValue])

  useRepeated(form, press)
  const refused = press ? pressRefuses(press, draft) : NOT_REFUSED

  const opened = useMemo(
    () => (press ? previewOpened({ draft, registers, press, shop, lead: { id: user.id, name: user.name } }) : null),
    [draft, press, registers, shop, user.id, user.name],
  )
  const findings = opened ? wouldRefuse(draft.id, opened, { at: new Date().toISOString(), bootId, monotonicMs: monotonicMs() }) : []
  const weak = tooWeak(draft.toolingIds, registers, opened)
  const taken = press?.underTest?.number ?? null
  const { errors, submitCount } = form.formState
  const submit = form.handleSubmit((request) => {
    // What is refused stands at its field already: the server would answer the same.
    if (refused.repair !== null) return setFocus('pressId')
    if (refused.repeats !== null) return setFocus('repeatsId')
    // A piece that carries too little is refused where it was chosen, before anything is sent.
    if (weak.size > 0) {
      setFocus('toolingIds')
      return
    }
    if (!taps.begin()) return
    open.mutate(request, {
      onSuccess: ({ id }) => {
        finish()
        onOpened(id)
      },
      onError: (error) => {
        taps.end()
        showProblem(error)
      },
    })
  })
  const choosePress = () => {
    setValue('points', [])
    setValue('repeatsId', '')
  }
  const chooseProtocol = (protocolId: string) => {
    const protocol = registers.protocols.find((one) => one.id === protocolId)
    setValue('legs', protocol ? legsOf(protocol.content, getValues('legs')) : [])
  }
  return (
    <PlateBesidePaper
      plate={
        <PressPlate
          press={description && drawnPress(description)}
          joints={(press?.joints ?? [])
            .filter((joint) => !joint.retired)
            .map((joint) => ({ id: joint.id, number: joint.number, name: joint.name, state: jointState(joint), place: joint.place }))}
          points={draft.points.flatMap(({ letter, place }) => (place === '' || letter === '' ? [] : [{ letter, place }]))}
          nothing="The press is drawn here, with its measuring points, as soon as it is chosen."
        />
      }
    >
      <div className={classNames(inset, 'pt-5 pb-10 desktop:px-8')}>
        <PageHeading className="mb-5">Plan a test</PageHeading>
        <Form onSubmit={submit}>
          <FormError message={errors.root?.message} attempt={submitCount} />
          <FormSteps>
            <PressStep
              form={form}
              number={1}
              registers={registers}
              planned={planned.data}
              refused={refused}
              today={today}
              onPress={choosePress}
              onProtocol={chooseProtocol}
            />
            <LegsStep form={form} number={2} />
            <ForceStep form={form} number={3} registers={registers} today={today} rams={description?.rams.length ?? 1} opened={opened} />
            <PointsStep
              form={form}
              number={4}
              press={description}
              indicators={instrumentChoices(registers, today, ['indicator'])}
              opened={opened}
            />
            <ToolingStep form={form} number={5} registers={registers} weak={weak} />
            <CheckStep form={form} number={6} opened={opened} engineer={draft.engineer} />
            <PeopleStep form={form} number={7} registers={registers} shopId={shop.id} lead={lead} />
            <BeforeStep
              form={form}
              number={8}
              opened={opened}
              today={today}
              findings={findings}
              joints={press ? beforeLoad(press) : []}
              taken={taken}
            />
          </FormSteps>
          <FormActions>
            <Button type="submit" kind="next" busy={open.isPending && 'Opening it'} note="the press's clearance is suspended with it">
              Open this test
            </Button>
            <p role="status" className="text-graphite">
              {Object.keys(errors).length > 0
                ? 'Some fields above need another look. Nothing you typed is lost.'
                : 'What you type is kept on this device until the test opens.'}
            </p>
          </FormActions>
        </Form>
      </div>
    </PlateBesidePaper>
  )
}
