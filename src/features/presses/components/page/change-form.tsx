import { useEffect, useState } from 'react'
import { useForm, useWatch } from 'react-hook-form'
import { changeRule, type Touches } from '#shared/press/changes'
import type { Attachment } from '#shared/ledger/envelope'
import { PRESS_PAYLOADS, type PressChange } from '#shared/press/entries'
import type { PressState } from '#shared/press/state'
import { PhotoField } from '../../../../components/attachments/photo-field'
import { Button } from '../../../../components/button'
import { TextArea } from '../../../../components/field'
import { Form, FormActions, FormError } from '../../../../components/form'
import { RadioRow } from '../../../../components/radio-row'
import { draftResolver } from '../../../../lib/draft-resolver'
import { useUser } from '../../../../lib/here'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import { changeChoices } from '../words'
import { ChangeEffect } from './change-effect'
import { JointChoice } from './joint-choice'
import { dropKeptChange, keepChange, readKeptChange } from '../../kept-change'
import type { Chosen, Sending } from './sending'

const HINTS: Record<Touches, string> = {
  'every joint': 'It reaches every joint. Mark those where something can be seen.',
  'the joints named, or every joint':
    'Tap them here or on the drawing. Leave all empty when you are not sure: every joint is examined again then.',
  'what can work loose': 'Mark others that it touched, beside those that can work loose.',
  'what holds the ram': 'Mark others that it touched, beside those that hold the ram.',
  'no joint': 'Mark those that lie under the paint.',
}

const schema = PRESS_PAYLOADS.changed.omit({ jointIds: true })

/** A row of radios of which none is chosen reads as null. */
type ChangeFields = { change: PressChange['change'] | null | undefined; why: string }

type ChangeFormProps = Sending & Chosen & { state: PressState; onDone: () => void; onLeave: () => void }

/** What was done to the press, or befell it, and before it is entered what that does. What was begun outlives a reload. */
export function ChangeForm({ state, chosen, onToggle, send, busy, onDone, onLeave }: ChangeFormProps) {
  const user = useUser()
  const [kept] = useState(() => readKeptChange(state.id, user.id))
  const form = useForm({
    resolver: draftResolver(schema, (fields: ChangeFields) => fields),
    defaultValues: { change: kept?.change, why: kept?.why ?? '' },
  })
  const [photos, setPhotos] = useState<Attachment[]>(kept?.photos ?? [])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  const [typed, why] = useWatch({ control: form.control, name: ['change', 'why'] })
  const change = typed ?? undefined
  useEffect(
    () => keepChange(state.id, user.id, { change, why, jointIds: chosen, photos }),
    [state.id, user.id, change, why, chosen, photos],
  )
  const joints = state.joints.filter((joint) => !joint.retired).sort((a, b) => a.number - b.number)
  const ends = change !== undefined && state.clearance.is === 'cleared' && changeRule(change).clearance
  const note =
    ends === 'ends' ? 'the clearance ends with it' : ends === 'waits for the joints' ? 'the clearance waits from then on' : undefined
  const leave = (then: () => void) => () => {
    dropKeptChange(state.id, user.id)
    then()
  }
  return (
    <Form
      onSubmit={form.handleSubmit((payload) =>
        send([{ kind: 'changed', payload: { ...payload, jointIds: [...chosen] }, attachments: photos }], {
          onSuccess: leave(onDone),
          onError,
        }),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <div className="grid items-start gap-x-8 gap-y-4 tablet:grid-cols-[17rem_minmax(0,1fr)]">
        <RadioRow
          label="What happened"
          stacked
          choices={changeChoices}
          message={errors.change && 'Choose what happened.'}
          {...form.register('change')}
        />
        <div className="grid gap-4">
          <ChangeEffect state={state} change={change} jointIds={chosen} />
          <JointChoice
            legend="Joints it touched"
            hint={change ? HINTS[changeRule(change).touches] : HINTS['the joints named, or every joint']}
            joints={joints}
            chosen={chosen}
            onToggle={onToggle}
          />
        </div>
      </div>
      <TextArea label="What was done, in a few words" message={errors.why?.message} {...form.register('why')} />
      <PhotoField label="Photos or documents" owner={`ledger:${state.id}`} chosen={photos} onChange={setPhotos} />
      <FormActions>
        <Button type="submit" kind="next" busy={busy && 'Reporting it'} note={note}>
          Report this change
        </Button>
        <Button onClick={leave(onLeave)}>Leave it</Button>
      </FormActions>
    </Form>
  )
}
