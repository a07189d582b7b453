import { useForm, useWatch } from 'react-hook-form'
import { protocolRequestSchema, type ProtocolRequest } from '#shared/api/protocols'
import type { ProtocolContent } from '#shared/proof-test/protocol'
import { LENGTH_UNITS, type LengthUnit } from '#shared/units'
import { Button } from '../../../components/button'
import { CheckRow } from '../../../components/check-row'
import { ControlledDecimal, ControlledQuantity, ControlledRadios } from '../../../components/controlled'
import { TextArea, TextField } from '../../../components/field'
import { HowLinks } from '../../../components/how-link'
import { Form, FormActions, FormError, FormPart } from '../../../components/form'
import { draftResolver, typedNumber } from '../../../lib/draft-resolver'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { draftOf, isAboveRating, toProtocolRequest, type ProtocolDraft } from './protocol-draft'
import { LegRows, StageRows, type ProtocolControl } from './protocol-rows'
import { StageStrip } from './stage-strip'

const NO_SOURCE = 'Shipped values: common practice, no source.'

/** The stages so far, as far as they can be drawn. */
function Preview({ control }: { control: ProtocolControl }) {
  const typed = useWatch({ control, name: 'content.stages' })
  const stages = typed.flatMap(({ percent, holdSeconds }) => {
    const [at, held] = [typedNumber(percent), typedNumber(holdSeconds)]
    return at === undefined || at <= 0 || at > 150 ? [] : [{ percent: at, holdSeconds: held === undefined ? null : Math.round(held) }]
  })
  return <StageStrip stages={stages} />
}

type Register = ReturnType<typeof useForm<ProtocolDraft>>['register']

/** A last stage whose percentage is no part of the protocol: whoever plans a test enters it with its rule. */
function AskedAboveRating({ control, register }: { control: ProtocolControl; register: Register }) {
  const asked = useWatch({ control, name: 'content.aboveRating.asked' })
  return (
    <>
      <CheckRow
        className="tablet:col-span-2"
        label="A last stage above rating"
        note="The percentage and its rule are asked when a test is planned. It is put on in a second climb, from a new datum."
        {...register('content.aboveRating.asked')}
      />
      {asked && (
        <ControlledDecimal
          control={control}
          name="content.aboveRating.holdSeconds"
          label="Held above rating, seconds"
          unit="s"
          hint="ASME ASP-2010 3-4.1.3, as described: ten minutes."
        />
      )}
    </>
  )
}

function AboveRatingRule({ control, register, message }: { control: ProtocolControl; register: Register; message: string | undefined }) {
  const stages = useWatch({ control, name: 'content.stages' })
  if (!isAboveRating(stages)) return null
  return (
    <TextField
      className="tablet:col-span-2"
      label="The rule that asks for a load above rating"
      hint="Its name and number, such as the standard’s. Never above the lowest rating in the train."
      message={message}
      {...register('content.aboveRatingRule')}
    />
  )
}

function LimitFields({ control }: { control: ProtocolControl }) {
  return (
    <FormPart title="Stops or waits" note={NO_SOURCE}>
      <ControlledDecimal
        control={control}
        name="content.limits.stageLowerPercent"
        label="Stage reached, below by at most %"
        unit="% below the stage"
      />
      <ControlledDecimal
        control={control}
        name="content.limits.stageUpperPercent"
        label="Stage reached, above by at most %"
        unit="% above the stage"
      />
      <ControlledDecimal control={control} name="content.limits.pressureLossPercent" label="Pressure loss in a hold, at most %" unit="%" />
      <ControlledDecimal
        control={control}
        name="content.limits.creepPercent"
        label="Creep in a hold, at most %"
        unit="% of the deflection, or two steps"
      />
      <ControlledDecimal
        control={control}
        name="content.limits.softeningPercent"
        label="Softening, at most %"
        unit="% than the stiffest step"
      />
      <ControlledDecimal
        control={control}
        name="content.limits.setPercent"
        label="Permanent set, at most %"
        unit="% of full deflection, or two steps"
      />
      <ControlledQuantity
        control={control}
        name="content.limits.mostSet"
        label="Permanent set, never more than"
        optional
        hint="ASME ASP-2010 3-4.1.1, as described: 3.18 mm increase of the opening."
        units={LENGTH_UNITS}
      />
      <HowLinks
        beside
        className="tablet:col-span-2"
        topics={[
          ['ram-force', 'stage reached'],
          ['hold', 'pressure loss and creep'],
          ['softening', 'softening'],
          ['permanent-set', 'permanent set'],
        ]}
      />
    </FormPart>
  )
}

function TimeFields({ control }: { control: ProtocolControl }) {
  return (
    <FormPart title="Times and steps" note={NO_SOURCE}>
      <ControlledDecimal control={control} name="content.seatingPercent" label="Seating load, %" unit="% of rated load" />
      <ControlledDecimal control={control} name="content.datumWatchSeconds" label="Datum watched, seconds" unit="s" />
      <ControlledDecimal control={control} name="content.recoverySeconds" label="Recovery before the set, seconds" unit="s" />
      <ControlledDecimal control={control} name="content.repeatHoldSeconds" label="Hold of the repeat climb, seconds" unit="s" />
      <ControlledRadios
        control={control}
        name="content.repeatClimb"
        className="tablet:col-span-2"
        label="Repeat climb"
        choices={[
          { value: 'when the set can be seen', label: 'When the set can be seen' },
          { value: 'always', label: 'Always' },
          { value: 'never', label: 'Never' },
        ]}
      />
    </FormPart>
  )
}

function JudgingFields({ control }: { control: ProtocolControl }) {
  return (
    <FormPart title="How it is judged" note="Decision rules: JCGM 106 and ILAC-G8. Other shipped values: common practice, no source.">
      <ControlledRadios
        control={control}
        name="content.decisionRule"
        className="tablet:col-span-2"
        label="A value counts as within its limit"
        choices={[
          { value: 'simple', label: 'Simple acceptance', note: 'when the reading is within' },
          { value: 'guard-band', label: 'Guard band of U', note: 'when the reading is within by its uncertainty' },
        ]}
      />
      <ControlledDecimal control={control} name="content.predictionAllowancePercent" label="Prediction widened by, %" unit="%" />
      <ControlledDecimal
        control={control}
        name="content.frictionPercent"
        label="Seal friction allowed for, up to %"
        unit="% less than the gauge says"
      />
      <ControlledDecimal
        control={control}
        name="content.marginDivisor"
        label="Clearance: proven load divided by"
        hint="1 unless the shop sets a margin."
      />
      <ControlledDecimal
        control={control}
        name="content.examinationMonths"
        label="Examined again within, months"
        unit="months"
        hint="29 CFR 1910.244(a)(2)(vi) asks six of jacks used at one place."
      />
      <HowLinks
        beside
        className="tablet:col-span-2"
        topics={[
          ['decision-rule', 'within and beyond'],
          ['line', 'prediction'],
          ['clearance', 'clearance'],
        ]}
      />
    </FormPart>
  )
}

type ProtocolFormProps = {
  /** What it begins with: the protocol to write on from. */
  name: string
  content: ProtocolContent
  lengthUnit: LengthUnit
  /** The number of the version that this becomes; 1 for a new protocol. */
  version: number
  send: (request: ProtocolRequest) => Promise<unknown>
  sending: boolean
  onLeave: () => void
}

/** A protocol, or its next version: every value of it a field. */
export function ProtocolForm({ name, content, lengthUnit, version, send, sending, onLeave }: ProtocolFormProps) {
  const form = useForm<ProtocolDraft, unknown, ProtocolRequest>({
    resolver: draftResolver(protocolRequestSchema, toProtocolRequest),
    defaultValues: draftOf(name, content, lengthUnit),
  })
  const { control, register, formState } = form
  const { errors, submitCount } = formState
  const showProblem = useProblemFields(form)
  return (
    <Form className="gap-0" onSubmit={form.handleSubmit((request) => send(request).catch(showProblem))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <FormPart title="What it is for">
        <TextField className="tablet:col-span-2" label="Name" autoComplete="off" message={errors.name?.message} {...register('name')} />
        <TextArea
          className="tablet:col-span-2"
          label="Purpose"
          optional
          rows={2}
          message={errors.content?.purpose?.message}
          {...register('content.purpose')}
        />
      </FormPart>
      <FormPart title="Stages" note="Lowest first, none skipped in the test. The last one reaches rated load.">
        <div className="min-w-0 tablet:col-span-2">
          <Preview control={control} />
        </div>
        <StageRows control={control} />
        <AskedAboveRating control={control} register={register} />
        <AboveRatingRule control={control} register={register} message={errors.content?.aboveRatingRule?.message} />
      </FormPart>
      <FormPart title="Legs" note="Positions of the press, in the order they are tested. Each has its own datum, climbs and set.">
        <LegRows form={form} />
      </FormPart>
      <LimitFields control={control} />
      <TimeFields control={control} />
      <JudgingFields control={control} />
      <div className="border-t-2 border-ink pt-4">
        <FormActions>
          <Button type="submit" kind="next" busy={sending && 'Keeping it'}>
            {version === 1 ? 'Keep this protocol' : `Keep as version ${version}`}
          </Button>
          <Button onClick={onLeave}>Leave it</Button>
          {version > 1 && <p className="text-graphite">Tests already opened keep the version they were opened with.</p>}
        </FormActions>
      </div>
    </Form>
  )
}
