import { useForm } from 'react-hook-form'
import { instrumentDetailsSchema, type InstrumentDetails } from '#shared/instruments/model'
import { Button } from '../../../components/button'
import { TextField } from '../../../components/field'
import { Form, FormActions, FormError, FormPart } from '../../../components/form'
import { RadioRow } from '../../../components/radio-row'
import { draftResolver } from '../../../lib/draft-resolver'
import { useProblemFields } from '../../../lib/use-problem-fields'
import { draftOf, emptyDraft, toInstrumentRequest, unitsOf, type InstrumentDraft, type ShopUnits } from './instrument-draft'
import { GaugeParts, IndicatorParts, LoadCellParts } from './instrument-parts'

const kinds: readonly { value: InstrumentDetails['kind']; label: string; note: string }[] = [
  { value: 'gauge', label: 'Pressure gauge', note: 'reads the oil behind the ram' },
  { value: 'load-cell', label: 'Load cell', note: 'reads force itself' },
  { value: 'indicator', label: 'Indicator', note: 'reads how far the frame moved' },
]

type InstrumentFormProps = {
  units: ShopUnits
  /** The instrument to change; none for a new one. */
  existing?: InstrumentDetails
  /** Sends it. The promise fails when the server refuses. */
  send: (details: InstrumentDetails) => Promise<unknown>
  sending: boolean
  onLeave: () => void
}

/** One instrument: what it is, its scale, and how true it is said to be. */
export function InstrumentForm({ units, existing, send, sending, onLeave }: InstrumentFormProps) {
  const form = useForm<InstrumentDraft, unknown, InstrumentDetails>({
    resolver: draftResolver(instrumentDetailsSchema, toInstrumentRequest),
    defaultValues: existing ? draftOf(existing, units) : emptyDraft(units),
  })
  const { control, register, setValue, watch, formState } = form
  const { errors, submitCount } = formState
  const kind = watch('kind')
  const showProblem = useProblemFields(form)
  const changeKind = (next: InstrumentDraft['kind']) => {
    const begin = unitsOf(next, units)
    setValue('kind', next)
    setValue('style', next === 'load-cell' ? '' : 'dial')
    setValue('fullScale.unit', begin.fullScale)
    setValue('increment.unit', begin.increment)
    form.clearErrors()
  }
  return (
    <Form className="gap-0" onSubmit={form.handleSubmit((details) => send(details).catch(showProblem))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <FormPart title="What it is" note="The code is what is written on the instrument. It prints on every record.">
        <RadioRow
          className="tablet:col-span-2"
          label="Kind"
          name="kind"
          value={kind}
          choices={kinds.map((one) => ({ ...one, disabled: existing !== undefined && one.value !== existing.kind }))}
          message={errors.kind?.message}
          onChange={(event) => {
            const next = kinds.find((one) => one.value === event.target.value)
            if (next) changeKind(next.value)
          }}
        />
        <TextField label="Code" autoCapitalize="characters" autoComplete="off" message={errors.code?.message} {...register('code')} />
        <TextField
          label="Maker, size, where it hangs"
          optional
          autoComplete="off"
          message={errors.description?.message}
          {...register('description')}
        />
      </FormPart>
      {kind === 'gauge' && <GaugeParts control={control} />}
      {kind === 'load-cell' && <LoadCellParts control={control} />}
      {kind === 'indicator' && <IndicatorParts control={control} />}
      <div className="border-t-2 border-ink pt-4">
        <FormActions>
          <Button type="submit" kind="next" busy={sending && 'Keeping it'}>
            {existing ? 'Keep these details' : 'Enter this instrument'}
          </Button>
          <Button onClick={onLeave}>{existing ? 'Leave it as it is' : 'Leave it'}</Button>
          {existing && <p className="text-graphite">Tests already opened keep the details they were opened with.</p>}
        </FormActions>
      </div>
    </Form>
  )
}
