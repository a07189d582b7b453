import { useForm } from 'react-hook-form'
import { toolingDetailsSchema, TOOLING_KINDS, type ToolingDetails } from '#shared/tooling'
import { FORCE_UNITS, LENGTH_UNITS } from '#shared/units'
import { Button } from '../../../components/button'
import { ControlledQuantity, ControlledRadios } from '../../../components/controlled'
import { TextArea, TextField } from '../../../components/field'
import { Form, FormActions, FormError, FormPart } from '../../../components/form'
import { draftResolver } from '../../../lib/draft-resolver'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { TOOLING_WORDS } from '../words'
import { draftOf, emptyDraft, toToolingRequest, type ShopUnits, type ToolingDraft } from './tooling-draft'

type ToolingFormProps = {
  units: ShopUnits
  /** The piece to change; none for a new one. */
  existing?: ToolingDetails
  /** Sends it. The promise fails when the server refuses. */
  send: (details: ToolingDetails) => Promise<unknown>
  sending: boolean
  onLeave: () => void
}

/** One loose piece: what it is, the load it carries, and where that load is known from. */
export function ToolingForm({ units, existing, send, sending, onLeave }: ToolingFormProps) {
  const form = useForm<ToolingDraft, unknown, ToolingDetails>({
    resolver: draftResolver(toolingDetailsSchema, toToolingRequest),
    defaultValues: existing ? draftOf(existing, units) : emptyDraft(units),
  })
  const { control, register, formState } = form
  const { errors, submitCount } = formState
  const showProblem = useProblemFields(form)
  return (
    <Form className="gap-0" onSubmit={form.handleSubmit((details) => send(details).catch(showProblem))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <FormPart title="What it is" note="The number is what is painted or stamped on the piece. It prints on every record and tag.">
        <TextField label="Number" autoCapitalize="characters" autoComplete="off" message={errors.code?.message} {...register('code')} />
        <TextField
          label="What it is"
          placeholder="Flat nose, 80 mm round"
          autoComplete="off"
          message={errors.name?.message}
          {...register('name')}
        />
        <ControlledRadios
          control={control}
          name="kind"
          className="tablet:col-span-2"
          label="Kind"
          choices={TOOLING_KINDS.map((kind) => ({ value: kind, label: TOOLING_WORDS[kind].name, note: TOOLING_WORDS[kind].note }))}
        />
      </FormPart>
      <FormPart
        title="What it carries"
        note="A test or a clearance never goes above the weakest piece used. Short, long and metric tons differ by 12 %: say which is marked."
      >
        <ControlledQuantity control={control} name="ratedLoad" label="Rated load" units={FORCE_UNITS} askUnit="Which unit?" />
        <TextField
          label="Where the rating comes from"
          placeholder="stamped on its side"
          hint="A mark, a maker’s paper, or a calculation with its author."
          autoComplete="off"
          message={errors.ratingFrom?.message}
          {...register('ratingFrom')}
        />
      </FormPart>
      <FormPart title="How it sits" note="So that nobody puts it on a rod or into a hole that it doesn’t fill.">
        <TextField
          label="What it fits"
          placeholder="thread M42 on the rod"
          autoComplete="off"
          message={errors.fit?.message}
          {...register('fit')}
        />
        <ControlledQuantity control={control} name="height" label="Height" optional units={LENGTH_UNITS} />
        <TextArea className="tablet:col-span-2" label="Remark" optional message={errors.remark?.message} {...register('remark')} />
      </FormPart>
      <div className="border-t-2 border-ink pt-4">
        <FormActions>
          <Button type="submit" kind="next" busy={sending && 'Keeping it'}>
            {existing ? 'Keep these details' : 'Enter this piece'}
          </Button>
          <Button onClick={onLeave}>{existing ? 'Leave it as it is' : 'Leave it'}</Button>
          {existing && <p className="text-graphite">Tests already opened keep the details they were opened with.</p>}
        </FormActions>
      </div>
    </Form>
  )
}
