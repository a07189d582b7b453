import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import type { Attachment } from '#shared/ledger/envelope'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import type { PressState, Repair } from '#shared/press/state'
import { PhotoField } from '../../../../components/attachments/photo-field'
import { Button } from '../../../../components/button'
import { CheckRow } from '../../../../components/check-row'
import { TextArea, TextField } from '../../../../components/field'
import { Form, FormActions, FormError } from '../../../../components/form'
import { useUser } from '../../../../lib/here'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import { JointChoice } from './joint-choice'
import type { Chosen, Sending } from './sending'

type RepairFormProps = Sending & { pressId: string; repair: Repair; onDone: () => void }

const noteSchema = PRESS_PAYLOADS['repair-noted'].pick({ note: true, doneBy: true })

/** One piece of work on a repair, by whoever did it. */
export function RepairNoteForm({ pressId, repair, send, busy, onDone }: RepairFormProps) {
  const user = useUser()
  const form = useForm({ resolver: zodResolver(noteSchema), defaultValues: { note: '', doneBy: user.name } })
  const [photos, setPhotos] = useState<Attachment[]>([])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  return (
    <Form
      className="mt-3"
      onSubmit={form.handleSubmit((payload) =>
        send([{ kind: 'repair-noted', payload: { repairId: repair.id, ...payload }, attachments: photos }], { onSuccess: onDone, onError }),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextArea label="What was done" message={errors.note?.message} {...form.register('note')} />
      <TextField label="Done by" className="tablet:max-w-80" message={errors.doneBy?.message} {...form.register('doneBy')} />
      <PhotoField label="Photos or documents" owner={`ledger:${pressId}`} chosen={photos} onChange={setPhotos} />
      <FormActions>
        <Button type="submit" kind="next" busy={busy && 'Writing it down'}>
          This was done
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

const closeSchema = PRESS_PAYLOADS['repair-closed'].pick({ done: true, doneBy: true })

/** The end of a repair: its joints are examined again after it. */
export function RepairCloseForm({ pressId, repair, send, busy, onDone }: RepairFormProps) {
  const user = useUser()
  const last = repair.notes.at(-1)
  const form = useForm({ resolver: zodResolver(closeSchema), defaultValues: { done: '', doneBy: last?.doneBy ?? user.name } })
  const [photos, setPhotos] = useState<Attachment[]>([])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  return (
    <Form
      className="mt-3"
      onSubmit={form.handleSubmit((payload) =>
        send([{ kind: 'repair-closed', payload: { repairId: repair.id, ...payload }, attachments: photos }], {
          onSuccess: onDone,
          onError,
        }),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextArea
        label="What was done, all in all"
        hint="It prints in the history of the press. The joints concerned are examined again after it."
        message={errors.done?.message}
        {...form.register('done')}
      />
      <TextField label="Done by" className="tablet:max-w-80" message={errors.doneBy?.message} {...form.register('doneBy')} />
      <PhotoField label="Photos or documents" owner={`ledger:${pressId}`} chosen={photos} onChange={setPhotos} />
      <FormActions>
        <Button type="submit" kind="next" busy={busy && 'Closing it'} note="its joints are examined again">
          The repair is done
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

const openSchema = PRESS_PAYLOADS['repair-opened'].pick({ why: true })

/** Somebody saw something that has to be put right before the press is loaded again. */
export function RepairOpenForm({
  state,
  chosen,
  onToggle,
  send,
  busy,
  onDone,
  onLeave,
}: Sending & Chosen & { state: PressState; onDone: () => void; onLeave: () => void }) {
  const form = useForm({ resolver: zodResolver(openSchema), defaultValues: { why: '' } })
  const [photos, setPhotos] = useState<Attachment[]>([])
  const [memberIds, setMemberIds] = useState<readonly string[]>([])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  const members = state.description?.members ?? []
  const toggleMember = (id: string) =>
    setMemberIds((before) => (before.includes(id) ? before.filter((one) => one !== id) : [...before, id]))
  return (
    <Form
      onSubmit={form.handleSubmit((payload) =>
        send([{ kind: 'repair-opened', payload: { ...payload, jointIds: [...chosen], memberIds: [...memberIds] }, attachments: photos }], {
          onSuccess: onDone,
          onError,
        }),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <TextArea
        label="What has to be put right"
        hint="A clearance in force ends with it, and no proof test opens before the repair is closed."
        message={errors.why?.message}
        {...form.register('why')}
      />
      <JointChoice
        legend="Joints concerned"
        hint="Tap them here or on the drawing. They fall back to unexamined."
        joints={state.joints.filter((joint) => !joint.retired).sort((a, b) => a.number - b.number)}
        chosen={chosen}
        onToggle={onToggle}
      />
      {members.length > 0 && (
        <fieldset>
          <legend className="font-medium">Members concerned</legend>
          <div className="grid gap-x-6 tablet:grid-cols-2">
            {members.map((member) => (
              <CheckRow
                key={member.id}
                className="border-b border-hairline"
                label={member.name}
                value={member.id}
                checked={memberIds.includes(member.id)}
                onChange={() => toggleMember(member.id)}
              />
            ))}
          </div>
        </fieldset>
      )}
      <PhotoField label="Photos or documents" owner={`ledger:${state.id}`} chosen={photos} onChange={setPhotos} />
      <FormActions>
        <Button
          type="submit"
          kind="next"
          busy={busy && 'Writing it down'}
          note={state.clearance.is === 'cleared' ? 'the clearance ends with it' : undefined}
        >
          A repair is wanted
        </Button>
        <Button onClick={onLeave}>Leave it</Button>
      </FormActions>
    </Form>
  )
}
