import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { v7 as newId } from 'uuid'
import type { FrameKind } from '#shared/press/model'
import { dropDraft, readDraft } from '../../../../lib/drafts'
import { draftResolver } from '../../../../lib/draft-resolver'
import { useKeptDraft } from '../../../../lib/use-kept-draft'
import { isProposal, pressFormSchema, proposal, toPayload, type PressFormDraft } from './draft'

/** Goes up when the form's fields change, so that an older draft isn't poured into it. */
const VERSION = 1

/** A form over a whole press: its draft outlives a reload under `name`, and its ids are made once. */
export function usePressForm(name: string, initial: () => PressFormDraft) {
  const [kept] = useState(() => readDraft<PressFormDraft>(name, VERSION))
  const form = useForm({
    resolver: draftResolver(pressFormSchema, toPayload),
    defaultValues: kept ?? initial(),
  })
  const { getValues, setValue, reset } = form
  /** Nothing is kept from here on: the press is in the register. */
  const finish = useKeptDraft(form, name, VERSION)
  return {
    form,
    restored: kept !== undefined,
    finish,
    beginAnew() {
      dropDraft(name)
      reset(initial())
    },
    /** Another kind of frame proposes its own members and joints, unless somebody has changed the list already. */
    chooseKind(before: FrameKind | '', kind: FrameKind): boolean {
      const { description, joints } = getValues()
      if (!isProposal(before, { members: description.members, joints })) return false
      const proposed = proposal(kind, newId)
      setValue('description.members', proposed.members)
      setValue('joints', proposed.joints)
      return true
    },
  }
}

export type PressForm = ReturnType<typeof usePressForm>['form']
