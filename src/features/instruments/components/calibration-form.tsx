import type { ReactNode } from 'react'
import { useForm } from 'react-hook-form'
import { calibrationSchemaFor, type Calibration, type InstrumentDetails } from '#shared/instruments/model'
import { FORCE_UNITS, LENGTH_UNITS, PRESSURE_UNITS, type Unit } from '#shared/units'
import { Button } from '../../../components/button'
import { ControlledDecimal, ControlledQuantity, ControlledRadios } from '../../../components/controlled'
import { DateField, TextField } from '../../../components/field'
import { Form, FormActions, FormError } from '../../../components/form'
import { draftResolver, typedNumber } from '../../../lib/draft-resolver'
import { useProblemFields } from '../../../lib/use-problem-fields'

type CalibrationDraft = {
  calibratedOn: string
  dueOn: string
  certificate: string
  comparedWith: string
  result: Calibration['result'] | ''
  uncertainty: { value: { text: string; unit: Unit }; k: string }
}

const unitsFor = { gauge: PRESSURE_UNITS, 'load-cell': FORCE_UNITS, indicator: LENGTH_UNITS } as const

/** Both fields of the uncertainty, or neither: a figure without its k says nothing. */
function toCalibration({ uncertainty, ...rest }: CalibrationDraft) {
  const none = uncertainty.value.text.trim() === '' && uncertainty.k.trim() === ''
  return { ...rest, uncertainty: none ? null : { value: uncertainty.value, k: typedNumber(uncertainty.k) } }
}

type CalibrationFormProps = {
  details: InstrumentDetails
  send: (calibration: Calibration) => Promise<unknown>
  sending: boolean
  /** The certificate's own file, chosen above the actions. */
  file?: ReactNode
  onLeave: () => void
}

/** A certificate: when, until when, against what, and what was found. */
export function CalibrationForm({ details, send, sending, file, onLeave }: CalibrationFormProps) {
  const form = useForm<CalibrationDraft, unknown, Calibration>({
    resolver: draftResolver<CalibrationDraft, Calibration>(calibrationSchemaFor[details.kind], toCalibration),
    defaultValues: {
      calibratedOn: '',
      dueOn: '',
      certificate: '',
      comparedWith: '',
      result: '',
      uncertainty: { value: { text: '', unit: details.increment.unit }, k: '' },
    },
  })
  const { control, register, watch, formState } = form
  const { errors, submitCount } = formState
  const showProblem = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit((calibration) => send(calibration).catch(showProblem))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <div className="grid gap-4 tablet:grid-cols-2">
        <DateField label="Compared on" autoFocus message={errors.calibratedOn?.message} {...register('calibratedOn')} />
        <DateField label="Next one due on" message={errors.dueOn?.message} {...register('dueOn')} />
        <TextField
          label="Number of the certificate"
          autoComplete="off"
          message={errors.certificate?.message}
          {...register('certificate')}
        />
        <TextField label="Compared with" optional autoComplete="off" message={errors.comparedWith?.message} {...register('comparedWith')} />
        <ControlledRadios
          control={control}
          name="result"
          className="tablet:col-span-2"
          label="Found"
          choices={[
            { value: 'in tolerance', label: 'In tolerance' },
            { value: 'out of tolerance', label: 'Out of tolerance' },
          ]}
        />
        {watch('result') === 'out of tolerance' && (
          <p className="border-2 border-stop-ink px-4 py-3 font-medium text-stop-ink tablet:col-span-2">
            Every clearance that rests on this instrument is suspended at once. Test those presses again with one in date.
          </p>
        )}
        <ControlledQuantity
          control={control}
          name="uncertainty.value"
          label="Uncertainty U on the certificate"
          optional
          hint="Takes the place of the class when the force’s uncertainty is worked out."
          units={unitsFor[details.kind]}
        />
        <ControlledDecimal
          control={control}
          name="uncertainty.k"
          label="Its coverage factor k"
          optional
          hint="Printed beside U, mostly 2. Goes with U."
        />
      </div>
      {file}
      <FormActions>
        <Button type="submit" kind="next" busy={sending && 'Keeping it'}>
          Enter this calibration
        </Button>
        <Button onClick={onLeave}>Leave it</Button>
      </FormActions>
    </Form>
  )
}
