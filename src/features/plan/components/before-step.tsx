import { CAUTIONS } from '#shared/cautions'
import { calibrationState } from '#shared/instruments/model'
import type { Finding } from '#shared/ledger/rules'
import type { Opened } from '#shared/proof-test/entries'
import { TextArea } from '../../../components/field'
import { FormStep, WholeRow } from '../../../components/form-steps'
import { Mark, type MarkName } from '../../../components/marks'
import type { PlanForm } from '../use-plan-form'

function Sentences({ title, mark, sentences }: { title: string; mark: MarkName; sentences: readonly string[] }) {
  if (sentences.length === 0) return null
  return (
    <WholeRow>
      <h3 className="text-18">{title}</h3>
      <ul className="mt-1 border-t border-hairline">
        {sentences.map((sentence) => (
          <li key={sentence} className="flex items-start gap-3 border-b border-hairline py-2">
            <span className="mt-0.5">
              <Mark name={mark} size={20} />
            </span>
            <span className="min-w-0">{sentence}</span>
          </li>
        ))}
      </ul>
    </WholeRow>
  )
}

type BeforeStepProps = {
  form: PlanForm
  number: number
  opened: Opened | null
  today: string
  /** What opening is refused by, as things are chosen now. */
  findings: readonly Finding[]
  /** A test may be opened with these, and no load goes on before they are put right. */
  joints: readonly string[]
  /** The test that has the press already. */
  taken: string | null
}

/** What keeps the test shut, what keeps the load off, and what is said wherever force is decided. */
export function BeforeStep({ form, number, opened, today, findings, joints, taken }: BeforeStepProps) {
  const late = opened?.instruments.filter((instrument) => calibrationState(instrument.calibration, today) !== 'in-date') ?? []
  const blocks = [
    ...(taken ? [`${taken} is under way on this press. Conclude it before another is opened.`] : []),
    ...findings.map((finding) => finding.says),
  ]
  return (
    <FormStep number={number} title="Before it opens">
      <Sentences title="Put this right first" mark="stop" sentences={blocks} />
      {late.length > 0 && (
        <WholeRow>
          <TextArea
            label="Why this test uses an instrument that is not in date"
            hint="It prints on the record, and the test then gives no clearance."
            optional
            message={form.formState.errors.instrumentOverride?.message}
            {...form.register('instrumentOverride')}
          />
        </WholeRow>
      )}
      <Sentences title="No load before" mark="wait" sentences={joints} />
      <WholeRow>
        <section aria-labelledby="cautions" className="border-2 border-ink px-4 py-3">
          <h3 id="cautions" className="text-18">
            Before force is put on
          </h3>
          <ul className="mt-1">
            {CAUTIONS.map((caution) => (
              <li key={caution} className="border-t border-hairline py-1 first:border-t-0">
                {caution}
              </li>
            ))}
          </ul>
        </section>
      </WholeRow>
    </FormStep>
  )
}
