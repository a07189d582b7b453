import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import { openTestRequestSchema } from '#shared/api/proof-tests'
import { readDraft } from '../../lib/drafts'
import { draftResolver } from '../../lib/draft-resolver'
import { bootId, deviceId, monotonicMs } from '../../lib/entry'
import { useKeptDraft } from '../../lib/use-kept-draft'
import { newPlan, toRequest, type PlanDraft, type PlanLookup, type Stamp } from './draft'

/** Goes up when the form's fields change, so that an older draft isn't poured into it. */
const VERSION = 5

const stamp = (): Stamp => ({ deviceId: deviceId(), bootId, monotonicMs: monotonicMs(), observedAt: new Date().toISOString() })

/** What the address asks a plan for: the press, and the test of it that is repeated. */
export interface Asked {
  press: string
  repeats: string
}

/** The plan's form: its draft outlives a reload. A press or test named by the address begins a plan for it. */
export function usePlanForm(shopId: string, asked: Asked, lookup: PlanLookup) {
  const name = `plan.${shopId}`
  const [initial] = useState(() => {
    const kept = readDraft<PlanDraft>(name, VERSION)
    const fits = kept && (asked.press === '' || kept.pressId === asked.press) && (asked.repeats === '' || kept.repeatsId === asked.repeats)
    return fits ? kept : newPlan(newId, asked.press, asked.repeats)
  })
  const form = useForm({
    resolver: draftResolver(openTestRequestSchema, (draft: PlanDraft) => toRequest(draft, stamp(), lookup)),
    defaultValues: initial,
  })
  return { form, finish: useKeptDraft(form, name, VERSION) }
}

export type PlanForm = ReturnType<typeof usePlanForm>['form']
