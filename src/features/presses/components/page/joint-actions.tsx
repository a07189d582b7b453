import { zodResolver } from '@hookform/resolvers/zod'
import { useState } from 'react'
import { useForm } from 'react-hook-form'
import { z } from 'zod'
import type { Attachment } from '#shared/ledger/envelope'
import { PRESS_PAYLOADS } from '#shared/press/entries'
import { nameJoints, neighboursOf } from '#shared/press/joints'
import type { PressJoint, PressState } from '#shared/press/state'
import { PhotoField } from '../../../../components/attachments/photo-field'
import { Button } from '../../../../components/button'
import { TextField } from '../../../../components/field'
import { Form, FormActions, FormError } from '../../../../components/form'
import { RadioRow } from '../../../../components/radio-row'
import { SelectField } from '../../../../components/select-field'
import { useProblemFields } from '../../../../lib/use-problem-fields'
import { useCan } from '../../../../lib/here'
import { makeUpChoices, methodChoices } from '../words'
import { DescribeJointForm, PlaceJointForm, RetireJointForm, SplitJointForm, type Spotting } from './joint-shape-forms'
import type { Sending } from './sending'

type ActionProps = Sending & { pressId: string; joint: PressJoint; joints: readonly PressJoint[]; onDone: () => void }

/** "2026-09-14T10:30" as the browser's own field writes it, where the reader is. */
function localMoment(moment: Date): string {
  return new Date(moment.getTime() - moment.getTimezoneOffset() * 60_000).toISOString().slice(0, 16)
}

const workSchema = z.object({
  makeUp: PRESS_PAYLOADS['joint-worked'].shape.makeUp,
  how: PRESS_PAYLOADS['joint-worked'].shape.how,
  workedAt: z.string().min(1, 'Say when the work was done: a weld is examined 12 hours after it.'),
})

/** What was done to a joint, and how far it is made up now. */
export function WorkForm({ pressId, joint, joints, send, busy, onDone }: ActionProps) {
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

const examinedSchema = PRESS_PAYLOADS['joint-examined']
  .pick({ method: true, result: true, remark: true })
  .extend({ early: z.string().trim().max(500) })

const HOURS_AFTER_WELDING = 12

/** Hours since a weld was made, while it is too fresh to be examined without a reason (rule P8); null otherwise. */
function hoursFresh({ kind, workedAt }: PressJoint, now: Date): number | null {
  if (kind !== 'weld' || workedAt === null) return null
  const hours = (now.getTime() - Date.parse(workedAt)) / 3_600_000
  return hours < HOURS_AFTER_WELDING ? Math.max(0, hours) : null
}

/** How a joint was looked at and what was found. */
export function ExamineForm({ pressId, joint, send, busy, onDone }: ActionProps) {
  const form = useForm({
    resolver: zodResolver(examinedSchema),
    defaultValues: { method: 'visual' as const, result: undefined, remark: '', early: '' },
  })
  const [photos, setPhotos] = useState<Attachment[]>([])
  const { errors, submitCount } = form.formState
  const onError = useProblemFields(form)
  const fresh = hoursFresh(joint, new Date())
  return (
    <Form
      onSubmit={form.handleSubmit(({ early, ...payload }) => {
        const asked = fresh !== null && payload.result === 'accepted'
        if (asked && early.length < 3) {
          form.setError('early', { message: 'Say why in a few words, or wait until the 12 hours are over.' }, { shouldFocus: true })
          return
        }
        send(
          [
            {
              kind: 'joint-examined',
              payload: { jointId: joint.id, ...payload, test: null },
              attachments: photos,
              overrides: asked ? [{ rule: 'P8', reason: early }] : [],
            },
          ],
          { onSuccess: onDone, onError },
        )
      })}
    >
      <FormError message={errors.root?.message} attempt={submitCount} />
      <div className="grid items-start gap-4">
        <SelectField label="Examined by" choices={methodChoices} {...form.register('method')} />
        <RadioRow
          label={`Joint ${joint.number} was`}
          choices={[
            { value: 'accepted', label: 'Accepted' },
            { value: 'rejected', label: 'Rejected', note: 'it opens a repair' },
          ]}
          message={errors.result && 'Say what was found.'}
          {...form.register('result')}
        />
      </div>
      {fresh !== null && (
        <TextField
          label={`Why it is examined now, ${fresh.toFixed(1)} hours after welding`}
          hint="A weld is examined 12 hours after it: a crack may come later than the weld."
          message={errors.early?.message}
          {...form.register('early')}
        />
      )}
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

type Open = 'work' | 'examine' | 'describe' | 'split' | 'retire' | 'place' | null

type JointActionsProps = Sending & { state: PressState; joint: PressJoint; joints: readonly PressJoint[]; spotting: Spotting }

/** What can be done to one joint. A test walks every joint down again in any case. */
export function JointActions({ state, joint, joints, spotting, send, busy }: JointActionsProps) {
  const can = useCan()
  const [open, setOpen] = useState<Open>(null)
  const onDone = () => setOpen(null)
  const shape = { state, joint, spotting, send, busy, onDone }
  const work = { pressId: state.id, joint, joints, send, busy, onDone }
  switch (open) {
    case 'work':
      return <WorkForm {...work} />
    case 'examine':
      return <ExamineForm {...work} />
    case 'describe':
      return <DescribeJointForm {...shape} />
    case 'split':
      return <SplitJointForm {...shape} />
    case 'retire':
      return <RetireJointForm {...shape} />
    case 'place':
      return <PlaceJointForm {...shape} />
    case null:
      return (
        <div className="mt-2 flex flex-wrap gap-3">
          {can('press:record') && (
            <Button size="line" onClick={() => setOpen('work')}>
              {joint.makeUp === 'finished' ? 'It was worked on' : joint.kind === 'weld' ? 'It is welded out' : 'It is made up'}
            </Button>
          )}
          {can('press:record') && joint.makeUp === 'finished' && (
            <Button size="line" onClick={() => setOpen('examine')}>
              It was examined
            </Button>
          )}
          {can('press:describe') && (
            <>
              <Button size="line" onClick={() => setOpen('describe')}>
                Describe it
              </Button>
              <Button size="line" onClick={() => setOpen('place')}>
                Place it on the drawing
              </Button>
              <Button size="line" onClick={() => setOpen('split')}>
                Split it
              </Button>
              <Button size="line" onClick={() => setOpen('retire')}>
                Retire it
              </Button>
            </>
          )}
        </div>
      )
  }
}
