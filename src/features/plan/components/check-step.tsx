import { useWatch } from 'react-hook-form'
import { Link } from 'react-router-dom'
import { cannotTell, expectedAtStage } from '#shared/proof-test/can-tell'
import type { Opened } from '#shared/proof-test/entries'
import { checkOf } from '#shared/proof-test/expected'
import { anyFigures } from '#shared/structure/check-words'
import { expectedDeflection } from '#shared/structure/expected-deflection'
import { toSI } from '#shared/units'
import { PhotoField } from '../../../components/attachments/photo-field'
import { DateField, TextField } from '../../../components/field'
import { FormStep, WholeRow } from '../../../components/form-steps'
import { HowLink } from '../../../components/how-link'
import { Mark } from '../../../components/marks'
import { CheckBars } from '../../../components/structure/check-bars'
import { setPercent } from '../../../components/typeset'
import { capital } from '../../../lib/words'
import { paths } from '../../../paths'
import { engineerTyped } from '../draft'
import type { PlanForm } from '../use-plan-form'

const SHOWN = 3

/** Why nothing is expected of the figure that leads; null where something is. */
function whyNothingExpected(opened: Opened): string | null {
  if (expectedAtStage(opened, 100)) return null
  const frame = { description: opened.press, joints: opened.joints }
  const { points, net } = expectedDeflection(frame, toSI(opened.press.ratedLoad), opened.points, { net: opened.net })
  const lead = opened.net ? net : points.get(opened.points[0]?.id ?? '')
  return lead?.missing ?? 'No measuring point has an indicator yet.'
}

function EngineerFields({ form }: { form: PlanForm }) {
  const errors = form.formState.errors.engineer
  const { control, getValues, setValue } = form
  const chosen = useWatch({ control, name: 'engineerFiles' })
  return (
    <WholeRow>
      <fieldset className="grid grid-cols-1 items-start gap-4 border-2 border-ink p-4 tablet:grid-cols-2">
        <legend className="px-2 text-18 font-semibold">A named engineer’s document</legend>
        <p className="tablet:col-span-2">
          The estimate is over 100 %, so no test opens without the document of an engineer who answers for this load. It prints on the
          record.
        </p>
        <TextField label="Engineer" autoComplete="off" message={errors?.name?.message} {...form.register('engineer.name')} />
        <TextField
          label="What document"
          hint="A calculation or drawing, with its number and issue."
          autoComplete="off"
          message={errors?.document?.message}
          {...form.register('engineer.document')}
        />
        <DateField label="Its date" message={errors?.on?.message} {...form.register('engineer.on')} />
        <PhotoField
          className="tablet:col-span-2"
          label="The document itself"
          hint="As PDF or photo. It is sent when the test is open, and stands in the record."
          owner={`ledger:${getValues('id')}`}
          chosen={chosen}
          onChange={(next) => setValue('engineerFiles', next)}
          most={4}
        />
      </fieldset>
    </WholeRow>
  )
}

type CheckStepProps = { form: PlanForm; number: number; opened: Opened | null; engineer: Parameters<typeof engineerTyped>[0] }

/** What the load path check lets expect of this test, in short; over 100 % it asks for an engineer's document. */
export function CheckStep({ form, number, opened, engineer }: CheckStepProps) {
  if (!opened) {
    return (
      <FormStep number={number} title="Load path check, an estimate">
        <WholeRow>
          <p className="text-graphite">It is worked out when press, protocol and instrument are chosen.</p>
        </WholeRow>
      </FormStep>
    )
  }
  const check = checkOf(opened)
  const known = anyFigures(check)
  const over = check.results.some(({ verdict }) => verdict === 'beyond')
  const missing = known ? whyNothingExpected(opened) : null
  const blind = cannotTell(opened)
  return (
    <FormStep number={number} title="Load path check, an estimate">
      <WholeRow>
        <p className="mb-3 flex items-start gap-3 font-medium">
          <span className="mt-0.5">
            <Mark name={over ? 'stop' : check.weakest ? 'within' : 'not-read'} size={20} />
          </span>
          <span>{setPercent(capital(check.sentence))}</span>
        </p>
        {known && <CheckBars check={check} forceUnit={opened.forceUnit} most={SHOWN} />}
        <p className="mt-2">
          <Link
            to={paths.press.href(opened.pressId)}
            className="inline-block min-h-12 content-center font-medium underline underline-offset-[3px] desktop:min-h-8"
          >
            {known ? 'Every check, its factors and sources' : 'Give the sections of this press'}
          </Link>
        </p>
        <HowLink topic="load-path" of="the load path check" beside />
      </WholeRow>
      {missing !== null && (
        <WholeRow>
          <p className="flex items-start gap-3">
            <span className="mt-0.5">
              <Mark name="not-read" size={20} />
            </span>
            <span>
              No deflection is expected of this test. {missing} Under “Tells of” say what each point reads: the beam, and what carries its
              ends.
            </span>
          </p>
        </WholeRow>
      )}
      {blind.length > 0 && (
        <WholeRow>
          <h3 className="text-18">What these instruments cannot tell</h3>
          <ul className="mt-1 border-t border-hairline">
            {blind.map((sentence) => (
              <li key={sentence} className="flex items-start gap-3 border-b border-hairline py-2">
                <span className="mt-0.5">
                  <Mark name="undecided" size={20} />
                </span>
                <span className="min-w-0">{setPercent(sentence)}</span>
              </li>
            ))}
          </ul>
        </WholeRow>
      )}
      {(over || engineerTyped(engineer)) && <EngineerFields form={form} />}
    </FormStep>
  )
}
