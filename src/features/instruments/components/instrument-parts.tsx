import { useWatch, type Control } from 'react-hook-form'
import { ASME_B40_GRADES, ASME_B40_GRADE_NAMES, EN_837_CLASSES } from '#shared/hydraulics/gauge'
import { GAUGE_STYLES, INDICATOR_STYLES, instrumentDetailsSchema, type InstrumentDetails } from '#shared/instruments/model'
import { errorLimitWords } from '#shared/instruments/words'
import { FORCE_UNITS, LENGTH_UNITS, PRESSURE_UNITS } from '#shared/units'
import { ControlledDecimal, ControlledQuantity, ControlledRadios, ControlledSelect } from '../../../components/controlled'
import { HowLink } from '../../../components/how-link'
import { FormPart } from '../../../components/form'
import { toInstrumentRequest, type InstrumentDraft } from './instrument-draft'

type PartProps = { control: Control<InstrumentDraft, unknown, InstrumentDetails> }

const gaugeStyles = { dial: 'Dial', digital: 'Digital', transducer: 'Transducer' } as const
const indicatorStyles = { dial: 'Dial', digital: 'Digital', feeler: 'Feelers', 'straight-edge and rule': 'Straight-edge and rule' } as const

const standards = [
  { value: 'en-837-1', label: 'EN 837-1 class' },
  { value: 'asme-b40.100', label: 'ASME B40.100 grade' },
  { value: 'stated', label: 'Stated in percent' },
]

function gradeLabel(grade: (typeof ASME_B40_GRADE_NAMES)[number]): string {
  const { outer, middle } = ASME_B40_GRADES[grade]
  return outer === middle ? `${grade}, ± ${outer} % of span` : `${grade}, ± ${outer}, ${middle}, ${outer} % of span`
}

/** What is typed so far, as far as it is an instrument: the code may still be missing. */
function LimitOfError({ control }: PartProps) {
  const draft = useWatch({ control })
  const parsed = instrumentDetailsSchema.safeParse({ ...toInstrumentRequest(draft as InstrumentDraft), code: 'as typed' })
  return (
    <p className="min-h-6 tablet:col-span-2" role="status">
      {parsed.success && (
        <>
          Limit of error <strong className="font-semibold">{errorLimitWords(parsed.data)}</strong>.
        </>
      )}
    </p>
  )
}

export function GaugeParts({ control }: PartProps) {
  const standard = useWatch({ control, name: 'accuracy.standard' })
  return (
    <>
      <FormPart title="Scale" note="As printed on the dial. A step is the smallest that can be read from where one stands.">
        <ControlledRadios
          control={control}
          name="style"
          className="tablet:col-span-2"
          label="Sort of gauge"
          choices={GAUGE_STYLES.map((style) => ({ value: style, label: gaugeStyles[style] }))}
        />
        <ControlledQuantity control={control} name="fullScale" label="Full scale" units={PRESSURE_UNITS} />
        <ControlledQuantity control={control} name="increment" label="One step" units={PRESSURE_UNITS} />
      </FormPart>
      <FormPart
        title="How true it is"
        note="By what stands on the dial or in its papers. A certificate's uncertainty takes its place where there is one."
      >
        <ControlledRadios control={control} name="accuracy.standard" className="tablet:col-span-2" label="Given as" choices={standards} />
        {standard === 'en-837-1' && (
          <ControlledSelect
            control={control}
            name="accuracy.class"
            label="Class"
            nothing="Choose the class"
            choices={EN_837_CLASSES.map((one) => ({ value: String(one), label: `${one}, ± ${one} % of span` }))}
          />
        )}
        {standard === 'asme-b40.100' && (
          <ControlledSelect
            control={control}
            name="accuracy.grade"
            label="Grade"
            hint="Grades with three figures hold in the lower quarter, the middle half, and the upper quarter of the scale."
            nothing="Choose the grade"
            choices={ASME_B40_GRADE_NAMES.map((grade) => ({ value: grade, label: gradeLabel(grade) }))}
          />
        )}
        {standard === 'stated' && (
          <ControlledDecimal control={control} name="accuracy.percentOfSpan" label="Percent of span, either way" unit="% of span" />
        )}
        <LimitOfError control={control} />
        <HowLink topic="gauge" of="the limit of error" beside className="tablet:col-span-2" />
      </FormPart>
    </>
  )
}

export function LoadCellParts({ control }: PartProps) {
  return (
    <FormPart title="Scale" note="Say which ton when it reads in tons: short, long and metric differ by 12 %.">
      <ControlledQuantity control={control} name="fullScale" label="Full scale" units={FORCE_UNITS} askUnit="Which unit?" />
      <ControlledQuantity control={control} name="increment" label="One step" units={FORCE_UNITS} askUnit="Which unit?" />
      <ControlledDecimal control={control} name="errorPercentOfSpan" label="Limit of error, percent of span" unit="% of span" />
      <LimitOfError control={control} />
    </FormPart>
  )
}

export function IndicatorParts({ control }: PartProps) {
  const style = useWatch({ control, name: 'style' })
  return (
    <FormPart title="Scale" note="A step is the smallest that can be read. A set smaller than two steps can't be told from none.">
      <ControlledRadios
        control={control}
        name="style"
        className="tablet:col-span-2"
        label="Sort of indicator"
        choices={INDICATOR_STYLES.map((one) => ({ value: one, label: indicatorStyles[one] }))}
      />
      <ControlledQuantity control={control} name="range" label="Range" units={LENGTH_UNITS} />
      <ControlledQuantity control={control} name="increment" label="One step" units={LENGTH_UNITS} />
      <ControlledQuantity
        control={control}
        name="errorLimit"
        label="Limit of error, by its maker"
        optional
        hint="Left empty, one step is taken: common practice, no source."
        units={LENGTH_UNITS}
      />
      {style === 'dial' && (
        <ControlledQuantity
          control={control}
          name="revolution"
          label="One turn of the pointer"
          optional
          hint="With it, a reading that is one whole turn off is asked about."
          units={LENGTH_UNITS}
        />
      )}
      <LimitOfError control={control} />
    </FormPart>
  )
}
