import { useEffect, useRef } from 'react'
import type { PressState } from '#shared/press/state'
import type { PlannedPress } from './api/get-planned-press'
import type { PlanForm } from './use-plan-form'

/** The test that went wrong last is the one that is repeated, unless the plan says another; said once for each press. */
export function useRepeated(form: PlanForm, press: PressState | undefined): void {
  const said = useRef<string | null>(null)
  const { getValues, setValue } = form
  useEffect(() => {
    if (!press || said.current === press.id) return
    said.current = press.id
    if (press.toRepeat && getValues('repeatsId') === '') setValue('repeatsId', press.toRepeat.proofTestId)
  }, [press, getValues, setValue])
}

/** Tests that a new one may repeat, the one that has to be repeated among them however long ago it was. */
export function repeatableTests(planned: PlannedPress | undefined): { id: string; label: string }[] {
  if (!planned) return []
  const { toRepeat } = planned.state
  const listed = planned.tests
    .filter((test) => test.result === 'rejected' || test.result === 'abandoned')
    .map((test) => ({ id: test.id, label: `${test.number}, ${test.result}` }))
  if (!toRepeat || listed.some(({ id }) => id === toRepeat.proofTestId)) return listed
  return [{ id: toRepeat.proofTestId, label: toRepeat.number }, ...listed]
}
