import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import type { Attachment } from '#shared/ledger/envelope'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import { nameJoints, neighboursOf } from '#shared/press/joints'
import type { PressJoint } from '#shared/press/state'
import { PhotoField } from '../../../../components/attachments/photo-field'
import { Button } from '../../../../components/button'
import { TextField } from '../../../../components/field'
import { Form, FormActions, FormError } from '../../../../components/form'
import { RadioRow } from '../../../../components/radio-row'
import { SelectField } from '../../../../components/select-field'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import type { PressWriting } from '../../api/append-to-press'
import { makeUpChoices, methodChoices } from '../words'

type Send = (drafts: PressWriting[], answers: { onSuccess: () => void; onError: (error: unknown) => void }) => void
type ActionProps = { pressId: string; joint: PressJoint; joints: readonly PressJoint[]; send: Send; busy: boolean; onDone: () => void }

/** "2026-09-14T10:30" as the browser's own field writes it, where the reader is. */
function localMoment(moment: Date): string {
  return new Date(moment.getTime() - moment.getTimezoneOffset() * 60_000).toISOString().slice(0, 16)
}

const workSchema = z.object({
  makeUp: PRESS_PAYLOADS['joint-worked'].shape.makeUp,
  how: PRESS_PAYLOADS['joint-worked'].shape.how,
  workedAt: z.string().min(1, 'Say when the work was done: a weld is examined 12 hours after it.'),
})

function WorkForm({ pressId, joint, joints, send, busy, onDone }: ActionProps) {
  const form = useForm({
    resolver: zodResolver(workSchema),
    defaultValues: { makeUp: 'finished' as const, how: '', workedAt: localMoment(new Date()) },
  })
  const [photos, setPhotos] = useState<Attachment[]>([])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  const touched = neighboursOf(joints, joint.id)
  return (
    <Form
      onSubmit={form.handleSubmit(({ makeUp, how, workedAt }) =>
        send(
          [
            {
              kind: 'joint-worked',
              payload: { jointId: joint.id, makeUp, how, workedAt: new Date(workedAt).toISOString(), test: null },
              attachments: photos,
            },
          ],
          {
            onSuccess: onDone,
            onError,
          },
        ),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <RadioRow
        label={`Joint ${joint.number} is now`}
        choices={makeUpChoices}
        message={errors.makeUp?.message}
        {...form.register('makeUp')}
      />
      <div className="grid gap-4">
        <TextField label="How" optional placeholder="welded out, E7018" message={errors.how?.message} {...form.register('how')} />
        <TextField label="When the work was done" type="datetime-local" message={errors.workedAt?.message} {...form.register('workedAt')} />
      </div>
      <PhotoField label="Photos" owner={`ledger:${pressId}`} chosen={photos} onChange={setPhotos} />
      {touched.length > 0 && (
        <p className="text-graphite">
          It shares members with {nameJoints(touched.map(({ number }) => number))}: {touched.length === 1 ? 'it is' : 'they are'} examined
          again after.
        </p>
      )}
      <FormActions>
        <Button type="submit" busy={busy && 'Writing it down'}>
          {`Joint ${joint.number} was worked on`}
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

const examinedSchema = PRESS_PAYLOADS['joint-examined'].pick({ method: true, result: true, remark: true })

function ExamineForm({ pressId, joint, send, busy, onDone }: ActionProps) {
  const form = useForm({
    resolver: zodResolver(examinedSchema),
    defaultValues: { method: 'visual' as const, result: undefined, remark: '' },
  })
  const [photos, setPhotos] = useState<Attachment[]>([])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  return (
    <Form
      onSubmit={form.handleSubmit((payload) =>
        send([{ kind: 'joint-examined', payload: { jointId: joint.id, ...payload, test: null }, attachments: photos }], {
          onSuccess: onDone,
          onError,
        }),
      )}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <div className="grid items-start gap-4">
        <SelectField label="Examined by" choices={methodChoices} {...form.register('method')} />
        <RadioRow
          label={`Joint ${joint.number} was`}
          choices={[
            { value: 'accepted', label: 'Accepted' },
            { value: 'rejected', label: 'Rejected' },
          ]}
          message={errors.result && 'Say what was found.'}
          {...form.register('result')}
        />
      </div>
      <TextField label="What was seen" optional message={errors.remark?.message} {...form.register('remark')} />
      <PhotoField label="Photos" owner={`ledger:${pressId}`} chosen={photos} onChange={setPhotos} />
      <FormActions>
        <Button type="submit" busy={busy && 'Writing it down'}>
          {`Joint ${joint.number} was examined`}
        </Button>
        <Button onClick={onDone}>Leave it</Button>
      </FormActions>
    </Form>
  )
}

/** Work on one joint, and its examination. A test walks every joint down again in any case. */
export function JointActions(props: Omit<ActionProps, 'onDone'>) {
  const [open, setOpen] = useState<'work' | 'examine' | null>(null)
  const done = () => setOpen(null)
  const { joint } = props
  if (open === 'work') return <WorkForm {...props} onDone={done} />
  if (open === 'examine') return <ExamineForm {...props} onDone={done} />
  return (
    <div className="mt-2 flex flex-wrap gap-3">
      <Button size="line" onClick={() => setOpen('work')}>
        {joint.makeUp === 'finished' ? 'It was worked on' : joint.kind === 'weld' ? 'It is welded out' : 'It is made up'}
      </Button>
      {joint.makeUp === 'finished' && (
        <Button size="line" onClick={() => setOpen('examine')}>
          It was examined
        </Button>
      )}
    </div>
  )
}
