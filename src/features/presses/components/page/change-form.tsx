import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import type { Attachment } from '#shared/ledger/envelope'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import type { PressJoint } from '#shared/press/state'
import { PhotoField } from '../../../../components/attachments/photo-field'
import { Button } from '../../../../components/button'
import { CheckRow } from '../../../../components/check-row'
import { TextArea } from '../../../../components/field'
import { Form, FormActions, FormError } from '../../../../components/form'
import { RadioRow } from '../../../../components/radio-row'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import type { PressWriting } from '../../api/append-to-press'
import { changeChoices } from '../words'

type Send = { send: (drafts: PressWriting[], answers: { onSuccess: () => void; onError: (error: unknown) => void }) => void; busy: boolean }
type ChangeFormProps = Send & { pressId: string; joints: readonly PressJoint[]; cleared: boolean; onDone: () => void }

/** What was done to the press, or befell it. It ends a clearance at once, except for paint. */
export function ChangeForm({ pressId, joints, cleared, send, busy, onDone }: ChangeFormProps) {
  const form = useForm({
    resolver: zodResolver(PRESS_PAYLOADS.changed),
    defaultValues: { change: undefined, jointIds: [], why: '' },
  })
  const [photos, setPhotos] = useState<Attachment[]>([])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  return (
    <Form
      onSubmit={form.handleSubmit((payload) => send([{ kind: 'changed', payload, attachments: photos }], { onSuccess: onDone, onError }))}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <RadioRow
        label="What happened"
        stacked
        choices={changeChoices}
        message={errors.change && 'Choose what happened.'}
        {...form.register('change')}
      />
      <fieldset>
        <legend className="font-medium">Joints it touched</legend>
        <p className="text-graphite">Leave all empty when you are not sure: every joint is examined again then.</p>
        <div className="grid tablet:grid-cols-2">
          {joints.map((joint) => (
            <CheckRow key={joint.id} label={`${joint.number} ${joint.name}`} value={joint.id} {...form.register('jointIds')} />
          ))}
        </div>
      </fieldset>
      <TextArea label="What was done, in a few words" message={errors.why?.message} {...form.register('why')} />
      <PhotoField label="Photos or documents" owner={`ledger:${pressId}`} chosen={photos} onChange={setPhotos} />
      <FormActions>
        <Button type="submit" kind="next" busy={busy && 'Reporting it'} note={cleared ? 'the clearance ends with it' : undefined}>
          Report this change
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

/** Takes the clearance away, with the reason. */
export function WithdrawForm({ send, busy, onDone }: Send & { onDone: () => void }) {
  const form = useForm({ resolver: zodResolver(PRESS_PAYLOADS.withdrawn), defaultValues: { why: '' } })
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  return (
    <Form onSubmit={form.handleSubmit((payload) => send([{ kind: 'withdrawn', payload }], { onSuccess: onDone, onError }))}>
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextArea label="Why the press is not to be used" message={errors.why?.message} {...form.register('why')} />
      <FormActions>
        <Button type="submit" kind="stop" busy={busy && 'Withdrawing it'}>
          Withdraw it from use
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}
