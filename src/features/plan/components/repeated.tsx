import { useWatch } from 'react-hook-form'
import type { PressState } from '#shared/press/state'
import { WholeRow } from '../../../components/form-steps'
import { TextLink } from '../../../components/button'
import { Mark } from '../../../components/marks'
import { setPercent } from '../../../components/typeset'
import { shortDate } from '../../../lib/dates'
import { paths } from '../../../paths'
import type { PlanForm } from '../use-plan-form'

/** What became of a test that is to be repeated: what went wrong, and what was done about it since. */
function toldOf(press: PressState, testId: string) {
  const repair = press.repairs.findLast(({ test }) => test?.proofTestId === testId)
  const event = press.history.findLast(({ proofTestId, mark }) => proofTestId === testId && mark === 'stop')
  const number = repair?.test?.number ?? (press.toRepeat?.proofTestId === testId ? press.toRepeat.number : 'The test')
  return { number, why: repair?.why ?? event?.text ?? null, closed: repair?.closed ?? null }
}

type RepeatedProps = { form: PlanForm; press: PressState | undefined; repairOpen: boolean }

/** Which test this one repeats and why; a repair that is still open is closed on the press's page first. */
export function Repeated({ form, press, repairOpen }: RepeatedProps) {
  const repeatsId = useWatch({ control: form.control, name: 'repeatsId' })
  if (!press || (repeatsId === '' && !repairOpen)) return null
  const told = repeatsId === '' ? null : toldOf(press, repeatsId)
  return (
    <WholeRow>
      <div className="border-2 border-ink bg-sheet px-4 py-3">
        {told && (
          <div className="flex items-start gap-3">
            <Mark name="stop" size={22} className="mt-0.5 shrink-0" />
            <div className="min-w-0">
              <p className="font-semibold">
                Repeats <TextLink to={paths.proofTest.href(repeatsId)}>{told.number}</TextLink>
              </p>
              {told.why !== null && <p>{setPercent(told.why)}</p>}
              {told.closed && (
                <p>
                  Repaired on {shortDate(told.closed.at)}: {told.closed.done}
                  {told.closed.doneBy !== '' && ` Done by ${told.closed.doneBy}.`}
                </p>
              )}
              <p className="text-graphite">
                Its line is drawn beside the new one where the same is measured, in the run and on the record.
              </p>
            </div>
          </div>
        )}
        {repairOpen && (
          <p className={told ? 'mt-2' : undefined}>
            <TextLink to={`${paths.press.href(press.id)}#repairs`}>To the open repair of this press</TextLink>
          </p>
        )}
      </div>
    </WholeRow>
  )
}
